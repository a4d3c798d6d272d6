import { Vector3 } from 'three';
import { ConvexHull } from 'three/examples/jsm/math/ConvexHull.js';
import { describe, expect, it } from 'vitest';
import { measure } from '../../src/polyhedron/measures.ts';
import { intersect } from '../../src/polyhedron/solid.ts';
import { checkSolid, count, facesAround, presentFaces, UNIT_FRAME } from './check-solid.ts';
import { type HalfSpace, planesFrom } from './hand-planes.ts';
import { randomPlanes } from './random-planes.ts';

/** A face of three's hull, as the numbers of its corner points. */
function hullTriangles(points: readonly Vector3[]): number[][] {
  const number = new Map(points.map((point, i) => [point, i]));
  return new ConvexHull().setFromPoints([...points]).faces.map((face) => {
    const corners: number[] = [];
    for (let edge = face.edge; corners.length === 0 || edge !== face.edge; edge = edge.next)
      corners.push(number.get(edge.head().point)!);
    return corners;
  });
}

/** Volume by the divergence theorem over three's triangles of the solid's own vertices. */
function hullVolume(vertices: Float64Array): number {
  const points = Array.from({ length: vertices.length / 3 }, (_, v) => new Vector3().fromArray(vertices, 3 * v));
  return hullTriangles(points).reduce((sum, [a, ...ring]) => {
    for (let i = 0; i + 1 < ring.length; i++)
      sum += points[a!]!.dot(new Vector3().crossVectors(points[ring[i]!]!, points[ring[i + 1]!]!)) / 6;
    return sum;
  }, 0);
}

/**
 * By polarity the half-spaces h·x ≤ D (D > 0) and the points h/D have dual convex bodies: a point is a corner of the
 * hull where its plane is a face, and a triangle of the hull is a vertex. The hull is that of three.js.
 */
describe.each([5, 10, 30, 100, 300])('%d random planes, against the hull of the dual points', (n) => {
  it.each([1, 2, 3].flatMap((seed) => [[seed, true] as const, [seed, false] as const]))(
    'seed %d, whole: %s',
    (seed, whole) => {
      const list: HalfSpace[] = randomPlanes(n, { seed, whole, spread: 0.1 });
      const solid = intersect(planesFrom(list));
      const dual = hullTriangles(list.map(([h, k, l, d]) => new Vector3(h / d, k / d, l / d)));
      if (solid.state === 'open') {
        expect(n).toBeLessThan(30);
        return;
      }
      checkSolid(solid);
      const named = (corners: number[]): string => [...corners].sort((a, b) => a - b).join();
      expect(facesAround(solid).map(named).sort()).toEqual(dual.map(named).sort());
      expect(presentFaces(solid)).toEqual([...new Set(dual.flat())].sort((a, b) => a - b));
      expect(count(solid).V).toBe(dual.length);
      const volume = measure(solid, UNIT_FRAME).volume;
      expect(Math.abs(hullVolume(solid.vertices) / volume - 1)).toBeLessThan(1e-9);
    },
  );
});
