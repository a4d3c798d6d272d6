import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { DiskError } from '../../src/disk/disk-error.ts';
import { type InputOptions, readInput } from '../../src/disk/read-input.ts';

let root: string;
beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), 'goniolith-input-'));
});
afterEach(() => {
  rmSync(root, { recursive: true, force: true });
});

async function fault(path: string, options: InputOptions = { limit: 100 }): Promise<DiskError> {
  const error: unknown = await readInput(path, options).catch((caught: unknown) => caught);
  if (!(error instanceof DiskError)) throw new Error(`expected a DiskError, not ${String(error)}`);
  return error;
}

describe('readInput', () => {
  it('reads a file up to the limit', async () => {
    const bytes = Uint8Array.from({ length: 100 }, (_, i) => i);
    writeFileSync(join(root, 'a'), bytes);
    expect(await readInput(join(root, 'a'), { limit: 100 })).toEqual(bytes);
    const error = await fault(join(root, 'a'), { limit: 99 });
    expect(error.code).toBe('tooLarge');
    expect(error.message).toMatch(/it has 100 bytes, and at most 99 bytes are read/);
  });

  it('reads an empty file, and one that is larger than a chunk', async () => {
    writeFileSync(join(root, 'empty'), '');
    expect((await readInput(join(root, 'empty'), { limit: 0 })).length).toBe(0);
    const large = new Uint8Array(300_000).fill(7);
    writeFileSync(join(root, 'large'), large);
    expect(Buffer.compare(await readInput(join(root, 'large'), { limit: 1e6 }), large)).toBe(0);
  });

  it('reads the standard input, and stops at the limit', async () => {
    const input = (): Readable => Readable.from([Buffer.from('abc'), 'd\u00fc', Buffer.from('f')]);
    const bytes = await readInput('-', { limit: 7, standardInput: input() });
    expect(new TextDecoder().decode(bytes)).toBe('abcd\u00fcf');
    const endless = Readable.from(
      (function* () {
        for (;;) yield Buffer.alloc(10);
      })(),
    );
    const error = await fault('-', { limit: 1000, standardInput: endless });
    expect(error.code).toBe('tooLarge');
    expect(error.message).toMatch(/^The standard input is too large/);
    const broken = Readable.from(
      (function* () {
        yield Buffer.alloc(1);
        throw Object.assign(new Error('EIO'), { code: 'EIO' });
      })(),
    );
    expect((await fault('-', { limit: 9, standardInput: broken })).message).toMatch(/Cannot read the standard input/);
  });

  it.runIf(process.platform !== 'win32')('reads a named pipe', async () => {
    const pipe = join(root, 'pipe');
    execFileSync('mkfifo', [pipe]);
    const [bytes] = await Promise.all([readInput(pipe, { limit: 10 }), writeFile(pipe, 'through')]);
    expect(new TextDecoder().decode(bytes)).toBe('through');
  });

  it.each([
    ['quarz.yaml', 'quartz.yaml'],
    ['Quartz.YAML', 'quartz.yaml'],
    ['calcite.yml', 'calcite.yaml'],
  ])('asks for %s whether %s was meant', async (wrong, right) => {
    for (const name of ['quartz.yaml', 'calcite.yaml', 'z', '.x']) writeFileSync(join(root, name), '');
    const error = await fault(join(root, wrong));
    expect(error.code).toBe('notFound');
    expect(error.message).toMatch(new RegExp(`there is no such file\\. Did you mean ${right}\\?$`));
  });

  it('asks for nothing where no name is near, and names a missing folder', async () => {
    writeFileSync(join(root, 'quartz.yaml'), '');
    expect((await fault(join(root, 'beryl.yaml'))).message).toMatch(/no such file\. Check the spelling/);
    expect((await fault(join(root, 'no', 'a'))).message).toContain(`the folder ${join(root, 'no')} does not exist`);
    expect((await fault('')).code).toBe('notFound');
  });

  it('refuses folders, devices and what cannot be reached', async () => {
    mkdirSync(join(root, 'folder'));
    expect((await fault(join(root, 'folder'))).message).toMatch(/is a folder\. Give the name of a file in it/);
    writeFileSync(join(root, 'file'), '');
    expect((await fault(join(root, 'file', 'x'))).code).toBe('notFolder');
    symlinkSync('loop', join(root, 'loop'));
    expect((await fault(join(root, 'loop'))).message).toMatch(/circle/);
    expect((await fault(join(root, 'x'.repeat(300)))).code).toBe('nameTooLong');
    expect((await fault('a\u0000b')).code).toBe('failed');
    if (process.platform !== 'win32') expect((await fault('/dev/null')).code).toBe('notFile');
  });
});
