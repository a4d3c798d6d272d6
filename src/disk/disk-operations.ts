import { linkSync, lstatSync, renameSync, rmdirSync, unlinkSync } from 'node:fs';
import { access, constants, lstat, open, readFile } from 'node:fs/promises';
import { systemCode } from './disk-error.ts';
import { makeFolders } from './make-folders.ts';

/** What `writeFiles` asks of the file system; tests put failing ones in place of these. */
export interface DiskOperations {
  /** Makes a folder and those above it; answers with the first one that was made, if any. */
  readonly makeFolder: (path: string) => Promise<string | undefined>;
  /** What is at the path; a link counts as a file. */
  readonly kindOf: (path: string) => Promise<'nothing' | 'file' | 'folder' | 'other'>;
  readonly assertWritable: (path: string) => Promise<void>;
  /** Writes a file that must not exist yet, and has it on the disk before it answers. */
  readonly writeNew: (path: string, bytes: Uint8Array) => Promise<void>;
  readonly read: (path: string) => Promise<Uint8Array>;
  /** Gives a file a second name, which must be free; its first name stays or goes. */
  readonly keepAs: (path: string, second: string) => void;
  readonly rename: (from: string, to: string) => void;
  readonly remove: (path: string) => void;
  readonly removeFolder: (path: string) => void;
  /** Has the folder's names on the disk. */
  readonly syncFolder: (path: string) => Promise<void>;
}

/** The real file system. */
export const DISK: DiskOperations = {
  makeFolder: makeFolders,
  kindOf: async (path) => {
    try {
      const found = await lstat(path);
      if (found.isDirectory()) return 'folder';
      return found.isFile() || found.isSymbolicLink() ? 'file' : 'other';
    } catch (error) {
      if (systemCode(error) === 'ENOENT') return 'nothing';
      throw error;
    }
  },
  assertWritable: (path) => access(path, constants.W_OK),
  writeNew: async (path, bytes) => {
    const file = await open(path, 'wx');
    try {
      await file.writeFile(bytes);
      await file.sync();
    } finally {
      await file.close();
    }
  },
  read: (path) => readFile(path),
  keepAs: (path, second) => {
    try {
      linkSync(path, second);
    } catch (error) {
      // Some disks (FAT) know no second names; there the file is renamed, and missing for a moment.
      if (systemCode(error) === 'EEXIST' || lstatSync(second, { throwIfNoEntry: false })) throw error;
      renameSync(path, second);
    }
  },
  rename: renameSync,
  remove: unlinkSync,
  removeFolder: rmdirSync,
  syncFolder: async (path) => {
    const folder = await open(path, 'r');
    try {
      await folder.sync();
    } finally {
      await folder.close();
    }
  },
};
