import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { unzipSync } from 'fflate';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { make } from '../../src/index.ts';
import { meshVolume } from '../../src/print/mesh.ts';
import type { RecipeInput } from '../../src/recipe/schema.ts';
import { ADMESH_ZEROS, canRun } from './programs.ts';

/**
 * What other programs say of bodies, letters, blunting and stands: admesh, PrusaSlicer and xmllint, all from Debian.
 * Without them these tests are left out, unless GONIOLITH_OUTSIDE asks for them.
 */
const folder = mkdtempSync(join(tmpdir(), 'goniolith-objects-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const run = (program: string, ...words: string[]): string =>
  execFileSync(program, words, { encoding: 'utf8', maxBuffer: 1 << 28, timeout: 240_000 });

type Print = NonNullable<RecipeInput['print']>;

/** Twenty objects of all kinds, each of another mineral. */
const OBJECTS: readonly (readonly [string, Print])[] = [
  ['quartz', { body: 'halves' }],
  ['fluorite', { body: 'hollow' }],
  ['calcite', { body: { kind: 'hollow', wall: 3, drains: true } }],
  ['gypsum', { body: 'frame' }],
  ['galena', { body: { kind: 'frame', strut: 2.4, bead: true } }],
  ['zircon', { body: 'frame', axes: true }],
  ['orthoclase', { body: { kind: 'halves', join: 'magnets' } }],
  ['albite', { body: { kind: 'halves', join: 'none', plane: '001' } }],
  ['beryl', { body: 'sectors' }],
  ['barite', { body: { kind: 'sectors', by: 'form', gap: 0.4 } }],
  ['pyrite', { body: 'units' }],
  ['topaz', { body: { kind: 'units', gap: 0.5 } }],
  ['magnetite', { letters: true }],
  ['cassiterite', { letters: 'raised' }],
  ['fluorapatite', { letters: { text: 'indices' }, axes: true }],
  ['forsterite', { blunt: true }],
  ['corundum', { blunt: { bevel: 1 }, letters: true }],
  ['rutile', { stand: { text: ['Rutile'], braille: true } }],
  ['sphalerite', { stand: { text: ['A code'], qr: 'https://example.org/a' }, letters: true }],
  ['staurolite', { axes: { fit: 'separate' } }],
];

interface Written {
  readonly mineral: string;
  readonly name: string;
  readonly path: string;
  /** mm³ of the bodies in the file. */
  readonly volumes: readonly number[];
  readonly bytes: Uint8Array;
}
const written: Written[] = [];
const stls = () => written.filter(({ name }) => name.endsWith('.stl'));
const threeMfs = () => written.filter(({ name }) => name.endsWith('.3mf'));

beforeAll(async () => {
  for (const [mineral, print] of OBJECTS) {
    const { files } = await make({ mineral, print: { size: 70, files: ['stl', '3mf'], ...print } });
    for (const { name, bytes, checks } of files) {
      const path = join(folder, `${mineral}-${name}`);
      writeFileSync(path, bytes);
      // A cavity is a surface of its own solid, no second one.
      written.push({ mineral, name, path, bytes, volumes: checks.map(({ volume }) => volume) });
    }
  }
}, 240_000);

describe('the objects', () => {
  it('are of twenty minerals', () => {
    expect(new Set(written.map(({ mineral }) => mineral)).size).toBe(20);
    expect(threeMfs()).toHaveLength(20);
  });
});

describe.runIf(canRun('admesh'))('admesh', () => {
  it('finds nothing to repair', () => {
    expect(stls().length).toBeGreaterThan(40);
    for (const { path } of stls()) {
      const report = run('admesh', path);
      for (const line of ADMESH_ZEROS)
        expect(new RegExp(`${line}\\s*:\\s*(\\d+)`).exec(report)?.[1], `${path}: ${line}`).toBe('0');
    }
  });
});

describe.runIf(canRun('xmllint'))('the published 3MF schemas', () => {
  it('take every model part', () => {
    const paths = threeMfs().map(({ path, bytes }) => {
      writeFileSync(`${path}.model`, unzipSync(bytes)['3D/3dmodel.model']!);
      return `${path}.model`;
    });
    const schema = fileURLToPath(new URL('./reference/3mf/3mf-all.xsd', import.meta.url));
    const { status, stderr } = spawnSync('xmllint', ['--nonet', '--noout', '--schema', schema, ...paths], {
      encoding: 'utf8',
    });
    expect(stderr.match(/ validates$/gm)).toHaveLength(paths.length);
    expect(status).toBe(0);
  });
});

describe.runIf(canRun('prusa-slicer'))('PrusaSlicer', () => {
  it.each([
    ['STL', stls],
    ['3MF', threeMfs],
  ] as const)(
    'says manifold of every body in %s, with its volume',
    (_, files) => {
      const report = run('prusa-slicer', '--info', ...files().map(({ path }) => path));
      const volumes = files().flatMap((file) => file.volumes);
      expect(report.match(/^manifold = yes$/gm)).toHaveLength(volumes.length);
      const found = [...report.matchAll(/^volume = ([\d.]+)$/gm)].map(([, volume]) => Number(volume));
      volumes.forEach((volume, i) => {
        expect(Math.abs(found[i]! / volume - 1)).toBeLessThan(1e-4);
      });
    },
    240_000,
  );
});

/** Parts that lie flat and overhang by little, so that no support adds to the filament. */
const FLAT: readonly (readonly [string, Print, RegExp])[] = [
  ['quartz', { body: 'halves' }, /^half-1$/],
  ['galena', { body: 'halves' }, /^half-2$/],
  ['fluorite', { body: { kind: 'halves', join: 'none', plane: '100' } }, /^half-1$/],
  ['orthoclase', { body: { kind: 'halves', join: 'none' } }, /^half-1$/],
  ['pyrite', { body: { kind: 'halves', join: 'magnets' } }, /^half-1$/],
  ['gypsum', { body: { kind: 'halves', join: 'none' } }, /^half-2$/],
  ['quartz', { stand: { text: ['Quartz'], braille: false } }, /^stand$/],
  ['zircon', { stand: { text: ['Zircon'], braille: false } }, /^stand$/],
  ['galena', { body: 'sectors' }, /^sector-100$/],
  ['galena', { letters: true }, /^body$/],
  ['halite', { blunt: { bevel: 1.5 } }, /^body$/],
  ['halite', { body: 'hollow' }, /^body$/],
];

describe.runIf(canRun('prusa-slicer'))('a G-code', () => {
  /**
   * At 100 % infill, without skirt, brim or support: what is extruded is the body. 2 % are allowed for the overlap of
   * lines and the rounding of layers at slanting faces, and 3 % for what narrow places lose (common practice).
   */
  it.each(FLAT)(
    'of %s, %j: as much filament as the body, within 5 %%',
    async (mineral, print, which) => {
      const { parts } = await make({ mineral, print: { size: 50, ...print } });
      const part = parts.find(({ name }) => which.test(name))!;
      const { writeStl } = await import('../../src/files/stl/write.ts');
      const { weldFloat32 } = await import('../../src/files/mesh/weld.ts');
      const path = join(folder, `flat-${mineral}-${part.name}.stl`);
      writeFileSync(path, writeStl(weldFloat32(part.mesh), 'flat'));
      const solid = [
        '--fill-density',
        '100%',
        '--fill-pattern',
        'rectilinear',
        '--skirts',
        '0',
        '--layer-height',
        '0.2',
      ];
      run('prusa-slicer', '--export-gcode', ...solid, '-o', `${path}.gcode`, path);
      const used = Number(/filament used \[cm3\] = ([\d.]+)/.exec(readFileSync(`${path}.gcode`, 'utf8'))?.[1]);
      expect(Math.abs((used * 1000) / meshVolume(part.mesh) - 1)).toBeLessThan(0.05);
    },
    240_000,
  );
});
