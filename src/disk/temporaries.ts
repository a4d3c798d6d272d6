import { unlinkSync } from 'node:fs';

/** The temporary files that exist at this moment. */
const live = new Set<string>();
let made = 0;

/** A hidden name that no other call and no other running process uses. `addTemporary` makes the file count as live. */
export function temporaryName(): string {
  return `.goniolith-${process.pid}-${++made}.part`;
}

export function addTemporary(path: string): void {
  live.add(path);
}

/** To be called when the file has been renamed or removed. */
export function forgetTemporary(path: string): void {
  live.delete(path);
}

/**
 * Removes all temporary files of this process, at once: for handlers of SIGINT and SIGTERM, before they exit. What
 * cannot be removed is passed over, because nothing could be done about it there.
 */
export function removeTemporaries(): void {
  for (const path of live) {
    live.delete(path);
    try {
      unlinkSync(path);
    } catch {
      // Not written yet, or the disk is gone.
    }
  }
}
