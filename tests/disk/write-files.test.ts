import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { DISK } from '../../src/disk/disk-operations.ts';
import { DiskError, removeTemporaries, type WriteOptions, writeFiles } from '../../src/disk/write-files.ts';

let root: string;
beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), 'goniolith-disk-'));
});
afterEach(() => {
  rmSync(root, { recursive: true, force: true });
});

const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text);
const file = (name: string, text = name): { name: string; bytes: Uint8Array } => ({ name, bytes: bytesOf(text) });
const read = (...path: string[]): string => readFileSync(join(root, ...path), 'utf8');
const list = (...path: string[]): string[] => readdirSync(join(root, ...path)).sort();

/** An error as the system gives it. */
const systemError = (code: string): Error => Object.assign(new Error(`${code}: made for a test`), { code });

async function fault(files: Parameters<typeof writeFiles>[1], options?: WriteOptions, folder = root) {
  const error: unknown = await writeFiles(folder, files, options).catch((caught: unknown) => caught);
  if (!(error instanceof DiskError)) throw new Error(`expected a DiskError, not ${String(error)}`);
  return error;
}

describe('writeFiles', () => {
  it('writes the files, makes the folders, leaves nothing else', async () => {
    await writeFiles(join(root, 'a', 'b'), [file('one.stl'), file('zwei \u00fc.3mf', '2'), file('.hidden', '')]);
    expect(list('a', 'b')).toEqual(['.hidden', 'one.stl', 'zwei \u00fc.3mf']);
    expect(read('a', 'b', 'zwei \u00fc.3mf')).toBe('2');
  });

  it('writes nothing and makes no folder for no files', async () => {
    await writeFiles(join(root, 'a'), []);
    expect(list()).toEqual([]);
  });

  it('replaces files that have the names', async () => {
    writeFileSync(join(root, 'one'), 'old and longer');
    await writeFiles(root, [file('one', 'new'), file('two')]);
    expect(read('one')).toBe('new');
    expect(list()).toEqual(['one', 'two']);
  });

  it('replaces a link, not what it leads to', async () => {
    writeFileSync(join(root, 'kept'), 'kept');
    symlinkSync('kept', join(root, 'link'));
    symlinkSync('nowhere', join(root, 'broken'));
    await writeFiles(root, [file('link', 'new'), file('broken', 'new too')]);
    expect([read('link'), read('kept'), read('broken')]).toEqual(['new', 'kept', 'new too']);
  });

  it('shows what was read back before any file has its name', async () => {
    const seen: string[] = [];
    const onVerify = (name: string, bytes: Uint8Array): void => {
      seen.push(`${name}: ${new TextDecoder().decode(bytes)}`);
      expect(list().filter((entry) => !entry.startsWith('.goniolith-'))).toEqual([]);
    };
    await writeFiles(root, [file('a', '1'), file('b', '2')], { onVerify });
    expect(seen).toEqual(['a: 1', 'b: 2']);
  });

  it('calls everything off when the check of what was read back throws, and passes its error on', async () => {
    writeFileSync(join(root, 'b'), 'old');
    const broken = new RangeError('not closed');
    const onVerify = (name: string): void => {
      if (name === 'b') throw broken;
    };
    await expect(writeFiles(root, [file('a'), file('b')], { onVerify })).rejects.toBe(broken);
    expect(list()).toEqual(['b']);
    expect(read('b')).toBe('old');
    await expect(writeFiles(join(root, 'x', 'y'), [file('b')], { onVerify })).rejects.toBe(broken);
    expect(list()).toEqual(['b']);
  });

  it('steps round what an earlier crash left behind', async () => {
    let tries = 0;
    const fs = {
      writeNew: async (path: string, bytes: Uint8Array): Promise<void> => {
        if (++tries < 4) writeFileSync(path, 'left behind');
        await DISK.writeNew(path, bytes);
      },
    };
    await writeFiles(root, [file('a')], { fs });
    expect(read('a')).toBe('a');
    expect(list().length, 'the three are not ours to remove').toBe(4);
  });
});

// The names and characters: Microsoft, Naming Files, Paths, and Namespaces.
describe('writeFiles refuses names', () => {
  const bad = ['', '.', '..', '/etc/x', '../x', 'a/b', 'a\\b', 'C:x', 'a\nb', 'a\u0000', 'a\u0085', '\ud800', 'q?.stl']
    .concat([
      'a*',
      '<a>',
      'a|b',
      '"a"',
      'CON',
      'nul.stl',
      'Com1.txt',
      'LPT\u00b9',
      'conin$',
      'aux .x',
      'a.',
      'a ',
      ' a',
    ])
    .concat(['x'.repeat(256), '\u00fc'.repeat(128)]);
  it.each(bad.map((name) => [JSON.stringify(name).slice(0, 20), name]))('%s', async (_, name) => {
    const error = await fault([file('good'), file(name)], {}, join(root, 'new'));
    expect(error.code).toBe('badName');
    expect(error.message).toContain(JSON.stringify(name));
    expect(list(), 'no folder was made').toEqual([]);
  });

  it.each(['a', 'A.b.stl', 'com10', 'console.stl', 'null', 'x'.repeat(255), '\u77f3\u82f1', '..a', '-x', '#1 & 2'])(
    'but not %s',
    async (name) => {
      await writeFiles(root, [file(name, 'x')]);
      expect(list()).toEqual([name]);
    },
  );

  it('that differ in case or in the composition of an accent only', async () => {
    expect((await fault([file('a.stl'), file('A.STL')])).message).toMatch(/Two files would be called "A.STL"/);
    expect((await fault([file('\u00fc'), file('u\u0308')])).code).toBe('badName');
  });
});

