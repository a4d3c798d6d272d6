import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { convexHull } from '../../../src/polyhedron/polygon.ts';
import type { Side } from '../../../src/print/lettering/box-room.ts';
import type { Point } from '../../../src/print/lettering/field.ts';
import { fitBox, sidesOf } from '../../../src/print/lettering/fit-box.ts';

const BOX = { width: 3, height: 1 };
const ALL = { least: 0, enough: Number.POSITIVE_INFINITY };

/** A side as a row of the linear programme: nx·x + ny·y + room ≥ size · reach. */
const reach = ({ nx, ny }: Side): number => (Math.abs(nx) * BOX.width + Math.abs(ny) * BOX.height) / 2;

/** Largest size by trying the meeting of every three sides: the slow obvious way (linear programming). */
function slowSize(sides: readonly Side[]): number {
  let best = Number.NEGATIVE_INFINITY;
  for (const [i, a] of sides.entries())
    for (const [j, b] of sides.slice(i + 1).entries())
      for (const c of sides.slice(i + j + 2)) {
        const rows = [a, b, c].map((side) => [side.nx, side.ny, -reach(side), -side.room]);
        const det = (k: number): number => {
          const m = rows.map((row) => [0, 1, 2].map((column) => row[column === k ? 3 : column]!));
          return (
            m[0]![0]! * (m[1]![1]! * m[2]![2]! - m[1]![2]! * m[2]![1]!) -
            m[0]![1]! * (m[1]![0]! * m[2]![2]! - m[1]![2]! * m[2]![0]!) +
            m[0]![2]! * (m[1]![0]! * m[2]![1]! - m[1]![1]! * m[2]![0]!)
          );
        };
        const whole = det(-1);
        if (Math.abs(whole) < 1e-9) continue;
        const [x, y, size] = [det(0) / whole, det(1) / whole, det(2) / whole];
        const within = sides.every((side) => side.nx * x + side.ny * y + side.room >= size * reach(side) - 1e-9);
        if (within) best = Math.max(best, size);
      }
  return best;
}

const polygons = fc
  .array(fc.tuple(fc.integer({ min: -100, max: 100 }), fc.integer({ min: -100, max: 100 })), {
    minLength: 3,
    maxLength: 12,
  })
  .map((points) => convexHull(points.map(([x, y]): Point => [x / 5, y / 5])))
  .filter((polygon) => polygon.length >= 3);

describe('the largest box in a convex polygon', () => {
  it('is as large as linear programming finds, save what it gives up for the middle', () => {
    fc.assert(
      fc.property(polygons, (polygon) => {
        const sides = sidesOf(polygon);
        const best = slowSize(sides);
        const spot = fitBox(polygon, sides, [], BOX, ALL);
        expect(spot.size).toBeLessThanOrEqual(best + 1e-9);
        expect(spot.size).toBeGreaterThan(0.9 * best);
        // What just fits is not given up.
        expect(fitBox(polygon, sides, [], BOX, { least: 0.97 * best, enough: best }).size).toBeGreaterThan(0.94 * best);
      }),
      { numRuns: Number(process.env.GONIOLITH_RUNS ?? 150) },
    );
  });

  it('stands in the middle where there is room', () => {
    const square: Point[] = [
      [0, 0],
      [10, 0],
      [10, 10],
      [0, 10],
    ];
    expect(fitBox(square, sidesOf(square), [], BOX, { least: 1, enough: 2 }).centre).toEqual([5, 5]);
  });

  it('keeps off discs', () => {
    const square: Point[] = [
      [-20, -20],
      [20, -20],
      [20, 20],
      [-20, 20],
    ];
    const disc = { centre: [0, 0] as const, radius: 5 };
    const { centre, size } = fitBox(square, sidesOf(square), [disc], BOX, ALL);
    // Above or below the disc 15 mm are free in height, and 40 in width: 40 / 3 by hand.
    expect(size).toBeGreaterThan(0.95 * (40 / 3));
    const [dx, dy] = [Math.abs(centre[0]) - (BOX.width * size) / 2, Math.abs(centre[1]) - (BOX.height * size) / 2];
    expect(Math.hypot(Math.max(0, dx), Math.max(0, dy))).toBeGreaterThanOrEqual(5 - 1e-9);
  });
});
