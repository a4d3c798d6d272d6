import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { make } from '../../src/index.ts';
import type { RecipeInput } from '../../src/recipe/schema.ts';
import { exponent, median, type Table } from './statistics.ts';

type Print = NonNullable<RecipeInput['print']>;

const RUNS = 5;

const divisor = (a: number, b: number): number => (b === 0 ? a : divisor(b, a % b));

/** Median of warm runs in milliseconds. */
async function cost(recipe: RecipeInput): Promise<number> {
  const found: number[] = [];
  for (let i = -2; i < RUNS; i++) {
    const begin = performance.now();
    await make(recipe);
    if (i >= 0) found.push(performance.now() - begin);
  }
  return median(found);
}

/** Everything at once: letters, bores for rods, a stand with its label, all files. */
export const WHOLE: Print = {
  size: 70,
  letters: true,
  axes: { fit: 'separate' },
  stand: true,
  files: ['stl', '3mf', 'glb'],
};

const OPTIONS: readonly (readonly [string, Print])[] = [
  ['solid', {}],
  ['axes, fused', { axes: true }],
  ['axes, separate', { axes: { fit: 'separate' } }],
  ['bores for metal rod', { axes: { fit: 'press', diameter: 2 } }],
  ['axes and key', { axes: true, key: true }],
  ['letters, engraved', { letters: true }],
  ['letters, raised', { letters: 'raised' }],
  ['letters, inlaid', { letters: 'inlaid' }],
  ['blunt, round', { blunt: true }],
  ['blunt, bevel', { blunt: { bevel: 1 } }],
  ['hollow', { body: 'hollow' }],
  ['frame', { body: 'frame' }],
  ['halves', { body: 'halves' }],
  ['sectors', { body: 'sectors' }],
  ['units', { body: 'units' }],
  ['skins', { body: 'skins' }],
  ['stand', { stand: true }],
  ['letters, as 3MF', { letters: true, files: ['3mf'] }],
  ['letters, as GLB', { letters: true, files: ['glb'] }],
  ['letters, separate axes, stand, all files', WHOLE],
];

export async function optionCosts(): Promise<Table> {
  const rows: string[][] = [];
  for (const [name, print] of OPTIONS)
    rows.push([name, (await cost({ mineral: 'quartz', print: { size: 70, ...print } })).toFixed(0)]);
  return {
    title: 'make of quartz, 70 mm, in a warm process, STL unless said, milliseconds, median',
    head: ['', 'ms'],
    rows,
  };
}

/** Forms of m-3m in the order of their largest index, all on one sphere, so that each shows. */
function cubic(forms: number): RecipeInput {
  const list: { face: [number, number, number]; distance: number }[] = [];
  for (let h = 1; list.length < forms; h++)
    for (let k = 0; k <= h; k++)
      for (let l = 0; l <= k && list.length < forms; l++)
        if (divisor(divisor(h, k), l) === 1) list.push({ face: [h, k, l], distance: 1 });
  return { pointGroup: 'm-3m', forms: list };
}

/** How the cost of a lettered model grows with its faces: ~ faces^exponent. */
export async function growthWithFaces(): Promise<Table> {
  const points: [number, number][] = [];
  for (const forms of [1, 3, 4, 5, 7, 9, 10]) {
    const recipe: RecipeInput = { ...cubic(forms), print: { size: 150, letters: { text: 'indices' } } };
    const { shape } = await make(recipe);
    points.push([shape.measures.faces.length, await cost(recipe)]);
  }
  const rows = points.map(([faces, ms]) => [String(faces), ms.toFixed(0), (ms / faces).toFixed(2)]);
  const power = exponent(points.filter(([faces]) => faces > 20)).toFixed(2);
  return {
    title: `A lettered model of m-3m by its number of faces; cost ~ faces^${power} above 20 faces`,
    head: ['faces', 'ms', 'ms a face'],
    rows,
  };
}

/** Peak memory of a process that makes one model with everything; from the built package. */
export function objectMemory(): Table {
  const entry = JSON.stringify(join(process.cwd(), 'dist', 'index.js'));
  const script = `import { make } from ${entry}; await make(${JSON.stringify({ mineral: 'quartz', print: WHOLE })});
    process.stdout.write(String(process.resourceUsage().maxRSS));`;
  const { stdout, status, stderr } = spawnSync(process.execPath, ['--input-type=module', '-e', script], {
    encoding: 'utf8',
  });
  if (status !== 0) throw new Error(`The model was not made: ${stderr}`);
  const rows = [['letters, separate axes, stand, all files', (Number(stdout) / 1024).toFixed(0)]];
  return { title: 'Peak memory of a process that makes one quartz, MiB', head: ['', 'MiB'], rows };
}
