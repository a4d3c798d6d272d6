import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, sep } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const SOURCE = fileURLToPath(new URL('../src/', import.meta.url));

/** Which rooms a room may import from; itself always. `door` stands for the files directly in src. */
const MAY_IMPORT: Readonly<Record<string, readonly string[]>> = {
  crystal: [],
  polyhedron: [],
  recipe: ['crystal'],
  shape: ['crystal', 'polyhedron', 'recipe'],
  rods: ['crystal', 'polyhedron', 'recipe', 'shape'],
  print: ['crystal', 'polyhedron', 'recipe', 'shape', 'rods'],
  files: ['print'],
  draw: ['crystal', 'polyhedron', 'recipe', 'shape', 'rods'],
  disk: ['crystal', 'recipe'],
  door: ['crystal', 'polyhedron', 'recipe', 'shape', 'rods', 'print', 'files', 'draw', 'disk'],
  cli: ['crystal', 'polyhedron', 'recipe', 'shape', 'rods', 'print', 'files', 'draw', 'disk', 'door'],
};

/** Rooms, and the one door, that are for Node alone; everything else runs in a browser unchanged. */
const NEEDS_NODE = new Set(['disk', 'cli', 'index.ts']);

const files = readdirSync(SOURCE, { recursive: true, encoding: 'utf8' })
  .filter((name) => /\.tsx?$/.test(name))
  .map((name) => name.split(sep).join('/'));

const roomOf = (file: string): string => (file.includes('/') ? file.split('/')[0]! : 'door');

interface Import {
  readonly file: string;
  readonly from: string;
}

const imports: Import[] = files.flatMap((file) => {
  const text = readFileSync(join(SOURCE, file), 'utf8');
  return [...text.matchAll(/(?:\bfrom|\bimport)\s*\(?\s*['"]([^'"]+)['"]/g)].map(([, from]) => ({ file, from: from! }));
});

describe('the house', () => {
  it('has only the rooms of the plan', () => {
    expect(files.length).toBeGreaterThan(40);
    for (const file of files) expect(Object.keys(MAY_IMPORT), file).toContain(roomOf(file));
  });

  it('imports downwards only', () => {
    for (const { file, from } of imports.filter((one) => one.from.startsWith('.'))) {
      const target = relative(SOURCE, join(SOURCE, dirname(file), from))
        .split(sep)
        .join('/');
      const [room, other] = [roomOf(file), roomOf(target)];
      expect([room, ...MAY_IMPORT[room]!], `${file} imports ${target}`).toContain(other);
    }
  });

  it('needs Node only at its doors to the disk and the terminal', () => {
    for (const { file, from } of imports) {
      const allowed = NEEDS_NODE.has(roomOf(file)) || NEEDS_NODE.has(file);
      if (from.startsWith('node:')) expect(allowed, `${file} imports ${from}`).toBe(true);
      if (/(^|\/)disk\//.test(from)) expect(allowed, `${file} imports ${from}`).toBe(true);
    }
    const globals = files.filter((file) =>
      /\b(process|Buffer|__dirname)\./.test(readFileSync(join(SOURCE, file), 'utf8')),
    );
    for (const file of globals) expect(NEEDS_NODE.has(roomOf(file)), `${file} uses a global of Node`).toBe(true);
  });

  it('sees every import: the pattern finds the forms in use', () => {
    expect(imports.some(({ from }) => from === 'node:fs')).toBe(true);
    expect(imports.some(({ file, from }) => file === 'cli/make.ts' && from === '../make.ts')).toBe(true);
  });
});
