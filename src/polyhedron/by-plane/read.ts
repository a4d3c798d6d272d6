import { CORNER, tolerableError } from '../exact/meet.ts';
import { integers, withRoom } from '../exact/room.ts';
import type { Shell } from './shell.ts';

/** Reads a finished shell into arrays of its own. */
export class Reader {
  start = integers(0);
  neighbour = integers(0);
  corner = integers(0);
  vertices = new Float64Array(0);
  /** The number that each vertex of the shell gets. */
  private number = integers(64);

  constructor(private readonly shell: Shell) {}

  /** Whether a face of the frame is left. */
  isOpen(): boolean {
    const { edgeOf, planes } = this.shell;
    return edgeOf.subarray(planes.count, planes.count + 6).some((edge) => edge !== -1);
  }

  /** Fills `start`, `neighbour` and `corner`. */
  readFaces(): void {
    const { edgeOf, next, face, twin, end, planes, vertices } = this.shell;
    this.start = integers(planes.count + 1);
    for (let f = 0; f < planes.count; f++) this.start[f + 1] = this.start[f]! + this.size(f);
    this.neighbour = integers(this.start[planes.count]!);
    this.corner = integers(this.neighbour.length);
    this.number = withRoom(this.number, vertices, integers).fill(-1, 0, vertices);
    let count = 0;
    for (let f = 0; f < planes.count; f++) {
      let edge = edgeOf[f]!;
      for (let i = this.start[f]!; i < this.start[f + 1]!; i++) {
        const v = end[edge]!;
        if (this.number[v] === -1) {
          this.number[v] = count;
          count += 1;
        }
        this.neighbour[i] = face[twin[edge]!]!;
        this.corner[i] = this.number[v]!;
        edge = next[edge]!;
      }
    }
  }

  private size(f: number): number {
    const { edgeOf, next } = this.shell;
    const first = edgeOf[f]!;
    if (first === -1) return 0;
    let size = 1;
    for (let edge = next[first]!; edge !== first; edge = next[edge]!) size += 1;
    return size;
  }

  /** Fills `vertices`. */
  readVertices(): void {
    const { place, alive, vertices, planes } = this.shell;
    const { number } = this;
    this.vertices = new Float64Array(3 * alive);
    const tolerable = tolerableError(planes, this.reach());
    for (let v = 0; v < vertices; v++) {
      if (number[v] === -1) continue;
      const to = 3 * number[v]!;
      if (place[CORNER * v + 3]! <= tolerable)
        for (let axis = 0; axis < 3; axis++) this.vertices[to + axis] = place[CORNER * v + axis]!;
      else this.vertices.set(this.shell.exactPlace(v), to);
    }
  }

  /** The largest coordinate. A vertex that is not known at all may be anywhere; the others tell. */
  private reach(): number {
    const { place, vertices } = this.shell;
    let reach = 0;
    for (let v = 0; v < vertices; v++) {
      const at = CORNER * v;
      if (this.number[v] === -1 || !(place[at + 3]! < Number.POSITIVE_INFINITY)) continue;
      reach = Math.max(reach, Math.abs(place[at]!), Math.abs(place[at + 1]!), Math.abs(place[at + 2]!));
    }
    return reach;
  }
}
