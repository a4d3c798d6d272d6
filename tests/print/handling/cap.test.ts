import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { between, sphereCap } from '../../../src/print/handling/cap.ts';
import { angleBetween, cross, dot, type Vector } from '../../../src/print/vectors.ts';

/** Solid angle of a triangle of directions, negative when it is turned inside out (Van Oosterom and Strackee 1983). */
const solidAngle = (a: Vector, b: Vector, c: Vector): number =>
  2 * Math.atan2(dot(a, cross(b, c)), 1 + dot(a, b) + dot(b, c) + dot(c, a));

/** Corners of a convex outline: on an ellipse about the z axis, at increasing angles with gaps below a half turn. */
const outline = fc
  .record({
    gaps: fc.array(fc.integer({ min: 5, max: 100 }), { minLength: 3, maxLength: 8 }),
    wide: fc.integer({ min: 10, max: 300 }),
    narrow: fc.integer({ min: 10, max: 300 }),
  })
  .filter(({ gaps }) => gaps.every((gap) => gap < 0.45 * gaps.reduce((sum, one) => sum + one, 0)))
  .map(({ gaps, wide, narrow }) => {
    const all = gaps.reduce((sum, gap) => sum + gap, 0);
    let angle = 0;
    return gaps.map((gap): Vector => {
      angle += (2 * Math.PI * gap) / all;
      const [x, y] = [(wide / 100) * Math.cos(angle), (narrow / 100) * Math.sin(angle)];
      const length = Math.hypot(x, y, 1);
      return [x / length, y / length, 1 / length];
    });
  });

describe('a cap on a sphere', () => {
  it('covers what its rim encloses once, with short edges and nothing turned over', () => {
    fc.assert(
      fc.property(outline, fc.integer({ min: 8, max: 60 }), (corners, hundredths) => {
        const step = hundredths / 100;
        const arcs = corners.map((corner, i) => {
          const next = corners[(i + 1) % corners.length]!;
          const pieces = Math.max(1, Math.ceil(angleBetween(corner, next) / step));
          return Array.from({ length: pieces }, (_, k) => between(corner, next, k / pieces));
        });
        const { directions, triangles } = sphereCap(arcs, step);
        let covered = 0;
        for (let t = 0; t < triangles.length; t += 3) {
          const [a, b, c] = [0, 1, 2].map((i) => directions[triangles[t + i]!]!);
          expect(solidAngle(a!, b!, c!)).toBeGreaterThan(0);
          covered += solidAngle(a!, b!, c!);
          for (const [p, q] of [
            [a!, b!],
            [b!, c!],
            [c!, a!],
          ] as const)
            expect(angleBetween(p, q) / step).toBeLessThan(Math.sqrt(3));
        }
        const fan = corners.slice(2).map((corner, i) => solidAngle(corners[0]!, corners[i + 1]!, corner));
        expect(covered).toBeCloseTo(
          fan.reduce((sum, one) => sum + one, 0),
          9,
        );
      }),
      { numRuns: 150 },
    );
  });
});
