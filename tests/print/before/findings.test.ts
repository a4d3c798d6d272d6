import { describe, expect, it } from 'vitest';
import { fitOnBed } from '../../../src/print/before/bed-fit.ts';
import { beforePrinting } from '../../../src/print/before/findings.ts';
import { amountOf, printingSeconds } from '../../../src/print/before/mass.ts';
import type { PrintingProfile } from '../../../src/print/before/profile.ts';
import { thinnestWall } from '../../../src/print/before/thickness.ts';
import { crystalMesh } from '../../../src/print/body.ts';
import { withSolids } from '../../../src/print/kit.ts';
import type { Mesh } from '../../../src/print/mesh.ts';
import { ontoBed, type Part } from '../../../src/print/part.ts';
import { cube, quartz, tetrahedron } from '../../draw/crystals.ts';
import { box, partOf, prism, turned } from '../solids.ts';

const profile: PrintingProfile = {
  name: 'a printer',
  bed: [220, 220, 250],
  wall: 0.8,
  usualWall: 1.2,
  feature: 0.4,
  overhang: 45,
  material: { name: 'PLA', density: 1.24, shell: 1.2, infill: 0.15 },
  speed: { layer: 0.2, perLayer: 3, flow: 4 },
};
const check = (parts: readonly Part[], scale = 20, shape = cube) =>
  withSolids((bench) => beforePrinting(bench, parts, shape, scale, profile));
const wall = (mesh: Mesh) => withSolids((bench) => thinnestWall(bench, mesh));

describe('bed fit', () => {
  it.each([
    ['as it lies', box(220, 100, 250), { upright: 2, turn: 0 }],
    ['turned onto its side', box(250, 100, 200), { upright: 0, turn: 0 }],
    ['too large', box(260, 230, 230), null],
    ['too high and too long', box(251, 221, 221), null],
  ])('%s', (_, mesh, fit) => {
    expect(fitOnBed(mesh, profile.bed)).toEqual(fit);
  });

  it('lays a long thin bar across the diagonal: 220 √2 = 311 mm less the bar’s width (by hand)', () => {
    // A bar L × w at 45° spans (L + w)/√2 both ways: L + 10 ≤ 311.1.
    const fit = fitOnBed(box(301, 10, 10), profile.bed);
    expect(fit?.turn).toBeGreaterThan(40);
    expect(fit?.turn).toBeLessThan(140);
    expect(fitOnBed(box(302, 10, 10), profile.bed)).toBeNull();
  });

  it('is refused only where nothing fits', async () => {
    const bedOf = async (mesh: Mesh) => (await check([partOf('bar', mesh)])).find(({ code }) => code === 'bed')!;
    expect((await bedOf(box(302, 10, 10))).severity).toBe('refuse');
    expect((await bedOf(box(302, 10, 10))).text).toMatch(/however it is turned: make it smaller/);
    expect((await bedOf(box(300, 10, 10))).severity).toBe('warning');
    expect((await bedOf(box(300, 10, 10))).text).toMatch(/turned by 4\d°|turned by 13\d°/);
    expect((await bedOf(box(30, 10, 10))).severity).toBe('note');
  });
});

