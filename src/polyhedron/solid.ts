import { CutFaces } from './by-form/cut-faces.ts';
import { GroupAction } from './by-form/group-action.ts';
import { Joiner } from './by-form/join.ts';
import { Inserter } from './by-plane/insert.ts';
import { Reader } from './by-plane/read.ts';
import { PlaneTable } from './exact/plane-table.ts';
import type { PlaneSet, PlaneSymmetry } from './planes.ts';

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
const table = new PlaneTable();
const action = new GroupAction();
const cut = new CutFaces(table, action);
const joiner = new Joiner(table, action, cut);
const inserter = new Inserter(table);
const reader = new Reader(inserter.shell);

/**
 * Intersects half-spaces exactly: every decision is the exact sign of a determinant, so any number of planes may meet in
 * a point or an edge. With a point group one face a form is cut and the group carries it to the rest; without, plane
 * after plane is put into one solid. Both ways give the same faces, edges and vertices.
 *
 * Normals that are not whole numbers are taken at their exact double values; a solid which reaches more than 2^40 times
 * its largest offset then counts as open. Normals and offsets are best kept between 1e-90 and 1e90 in size, within
 * which no product in the filters leaves the range of doubles.
 * @throws RangeError for a plane without a normal, or with a number that is not finite
 */
export function intersect(planes: PlaneSet): Solid {
  table.load(planes);
  return planes.symmetry ? intersectForms(planes, planes.symmetry) : intersectPlanes(planes);
}

function intersectForms(planes: PlaneSet, symmetry: PlaneSymmetry): Solid {
  action.load(planes, symmetry);
  cut.cut();
  joiner.carry();
  const { start, neighbour } = joiner;
  if (planes.form.length === 0 || cut.open) return { planes, state: 'open', start, neighbour, ...noVertices() };
  if (neighbour.length === 0) return { planes, state: 'empty', start, neighbour, ...noVertices() };
  joiner.join();
  return { planes, state: 'bounded', start, neighbour, corner: joiner.corner, vertices: joiner.vertices };
}

function intersectPlanes(planes: PlaneSet): Solid {
  if (!inserter.insertAll()) {
    const start = new Int32Array(planes.form.length + 1);
    return { planes, state: 'empty', start, neighbour: new Int32Array(0), ...noVertices() };
  }
  reader.readFaces();
  const { start, neighbour, corner } = reader;
  if (reader.isOpen()) return { planes, state: 'open', start, neighbour, ...noVertices() };
  reader.readVertices();
  return { planes, state: 'bounded', start, neighbour, corner, vertices: reader.vertices };
}

const noVertices = () => ({ corner: new Int32Array(0), vertices: new Float64Array(0) });
