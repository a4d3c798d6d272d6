import type { FacePlane } from '../../shape/face-planes.ts';
import { across, dot, minus, plus, times, type Vector } from '../vectors.ts';

type Point = readonly [number, number];

/** Where the skins of two faces touch: a convex polygon, counter-clockwise seen from the first face. */
export interface Wall {
  /** Places of the two faces in the list of planes. */
  readonly faces: readonly [number, number];
  readonly corners: readonly Vector[];
}

/**
 * The skin of a face is what lies nearer to it than to any other face, and no deeper than the skins. Two skins meet in the
 * plane of points that are equally deep under both faces; of that plane every other face, the surface and the depth cut
 * away a half-plane. (The boundaries of these cells are the medial axis of the crystal.)
 * @param faces outlines of the faces, in the order of the planes
 * @param radius of a sphere about the crystal
 */
export function skinWalls(
  planes: readonly FacePlane[],
  faces: readonly (readonly Vector[])[],
  depth: number,
  radius: number,
): Wall[] {
  const walls: Wall[] = [];
  const boxes = faces.map((corners) => boxAbout(corners, depth));
  planes.forEach((f, i) => {
    for (let j = i + 1; j < planes.length; j++) {
      if (!meet(boxes[i]!, boxes[j]!)) continue;
      const corners = wallBetween(f, planes[j]!, planes, depth, radius);
      if (corners) walls.push({ faces: [i, j], corners });
    }
  });
  return walls;
}

interface Box {
  readonly low: Vector;
  readonly high: Vector;
}

/**
 * Holds the skin of a face: a ball about a point of it that touches the face lies in the crystal, so the point is no
 * farther than the depth from the face itself, not only from its plane.
 */
function boxAbout(corners: readonly Vector[], depth: number): Box {
  const extreme = (axis: 0 | 1 | 2, side: 1 | -1): number =>
    side * Math.max(...corners.map((corner) => side * corner[axis])) + side * (depth + ON_LINE);
  return {
    low: [extreme(0, -1), extreme(1, -1), extreme(2, -1)],
    high: [extreme(0, 1), extreme(1, 1), extreme(2, 1)],
  };
}

const meet = (a: Box, b: Box): boolean =>
  ([0, 1, 2] as const).every((axis) => a.low[axis] <= b.high[axis] && b.low[axis] <= a.high[axis]);

function wallBetween(
  f: FacePlane,
  g: FacePlane,
  planes: readonly FacePlane[],
  depth: number,
  radius: number,
): Vector[] | null {
  const apart = minus(f.normal, g.normal);
  const size = Math.hypot(...apart);
  const normal = times(apart, 1 / size);
  const from = times(normal, (f.distance - g.distance) / size);
  const [u, v] = across(normal);
  const reach = 2 * radius;
  let polygon: readonly Point[] = [
    [-reach, -reach],
    [reach, -reach],
    [reach, reach],
    [-reach, reach],
  ];
  const cut = (row: Vector, most: number): boolean => {
    polygon = clipped(polygon, [dot(row, u), dot(row, v)], most - dot(row, from));
    return polygon.length > 2;
  };
  if (!cut(f.normal, f.distance) || !cut(times(f.normal, -1), depth - f.distance)) return null;
  for (const h of planes)
    if (h !== f && h !== g && !cut(minus(h.normal, f.normal), h.distance - f.distance)) return null;
  if (width(polygon) < NO_WIDTH) return null;
  return polygon.map(([x, y]) => plus(from, plus(times(u, x), times(v, y))));
}

/** Millimetres: far above rounding, far below what a file can keep. Lines this near a corner pass through it. */
const ON_LINE = 1e-9;
/** Skins that meet only in an edge leave walls no wider than rounding makes them. */
const NO_WIDTH = 1e-6;

/** What `a · x ≤ c` leaves of a convex polygon (Sutherland and Hodgman, 1974), corners on the line kept as they are. */
function clipped(polygon: readonly Point[], a: Point, c: number): Point[] {
  const norm = Math.hypot(...a);
  if (norm < ON_LINE) return c > -ON_LINE ? [...polygon] : [];
  const out: Point[] = [];
  polygon.forEach((p, i) => {
    const q = polygon[(i + 1) % polygon.length]!;
    const [dp, dq] = [a[0] * p[0] + a[1] * p[1] - c, a[0] * q[0] + a[1] * q[1] - c].map((d) => d / norm) as [
      number,
      number,
    ];
    if (dp <= ON_LINE) out.push(p);
    if (Math.min(dp, dq) < -ON_LINE && Math.max(dp, dq) > ON_LINE) {
      const t = dp / (dp - dq);
      out.push([p[0] + t * (q[0] - p[0]), p[1] + t * (q[1] - p[1])]);
    }
  });
  return out;
}

/** Twice the area over the outline's length: near the width of a sliver. */
function width(polygon: readonly Point[]): number {
  let [twice, outline] = [0, 0];
  polygon.forEach(([px, py], i) => {
    const [qx, qy] = polygon[(i + 1) % polygon.length]!;
    twice += px * qy - qx * py;
    outline += Math.hypot(qx - px, qy - py);
  });
  return (2 * twice) / outline;
}
