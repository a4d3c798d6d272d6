import { basename, dirname, join } from 'node:path';
import { DiskError, diskErrorOf, systemCode } from './disk-error.ts';
import type { DiskOperations } from './disk-operations.ts';
import { forgetTemporary, temporaryName } from './temporaries.ts';

/** A finished file and the name that it is to get. */
export interface Replacement {
  readonly temporary: string;
  readonly target: string;
}

/** A name that has been given, and where the file that had it before is kept. */
interface Done {
  readonly target: string;
  readonly kept: string | undefined;
}

/**
 * Gives all files their names, or none. Files that had the names are kept aside until all is done, and put back if a
 * renaming fails. All in one go, without awaiting: no signal handler of this process sees the middle of it.
 * @throws DiskError
 */
export function replaceAll(disk: DiskOperations, replacements: readonly Replacement[]): void {
  const done: Done[] = [];
  for (const { temporary, target } of replacements) {
    let kept: string | undefined;
    try {
      kept = keepAside(disk, target);
      disk.rename(temporary, target);
      forgetTemporary(temporary);
      done.push({ target, kept });
    } catch (error) {
      const stuck = [...(kept === undefined ? [] : putBack(disk, { target, kept })), ...undo(disk, done)];
      throw withStuck(diskErrorOf(error, `Cannot write ${target}`), stuck);
    }
  }
  for (const { kept } of done) if (kept !== undefined) removeKept(disk, kept);
}

/** Keeps the present file of that name under a hidden one; answers with nothing if there is no such file. */
function keepAside(disk: DiskOperations, target: string): string | undefined {
  const kept = join(dirname(target), temporaryName());
  try {
    disk.keepAs(target, kept);
    return kept;
  } catch (error) {
    if (systemCode(error) === 'ENOENT') return undefined;
    throw error;
  }
}

/** Undoes the last first; answers with what could not be undone. */
function undo(disk: DiskOperations, done: readonly Done[]): string[] {
  return done.toReversed().flatMap((step) => putBack(disk, step));
}

function putBack(disk: DiskOperations, { target, kept }: Done): string[] {
  try {
    if (kept === undefined) disk.remove(target);
    else disk.rename(kept, target);
    if (kept !== undefined) removeKept(disk, kept);
    return [];
  } catch {
    return [kept === undefined ? `${target} is new` : `the former ${basename(target)} is now ${kept}`];
  }
}

/** Renaming a file to its own second name leaves both names; a name that is gone already is no fault. */
function removeKept(disk: DiskOperations, kept: string): void {
  try {
    disk.remove(kept);
  } catch {
    // Gone already, or left behind hidden: the files themselves are all in place.
  }
}

function withStuck(error: DiskError, stuck: readonly string[]): DiskError {
  if (stuck.length === 0) return error;
  const message = `${error.message} Moreover, not everything could be put back: ${stuck.join('; ')}.`;
  return new DiskError(error.code, message, error.cause);
}
