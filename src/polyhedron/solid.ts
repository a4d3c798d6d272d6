import { FacePolygon } from './clip.ts';
import { exactOffsets, type Offset } from './offset.ts';
import type { PlaneSet, PlaneSymmetry } from './planes.ts';
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

/** The polygons of each form's first plane, cut by all others. */
interface Cut {
  readonly polygons: readonly FacePolygon[];
  readonly firstPlane: readonly number[];
}

/**
 * Intersects half-spaces exactly. One face a form is cut; the planes' symmetry, where given, carries it to the rest.
 * Every decision is the exact sign of a determinant, so any number of planes may meet in a point or an edge.
 * Planes with normals that are not whole numbers are treated at their exact double values; a solid which reaches more
 * than 2^40 times its largest offset then counts as open.
 */
export function intersect(planes: PlaneSet): Solid {
  const count = planes.form.length;
  const cut = cutFaces(planes, withFrame(planes));
  const nothing = { corner: new Int32Array(0), vertices: new Float64Array(0) };
  const { start, neighbour } = spread(planes, cut);
  if (neighbour.length === 0) {
    const state = count === 0 ? 'open' : 'empty';
    return { planes, state, start, neighbour, ...nothing };
  }
  if (neighbour.some((plane) => plane >= count)) return { planes, state: 'open', start, neighbour, ...nothing };
  return { planes, state: 'bounded', start, neighbour, ...joinCorners(planes, cut, start, neighbour) };
}

/** The planes, and after them six sides of a cube so large that it cuts only what reaches to infinity. */
function withFrame({ normals, form, offsets }: PlaneSet): SidePlanes {
  let [largest, offset, whole] = [1, 0, true];
  for (const h of normals) {
    largest = Math.max(largest, Math.abs(h));
    whole &&= Number.isInteger(h);
  }
  for (const { approximate } of offsets) offset = Math.max(offset, Math.abs(approximate));
  // By Cramer's rule with a determinant of at least 1, no coordinate of a corner exceeds 6·largest²·offset.
  const reach = (whole ? 12 * largest * largest : 2 ** 40) * (offset || 1);
  const side = { ...exactOffsets([2 ** Math.ceil(Math.log2(reach))])[0]!, family: -1 };
  const each: Offset[] = Array.from(form, (f) => offsets[f]!);
  for (let i = 0; i < 6; i++) each.push(side);
  return sidePlanes([...normals, 1, 0, 0, 0, 1, 0, 0, 0, 1, -1, 0, 0, 0, -1, 0, 0, 0, -1], each);
}

function cutFaces(planes: PlaneSet, side: SidePlanes): Cut {
  const count = planes.form.length;
  const polygons: FacePolygon[] = [];
  const firstPlane: number[] = [];
  /** For faces not yet cut: planes already known to be neighbours. Cutting with them first leaves little to do. */
  const known = new Map<number, number[]>();
  for (let face = 0; face < count; face++) {
    if (face > 0 && planes.form[face] === planes.form[face - 1]) continue;
    const polygon = new FacePolygon(side, face, frameAround(side, face, count));
    for (const p of known.get(face) ?? []) polygon.cut(p);
    for (let p = 0; p < count && polygon.neighbours.length > 0; p++) if (p !== face) polygon.cut(p);
    for (const p of polygon.neighbours) if (p > face && p < count) known.set(p, [...(known.get(p) ?? []), face]);
    known.delete(face);
    polygons.push(polygon);
    firstPlane.push(face);
  }
  return { polygons, firstPlane };
}

/** The four sides of the frame that bound a face's plane, in the order in which they go round it. */
function frameAround({ x, y, z }: SidePlanes, face: number, frame: number): number[] {
  const h = [x[face]!, y[face]!, z[face]!];
  const k = h.reduce((best, value, axis) => (Math.abs(value) > Math.abs(h[best]!) ? axis : best), 0);
  const [i, j] = [(k + 1) % 3, (k + 2) % 3];
  const round = [frame + i, frame + j, frame + 3 + i, frame + 3 + j];
  return h[k]! > 0 ? round : round.reverse();
}

