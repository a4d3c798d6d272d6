/** A point of a plane. */
export type Point = readonly [number, number];

/**
 * Convex hull, counter-clockwise, without points on its sides (monotone chain, Andrew 1979). Of points in one place it
 * is one of them.
 */
export function convexHull(points: readonly Point[]): Point[] {
  const sorted = [...points].sort((p, q) => p[0] - q[0] || p[1] - q[1]);
  const hull = [...chain(sorted), ...chain(sorted.toReversed())];
  return hull.length === 0 ? sorted.slice(0, 1) : hull;
}

function chain(sorted: readonly Point[]): Point[] {
  const kept: Point[] = [];
  for (const point of sorted) {
    while (kept.length > 1 && turn(kept.at(-2)!, kept.at(-1)!, point) <= 0) kept.pop();
    kept.push(point);
  }
  return kept.slice(0, -1);
}

const turn = (p: Point, q: Point, r: Point): number => (q[0] - p[0]) * (r[1] - p[1]) - (q[1] - p[1]) * (r[0] - p[0]);

/** Centre of mass of a polygon; of one without area its first corner. */
export function centroid(polygon: readonly Point[]): Point {
  const [x0, y0] = polygon[0]!;
  let [x, y, area] = [0, 0, 0];
  for (let i = 1; i + 1 < polygon.length; i++) {
    const [ax, ay] = [polygon[i]![0] - x0, polygon[i]![1] - y0];
    const [bx, by] = [polygon[i + 1]![0] - x0, polygon[i + 1]![1] - y0];
    const twice = ax * by - ay * bx;
    x += (twice * (ax + bx)) / 3;
    y += (twice * (ay + by)) / 3;
    area += twice;
  }
  return area === 0 ? [x0, y0] : [x0 + x / area, y0 + y / area];
}
