import { describe, expect, it } from 'vitest';
import { crystalMesh } from '../../../src/print/body.ts';
import { bevelledBody } from '../../../src/print/handling/bevelled.ts';
import { fluxIndex } from '../../../src/print/handling/magnet.ts';
import { type HandlingOptions, handlingReport } from '../../../src/print/handling/report.ts';
import { roundedBody } from '../../../src/print/handling/rounded.ts';
import { withSolids } from '../../../src/print/kit.ts';
import { assemble, type Part } from '../../../src/print/part.ts';
import type { ClosedShape } from '../../../src/shape/shape.ts';
import { cube, octahedron, quartz, tetrahedron } from '../../draw/crystals.ts';
import { box, partOf, prism, turned } from '../solids.ts';

const report = (parts: readonly Part[], shape: ClosedShape, options?: HandlingOptions) =>
  withSolids((bench) => handlingReport(bench, parts, shape, 20, options));

describe('the report on handling', () => {
  it('gives the dihedral angles of a tetrahedron: arccos 1/3 = 70.53° (by hand)', async () => {
    const found = await report([], tetrahedron);
    const edges = found.find(({ code }) => code === 'sharp-edges')!;
    expect(edges.measured).toBeCloseTo((Math.acos(1 / 3) * 180) / Math.PI, 9);
    expect(edges.text).toMatch(/6 edges is 70.5°; 6 are below 90°, 0 below 30°/);
  });

  it('counts a cube’s right angles as not below 90°', async () => {
    expect((await report([], cube)).find(({ code }) => code === 'sharp-edges')?.text).toMatch(/0 are below 90°/);
  });

  it('sets the corners beside the gauge’s 0.50 mm, before and after blunting', async () => {
    const points = async (options?: HandlingOptions) =>
      (await report([], octahedron, options)).find(({ code }) => code === 'points')!;
    expect(await points()).toMatchObject({ severity: 'warning', figure: 0.5 });
    expect((await points()).text).toMatch(/reaches 0.72 mm.*6 corners reach beyond/);
    for (const body of [bevelledBody(octahedron, 20, { width: 1 }), roundedBody(octahedron, 20)]) {
      const blunt = await points({ body });
      expect(blunt.severity).toBe('note');
      expect(blunt.measured).toBeLessThan(0.5);
    }
  });

  it('says that blunting makes no crystal faces', async () => {
    const found = await report([], cube, { body: roundedBody(cube, 20) });
    expect(found.find(({ code }) => code === 'blunted')?.text).toMatch(/radius of 0.75 mm.*no crystal faces/);
  });

  it('tries every connected solid in the small-parts cylinder', async () => {
    const parts = [
      partOf('body', crystalMesh(cube, 20)),
      partOf('rod-3', prism(24, 1.5, 60), 4),
      partOf('tags', assemble([partOf('', box(20, 10, 2)), partOf('', turned(box(50, 50, 2), 1, 0, 90))])),
    ];
    const found = (await report(parts, cube)).filter(({ code }) => code === 'small-part');
    expect(found.map(({ part, severity }) => [part, severity])).toEqual([
      ['body', 'note'],
      ['rod-3', 'warning'],
      ['tags', 'warning'],
      ['tags', 'note'],
    ]);
    expect(found[1]!.text).toMatch(/"rod-3" \(4 copies\), 60.1 mm at its longest, fits the 31.7 mm/);
  });

  it('gives a magnet’s flux index: 6 × 2 mm with 0.3 T has π/4 · 36 · 9 = 254 kG²mm² (by hand)', async () => {
    const magnet = { diameter: 6, thickness: 2, poleField: 0.3 };
    expect(fluxIndex(magnet)).toBeCloseTo(254.47, 2);
    const [found] = (await report([], cube, { magnets: [magnet] })).filter(({ code }) => code === 'magnet');
    expect(found).toMatchObject({ figure: 50, severity: 'warning', source: expect.stringMatching(/16 CFR 1262/) });
    expect(fluxIndex({ diameter: 6, thickness: 2 })).toBeGreaterThan(50);
  });

  it('measures, cites and defers, and never calls a thing safe', async () => {
    const found = await report([partOf('body', crystalMesh(quartz, 20))], quartz, {
      body: bevelledBody(quartz, 20, { width: 0.6 }),
      magnets: [{ diameter: 5, thickness: 1 }],
    });
    expect(found.at(-1)!.text).toMatch(/not a compliance test.*local rules/);
    for (const { text, source, measured } of found) {
      expect(text).not.toMatch(/\bsafe\b|\bcompliant\b|NaN|undefined/);
      expect(source.length).toBeGreaterThan(5);
      expect(Number.isFinite(measured)).toBe(true);
    }
  });
});
