import { constants } from 'node:fs';
import { access, open, readdir, stat } from 'node:fs/promises';
import { basename, dirname } from 'node:path';
import { nearest } from '../crystal/nearest.ts';
import { DiskError, diskErrorOf, systemCode } from './disk-error.ts';

export { decodeText } from './decode-text.ts';

export interface InputOptions {
  /** The most bytes that are accepted. */
  readonly limit: number;
  /** Read for `-` instead of the process's standard input, for tests. */
  readonly standardInput?: AsyncIterable<Uint8Array | string>;
}

/**
 * All bytes of a file, or of standard input for `-`. A named pipe is read too, so that a shell's process substitution
 * works. Nothing larger than the limit is taken into memory.
 * @throws DiskError `notFound`, `isFolder`, `notFile`, `noPermission`, `tooLarge`, …
 */
export async function readInput(path: string, options: InputOptions): Promise<Uint8Array> {
  try {
    if (path === '-') return await collect(options.standardInput ?? process.stdin, options.limit, 'The standard input');
    await assertReadable(path, options.limit);
    const file = await open(path);
    return await collect(file.createReadStream(), options.limit, path);
  } catch (error) {
    if (path === '-') throw diskErrorOf(error, 'Cannot read the standard input');
    if (systemCode(error) === 'ENOENT') throw await notFound(path, error);
    throw diskErrorOf(error, `Cannot read ${path}`);
  }
}

async function assertReadable(path: string, limit: number): Promise<void> {
  const found = await stat(path);
  if (found.isDirectory()) throw new DiskError('isFolder', `${path} is a folder. Give the name of a file in it.`);
  if (!found.isFile() && !found.isFIFO())
    throw new DiskError('notFile', `${path} is a device, not a file. Give the name of a file.`);
  if (found.isFile() && found.size > limit) throw tooLarge(path, limit, `it has ${spellBytes(found.size)}`);
  await access(path, constants.R_OK);
}

async function collect(stream: AsyncIterable<Uint8Array | string>, limit: number, source: string): Promise<Uint8Array> {
  const chunks: Uint8Array[] = [];
  let length = 0;
  for await (const chunk of stream) {
    const bytes = typeof chunk === 'string' ? new TextEncoder().encode(chunk) : chunk;
    length += bytes.length;
    if (length > limit) throw tooLarge(source, limit, 'it goes on after that');
    chunks.push(bytes);
  }
  const all = new Uint8Array(length);
  let at = 0;
  for (const chunk of chunks) {
    all.set(chunk, at);
    at += chunk.length;
  }
  return all;
}

function tooLarge(source: string, limit: number, what: string): DiskError {
  const message = `${source} is too large: ${what}, and at most ${spellBytes(limit)} are read.`;
  return new DiskError('tooLarge', `${message} Check that it is the right file, or give a smaller one.`);
}

function spellBytes(bytes: number): string {
  if (bytes < 10_000) return `${bytes} bytes`;
  return bytes < 10_000_000 ? `${Math.round(bytes / 1000)} kB` : `${Math.round(bytes / 1_000_000)} MB`;
}

/** Names the nearest file in that folder, or the folder if that is what is missing. */
async function notFound(path: string, cause: unknown): Promise<DiskError> {
  if (path === '') return new DiskError('notFound', 'The path is empty. Give the name of a file.', cause);
  const folder = dirname(path);
  let names: string[];
  try {
    names = await readdir(folder);
  } catch {
    const what = `Cannot read ${path}: the folder ${folder} does not exist or cannot be looked into.`;
    return new DiskError('notFound', `${what} Check the spelling of the path.`, cause);
  }
  const [guess] = nearest(basename(path), names, 1);
  const advice = guess === undefined ? 'Check the spelling of the path.' : `Did you mean ${guess}?`;
  return new DiskError('notFound', `Cannot read ${path}: there is no such file. ${advice}`, cause);
}
