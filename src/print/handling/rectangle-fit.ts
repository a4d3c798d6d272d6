import { convexHull } from '../../polyhedron/polygon.ts';
export type Point = readonly [number, number];

export interface RectangleFit {
  /** The rectangle, this many times as large, is the smallest of its shape that holds the points. */
  readonly factor: number;
  /** Angle from the points' x axis to the rectangle's first side, radians in [0, π). */
  readonly turn: number;
}

/**
 * How well points fit a rectangle in any rotation. Between two directions along or across a side of their hull, both
 * extents are plain cosines, which bulge; so the least of their larger share lies at such a direction or where both
 * shares are equal.
 */
export function fitRectangle(points: readonly Point[], [a, b]: readonly [number, number]): RectangleFit {
  const hull = convexHull(points);
  const turns = hull
    .flatMap(([x, y], i) => {
      const [nextX, nextY] = hull[(i + 1) % hull.length]!;
      const angle = Math.atan2(nextY - y, nextX - x);
      return [halfTurn(angle), halfTurn(angle + Math.PI / 2)];
    })
    .sort((p, q) => p - q);
  let best: RectangleFit = { factor: Number.POSITIVE_INFINITY, turn: 0 };
  const attempt = (turn: number): void => {
    const factor = Math.max(extent(hull, turn).length / a, extent(hull, turn + Math.PI / 2).length / b);
    if (factor < best.factor) best = { factor, turn };
  };
  for (const [i, turn] of turns.entries()) {
    attempt(turn);
    const next = turns[i + 1] ?? turns[0]! + Math.PI;
    const [one, other] = [extent(hull, (turn + next) / 2), extent(hull, (turn + next + Math.PI) / 2)];
    const even = Math.atan2(other.y / b - one.x / a, one.y / a + other.x / b);
    const inside = turn + halfTurn(even - turn);
    if (inside < next) attempt(halfTurn(inside));
  }
  return best;
}

const halfTurn = (angle: number): number => ((angle % Math.PI) + Math.PI) % Math.PI;

/** From the lowest point in a direction to the highest: length along the direction, and the difference itself. */
function extent(points: readonly Point[], turn: number): { length: number; x: number; y: number } {
  const [cos, sin] = [Math.cos(turn), Math.sin(turn)];
  let [low, high] = [points[0]!, points[0]!];
  let [least, most] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const point of points) {
    const along = cos * point[0] + sin * point[1];
    if (along < least) [least, low] = [along, point];
    if (along > most) [most, high] = [along, point];
  }
  return { length: most - least, x: high[0] - low[0], y: high[1] - low[1] };
}