describe('writeFiles leaves all as it was', () => {
  it('when a folder has the name of a file', async () => {
    mkdirSync(join(root, 'b'));
    const error = await fault([file('a'), file('b')]);
    expect(error.code).toBe('isFolder');
    expect(error.message).toMatch(/Cannot write .*b: a folder has that name\. Choose/);
    expect(list()).toEqual(['b']);
  });

  it('when the folder is a file, or lies in one', async () => {
    writeFileSync(join(root, 'f'), '');
    expect((await fault([file('a')], {}, join(root, 'f'))).code).toBe('notFolder');
    expect((await fault([file('a')], {}, join(root, 'f', 'g'))).code).toBe('notFolder');
    expect(list()).toEqual(['f']);
  });

  // POSIX error numbers under the names that Node gives them.
  it.each([
    ['ENOSPC', 'noSpace', /the disk is full\. Free some space/],
    ['EDQUOT', 'noSpace', /share of the disk/],
    ['EACCES', 'noPermission', /permission was denied/],
    ['EROFS', 'readOnly', /can only be read/],
    ['EIO', 'failed', /fault/],
    ['EWHATEVER', 'failed', /EWHATEVER/],
  ])('when writing the second file gives %s', async (code, ours, words) => {
    writeFileSync(join(root, 'a'), 'old');
    let calls = 0;
    const fs = {
      writeNew: async (path: string, bytes: Uint8Array): Promise<void> => {
        await DISK.writeNew(path, bytes.subarray(0, 1));
        if (++calls === 2) throw systemError(code);
        rmSync(path);
        await DISK.writeNew(path, bytes);
      },
    };
    const error = await fault([file('a', 'new'), file('b', 'new')], { fs });
    expect(error.code).toBe(ours);
    expect(error.message).toMatch(words);
    expect(error.message).toContain(join(root, 'b'));
    expect(list()).toEqual(['a']);
    expect(read('a')).toBe('old');
    await fault([file('a', 'new'), file('b', 'new')], { fs: { writeNew: () => Promise.reject(systemError(code)) } });
    expect(list()).toEqual(['a']);
  });

  it('when an existing file is protected from writing', async () => {
    writeFileSync(join(root, 'a'), 'old');
    const fs = { assertWritable: () => Promise.reject(systemError('EACCES')) };
    expect((await fault([file('a')], { fs })).code).toBe('noPermission');
    expect(read('a')).toBe('old');
  });

  it('when other bytes are read back than were written', async () => {
    const fs = { read: () => Promise.resolve(bytesOf('abd')) };
    const error = await fault([file('a', 'abc')], { fs }, join(root, 'new', 'folder'));
    expect(error.code).toBe('notAsWritten');
    expect(list()).toEqual([]);
  });

  it('when the folder that was made has something of others in it, except that one', async () => {
    const fs = {
      read: (): Promise<Uint8Array> => {
        writeFileSync(join(root, 'new', 'other'), '');
        return Promise.reject(systemError('EIO'));
      },
    };
    await fault([file('a')], { fs }, join(root, 'new', 'folder'));
    expect(list()).toEqual(['new']);
    expect(list('new')).toEqual(['other']);
  });

  it.each([0, 1, 2])('when renaming number %d fails', async (failing) => {
    writeFileSync(join(root, 'a'), 'old a');
    writeFileSync(join(root, 'c'), 'old c');
    let calls = 0;
    const fs = {
      rename: (from: string, to: string): void => {
        if (calls++ === failing) throw systemError('EACCES');
        DISK.rename(from, to);
      },
    };
    const error = await fault([file('a', 'new'), file('b', 'new'), file('c', 'new')], { fs });
    expect(error.code).toBe('noPermission');
    expect(error.message).toContain(join(root, ['a', 'b', 'c'][failing] ?? ''));
    expect(list()).toEqual(['a', 'c']);
    expect([read('a'), read('c')]).toEqual(['old a', 'old c']);
  });

  it('on disks without second names for files, too', async () => {
    writeFileSync(join(root, 'a'), 'old a');
    const fs = {
      keepAs: (path: string, second: string): void => DISK.rename(path, second),
      rename: (from: string, to: string): void => {
        if (to.endsWith('b')) throw systemError('EBUSY');
        DISK.rename(from, to);
      },
    };
    await fault([file('a', 'new'), file('b', 'new')], { fs });
    expect(list()).toEqual(['a']);
    expect(read('a')).toBe('old a');
    await writeFiles(root, [file('a', 'new')], { fs });
    expect(list()).toEqual(['a']);
    expect(read('a')).toBe('new');
  });

  it('and says so if something cannot be put back', async () => {
    writeFileSync(join(root, 'a'), 'old a');
    let broken = false;
    const fs = {
      rename: (from: string, to: string): void => {
        if (to.endsWith('b')) broken = true;
        if (broken) throw systemError('EIO');
        DISK.rename(from, to);
      },
    };
    const error = await fault([file('a', 'new'), file('b', 'new')], { fs });
    const kept = list().find((name) => name.startsWith('.goniolith-')) ?? 'none';
    expect(error.message).toContain(`the former a is now ${join(root, kept)}`);
    expect(read(kept)).toBe('old a');
  });
});

describe('removeTemporaries', () => {
  it('removes what is being written, and nothing that is finished', async () => {
    await writeFiles(root, [file('finished')]);
    let during: string[] = [];
    const onVerify = (): void => {
      during = list();
      removeTemporaries();
      expect(list()).toEqual(['finished']);
    };
    await expect(writeFiles(root, [file('a')], { onVerify })).rejects.toBeInstanceOf(DiskError);
    expect(during.length).toBe(2);
    removeTemporaries();
    expect(list()).toEqual(['finished']);
  });
});
