import type { Manifold } from 'manifold-3d';
import { describe, expect, it } from 'vitest';
import { checkMesh } from '../../../src/files/check/check.ts';
import { weldFloat32 } from '../../../src/files/mesh/weld.ts';
import { crystal } from '../../../src/index.ts';
import { crystalMesh } from '../../../src/print/body.ts';
import { type Workbench, withSolids } from '../../../src/print/kit.ts';
import type { Mesh } from '../../../src/print/mesh.ts';
import { fuseRods } from '../../../src/print/rods/fused.ts';
import { brailleLines, labelLines } from '../../../src/print/stand/label-lines.ts';
import type { StandOptions } from '../../../src/print/stand/options.ts';
import { rodLines } from '../../../src/print/stand/rod-slots.ts';
import { makeStand, type Stand } from '../../../src/print/stand/stand.ts';
import { mm } from '../../../src/recipe/quantity.ts';
import { planRods } from '../../../src/rods/plan.ts';
import { regular } from '../lettering/fonts.ts';
import { type Sized, SOME_MINERALS, sized } from '../lettering/shapes.ts';

const CLEARANCE = 0.2;
const PLAIN: StandOptions = { attitude: 'c-up', typeface: regular, clearance: CLEARANCE, wall: 2 };
const WIDE = { widest: 500 };

const standOf = ({ shape, scale }: Sized, options: Partial<StandOptions> = {}): Promise<Stand> =>
  withSolids((bench) => makeStand(bench, shape, scale, { ...PLAIN, ...options }));

const shapeOnly = ({ positions, triangles }: Mesh): Mesh => ({ positions, triangles });

/** Overlap, least distance, and overlaps while the crystal goes up: all as solids, in the crystal's frame. */
function fit(bench: Workbench, stand: Stand, body: Manifold, up: readonly [number, number, number]) {
  const cradle = bench.solid(shapeOnly(stand.parts[0]!.placed[0]!));
  const raised = [0.05, 0.5, 1, 3, 7, 15, 30, 60].map((by) => {
    const [x, y, z] = up.map((value) => value * by);
    return body.translate(x!, y!, z!).intersect(cradle).volume();
  });
  return { overlap: cradle.intersect(body).volume(), gap: cradle.minGap(body, 2), raised };
}

describe.each(SOME_MINERALS)('a stand for %s', (mineral) => {
  it('holds it with its clearance, lets it out upwards, and is sound', async () => {
    const { shape, scale } = sized(mineral, 70);
    const label = { lines: labelLines(shape.crystal, ['× 2.5']), braille: brailleLines(shape.crystal), sizes: WIDE };
    const { stand, fits } = await withSolids((bench) => {
      const made = makeStand(bench, shape, scale, { ...PLAIN, ...label });
      return { stand: made, fits: fit(bench, made, bench.solid(shapeOnly(crystalMesh(shape, scale))), [0, 0, 1]) };
    });
    expect(fits.overlap).toBe(0);
    expect(Math.abs(fits.gap - CLEARANCE)).toBeLessThan(1e-3);
    expect(fits.raised).toEqual(fits.raised.map(() => 0));
    expect(stand.parts).toHaveLength(1);
    const report = checkMesh(weldFloat32(stand.parts[0]!.mesh));
    expect(report.problems).toEqual([]);
    expect(report.bodies).toHaveLength(1);
    expect(report.extents.min.map((value) => Math.abs(value))).toEqual([0, 0, 0]);
  });
});

describe('a crystal on one of its faces', () => {
  it.each([
    ['gypsum', 0],
    ['quartz', 0],
    ['fluorite', 0],
    ['calcite', 1],
    ['albite', 2],
    ['tetrahedrite', 0],
  ])('%s, face %i: the same fit, and the face lies level', async (mineral, index) => {
    const { shape, scale } = sized(mineral, 60);
    const face = shape.measures.faces[index]!;
    const [x, y, z] = shape.measures.normals.subarray(3 * face, 3 * face + 3);
    const up = [-x!, -y!, -z!] as const;
    const { stand, fits } = await withSolids((bench) => {
      const made = makeStand(bench, shape, scale, { ...PLAIN, attitude: { down: [x!, y!, z!] } });
      return { stand: made, fits: fit(bench, made, bench.solid(shapeOnly(crystalMesh(shape, scale))), up) };
    });
    const m = stand.toStand;
    const turned = [0, 1, 2].map((row) => m[row]! * x! + m[4 + row]! * y! + m[8 + row]! * z!);
    expect(turned[2]).toBeCloseTo(-1, 9);
    expect(fits.overlap).toBe(0);
    expect(Math.abs(fits.gap - CLEARANCE)).toBeLessThan(1e-3);
    expect(fits.raised).toEqual(fits.raised.map(() => 0));
    expect(checkMesh(weldFloat32(stand.parts[0]!.mesh)).problems).toEqual([]);
  });
});

describe('rods in the crystal', () => {
  it('have room in the cradle and are not held back', async () => {
    const { shape, scale } = sized('fluorite', 60);
    const plan = planRods(shape, scale, {
      orders: [4, 3],
      directions: null,
      fit: 'fused',
      diameter: mm(3),
      reach: mm(12),
    });
    const rods = rodLines(plan);
    const fits = await withSolids((bench) => {
      const stand = makeStand(bench, shape, scale, { ...PLAIN, rods });
      expect(checkMesh(weldFloat32(stand.parts[0]!.mesh)).problems).toEqual([]);
      return fit(bench, stand, fuseRods(bench, bench.solid(crystalMesh(shape, scale)), plan), [0, 0, 1]);
    });
    expect(fits.overlap).toBe(0);
    expect(fits.gap).toBeGreaterThan(CLEARANCE - 1e-3);
    expect(fits.raised).toEqual(fits.raised.map(() => 0));
  });
});

