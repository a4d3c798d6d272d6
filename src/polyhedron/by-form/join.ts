import { CORNER, tolerableError } from '../exact/meet.ts';
import type { PlaneTable } from '../exact/plane-table.ts';
import { integers, withRoom } from '../exact/room.ts';
import { exactMeet } from '../exact/side.ts';
import type { CutFaces } from './cut-faces.ts';
import type { GroupAction } from './group-action.ts';

/** Carries the cut faces to all planes of their forms, and joins their edges and corners. */
export class Joiner {
  /** Face f has edges `start[f]` … `start[f + 1] − 1`; on the other side of each is its neighbour. */
  start = integers(0);
  neighbour = integers(0);
  /** The vertex at the end of each edge, and where it is. */
  corner = integers(0);
  vertices = new Float64Array(0);
  /** The face of each edge. */
  private face = integers(256);
  /** Which corner of the cut faces the end of each edge is an image of. */
  private source = integers(256);
  /** The edge that leaves the vertex at an edge's end on the next face round that vertex. */
  private turn = integers(256);

  constructor(
    private readonly planes: PlaneTable,
    private readonly action: GroupAction,
    private readonly cut: CutFaces,
  ) {}

  /** Fills `start` and `neighbour`. */
  carry(): void {
    const { cut } = this;
    const { form } = this.action;
    const count = form.length;
    const start = integers(count + 1);
    for (let f = 0; f < count; f++) start[f + 1] = start[f]! + cut.end[form[f]!]! - cut.start[form[f]!]!;
    const total = start[count]!;
    this.start = start;
    this.neighbour = integers(total);
    this.face = withRoom(this.face, total, integers);
    this.source = withRoom(this.source, total, integers);
    for (let f = 0; f < count; f++) {
      for (let e = start[f]!; e < start[f + 1]!; e++) this.face[e] = f;
      this.carryRing(f);
    }
  }

  /** An operation of the second kind turns the ring round: what was the start of an edge is then its end. */
  private carryRing(f: number): void {
    const { start, neighbour, source, cut } = this;
    const { form } = this.action;
    const { image, product, carrier, improper, order } = this.action.symmetry;
    const { ring } = cut;
    const from = cut.start[form[f]!]!;
    const to = cut.end[form[f]!]!;
    const row = carrier[f]! * order;
    const back = improper[carrier[f]!] === 1;
    let e = back ? start[f + 1]! - 1 : start[f]!;
    for (let i = from; i < to; i++) {
      const q = ring[i]!;
      neighbour[e] = q < form.length ? image[form[q]!]![product[row + carrier[q]!]!]! : q;
      source[e] = !back ? i : i === from ? to - 1 : i - 1;
      e += back ? -1 : 1;
    }
  }

  /** Fills `corner` and `vertices` by walking round every corner: the faces met on the way share one vertex. */
  join(): void {
    this.pairEdges();
    const { neighbour, face, source, turn, cut, planes } = this;
    const corner = integers(neighbour.length).fill(-1);
    // Three faces or more meet in a vertex.
    const vertices = new Float64Array(neighbour.length);
    const tolerable = tolerableError(planes, cut.reach);
    let count = 0;
    for (let first = 0; first < neighbour.length; first++) {
      if (corner[first] !== -1) continue;
      let best = first;
      let error = cut.corners[source[first]! * CORNER + 3]!;
      corner[first] = count;
      for (let e = turn[first]!; e !== first; e = turn[e]!) {
        corner[e] = count;
        const other = cut.corners[source[e]! * CORNER + 3]!;
        if (other < error) [best, error] = [e, other];
      }
      if (error <= tolerable) this.carryCorner(face[best]!, source[best]!, vertices, 3 * count);
      else vertices.set(this.exactCorner(best), 3 * count);
      count += 1;
    }
    this.corner = corner;
    this.vertices = vertices.slice(0, 3 * count);
  }

  /** Edge (p, q) belongs with edge (q, p). Faces have few edges, so the partner is found by looking along them. */
  private pairEdges(): void {
    const { start, neighbour, face } = this;
    this.turn = withRoom(this.turn, neighbour.length, integers);
    const { turn } = this;
    turn.fill(-1, 0, neighbour.length);
    for (let e = 0; e < neighbour.length; e++) {
      const f = face[e]!;
      const before = e === start[f] ? start[f + 1]! - 1 : e - 1;
      if (turn[before] !== -1) continue;
      const other = neighbour[e]!;
      const from = start[other]!;
      const to = start[other + 1]!;
      let t = from;
      while (t < to && neighbour[t] !== f) t += 1;
      if (t === to) throw new Error(`Faces ${f} and ${other} do not agree on their common edge.`);
      turn[before] = t;
      turn[t === from ? to - 1 : t - 1] = e;
    }
  }

  private exactCorner(edge: number): readonly [number, number, number] {
    const { start, neighbour, face, planes } = this;
    const f = face[edge]!;
    const after = edge + 1 === start[f + 1] ? start[f]! : edge + 1;
    return exactMeet(planes, f, neighbour[edge]!, neighbour[after]!);
  }

  private carryCorner(f: number, source: number, out: Float64Array, at: number): void {
    const { corners } = this.cut;
    const x = corners[source * CORNER]!;
    const y = corners[source * CORNER + 1]!;
    const z = corners[source * CORNER + 2]!;
    const { matrices: w, carrier } = this.action.symmetry;
    let row = 9 * carrier[f]!;
    for (let axis = 0; axis < 3; axis++, row += 3) out[at + axis] = w[row]! * x + w[row + 1]! * y + w[row + 2]! * z;
  }
}
