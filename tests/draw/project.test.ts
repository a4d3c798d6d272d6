import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { boundsOf, fitInto, place, signedArea } from '../../src/draw/project.ts';
import type { Point } from '../../src/draw/vector.ts';
import { convexHull } from '../../src/polyhedron/polygon.ts';

const point = fc.tuple(fc.integer({ min: -20, max: 20 }), fc.integer({ min: -20, max: 20 }));

describe('placing on the page', () => {
  it('fits into the box, touches it in one direction, stands in its middle, and turns y down', () => {
    fc.assert(
      fc.property(fc.array(point, { minLength: 3 }), (points) => {
        const bounds = boundsOf(points as Point[]);
        fc.pre(bounds.high[0] > bounds.low[0] && bounds.high[1] > bounds.low[1]);
        const placement = fitInto(bounds, { x: 10, y: 20, width: 300, height: 200 });
        const placed = boundsOf([place(placement, bounds.low), place(placement, bounds.high)]);
        const [width, height] = [placed.high[0] - placed.low[0], placed.high[1] - placed.low[1]];
        expect(Math.max(width / 300, height / 200)).toBeCloseTo(1, 9);
        expect((placed.low[0] + placed.high[0]) / 2).toBeCloseTo(160, 9);
        expect((placed.low[1] + placed.high[1]) / 2).toBeCloseTo(120, 9);
        expect(place(placement, bounds.high)[1]).toBeLessThan(place(placement, bounds.low)[1]);
      }),
    );
  });
});

describe('convex hull', () => {
  it('of a square with points inside and on its sides is the square, counter-clockwise', () => {
    const square: Point[] = [
      [0, 0],
      [2, 0],
      [2, 2],
      [0, 2],
      [1, 1],
      [1, 0],
      [2, 1],
    ];
    expect(convexHull(square)).toEqual([
      [0, 0],
      [2, 0],
      [2, 2],
      [0, 2],
    ]);
  });

  it('has no point to the right of any side', () => {
    fc.assert(
      fc.property(fc.array(point, { minLength: 3 }), (points) => {
        const outline = convexHull(points as Point[]);
        fc.pre(outline.length > 2);
        expect(signedArea(outline)).toBeGreaterThan(0);
        for (const [i, [x, y]] of outline.entries()) {
          const [nextX, nextY] = outline[(i + 1) % outline.length]!;
          for (const [px, py] of points)
            expect((nextX - x) * (py - y) - (nextY - y) * (px - x)).toBeGreaterThanOrEqual(0);
        }
      }),
    );
  });
});
