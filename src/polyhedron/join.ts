import type { CutFaces } from './cut-faces.ts';
import type { GroupAction } from './group-action.ts';
import { CORNER } from './meet.ts';
import type { PlaneSet, PlaneSymmetry } from './planes.ts';
import { exactMeet, type SidePlanes } from './side.ts';

/** The edges of all faces, one face after the other, counter-clockwise seen from outside. */
export interface FaceEdges {
  /** Face f has edges `start[f]` … `start[f + 1] − 1`. */
  readonly start: Int32Array;
  /** The face on the other side of each edge. */
  readonly neighbour: Int32Array;
  /** The face of each edge. */
  readonly face: Int32Array;
  /** Which corner of the cut faces the end of each edge is an image of. */
  readonly source: Int32Array;
}

/** Carries the cut faces to all planes of their forms. */
export function carryFaces({ form, symmetry }: PlaneSet, cut: CutFaces, action: GroupAction): FaceEdges {
  const count = form.length;
  const start = new Int32Array(count + 1);
  for (let f = 0; f < count; f++) {
    const slot = action.slot(f);
    start[f + 1] = start[f]! + cut.end[slot]! - cut.start[slot]!;
  }
  const total = start[count]!;
  const edges = { start, neighbour: new Int32Array(total), face: new Int32Array(total), source: new Int32Array(total) };
  for (let f = 0; f < count; f++) {
    for (let e = start[f]!; e < start[f + 1]!; e++) edges.face[e] = f;
    if (symmetry) carryRing(edges, f, cut, form, symmetry);
    else copyRing(edges, f, cut);
  }
  return edges;
}

function copyRing({ start, neighbour, source }: FaceEdges, f: number, cut: CutFaces): void {
  const shift = cut.start[f]! - start[f]!;
  for (let e = start[f]!; e < start[f + 1]!; e++) {
    neighbour[e] = cut.ring[e + shift]!;
    source[e] = e + shift;
  }
}

/** An operation of the second kind turns the ring round: what was the start of an edge is then its end. */
function carryRing(edges: FaceEdges, f: number, cut: CutFaces, form: Int32Array, symmetry: PlaneSymmetry): void {
  const { start, neighbour, source } = edges;
  const { image, product, carrier, improper } = symmetry;
  const slot = form[f]!;
  const [from, to] = [cut.start[slot]!, cut.end[slot]!];
  const row = carrier[f]! * symmetry.order;
  const back = improper[carrier[f]!] === 1;
  let e = back ? start[f + 1]! - 1 : start[f]!;
  for (let i = from; i < to; i++) {
    const q = cut.ring[i]!;
    neighbour[e] = q < form.length ? image[form[q]!]![product[row + carrier[q]!]!]! : q;
    source[e] = !back ? i : i === from ? to - 1 : i - 1;
    e += back ? -1 : 1;
  }
}

/**
 * Edge (p, q) belongs with edge (q, p). Faces have few edges, so the partner is found by looking along them.
 * @returns for each edge, the one that leaves the vertex at its end on the next face round that vertex
 */
export function turnAtEnds({ start, neighbour, face }: FaceEdges): Int32Array {
  const turn = new Int32Array(neighbour.length).fill(-1);
  for (let e = 0; e < neighbour.length; e++) {
    const f = face[e]!;
    const before = e === start[f] ? start[f + 1]! - 1 : e - 1;
    if (turn[before] !== -1) continue;
    const other = neighbour[e]!;
    const [from, to] = [start[other]!, start[other + 1]!];
    let t = from;
    while (t < to && neighbour[t] !== f) t += 1;
    if (t === to) throw new Error(`Faces ${f} and ${other} do not agree on their common edge.`);
    turn[before] = t;
    turn[t === from ? to - 1 : t - 1] = e;
  }
  return turn;
}

/** Corners that are known no better than this, relative to the size of the solid, are worked out exactly. */
const COARSE = 2 ** -34;

/** Walks round every corner: the faces met on the way share one vertex. */
export function joinCorners(set: PlaneSet, planes: SidePlanes, cut: CutFaces, edges: FaceEdges) {
  const { start, neighbour, face, source } = edges;
  const turn = turnAtEnds(edges);
  const corner = new Int32Array(neighbour.length).fill(-1);
  // Three faces or more meet in a vertex.
  const vertices = new Float64Array(neighbour.length);
  const poor = COARSE * cut.reach;
  let count = 0;
  for (let first = 0; first < neighbour.length; first++) {
    if (corner[first] !== -1) continue;
    let best = first;
    for (let e = first; corner[e] === -1; e = turn[e]!) {
      corner[e] = count;
      if (cut.corners[source[e]! * CORNER + 3]! < cut.corners[source[best]! * CORNER + 3]!) best = e;
    }
    const f = face[best]!;
    if (cut.corners[source[best]! * CORNER + 3]! <= poor) carryCorner(set, cut, f, source[best]!, vertices, 3 * count);
    else {
      const after = best + 1 === start[f + 1] ? start[f]! : best + 1;
      vertices.set(exactMeet(planes, f, neighbour[best]!, neighbour[after]!), 3 * count);
    }
    count += 1;
  }
  return { corner, vertices: vertices.slice(0, 3 * count) };
}

function carryCorner(
  set: PlaneSet,
  { corners }: CutFaces,
  f: number,
  source: number,
  out: Float64Array,
  at: number,
): void {
  const x = corners[source * CORNER]!;
  const y = corners[source * CORNER + 1]!;
  const z = corners[source * CORNER + 2]!;
  if (!set.symmetry) {
    out[at] = x;
    out[at + 1] = y;
    out[at + 2] = z;
    return;
  }
  const w = set.symmetry.matrices;
  let row = 9 * set.symmetry.carrier[f]!;
  for (let axis = 0; axis < 3; axis++, row += 3) out[at + axis] = w[row]! * x + w[row + 1]! * y + w[row + 2]! * z;
}
