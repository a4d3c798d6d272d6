export type Point = readonly [number, number];

/** A half-plane `a · x ≤ c`. */
export interface Line {
  readonly a: Point;
  readonly c: number;
}

/** A disc in a convex polygon. */
export interface Disc {
  readonly centre: Point;
  readonly radius: number;
}

/** What a half-plane leaves of a convex polygon (Sutherland and Hodgman, 1974); empty when nothing. */
export function clip(polygon: readonly Point[], { a, c }: Line): Point[] {
  const out: Point[] = [];
  polygon.forEach((p, i) => {
    const q = polygon[(i + 1) % polygon.length]!;
    const [dp, dq] = [a[0] * p[0] + a[1] * p[1] - c, a[0] * q[0] + a[1] * q[1] - c];
    if (dp <= 0) out.push(p);
    if (dp < 0 !== dq < 0 && dp !== 0 && dq !== 0) {
      const t = dp / (dp - dq);
      out.push([p[0] + t * (q[0] - p[0]), p[1] + t * (q[1] - p[1])]);
    }
  });
  return out;
}

/** The polygon with every side moved in. */
export const inset = (polygon: readonly Point[], by: number): Point[] =>
  sidesOf(polygon).reduce((left, { a, c }) => clip(left, { a, c: c - by }), [...polygon]);

const HALVINGS = 40;

/**
 * The largest disc in a counter-clockwise convex polygon, by halving on the radius; where many discs are the largest, the
 * one in their middle. Null for a polygon without area.
 */
export function largestDisc(polygon: readonly Point[]): Disc | null {
  if (polygon.length < 3) return null;
  let [low, high] = [0, Math.sqrt(Math.max(0, area(polygon)) / Math.PI)];
  if (!(high > 0)) return null;
  let left: readonly Point[] = polygon;
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (low + high) / 2;
    const inside = inset(polygon, middle);
    if (inside.length > 0 && area(inside) >= 0) [low, left] = [middle, inside];
    else high = middle;
  }
  return { centre: middleOf(left), radius: low };
}

/** The polygon's sides as half-planes with unit normals. */
export function sidesOf(polygon: readonly Point[]): Line[] {
  return polygon.flatMap((p, i) => {
    const q = polygon[(i + 1) % polygon.length]!;
    const [x, y] = [q[0] - p[0], q[1] - p[1]];
    const size = Math.hypot(x, y);
    return size < SHORTEST ? [] : [{ a: [y / size, -x / size] as const, c: (y * p[0] - x * p[1]) / size }];
  });
}

/** Sides shorter than this have no direction of their own, millimetres. */
const SHORTEST = 1e-9;

export const area = (polygon: readonly Point[]): number =>
  polygon.reduce((sum, p, i) => {
    const q = polygon[(i + 1) % polygon.length]!;
    return sum + (p[0] * q[1] - q[0] * p[1]) / 2;
  }, 0);

/** Middle of the box around the points along and across their longest extent: exact for a point or a strip. */
function middleOf(points: readonly Point[]): Point {
  const [x, y] = longestExtent(points);
  const along = points.map((p) => p[0] * x + p[1] * y);
  const beside = points.map((p) => p[1] * x - p[0] * y);
  const [s, t] = [along, beside].map((values) => (Math.min(...values) + Math.max(...values)) / 2) as [number, number];
  return [s * x - t * y, s * y + t * x];
}

/** Unit vector between the two points that are farthest apart. */
export function longestExtent(points: readonly Point[]): Point {
  let [best, along]: [number, Point] = [0, [1, 0]];
  points.forEach((p, i) => {
    for (const q of points.slice(i + 1)) {
      const size = Math.hypot(q[0] - p[0], q[1] - p[1]);
      if (size > best * (1 + 1e-9)) [best, along] = [size, [(q[0] - p[0]) / size, (q[1] - p[1]) / size]];
    }
  });
  return along;
}