/** Carries the cut faces to all planes of their forms; an operation of the second kind turns the cycle round. */
function spread(planes: PlaneSet, { polygons }: Cut): { start: Int32Array; neighbour: Int32Array } {
  const { form, symmetry } = planes;
  const count = form.length;
  const start = new Int32Array(count + 1);
  for (let f = 0; f < count; f++) start[f + 1] = start[f]! + polygons[form[f]!]!.neighbours.length;
  const neighbour = new Int32Array(start[count]!);
  for (let f = 0; f < count; f++) {
    const cycle = polygons[form[f]!]!.neighbours;
    const first = start[f]!;
    const operation = symmetry ? symmetry.carrier[f]! : 0;
    const back = symmetry?.improper[operation] === 1;
    for (let i = 0; i < cycle.length; i++)
      neighbour[first + (back ? cycle.length - 1 - i : i)] = symmetry
        ? carry(planes, symmetry, operation, cycle[i]!)
        : cycle[i]!;
  }
  return { start, neighbour };
}

function carry({ form }: PlaneSet, symmetry: PlaneSymmetry, operation: number, plane: number): number {
  const ofForm = form[plane];
  if (ofForm === undefined) return plane;
  const from = symmetry.carrier[plane]!;
  return symmetry.image[ofForm]![symmetry.product[operation * symmetry.order + from]!]!;
}

/** Walks around every corner by "across the edge, then on": the faces met on the way share one vertex. */
function joinCorners(planes: PlaneSet, cut: Cut, start: Int32Array, neighbour: Int32Array) {
  const twin = pairEdges(start, neighbour);
  const face = new Int32Array(neighbour.length);
  for (let f = 0; f + 1 < start.length; f++) face.fill(f, start[f], start[f + 1]);
  const corner = new Int32Array(neighbour.length).fill(-1);
  const vertices: number[] = [];
  for (let edge = 0; edge < neighbour.length; edge++) {
    if (corner[edge] !== -1) continue;
    let [best, error] = [edge, Number.POSITIVE_INFINITY];
    for (let e = edge; corner[e] === -1; ) {
      corner[e] = vertices.length / 3;
      const doubt = cornerError(planes, cut, start, face[e]!, e);
      if (doubt < error) [best, error] = [e, doubt];
      e = twin[e + 1 === start[face[e]! + 1] ? start[face[e]!]! : e + 1]!;
    }
    placeCorner(planes, cut, start, face[best]!, best, vertices);
  }
  return { corner, vertices: Float64Array.from(vertices) };
}

/** Edge (p, q) belongs with edge (q, p). Faces have few edges, so the partner is found by looking along them. */
function pairEdges(start: Int32Array, neighbour: Int32Array): Int32Array {
  const twin = new Int32Array(neighbour.length);
  for (let f = 0; f + 1 < start.length; f++)
    for (let e = start[f]!; e < start[f + 1]!; e++) {
      const other = neighbour[e]!;
      let t = start[other]!;
      while (t < start[other + 1]! && neighbour[t] !== f) t += 1;
      if (t === start[other + 1]) throw new Error(`Faces ${f} and ${other} do not agree on their common edge.`);
      twin[e] = t;
    }
  return twin;
}

/** The corner of the form's cut face that corresponds to the end of this edge. */
function cutCorner(planes: PlaneSet, cut: Cut, start: Int32Array, face: number, edge: number) {
  const { corners, neighbours } = cut.polygons[planes.form[face]!]!;
  const operation = planes.symmetry?.carrier[face] ?? 0;
  const place = edge - start[face]!;
  const count = neighbours.length;
  // Turned round, edge i of the image is edge count−1−i of the original, and its end is that edge's start.
  const back = planes.symmetry?.improper[operation] === 1;
  const at = 4 * (back ? (2 * count - 2 - place) % count : place);
  return { corners, operation, at };
}

function cornerError(planes: PlaneSet, cut: Cut, start: Int32Array, face: number, edge: number): number {
  const { corners, at } = cutCorner(planes, cut, start, face, edge);
  return corners[at + 3]!;
}

function placeCorner(planes: PlaneSet, cut: Cut, start: Int32Array, face: number, edge: number, out: number[]): void {
  const { corners, operation, at } = cutCorner(planes, cut, start, face, edge);
  const [x, y, z] = [corners[at]!, corners[at + 1]!, corners[at + 2]!];
  const w = planes.symmetry?.matrices;
  if (!w) {
    out.push(x, y, z);
    return;
  }
  for (let row = 9 * operation; row < 9 * operation + 9; row += 3)
    out.push(w[row]! * x + w[row + 1]! * y + w[row + 2]! * z);
}