describe('the thinnest wall', () => {
  it('of convex bodies is their smallest width', async () => {
    expect((await wall(turned(box(30, 20, 4), 0.4, 0.7))).thinnest).toBeCloseTo(4, 3);
    // A regular tetrahedron is narrowest between opposite edges: a/√2 (by hand); its height is a √(2/3).
    const edge = 20 * 2 * Math.sqrt(6);
    expect((await wall(crystalMesh(tetrahedron, 20))).thinnest).toBeCloseTo(edge / Math.SQRT2, 3);
    expect((await wall(crystalMesh(cube, 10))).thinnest).toBeCloseTo(20, 4);
  });

  it('of a hollow box is its wall', async () => {
    const hollow = await withSolids((bench) => {
      const inner = bench.place(bench.solid(box(27, 17, 7)), [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0, 1.5, 1.5, 1.5, 1]);
      return bench.mesh(bench.subtract(bench.solid(box(30, 20, 10)), [inner]), 0);
    });
    expect(await wall(hollow)).toMatchObject({ how: 'rays from the middles of triangles' });
    expect((await wall(hollow)).thinnest).toBeCloseTo(1.5, 4);
  });

  it('of a rod with a plate at its end is the rod’s diameter between flat sides', async () => {
    const rod = await withSolids((bench) =>
      bench.mesh(bench.union([bench.solid(prism(24, 1.5, 60)), bench.solid(box(12, 12, 4))]), 0),
    );
    expect((await wall(rod)).thinnest).toBeCloseTo(3 * Math.cos(Math.PI / 24), 2);
  });

  it('is told against the profile, and refused where a plain plate cannot come out at all', async () => {
    const told = async (thickness: number) =>
      (await check([partOf('plate', box(30, 30, thickness))])).find(({ code }) => code === 'thin-wall')!;
    expect(await told(2)).toMatchObject({ severity: 'note', figure: 1.2 });
    expect(await told(1)).toMatchObject({ severity: 'warning', figure: 1.2 });
    expect(await told(0.6)).toMatchObject({ severity: 'warning', figure: 0.8 });
    expect(await told(0.3)).toMatchObject({ severity: 'refuse', figure: 0.8 });
  });
});

describe('material and time', () => {
  it('follow the stated formulas', () => {
    // 10 mm cube: w = 600 · 0.5 / 1000 = 0.3, deposited 1000 (0.3 + 0.2 · 0.7) = 440 mm³, at 1.25 g/cm³ 0.55 g (by
    // hand).
    const amount = amountOf(box(10, 10, 10), { name: 'x', density: 1.25, shell: 0.5, infill: 0.2 });
    expect(amount.shellShare).toBeCloseTo(0.3, 12);
    expect(amount.deposited).toBeCloseTo(440, 9);
    expect([amount.grams, amount.solidGrams].map((g) => Number(g.toFixed(6)))).toEqual([0.55, 1.25]);
    expect(printingSeconds(440, 10, { layer: 0.2, perLayer: 3, flow: 4 })).toEqual({ layers: 50, seconds: 260 });
    expect(printingSeconds(440, 10.01, { layer: 0.05, perLayer: 8, flow: null })).toEqual({
      layers: 201,
      seconds: 1608,
    });
  });

  it('never take more than the whole body', () => {
    const amount = amountOf(box(10, 10, 0.5), { name: 'x', density: 1, shell: 1.2, infill: 0.1 });
    expect(amount.grams).toBeCloseTo(amount.solidGrams, 12);
  });
});

describe('the findings', () => {
  it('say something of every part and of the crystal, and what to change', async () => {
    const mesh = ontoBed([crystalMesh(quartz, 12)])[0]!;
    const found = await check([partOf('body', mesh), partOf('rod', prism(24, 1.5, 60), 3)], 12, quartz);
    expect(found.filter(({ part }) => part === 'rod').map(({ code }) => code)).toEqual([
      'bed',
      'overhang',
      'thin-wall',
      'material',
      'time',
    ]);
    expect(found.filter(({ part }) => part === null).map(({ code }) => code)).toEqual(['short-edge', 'narrow-face']);
    expect(found.find(({ code, part }) => code === 'material' && part === 'rod')?.text).toMatch(/each, 3 of them/);
    for (const { text, source } of found) {
      expect(text).toMatch(/[.]$/);
      expect(text).not.toMatch(/NaN|Infinity|undefined/);
      expect(source.length).toBeGreaterThan(10);
    }
  });

  it('measure a cube’s edge and face', async () => {
    const found = await check([], 0.1);
    expect(found.map(({ code, measured, severity }) => [code, Number(measured.toFixed(9)), severity])).toEqual([
      ['short-edge', 0.2, 'warning'],
      ['narrow-face', 0.2, 'warning'],
    ]);
    expect(found[0]!.text).toMatch(/12 edges are below the 0.4 mm/);
  });
});
