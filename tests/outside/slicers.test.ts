import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { PRESET_FOLDER } from '../../src/disk/preset-folder.ts';
import { make } from '../../src/index.ts';
import type { MadeFile } from '../../src/make.ts';
import { preset } from '../../src/recipe/shelf.ts';
import { ADMESH_ZEROS, canRun } from './programs.ts';

/**
 * What other programs say of our files: admesh (repair statistics) and PrusaSlicer (manifold test, slicing), both from
 * Debian. On machines without them these tests are left out, unless GONIOLITH_OUTSIDE asks for them.
 */
const folder = mkdtempSync(join(tmpdir(), 'goniolith-outside-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const run = (program: string, ...words: string[]): string =>
  execFileSync(program, words, { encoding: 'utf8', maxBuffer: 1 << 28, timeout: 120_000 });

const minerals = PRESET_FOLDER.list('minerals').flatMap((name) =>
  Object.keys(preset(PRESET_FOLDER, 'minerals', name)!.habits).map((habit) => `${name}/${habit}`),
);
const sets = PRESET_FOLDER.list('sets').flatMap((name) =>
  Object.keys(preset(PRESET_FOLDER, 'sets', name)!.recipes).map((key) => `${name}/${key}`),
);

async function written(recipe: string, print = ''): Promise<(MadeFile & { path: string })[]> {
  const [mineral, habit] = recipe.split('/');
  const made = await make(print ? `mineral: ${mineral}\nhabit: ${habit}\nprint: ${print}\n` : recipe);
  return made.files.map((file) => {
    const path = join(folder, `${recipe.replaceAll('/', '-')}-${file.name}`);
    writeFileSync(path, file.bytes);
    return { ...file, path };
  });
}

describe.runIf(canRun('admesh'))('admesh', () => {
  it.each([...minerals, ...sets])('finds nothing to repair in %s', async (recipe) => {
    for (const { path } of await written(recipe)) {
      const report = run('admesh', path);
      for (const line of ADMESH_ZEROS) expect(new RegExp(`${line}\\s*:\\s*(\\d+)`).exec(report)?.[1], line).toBe('0');
      expect(/Number of parts\s*:\s*(\d+)/.exec(report)?.[1]).toBe('1');
    }
  });

  it.each(minerals)('finds nothing to repair in %s with its axes, fused and separate', async (recipe) => {
    for (const fit of ['fused', 'separate'])
      for (const {
        path,
        checks: [check],
      } of await written(recipe, `{ size: 80, axes: { fit: ${fit}, diameter: 2 } }`)) {
        const report = run('admesh', path);
        for (const line of ADMESH_ZEROS)
          expect(new RegExp(`${line}\\s*:\\s*(\\d+)`).exec(report)?.[1], `${fit} ${line}`).toBe('0');
        expect(Number(/Number of parts\s*:\s*(\d+)/.exec(report)?.[1])).toBe(check!.bodies.length);
      }
  });
});

describe.runIf(canRun('prusa-slicer'))('PrusaSlicer', () => {
  it.each([minerals, sets].flatMap((all) => chunks(all, 20)).map((all) => [all.length, all[0]!, all] as const))(
    'says manifold of %i presets from %s on',
    async (count, _, recipes) => {
      const files = (await Promise.all(recipes.map((recipe) => written(recipe)))).flat();
      const report = run('prusa-slicer', '--info', ...files.map(({ path }) => path));
      expect(report.match(/^manifold = yes$/gm)).toHaveLength(count);
      const volumes = [...report.matchAll(/^volume = ([\d.]+)$/gm)].map(([, volume]) => Number(volume));
      files.forEach(({ checks: [check] }, i) => {
        expect(Math.abs(volumes[i]! / check!.volume - 1)).toBeLessThan(1e-4);
      });
    },
  );

  const sixth = Math.ceil(minerals.length / 6);
  it.each(minerals.filter((_, i) => i % sixth === 0))('slices %s with its rods', async (recipe) => {
    const [file] = await written(recipe, '{ size: 40, axes: { diameter: 2, reach: 9 } }');
    const gcode = `${file!.path}.gcode`;
    // Many crystals stand on a point: raft and supports carry them, as they would on a real printer.
    const support = [
      '--support-material',
      '--raft-layers',
      '2',
      '--fill-density',
      '100%',
      '--fill-pattern',
      'rectilinear',
    ];
    run('prusa-slicer', '--export-gcode', ...support, '-o', gcode, file!.path);
    const moves = readFileSync(gcode, 'utf8');
    const used = Number(/filament used \[cm3\] = ([\d.]+)/.exec(moves)?.[1]);
    expect(used * 1000).toBeGreaterThan(0.95 * file!.checks[0]!.volume);
    const heights = [...moves.matchAll(/^;Z:([\d.]+)/gm)].map(([, z]) => Number(z));
    const { min, max } = file!.checks[0]!.extents;
    expect(Math.max(...heights)).toBeGreaterThan(max[2] - min[2] - 0.5);
  });
});

function chunks<T>(all: readonly T[], size: number): T[][] {
  return Array.from({ length: Math.ceil(all.length / size) }, (_, i) => all.slice(i * size, (i + 1) * size));
}
