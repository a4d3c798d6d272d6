import { CORNER } from '../exact/meet.ts';
import { PLANE } from '../exact/plane-table.ts';
import { integers, signs, withRoom } from '../exact/room.ts';
import { ULP } from '../exact/side.ts';
import type { Shell } from './shell.ts';

/** Takes away from a shell what lies outside a plane, and closes the gap with that plane's face. */
export class Carver {
  private plane = 0;
  /** A new number for each plane, so that marks of earlier ones need not be wiped. */
  private turn = 0;
  /** The turn in which the side of each vertex was last asked for, and the answer. */
  private asked = integers(64);
  private sides = signs(64);
  /** The vertices outside, in the order in which they were found, and how many there are; how many lie on the plane. */
  private gone = integers(64);
  private outside = 0;
  private touching = 0;
  /** The first and the last half-edge of the new face. */
  private first = -1;
  private last = -1;

  constructor(private readonly shell: Shell) {}

  /** @param start a vertex outside plane p. Answers whether anything with a volume is left. */
  carve(p: number, start: number): boolean {
    this.prepare(p);
    const brink = this.flood(start);
    // Every vertex on the plane of a solid with nothing inside it has an edge that leads outside.
    if (this.outside + this.touching === this.shell.alive) return false;
    this.walkRound(brink);
    const { into, edgeOf } = this.shell;
    edgeOf[p] = this.first;
    for (let i = 0; i < this.outside; i++) into[this.gone[i]!] = -1;
    this.shell.alive -= this.outside;
    return true;
  }

  private prepare(p: number): void {
    const { vertices } = this.shell;
    this.plane = p;
    this.outside = 0;
    this.touching = 0;
    this.last = -1;
    this.turn += 1;
    if (this.turn === 2 ** 30) {
      this.asked.fill(0);
      this.turn = 1;
    }
    this.asked = withRoom(this.asked, vertices, integers);
    this.sides = withRoom(this.sides, vertices, signs);
    this.gone = withRoom(this.gone, vertices, integers);
  }

  /** Finds all vertices outside, which hang together. Answers a half-edge that comes in from there. */
  private flood(start: number): number {
    const { next, twin, end, into, face, edgeOf } = this.shell;
    const { gone } = this;
    let inward = -1;
    let count = 0;
    this.sideOf(start);
    for (let done = 0; done < this.outside; done++) {
      const first = into[gone[done]!]!;
      let e = first;
      do {
        // A face that keeps a corner gets an edge again in `closeFace`.
        edgeOf[face[e]!] = -1;
        const out = next[e]!;
        if (this.sideOf(end[out]!) <= 0) inward = out;
        count += 1;
        e = twin[out]!;
      } while (e !== first);
    }
    this.shell.makeRoom(count);
    return inward;
  }

  private sideOf(v: number): number {
    const { asked, sides, shell, plane } = this;
    if (asked[v] === this.turn) return sides[v]!;
    const { place } = shell;
    const { rows } = shell.planes;
    const hx = rows[PLANE * plane]!;
    const hy = rows[PLANE * plane + 1]!;
    const hz = rows[PLANE * plane + 2]!;
    const offset = rows[PLANE * plane + 3]!;
    const s = hx * place[CORNER * v]! + hy * place[CORNER * v + 1]! + hz * place[CORNER * v + 2]! - offset;
    const length = Math.abs(hx) + Math.abs(hy) + Math.abs(hz);
    const doubt = length * place[CORNER * v + 3]! + 8 * ULP * Math.abs(offset);
    const side = s > doubt ? 1 : s < -doubt ? -1 : shell.exactSide(v, plane);
    asked[v] = this.turn;
    sides[v] = side;
    if (side === 0) this.touching += 1;
    if (side > 0) {
      this.gone[this.outside] = v;
      this.outside += 1;
    }
    return side;
  }

  /**
   * Walks counter-clockwise round the new face. At each step `at` is one of its vertices and `up` a half-edge that leads
   * outside from there: one that crosses the plane in `at`, or one that begins in a vertex on the plane.
   */
  private walkRound(inward: number): void {
    const { next, previous, twin, end } = this.shell;
    const firstUp = twin[inward]!;
    const startsCrossing = this.sideOf(end[inward]!) < 0;
    const start = startsCrossing ? this.cross(firstUp) : end[inward]!;
    let up = firstUp;
    let at = start;
    let crossing = startsCrossing;
    do {
      let entry = twin[up]!;
      if (!crossing) {
        entry = next[entry]!;
        const side = this.sideOf(end[entry]!);
        if (side > 0) {
          // A face that touches the plane in this vertex only: it goes.
          up = entry;
          continue;
        }
        if (side === 0) {
          // A face that touches the plane along this edge: it goes, and the new face takes the edge over.
          up = next[entry]!;
          at = end[entry]!;
          this.takeOver(entry);
          continue;
        }
      }
      up = this.wayOut(entry);
      const from = end[previous[up]!]!;
      crossing = this.sideOf(from) < 0;
      const exit = crossing ? up : previous[up]!;
      const leave = !crossing ? from : startsCrossing && up === firstUp ? start : this.cross(up);
      this.closeFace(exit, leave, at, entry);
      at = leave;
    } while (at !== start || this.last === -1);
    this.shell.link(this.last, this.first);
  }

  /** On the face that `entry` enters from outside: the half-edge that leads outside again, the way round before it. */
  private wayOut(entry: number): number {
    const { previous, end } = this.shell;
    let e = previous[entry]!;
    while (this.sideOf(end[previous[e]!]!) > 0) e = previous[e]!;
    return e;
  }

  /** The vertex where a half-edge crosses the plane. It ends there only when `closeFace` says so. */
  private cross(edge: number): number {
    const { face, twin } = this.shell;
    return this.shell.addVertex(face[edge]!, face[twin[edge]!]!, this.plane, edge);
  }

  /** Replaces what a face loses by an edge from `leave` to `at`, between half-edges `exit` and `entry` that it keeps. */
  private closeFace(exit: number, leave: number, at: number, entry: number): void {
    const { shell } = this;
    const face = shell.face[entry]!;
    const edge = shell.addEdge(face, at, this.plane, leave);
    shell.end[exit] = leave;
    shell.link(exit, edge);
    shell.link(edge, entry);
    shell.edgeOf[face] = edge;
    shell.into[at] = edge;
    shell.into[leave] = exit;
    this.append(edge + 1);
  }

  private takeOver(edge: number): void {
    const { shell } = this;
    shell.face[edge] = this.plane;
    shell.into[shell.end[edge]!] = edge;
    this.append(edge);
  }

  private append(edge: number): void {
    if (this.last === -1) this.first = edge;
    else this.shell.link(this.last, edge);
    this.last = edge;
  }
}
