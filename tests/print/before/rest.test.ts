import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { centreOfMass } from '../../../src/print/before/mass.ts';
import { overhangArea } from '../../../src/print/before/overhang.ts';
import { type Resting, restPart } from '../../../src/print/before/rest.ts';
import { crystalMesh } from '../../../src/print/body.ts';
import { withSolids } from '../../../src/print/kit.ts';
import { extentsOf, type Mesh, meshVolume } from '../../../src/print/mesh.ts';
import { CRYSTALS, octahedron, tetrahedron } from '../../draw/crystals.ts';
import { box, prism, turned } from '../solids.ts';

const rest = (mesh: Mesh, overhang = 45): Promise<Resting> =>
  withSolids((bench) => restPart(bench, mesh, { overhang }));
const angle = fc.integer({ min: -3_000, max: 3_000 }).map((n) => n / 1000);

describe('the resting face', () => {
  it('of a box is its largest face, however the box lies', async () => {
    for (const [x, z] of [
      [0, 0],
      [0.3, 1],
      [2, -1],
      [Math.PI, 0.5],
    ]) {
      const { mesh, footprint, margin, overhang, tilt } = await rest(turned(box(30, 20, 10), x!, z!, 7));
      expect(footprint).toBeCloseTo(600, 2);
      expect(margin).toBeCloseTo(10, 3);
      expect(overhang).toBe(0);
      expect(tilt).toBeCloseTo((Math.atan2(10, 5) * 180) / Math.PI, 2);
      expect(extentsOf(mesh)[2]).toBeCloseTo(10, 3);
    }
  });

  it('of an octahedron leaves its lower faces, 109.5° − 90° = 19.5° from the vertical, unsupported', async () => {
    const mesh = crystalMesh(octahedron, 20);
    const edge = 20 * Math.sqrt(6);
    const { overhang, footprint, margin } = await rest(mesh);
    expect(overhang).toBe(0);
    expect(footprint).toBeCloseTo((Math.sqrt(3) / 4) * edge ** 2, 1);
    // The inscribed circle of the triangle (by hand).
    expect(margin).toBeCloseTo(edge / (2 * Math.sqrt(3)), 3);
  });

  it('lets a tube stand on its end rather than lie, where lying needs support', async () => {
    expect(extentsOf((await rest(prism(24, 10, 30))).mesh)[2]).toBeCloseTo(30, 4);
  });

  it('never stands a part on a face beside its centre of mass', async () => {
    // A prism whose top hangs far over: base 10 × 10, sheared by 30 over 20.
    const sheared = box(10, 10, 20);
    const positions = sheared.positions.map((v, i, all) => (i % 3 === 0 ? v + 1.5 * all[i + 2]! : v));
    const { margin, mesh } = await rest({ ...sheared, positions });
    expect(margin).toBeGreaterThan(0);
    expect(extentsOf(mesh)[2]).toBeLessThan(19);
  });

  it('turns without changing anything else, for any crystal in any place', async () => {
    await fc.assert(
      fc.asyncProperty(fc.nat(CRYSTALS.length - 1), angle, angle, async (which, x, z) => {
        const shape = CRYSTALS[which]![1];
        const mesh = turned(crystalMesh(shape, 30 / shape.measures.circumscribedRadius), x, z, 3);
        const { mesh: laid, matrix, margin, overhang } = await rest(mesh);
        expect(meshVolume(laid) / meshVolume(mesh)).toBeCloseTo(1, 9);
        expect(margin).toBeGreaterThan(0);
        expect(overhangArea(laid, [0, 0, -1], 0, 45)).toBeCloseTo(overhang, 3);
        for (let at = 0; at < laid.positions.length; at += 3)
          for (let axis = 0; axis < 3; axis++) {
            const by = [0, 4, 8].reduce((sum, column, k) => sum + matrix[column + axis]! * mesh.positions[at + k]!, 0);
            expect(laid.positions[at + axis]).toBeCloseTo(by + matrix[12 + axis]!, 9);
            expect(laid.positions[at + axis]).toBeGreaterThanOrEqual(0);
          }
        const onBed = Array.from(laid.positions).filter((v, i) => i % 3 === 2 && v < 1e-3).length;
        expect(onBed).toBeGreaterThanOrEqual(3);
      }),
      { numRuns: 60 },
    );
  });

  it('is the same for the same part', async () => {
    const mesh = crystalMesh(tetrahedron, 17);
    expect(await rest(mesh)).toEqual(await rest(mesh));
  });
});

describe('overhang', () => {
  it('of a box on its edge is that of the two lower faces when the limit is below 45°', () => {
    const mesh = turned(box(30, 20, 20), Math.PI / 4, 0);
    const low = mesh.positions.reduce((least, v, i) => (i % 3 === 2 ? Math.min(least, v) : least), 0);
    expect(overhangArea(mesh, [0, 0, -1], -low, 44)).toBeCloseTo(1200, 6);
    expect(overhangArea(mesh, [0, 0, -1], -low, 45)).toBe(0);
    expect(overhangArea(mesh, [0, 0, -1], -low, 46)).toBe(0);
  });
});

describe('the centre of mass', () => {
  it('of a box is its middle, and of a half-tetrahedron a quarter up (by hand)', () => {
    const middle = centreOfMass(turned(box(30, 20, 10), 0, 0, 100));
    expect(middle.map((v) => Math.round(v * 1e9) / 1e9)).toEqual([115, 110, 105]);
    const pyramid: Mesh = {
      positions: Float64Array.from([0, 0, 0, 4, 0, 0, 0, 8, 0, 0, 0, 12]),
      triangles: Uint32Array.from([0, 2, 1, 0, 1, 3, 1, 2, 3, 0, 3, 2]),
    };
    expect(centreOfMass(pyramid).map((v) => Math.round(v * 1e9) / 1e9)).toEqual([1, 2, 3]);
  });
});
