import { cutFaces } from './cut-faces.ts';
import { GroupAction } from './group-action.ts';
import { carryFaces, joinCorners } from './join.ts';
import { doubleOffset, type Offset } from './offset.ts';
import type { PlaneSet } from './planes.ts';
import { type SidePlanes, sidePlanes } from './side.ts';

/**
 * The intersection of half-spaces, with its full topology. Face f's edges are `start[f]` … `start[f + 1] − 1`,
 * counter-clockwise seen from outside; a face with no edges does not appear.
 */
export interface Solid {
  readonly planes: PlaneSet;
  /** `open`: it reaches to infinity, and `vertices` is empty. `empty`: nothing, or nothing with a volume, is left. */
  readonly state: 'bounded' | 'open' | 'empty';
  readonly start: Int32Array;
  /** The plane on the other side of each edge. */
  readonly neighbour: Int32Array;
  /** The vertex at the end of each edge. */
  readonly corner: Int32Array;
  /** Coordinates of the vertices in the basis of the planes, three a vertex. */
  readonly vertices: Float64Array;
}

/**
 * Intersects half-spaces exactly. One face a form is cut; the planes' symmetry, where given, carries it to the rest.
 * Every decision is the exact sign of a determinant, so any number of planes may meet in a point or an edge.
 * Planes with normals that are not whole numbers are treated at their exact double values; a solid which reaches more
 * than 2^40 times its largest offset then counts as open. Normals and offsets are best kept between 1e-90 and 1e90 in
 * size, within which no product in the filters leaves the range of doubles.
 * @throws RangeError for a plane without a normal, or with a number that is not finite
 */
export function intersect(planes: PlaneSet): Solid {
  const count = planes.form.length;
  const prepared = withFrame(planes);
  const action = new GroupAction(planes);
  const cut = cutFaces(prepared, count, action);
  const edges = carryFaces(planes, cut, action);
  const { start, neighbour } = edges;
  const nothing = { corner: new Int32Array(0), vertices: new Float64Array(0) };
  if (count === 0 || cut.open) return { planes, state: 'open', start, neighbour, ...nothing };
  if (neighbour.length === 0) return { planes, state: 'empty', start, neighbour, ...nothing };
  return { planes, state: 'bounded', start, neighbour, ...joinCorners(planes, prepared, cut, edges) };
}

/** The planes, and after them six sides of a cube so large that it cuts only what reaches to infinity. */
function withFrame({ normals, form, offsets }: PlaneSet): SidePlanes {
  const count = form.length;
  let [largest, offset, whole] = [1, 0, true];
  for (let i = 0; i < 3 * count; i++) {
    const h = normals[i]!;
    largest = Math.max(largest, Math.abs(h));
    whole &&= Math.floor(h) === h;
  }
  for (const { approximate } of offsets) offset = Math.max(offset, Math.abs(approximate));
  if (!Number.isFinite(largest + offset)) throw new RangeError('A plane needs finite numbers.');
  // By Cramer's rule with a determinant of at least 1, no coordinate of a corner exceeds 6·largest²·offset.
  const reach = (whole ? 12 * largest * largest : 2 ** 40) * (offset || 1);
  const side = doubleOffset(2 ** Math.ceil(Math.log2(reach)), -1);
  const each: Offset[] = [];
  for (let p = 0; p < count; p++) each.push(offsets[form[p]!]!);
  each.push(side, side, side, side, side, side);
  const rows = new Float64Array(3 * count + 18);
  rows.set(normals.subarray(0, 3 * count));
  rows.set([1, 0, 0, 0, 1, 0, 0, 0, 1, -1, 0, 0, 0, -1, 0, 0, 0, -1], 3 * count);
  return sidePlanes(rows, each);
}
