import { CutFaces } from './cut-faces.ts';
import { GroupAction } from './group-action.ts';
import { Joiner } from './join.ts';
import { PlaneTable } from './plane-table.ts';
import type { PlaneSet } from './planes.ts';

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

/** Where the kernel works. One for all calls: a call neither waits nor calls back, so none can disturb another. */
const planes = new PlaneTable();
const action = new GroupAction();
const cut = new CutFaces(planes, action);
const joiner = new Joiner(planes, action, cut);

/**
 * Intersects half-spaces exactly. One face a form is cut; the planes' symmetry, where given, carries it to the rest.
 * Every decision is the exact sign of a determinant, so any number of planes may meet in a point or an edge.
 * Planes with normals that are not whole numbers are treated at their exact double values; a solid which reaches more
 * than 2^40 times its largest offset then counts as open. Normals and offsets are best kept between 1e-90 and 1e90 in
 * size, within which no product in the filters leaves the range of doubles.
 * @throws RangeError for a plane without a normal, or with a number that is not finite
 */
export function intersect(set: PlaneSet): Solid {
  planes.load(set);
  action.load(set);
  cut.cut();
  joiner.carry(set);
  const { start, neighbour } = joiner;
  const nothing = { planes: set, start, neighbour, corner: new Int32Array(0), vertices: new Float64Array(0) };
  if (set.form.length === 0 || cut.open) return { state: 'open', ...nothing };
  if (neighbour.length === 0) return { state: 'empty', ...nothing };
  joiner.join(set);
  return { planes: set, state: 'bounded', start, neighbour, corner: joiner.corner, vertices: joiner.vertices };
}
