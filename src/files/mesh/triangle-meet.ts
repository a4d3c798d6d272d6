import { orient2d, orient3d, type Sign } from './orient.ts';

/** Three vertex numbers of a triangle that has an area. */
export type Corners = readonly [number, number, number];

/**
 * Whether two triangles have a point in common besides the corners or the edge that they share. Exact; touching counts,
 * lying on each other counts, but not for triangles with all three corners in common. Equal corners must have equal
 * numbers.
 *
 * Two triangles not in one plane meet where an edge of one meets the other. With one shared corner, the part in common
 * is convex and ends on the side opposite that corner of one or the other, so those two sides decide. With a shared
 * edge they meet elsewhere only when folded onto each other.
 */
export function trianglesMeet(p: Float64Array, s: Corners, t: Corners): boolean {
  const [a, b, c] = s;
  const [hasA, hasB, hasC] = [isCorner(t, a), isCorner(t, b), isCorner(t, c)];
  if (hasA && hasB) return !hasC && foldedTogether(p, a, b, c, t);
  if (hasB && hasC) return foldedTogether(p, b, c, a, t);
  if (hasC && hasA) return foldedTogether(p, c, a, b, t);
  if (edgeDivides(p, s, t) || edgeDivides(p, t, s)) return false;
  const sideOfT = sides(p, s, t);
  if (allOnOneSide(sideOfT)) return false;
  const sideOfS = sides(p, t, s);
  if (allOnOneSide(sideOfS)) return false;
  const apex = hasA ? a : hasB ? b : hasC ? c : undefined;
  return sideMeets(p, s, t, sideOfS, apex) || sideMeets(p, t, s, sideOfT, apex);
}

const isCorner = (t: Corners, vertex: number): boolean => t[0] === vertex || t[1] === vertex || t[2] === vertex;

/** On which side of the plane of `plane` each corner of `t` lies. */
function sides(p: Float64Array, plane: Corners, t: Corners): [Sign, Sign, Sign] {
  const [a, b, c] = plane;
  const side = (d: number): Sign => (d === a || d === b || d === c ? 0 : orient3d(p, a, b, c, d));
  return [side(t[0]), side(t[1]), side(t[2])];
}

const allOnOneSide = ([a, b, c]: readonly [Sign, Sign, Sign]): boolean => a !== 0 && a === b && b === c;

/**
 * Whether, seen along an axis, all of `t` but a common corner lies strictly beyond one edge of `s`: then they do not meet.
 * Asked first, because it spares neighbours in one plane the exact arithmetic that being in one plane calls for.
 */
function edgeDivides(p: Float64Array, s: Corners, t: Corners): boolean {
  const axis = viewingAxis(p, s);
  const beyond = -orient2d(p, axis, s[0], s[1], s[2]);
  for (let i = 0; i < 3; i++) {
    const from = s[i]!;
    const to = s[(i + 1) % 3]!;
    const outside = (corner: number): boolean =>
      corner === from || corner === to || orient2d(p, axis, from, to, corner) === beyond;
    if (outside(t[0]) && outside(t[1]) && outside(t[2])) return true;
  }
  return false;
}

/** Whether an edge of `s` (only the one opposite `apex`, if given) meets `t`; `side` is that of the corners of `s`. */
function sideMeets(p: Float64Array, s: Corners, t: Corners, side: readonly Sign[], apex: number | undefined): boolean {
  for (let i = 0; i < 3; i++) {
    const j = (i + 1) % 3;
    if (s[i] === apex || s[j] === apex) continue;
    if (segmentMeets(p, s[i]!, s[j]!, t, side[i]!, side[j]!)) return true;
  }
  return false;
}

function segmentMeets(p: Float64Array, from: number, to: number, t: Corners, sideFrom: Sign, sideTo: Sign): boolean {
  if (sideFrom === 0 && sideTo === 0) return segmentMeetsInPlane(p, from, to, t);
  if (sideFrom === sideTo) return false;
  const [a, b, c] = t;
  const x = orient3d(p, from, to, a, b);
  const y = orient3d(p, from, to, b, c);
  const z = orient3d(p, from, to, c, a);
  return (x >= 0 && y >= 0 && z >= 0) || (x <= 0 && y <= 0 && z <= 0);
}

function segmentMeetsInPlane(p: Float64Array, from: number, to: number, t: Corners): boolean {
  const [a, b, c] = t;
  const axis = viewingAxis(p, t);
  const turn = orient2d(p, axis, a, b, c);
  const outside = (edgeFrom: number, edgeTo: number): boolean => orient2d(p, axis, edgeFrom, edgeTo, from) === -turn;
  if (!outside(a, b) && !outside(b, c) && !outside(c, a)) return true;
  return (
    segmentsCross(p, axis, from, to, a, b) ||
    segmentsCross(p, axis, from, to, b, c) ||
    segmentsCross(p, axis, from, to, c, a)
  );
}

/** An axis along which the triangle is seen with an area: the one with the largest as far as rounding tells. */
function viewingAxis(p: Float64Array, [a, b, c]: Corners): number {
  const [i, j, k] = [3 * a, 3 * b, 3 * c];
  const [ux, uy, uz] = [p[j]! - p[i]!, p[j + 1]! - p[i + 1]!, p[j + 2]! - p[i + 2]!];
  const [vx, vy, vz] = [p[k]! - p[i]!, p[k + 1]! - p[i + 1]!, p[k + 2]! - p[i + 2]!];
  const [x, y, z] = [Math.abs(uy * vz - uz * vy), Math.abs(uz * vx - ux * vz), Math.abs(ux * vy - uy * vx)];
  const best = z >= x && z >= y ? 2 : y >= x ? 1 : 0;
  if (orient2d(p, best, a, b, c) !== 0) return best;
  return [2, 1, 0].find((axis) => orient2d(p, axis, a, b, c) !== 0) ?? 0;
}

function segmentsCross(p: Float64Array, axis: number, a: number, b: number, c: number, d: number): boolean {
  const c1 = orient2d(p, axis, a, b, c);
  const d1 = orient2d(p, axis, a, b, d);
  const a1 = orient2d(p, axis, c, d, a);
  const b1 = orient2d(p, axis, c, d, b);
  if (c1 * d1 < 0 && a1 * b1 < 0) return true;
  return (
    (c1 === 0 && inBox(p, a, b, c)) ||
    (d1 === 0 && inBox(p, a, b, d)) ||
    (a1 === 0 && inBox(p, c, d, a)) ||
    (b1 === 0 && inBox(p, c, d, b))
  );
}

/** Whether `point`, which is in line with `a` and `b`, lies between them or on one of them. */
function inBox(p: Float64Array, a: number, b: number, point: number): boolean {
  for (let axis = 0; axis < 3; axis++) {
    const [u, v, w] = [p[3 * a + axis]!, p[3 * b + axis]!, p[3 * point + axis]!];
    if (w < Math.min(u, v) || w > Math.max(u, v)) return false;
  }
  return true;
}

/** Whether the triangle u, v, a lies on the triangle t, which has the edge u, v too. */
function foldedTogether(p: Float64Array, u: number, v: number, a: number, t: Corners): boolean {
  const b = t[0] !== u && t[0] !== v ? t[0] : t[1] !== u && t[1] !== v ? t[1] : t[2];
  if (orient3d(p, u, v, a, b) !== 0) return false;
  const axis = viewingAxis(p, [u, v, a]);
  return orient2d(p, axis, u, v, a) === orient2d(p, axis, u, v, b);
}