describe('a second colour', () => {
  it('fills exactly: parts touch in one plane, overlap nowhere, and together are the whole', async () => {
    const gypsum = sized('gypsum', 60);
    const label: Partial<StandOptions> = {
      lines: labelLines(gypsum.shape.crystal),
      braille: brailleLines(gypsum.shape.crystal),
      code: 'https://museum.example/A-1987.12',
      sizes: WIDE,
    };
    const [one] = (await standOf(gypsum, label)).parts;
    const { parts } = await standOf(gypsum, { ...label, contrast: true });
    expect(parts.map(({ name }) => name)).toEqual(['stand', 'stand-letters', 'stand-code']);
    for (const { mesh } of parts) expect(checkMesh(weldFloat32(mesh)).problems).toEqual([]);
    const lowest = parts.slice(1).map(({ mesh }) => Math.min(...mesh.positions.filter((_, i) => i % 3 === 2)));
    expect(lowest).toEqual([2, 2]);
    const { volumes, overlaps } = await withSolids((bench) => {
      const [stand, ...inks] = parts.map(({ mesh }) => bench.solid(shapeOnly(mesh)));
      const whole = bench.solid(shapeOnly(one!.mesh));
      return {
        volumes: [stand!, ...inks].map((solid) => solid.volume()).concat(-whole.volume()),
        overlaps: inks.map((ink) => ink.intersect(stand!).volume()),
      };
    });
    for (const overlap of overlaps) expect(Math.abs(overlap)).toBeLessThan(1e-12);
    expect(Math.abs(volumes.reduce((sum, value) => sum + value, 0))).toBeLessThan(0.05);
    expect(new Set(one!.mesh.surface)).toEqual(new Set([0, 1]));
  });
});

describe('what cannot be', () => {
  const quartz = sized('quartz', 60);
  const error = (options: Partial<StandOptions>): Promise<unknown> =>
    standOf(quartz, options).catch((thrown) => thrown);

  it.each<[string, Partial<StandOptions>, RegExp]>([
    [
      'a line of 500 characters',
      { lines: ['Quartz', 'x'.repeat(500)] },
      /line 2 of the plaque, "x+…", has 500 characters; a line may have 55/,
    ],
    [
      'a line wider than the plaque',
      { lines: ['A long name for a quartz'] },
      /line 1 of the plaque, .* is \d+ mm wide in 16 mm letters; there is room for 201 mm/,
    ],
    [
      'braille wider than the plaque',
      { braille: ['a name with many letters in a row here'] },
      /line 1 of the braille, .* is \d+ mm wide in 38 cells of 6.2 mm/,
    ],
    ['a script without glyphs', { lines: ['Горный хрусталь'] }, /no sign for Г \(U\+0413\), о/],
    ['signs without braille', { braille: ['SiO₂'] }, /no sign for ₂ \(U\+2082\)/],
    ['too many lines', { lines: Array.from({ length: 9 }, () => 'a') }, /9 raised lines; it may have 8/],
    ['a blank line', { lines: ['Quartz', '  '] }, /line 2 of the plaque is blank/],
    ['a code that no QR code holds', { code: 'x'.repeat(3000) }, /at most 2331 bytes, and this text has 3000/],
    [
      'a code wider than the plaque',
      { code: 'x'.repeat(2300) },
      /QR code for 2300 characters has 177 × 177 modules of 1.2 mm/,
    ],
    ['sitting deeper than it is high', { hold: 70 }, /60.0 mm height cannot sit 70.0 mm deep/],
  ])('%s is refused', async (_, options, message) => {
    const thrown = await error(options);
    expect(thrown).toMatchObject({ name: 'ObjectError' });
    expect(String(thrown)).toMatch(message);
  });

  it('a leaning crystal that would tip over is refused, and told by how much', async () => {
    // A sheared prism: its centre stands far outside of its small base (by hand).
    const leaning = sized(
      'pointGroup: "-1"\ncell: { a: 5, b: 5, c: 20, alpha: 60, beta: 50, gamma: 90 }\nforms:\n  - { face: "001", distance: 3 }\n  - { face: "100", distance: 0.5 }\n  - { face: "010", distance: 0.5 }\n',
      80,
    );
    const face = leaning.shape.measures.faces.find((one) => leaning.shape.solid.planes.normals[3 * one + 2] === -1)!;
    const [x, y, z] = leaning.shape.measures.normals.subarray(3 * face, 3 * face + 3);
    const thrown = await standOf(leaning, { attitude: { down: [x!, y!, z!] }, hold: 3 }).catch((it: unknown) => it);
    expect(thrown).toMatchObject({ name: 'ObjectError', code: 'stand' });
    expect(String(thrown)).toMatch(/would tip over: its centre of mass is \d+\.\d mm outside of the cradle's rim/);
  });
});

it('tells the figures it used', async () => {
  const { remarks } = await standOf(sized('quartz', 60), {
    lines: ['Quartz'],
    braille: ['Quartz'],
    sizes: { letterHeight: 13 },
  });
  expect(remarks.join('\n')).toMatch(/capitals 13 mm high, 0.8 mm raised, at least 3.2 mm apart/);
  expect(remarks.join('\n')).toMatch(/under 16 mm are meant .* can also be seen/);
  expect(remarks.join('\n')).toMatch(/dots 1.6 mm wide and 0.7 mm high, 2.5 mm apart, cells 6.2 mm, lines 10 mm/);
});

it('is the same every time', async () => {
  const options = { lines: labelLines(crystal('topaz')), code: 'A 12', sizes: WIDE };
  const [one, two] = [await standOf(sized('topaz', 60), options), await standOf(sized('topaz', 60), options)];
  expect(one.parts).toEqual(two.parts);
});
