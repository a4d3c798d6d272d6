import { describe, expect, it } from 'vitest';
import { crystalMesh } from '../../../src/print/body.ts';
import { cornerAxes } from '../../../src/print/handling/corner-axis.ts';
import { pointReach } from '../../../src/print/handling/point-gauge.ts';
import { fitRectangle } from '../../../src/print/handling/rectangle-fit.ts';
import { roundedBody } from '../../../src/print/handling/rounded.ts';
import type { ClosedShape } from '../../../src/shape/shape.ts';
import { cube, hexaoctahedron, octahedron, tetrahedron } from '../../draw/crystals.ts';

const reach = (shape: ClosedShape) => pointReach(crystalMesh(shape, 20), cornerAxes(shape.measures, shape.solid));

describe('the slot of the sharp-point gauge (16 CFR 1500.48: 1.02 × 1.15 mm, feeler at 0.38 + 0.12 mm)', () => {
  it('takes in an octahedron’s corner until its square section has sides of 1.02 mm', () => {
    // Section at depth t: a square of diagonal 2 t (by hand).
    expect(reach(octahedron)).toMatchObject({ beyond: 6, corners: 6 });
    expect(reach(octahedron).farthest).toBeCloseTo(1.02 / Math.SQRT2, 5);
  });

  it('takes in corners with a triangular section until the triangle is the largest in the slot', () => {
    // Largest equilateral triangle in a rectangle a × b with b < 2a/√3: side 2 √(a² + b² − √3 a b).
    const [a, b] = [1.02, 1.15];
    const side = 2 * Math.sqrt(a * a + b * b - Math.sqrt(3) * a * b);
    expect(reach(tetrahedron).farthest).toBeCloseTo(side * Math.sqrt(2 / 3), 4);
    expect(reach(cube).farthest).toBeCloseTo(side / Math.sqrt(6), 4);
    expect([reach(tetrahedron).beyond, reach(cube).beyond]).toEqual([4, 0]);
  });

  it('gives the calculated figures in common use: octahedron 0.72, tetrahedron 0.94, cube 0.47 mm', () => {
    expect([octahedron, tetrahedron, cube].map((shape) => Number(reach(shape).farthest.toFixed(2)))).toEqual([
      0.72, 0.94, 0.47,
    ]);
  });

  it('counts blunter corners too', () => {
    expect(reach(hexaoctahedron).corners).toBe(26);
    expect(reach(hexaoctahedron).farthest).toBeLessThan(0.47);
  });

  it.each([
    [0.55, 0.34],
    [0.75, 0.2],
  ])('a corner rounded with %f mm reaches %f mm in at most, as a ball does: r − √(r² − 0.51²)', (radius, figure) => {
    for (const shape of [cube, octahedron, tetrahedron]) {
      // Only the tetrahedron's corner is so sharp that the ball itself, and no cylinder of an edge, meets the slot.
      const least = shape === tetrahedron ? figure - 0.01 : 0;
      const { mesh } = roundedBody(shape, 20, { radius });
      const { farthest, beyond } = pointReach(mesh, cornerAxes(shape.measures, shape.solid));
      expect(farthest).toBeLessThan(figure + 0.02 + 0.005);
      expect(farthest).toBeGreaterThan(least);
      expect(beyond).toBe(0);
    }
  });
});

describe('points in a turned rectangle', () => {
  it('of its own shape fit exactly, however turned', () => {
    for (let turn = 0; turn < Math.PI; turn += 0.1) {
      const [cos, sin] = [Math.cos(turn), Math.sin(turn)];
      const corners = [
        [0, 0],
        [3, 0],
        [3, 2],
        [0, 2],
      ].map(([x, y]): [number, number] => [cos * x! - sin * y!, sin * x! + cos * y!]);
      const fit = fitRectangle(corners, [3, 2]);
      expect(fit.factor, `turned by ${turn}`).toBeCloseTo(1, 12);
      expect(Math.abs(Math.sin(fit.turn - turn)), `turned by ${turn}`).toBeLessThan(1e-9);
    }
  });

  it('are found as well as by trying 20,000 angles', () => {
    let state = 7;
    const random = (): number => {
      state = (state * 48271) % 2147483647;
      return state / 2147483647;
    };
    for (let round = 0; round < 60; round++) {
      const points = Array.from({ length: 3 + (round % 9) }, (): [number, number] => [random(), random()]);
      const { factor } = fitRectangle(points, [1.02, 1.15]);
      let tried = Number.POSITIVE_INFINITY;
      for (let i = 0; i < 20_000; i++) {
        const [cos, sin] = [Math.cos((i * Math.PI) / 20_000), Math.sin((i * Math.PI) / 20_000)];
        const along = points.map(([x, y]) => cos * x + sin * y);
        const acrossIt = points.map(([x, y]) => cos * y - sin * x);
        const extent = (values: number[]): number => Math.max(...values) - Math.min(...values);
        tried = Math.min(tried, Math.max(extent(along) / 1.02, extent(acrossIt) / 1.15));
      }
      expect(factor).toBeLessThanOrEqual(tried + 1e-12);
      expect(factor).toBeGreaterThan(tried - 3e-4);
    }
  });
});
