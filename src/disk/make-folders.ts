import { mkdir, stat } from 'node:fs/promises';
import { dirname, resolve } from 'node:path';
import { systemCode } from './disk-error.ts';

/**
 * Makes a folder and those above it that are missing; answers with the first one that was made, if any. Node's own
 * recursive `mkdir` never ends where the system says that a new folder's parent is not there (below /proc).
 */
export async function makeFolders(path: string): Promise<string | undefined> {
  const missing: string[] = [];
  for (let folder = resolve(path); !(await isFolder(folder)); folder = dirname(folder)) missing.unshift(folder);
  for (const folder of missing) await mkdir(folder).catch((error: unknown) => unlessMadeMeanwhile(folder, error));
  return missing[0];
}

/** @throws the system's error when something that is no folder stands there */
async function isFolder(path: string): Promise<boolean> {
  try {
    if ((await stat(path)).isDirectory()) return true;
  } catch (error) {
    if (systemCode(error) === 'ENOENT') return false;
    throw error;
  }
  throw Object.assign(new Error(`${path} is no folder`), { code: 'EEXIST' });
}

async function unlessMadeMeanwhile(folder: string, error: unknown): Promise<void> {
  if (systemCode(error) !== 'EEXIST' || !(await isFolder(folder))) throw error;
}
