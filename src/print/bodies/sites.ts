import type { FacePlane } from '../../shape/face-planes.ts';
import { across, cross, dot, length, plus, times, type Vector, vectorAt } from '../vectors.ts';
import { area, clip, type Disc, largestDisc, longestExtent, type Point } from './convex-polygon.ts';

/** A flat face in its own plane: `origin + s·u + t·v`, u and v unit vectors, counter-clockwise seen along −normal. */
export interface FlatFace {
  readonly normal: Vector;
  readonly origin: Vector;
  readonly u: Vector;
  readonly v: Vector;
  readonly polygon: readonly Point[];
}

/** A face given by its corners, laid out in its plane. */
export function flatFace(normal: Vector, corners: ArrayLike<number>, cycle: readonly number[]): FlatFace {
  const [u, v] = across(normal);
  const points = cycle.map((corner) => vectorAt(corners, corner));
  const height = points.reduce((sum, p) => sum + dot(p, normal), 0) / points.length;
  return { normal, origin: times(normal, height), u, v, polygon: points.map((p): Point => [dot(p, u), dot(p, v)]) };
}

/** A point of the face's plane in space. */
export const inSpace = ({ origin, u, v }: FlatFace, [s, t]: Point): Vector =>
  plus(origin, plus(times(u, s), times(v, t)));

/**
 * Where a round hole square to the face may start: it keeps `margin` inside all planes from the depth `from` to `to`,
 * counted along the face's normal (negative: into the body behind it).
 */
export function roomForHole(
  face: FlatFace,
  planes: readonly FacePlane[],
  { radius, margin, from, to }: { radius: number; margin: number; from: number; to: number },
): Point[] {
  let left: Point[] = [...face.polygon];
  for (const { normal, distance } of planes) {
    const rise = dot(normal, face.normal);
    const sideways = length(cross(normal, face.normal));
    const room = distance - margin - radius * sideways - dot(normal, face.origin) - Math.max(from * rise, to * rise);
    const a: Point = [dot(normal, face.u), dot(normal, face.v)];
    if (sideways > 1e-9) left = clip(left, { a, c: room });
    else if (room < 0) return [];
  }
  return area(left) > 0 ? left : [];
}

/** Well-separated places: the middles of as many equal slices across the longest extent. */
export function spread(room: readonly Point[], count: number): Disc[] {
  const [x, y] = longestExtent(room);
  const along = room.map((p) => p[0] * x + p[1] * y);
  const [low, high] = [Math.min(...along), Math.max(...along)];
  const step = (high - low) / count;
  return Array.from({ length: count }, (_, i) => {
    const [from, to] = [low + i * step, low + (i + 1) * step];
    const slice = clip(clip(room, { a: [x, y], c: to }), { a: [-x, -y], c: -from });
    return largestDisc(slice);
  }).flatMap((disc) => (disc ? [disc] : []));
}
