import type { Mesh } from '../mesh.ts';
import { across, dot, minus, plus, type Vector, vectorAt } from '../vectors.ts';
import { POINT_GAUGE } from './figures.ts';
import { fitRectangle, type Point } from './rectangle-fit.ts';

/** Millimetres; a point that reaches deeper is told as reaching this far. */
export const GAUGE_LIMIT = 3;

/** Depth beyond which a point works the gauge. */
export const TRIPS = POINT_GAUGE.setBack + POINT_GAUGE.push;

export interface PointReach {
  /** How far the corner that reaches farthest goes into the slot, millimetres. */
  readonly farthest: number;
  /** How many corners reach farther than the gauge's feeler lets them without working it. */
  readonly beyond: number;
  readonly corners: number;
}

/**
 * How far the corners of a convex body go into the slot of the sharp-point gauge, each held straight in along its axis
 * and turned about it to its best; ideal, without the play and the pressure of the test. Tilting adds little: 0.01 mm
 * for a regular tetrahedron, 0.005 mm for a cube, nothing for an octahedron (tried).
 * @param axes the directions to try, one a corner, unit vectors pointing outwards
 */
export function pointReach(mesh: Mesh, axes: readonly Vector[]): PointReach {
  const body = ridges(mesh);
  let [farthest, beyond] = [0, 0];
  for (const axis of axes) {
    const tip = tipAlong(body, axis);
    if (tip.fits(TRIPS)) beyond += 1;
    if (!tip.fits(farthest)) continue;
    farthest = deepest(tip.fits, farthest);
  }
  return { farthest, beyond, corners: axes.length };
}

/** The largest depth that fits, by halving to a millionth of a millimetre. */
function deepest(fits: (depth: number) => boolean, known: number): number {
  let [low, high] = [known, GAUGE_LIMIT];
  if (fits(high)) return high;
  while (high - low > 1e-6) {
    const middle = (low + high) / 2;
    if (fits(middle)) low = middle;
    else high = middle;
  }
  return low;
}

interface Ridges {
  readonly points: readonly Vector[];
  /** Pairs of points; each edge of the mesh once. */
  readonly pairs: readonly (readonly [number, number])[];
}

function ridges({ positions, triangles }: Mesh): Ridges {
  const pairs: [number, number][] = [];
  triangles.forEach((from, i) => {
    const to = triangles[i % 3 === 2 ? i - 2 : i + 1]!;
    if (from < to) pairs.push([from, to]);
  });
  return { points: Array.from({ length: positions.length / 3 }, (_, i) => vectorAt(positions, i)), pairs };
}

/**
 * What lies within a depth of the body's farthest point must pass the slot; seen along the axis it is the hull of a
 * few points.
 */
function tipAlong({ points, pairs }: Ridges, axis: Vector): { fits: (depth: number) => boolean } {
  const heights = points.map((point) => dot(point, axis));
  const top = heights.reduce((most, height) => Math.max(most, height), Number.NEGATIVE_INFINITY);
  const [e, f] = across(axis);
  const seen = (point: Vector): Point => [dot(point, e), dot(point, f)];
  const near = pairs.filter(([p, q]) => Math.max(heights[p]!, heights[q]!) > top - GAUGE_LIMIT);
  const fits = (depth: number): boolean => {
    const level = top - depth;
    const outline: Point[] = [];
    for (const [p, q] of near) {
      const [high, low] = heights[p]! > heights[q]! ? [p, q] : [q, p];
      if (heights[high]! < level) continue;
      outline.push(seen(points[high]!));
      const span = heights[high]! - heights[low]!;
      const share = heights[low]! >= level ? 1 : (heights[high]! - level) / span;
      outline.push(seen(plus(points[high]!, minus(points[low]!, points[high]!), share)));
    }
    return fitRectangle(outline, POINT_GAUGE.slot).factor <= 1;
  };
  return { fits };
}
