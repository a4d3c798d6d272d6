import { dirname, join, resolve } from 'node:path';
import { DiskError, diskErrorOf, systemCode } from './disk-error.ts';
import { DISK, type DiskOperations } from './disk-operations.ts';
import { assertFileNames } from './file-names.ts';
import { replaceAll } from './replace-all.ts';
import { addTemporary, forgetTemporary, temporaryName } from './temporaries.ts';

export { DiskError } from './disk-error.ts';
export { removeTemporaries } from './temporaries.ts';

/** How often another temporary name is tried when one is taken by what an earlier crash left behind. */
const NAME_TRIES = 1000;

export interface NamedBytes {
  readonly name: string;
  readonly bytes: Uint8Array;
}

export interface WriteOptions {
  /** Operations to use instead of the real ones, for tests. */
  readonly fs?: Partial<DiskOperations>;
  /** Called with what was read back, before any file gets its name; what it throws calls everything off. */
  readonly onVerify?: (name: string, bytes: Uint8Array) => void;
}

/**
 * Writes several files into a folder, all or none. Each goes to a hidden temporary file first, is forced to the disk,
 * read back and compared; only when all are good do they get their names, replacing files that had them. If anything
 * fails, the temporary files are removed, what was replaced is put back, and a folder that was made for the files is
 * removed again.
 * @param folder made if it does not exist, with those above it.
 * @throws DiskError in plain words; whatever `onVerify` throws, unchanged.
 */
export async function writeFiles(
  folder: string,
  files: readonly NamedBytes[],
  options: WriteOptions = {},
): Promise<void> {
  assertFileNames(files.map(({ name }) => name));
  if (files.length === 0) return;
  const disk: DiskOperations = { ...DISK, ...options.fs };
  const made = await makeFolder(disk, folder);
  const temporaries: string[] = [];
  try {
    for (const { name } of files) await assertReplaceable(disk, join(folder, name));
    for (const { name, bytes } of files) {
      const temporary = await writeTemporary(disk, folder, name, bytes, temporaries);
      const read = await readBack(disk, temporary, join(folder, name), bytes);
      options.onVerify?.(name, read);
    }
    replaceAll(
      disk,
      files.map(({ name }, i) => ({ temporary: temporaries[i]!, target: join(folder, name) })),
    );
  } catch (error) {
    for (const temporary of temporaries) quietly(() => disk.remove(temporary));
    if (made !== undefined) removeMade(disk, folder, made);
    throw error;
  } finally {
    for (const temporary of temporaries) forgetTemporary(temporary);
  }
  await disk.syncFolder(folder).catch(() => undefined); // some systems cannot force a folder; the files are there
}

/** The first folder that had to be made, if any. */
async function makeFolder(disk: DiskOperations, folder: string): Promise<string | undefined> {
  try {
    return await disk.makeFolder(folder);
  } catch (error) {
    throw diskErrorOf(error, `Cannot make the folder ${folder}`);
  }
}

async function assertReplaceable(disk: DiskOperations, target: string): Promise<void> {
  try {
    const kind = await disk.kindOf(target);
    if (kind === 'folder')
      throw new DiskError('isFolder', `Cannot write ${target}: a folder has that name. Choose another name.`);
    if (kind === 'other')
      throw new DiskError('notFile', `Cannot write ${target}: it is a device, not a file. Choose another name.`);
    if (kind === 'file') await disk.assertWritable(target);
  } catch (error) {
    if (systemCode(error) === 'ENOENT') return; // a link that leads nowhere: the file will take its place
    throw diskErrorOf(error, `Cannot write ${target}`);
  }
}

async function writeTemporary(
  disk: DiskOperations,
  folder: string,
  name: string,
  bytes: Uint8Array,
  temporaries: string[],
): Promise<string> {
  for (let attempt = 1; ; attempt++) {
    const temporary = join(folder, temporaryName());
    addTemporary(temporary);
    try {
      await disk.writeNew(temporary, bytes);
      temporaries.push(temporary);
      return temporary;
    } catch (error) {
      if (systemCode(error) !== 'EEXIST') temporaries.push(temporary);
      else forgetTemporary(temporary);
      if (systemCode(error) !== 'EEXIST' || attempt === NAME_TRIES)
        throw diskErrorOf(error, `Cannot write ${join(folder, name)}`);
    }
  }
}

async function readBack(
  disk: DiskOperations,
  temporary: string,
  target: string,
  bytes: Uint8Array,
): Promise<Uint8Array> {
  try {
    const read = await disk.read(temporary);
    if (Buffer.compare(read, bytes) === 0) return read;
  } catch (error) {
    throw diskErrorOf(error, `Cannot read back ${target}`);
  }
  const what = 'what was read back differs from what was written. Choose another disk and check this one.';
  throw new DiskError('notAsWritten', `Cannot write ${target}: ${what}`);
}

/** Removes the folders that were made, from `folder` up to `first`, as long as they are empty. */
function removeMade(disk: DiskOperations, folder: string, first: string): void {
  const top = resolve(first);
  for (let path = resolve(folder); path.length >= top.length; path = dirname(path)) {
    try {
      disk.removeFolder(path);
    } catch {
      return; // someone else has put something into it
    }
    if (path === top) return;
  }
}

function quietly(action: () => void): void {
  try {
    action();
  } catch {
    // It is not there, or the disk is gone: the error that led here says more.
  }
}
