import { CORNER } from './meet.ts';
import { PLANE } from './plane-table.ts';
import { integers, signs, withRoom } from './room.ts';
import type { Shell } from './shell.ts';
import { ULP } from './side.ts';

/** Takes away from a shell what lies outside a plane, and closes the gap with that plane's face. */
export class Carver {
  private plane = 0;
  /** A new number for each plane, so that marks of earlier ones need not be wiped. */
  private turn = 0;
  /** The turn in which the side of each vertex was last asked for, and the answer. */
  private asked = integers(64);
  private sides = signs(64);
  /** Vertices outside, the first `outside` of them. */
  private gone = integers(64);
  private outside = 0;
  private touching = 0;
  /** The last half-edge made for the new face, and the first. */
  private last = -1;
  private first = -1;

  constructor(private readonly shell: Shell) {}

  /** @param start a vertex outside plane p. Answers whether anything with a volume is left. */
  carve(p: number, start: number): boolean {
    this.prepare(p);
    const brink = this.flood(start);
    if (this.outside + this.touching === this.shell.alive) return false;
    this.walkRound(brink);
    this.shell.edgeOf[p] = this.first;
    this.forget();
    return true;
  }

  private prepare(p: number): void {
    const { vertices } = this.shell;
    this.plane = p;
    this.turn += 1;
    this.outside = 0;
    this.touching = 0;
    this.last = -1;
    // Room for all vertices there are, and for those to come: no more than there are edges to cut.
    this.asked = withRoom(this.asked, vertices, integers);
    this.sides = withRoom(this.sides, vertices, signs);
    this.gone = withRoom(this.gone, vertices, integers);
  }

  /** Finds all vertices outside; they hang together. Answers a half-edge that leaves them. */
  private flood(start: number): number {
    const { next, twin, end, into, face, edgeOf } = this.shell;
    const { gone } = this;
    let brink = -1;
    this.sideOf(start);
    for (let done = 0; done < this.outside; done++) {
      const first = into[gone[done]!]!;
      let e = first;
      do {
        // Faces that keep a corner get an edge again in `walkRound`.
        edgeOf[face[e]!] = -1;
        const out = next[e]!;
        if (this.sideOf(end[out]!) <= 0) brink = out;
        e = twin[out]!;
      } while (e !== first);
    }
    return brink;
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
   * Walks along the brink, counter-clockwise round the new face. At each step `at` is a vertex of the new face and `up`
   * runs from it to the outside: an edge that crosses the plane in `at`, or one of those that begin in a vertex on it.
   */
  private walkRound(brink: number): void {
    const { next, twin, end } = this.shell;
    let up = twin[brink]!;
    const crossing = this.sideOf(end[brink]!) < 0;
    const firstUp = up;
    const start = crossing ? this.cross(up) : end[brink]!;
    let at = start;
    let isCrossing = crossing;
    do {
      let entry = twin[up]!;
      if (!isCrossing) {
        entry = next[entry]!;
        const side = this.sides[end[entry]!]!;
        if (side > 0) {
          // A face that touches the plane in this vertex only: it goes.
          up = entry;
          continue;
        }
        if (side === 0) {
          // A face that touches the plane along this edge: it goes, and the new face takes the edge over.
          at = end[entry]!;
          up = next[entry]!;
          this.takeOver(entry);
          continue;
        }
      }
      up = this.leaveOutside(entry);
      const from = end[this.shell.previous[up]!]!;
      isCrossing = this.sides[from]! < 0;
      const leave = !isCrossing ? from : up === firstUp && crossing ? start : this.cross(up);
      this.closeFace(entry, isCrossing ? up : this.shell.previous[up]!, at, leave);
      at = leave;
    } while (at !== start || this.last === -1);
    this.shell.link(this.last, this.first);
  }
}
