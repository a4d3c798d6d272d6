import { exactSide, meet, type SidePlanes } from './side.ts';

const ULP = 2 ** -53;
/** Numbers kept for a corner: x, y, z and the bound of their error. */
const CORNER = 4;

/**
 * One face's polygon while other planes cut it. It is kept as the cycle of neighbour planes, counter-clockwise seen
 * from outside; corner i is where the face meets neighbours i and i + 1. Coordinates only serve as a filter in front
 * of exact signs: no coordinate decides the topology.
 */
export class FacePolygon {
  /** Neighbour planes in order; empty once nothing is left of the face. */
  neighbours: number[] = [];
  /** x, y, z, error of each corner. */
  corners: Float64Array = new Float64Array(16 * CORNER);
  private spare: Float64Array = new Float64Array(16 * CORNER);
  private sides: Int8Array = new Int8Array(16);
  /** Middle and half widths of the box around the corners, and the slack that covers their errors. */
  private readonly box = new Float64Array(7);

  constructor(
    private readonly planes: SidePlanes,
    readonly face: number,
    frame: readonly number[],
  ) {
    this.neighbours = [...frame];
    this.makeRoom(frame.length);
    frame.forEach((neighbour, i) => {
      meet(planes, face, neighbour, frame[(i + 1) % frame.length]!, this.corners, i * CORNER);
    });
    this.measureBox();
  }

  /** Takes away what lies outside plane p. */
  cut(p: number): void {
    const { planes, neighbours } = this;
    const { x, y, z, d } = planes;
    const [hx, hy, hz, offset] = [x[p]!, y[p]!, z[p]!, d[p]!];
    const [ax, ay, az] = [Math.abs(hx), Math.abs(hy), Math.abs(hz)];
    const b = this.box;
    const slack = (ax + ay + az) * b[6]! + 8 * ULP * Math.abs(offset);
    const highest = hx * b[0]! + hy * b[1]! + hz * b[2]! + ax * b[3]! + ay * b[4]! + az * b[5]!;
    if (highest + slack < offset) return;

    let outside = 0;
    let inside = 0;
    const count = neighbours.length;
    for (let i = 0; i < count; i++) {
      const at = i * CORNER;
      const [cx, cy, cz] = [this.corners[at]!, this.corners[at + 1]!, this.corners[at + 2]!];
      const s = hx * cx + hy * cy + hz * cz - offset;
      const size = ax * Math.abs(cx) + ay * Math.abs(cy) + az * Math.abs(cz) + Math.abs(offset);
      const doubt = (ax + ay + az) * this.corners[at + 3]! + 8 * ULP * size;
      const next = neighbours[i + 1 === count ? 0 : i + 1]!;
      const side = s > doubt ? 1 : s < -doubt ? -1 : exactSide(planes, this.face, neighbours[i]!, next, p);
      this.sides[i] = side;
      if (side > 0) outside += 1;
      else if (side < 0) inside += 1;
    }
    if (outside === 0) this.touch(p, inside);
    else if (inside === 0) this.neighbours = [];
    else this.replaceOutside(p);
  }

  /** Plane p cuts nothing off. It may still lie on an edge or on the whole face; then the plane that counts is named. */
  private touch(p: number, inside: number): void {
    const { neighbours, sides } = this;
    const count = neighbours.length;
    if (inside === 0) {
      if (p < this.face) this.neighbours = [];
      return;
    }
    for (let i = 0; i < count; i++)
      if (sides[i] === 0 && sides[(i + count - 1) % count] === 0 && this.isRedundant(neighbours[i]!, p))
        neighbours[i] = p;
  }

  /** Whether `old` adds nothing along the line that it, plane p and the face share: its normal lies between theirs. */
  private isRedundant(old: number, p: number): boolean {
    const { x, y, z } = this.planes;
    const cross = (a: number, b: number): [number, number, number] => [
      y[a]! * z[b]! - z[a]! * y[b]!,
      z[a]! * x[b]! - x[a]! * z[b]!,
      x[a]! * y[b]! - y[a]! * x[b]!,
    ];
    const [u, v, w] = cross(this.face, p);
    const along = ([a, b, c]: [number, number, number]): number => a * u + b * v + c * w;
    const [toFace, toP] = [along(cross(old, p)), along(cross(this.face, old))];
    if (toFace === 0 && toP > 0) return p < old;
    return toFace >= 0 && toP >= 0;
  }

  /** Keeps the edges with an end strictly inside, closes the gap with plane p. */
  private replaceOutside(p: number): void {
    const { neighbours, sides, planes, face } = this;
    const count = neighbours.length;
    let first = 0;
    while (!(sides[(first + count - 1) % count]! >= 0 && sides[first]! < 0)) first += 1;
    const kept: number[] = [];
    this.makeRoom(count + 1);
    const target = this.spare;
    for (let i = first; ; i = i + 1 === count ? 0 : i + 1) {
      kept.push(neighbours[i]!);
      if (sides[i]! >= 0) break;
      target.set(this.corners.subarray(i * CORNER, i * CORNER + CORNER), (kept.length - 1) * CORNER);
    }
    const last = kept.length - 1;
    meet(planes, face, kept[last]!, p, target, last * CORNER);
    meet(planes, face, p, kept[0]!, target, (last + 1) * CORNER);
    kept.push(p);
    this.spare = this.corners;
    this.corners = target;
    this.neighbours = kept;
    this.measureBox();
  }

  private makeRoom(count: number): void {
    if (count <= this.sides.length) return;
    const grow = (old: Float64Array): Float64Array => {
      const wider = new Float64Array(2 * count * CORNER);
      wider.set(old);
      return wider;
    };
    this.corners = grow(this.corners);
    this.spare = grow(this.spare);
    const sides = new Int8Array(2 * count);
    sides.set(this.sides);
    this.sides = sides;
  }

  private measureBox(): void {
    const { corners, box } = this;
    const end = this.neighbours.length * CORNER;
    let [error, reach] = [0, 0];
    for (let axis = 0; axis < 3; axis++) {
      let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
      for (let at = axis; at < end; at += CORNER) {
        const value = corners[at]!;
        if (value < low) low = value;
        if (value > high) high = value;
      }
      box[axis] = (low + high) / 2;
      box[axis + 3] = (high - low) / 2;
      reach = Math.max(reach, Math.abs(low), Math.abs(high));
    }
    for (let at = 3; at < end; at += CORNER) error = Math.max(error, corners[at]!);
    box[6] = error + 16 * ULP * reach;
  }
}
