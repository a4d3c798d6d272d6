import { along, dot, type Point, type Vector } from '../../src/draw/vector.ts';
import type { ViewFrame } from '../../src/draw/view.ts';

/** A convex solid as half-spaces `normal · x ≤ distance`. */
export type ConvexSolid = readonly { readonly normal: Vector; readonly distance: number }[];

/** How near to the viewer a convex solid comes on the line of sight through a point of the picture; null beside it. */
export function frontDepth(solid: ConvexSolid, frame: ViewFrame, [x, y]: Point): number | null {
  const start = along(along([0, 0, 0], frame.right, x), frame.up, y);
  let [low, high] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
  for (const { normal, distance } of solid) {
    const slope = dot(normal, frame.toward);
    const room = distance - dot(normal, start);
    if (Math.abs(slope) < 1e-12) {
      if (room < 0) return null;
    } else if (slope > 0) high = Math.min(high, room / slope);
    else low = Math.max(low, room / slope);
  }
  return high > low ? high : null;
}

/** A prism over a convex outline (counter-clockwise) across an axis, between two heights. */
export function prism(
  outline: readonly (readonly [number, number])[],
  [x, y, axis]: readonly [Vector, Vector, Vector],
  [from, to]: readonly [number, number],
): ConvexSolid {
  const sides = outline.flatMap(([px, py], i) => {
    const [qx, qy] = outline[(i + 1) % outline.length]!;
    const length = Math.hypot(qx - px, qy - py);
    if (length < 1e-9) return [];
    const [nx, ny] = [(qy - py) / length, (px - qx) / length];
    return [{ normal: along(along([0, 0, 0], x, nx), y, ny), distance: nx * px + ny * py }];
  });
  const down: Vector = [-axis[0], -axis[1], -axis[2]];
  return [...sides, { normal: axis, distance: to }, { normal: down, distance: -from }];
}

export function contains(polygon: readonly Point[], [x, y]: Point): boolean {
  let inside = false;
  for (const [i, [px, py]] of polygon.entries()) {
    const [qx, qy] = polygon[(i + 1) % polygon.length]!;
    if (py > y !== qy > y && x < px + ((y - py) * (qx - px)) / (qy - py)) inside = !inside;
  }
  return inside;
}

/** Distance of a point from a polygon's outline. */
export function distanceFrom(polygon: readonly Point[], [x, y]: Point): number {
  return Math.min(
    ...polygon.map(([px, py], i) => {
      const [qx, qy] = polygon[(i + 1) % polygon.length]!;
      const [dx, dy] = [qx - px, qy - py];
      const square = dx * dx + dy * dy;
      const t = square === 0 ? 0 : Math.min(1, Math.max(0, ((x - px) * dx + (y - py) * dy) / square));
      return Math.hypot(x - px - t * dx, y - py - t * dy);
    }),
  );
}
