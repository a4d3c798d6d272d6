import { CORNER, meet } from './meet.ts';
import { exactCross, exactSide, type SidePlanes, ULP } from './side.ts';

/**
 * One face's polygon while other planes cut it. It is kept as the ring of neighbour planes, counter-clockwise seen
 * from outside; corner i is where the face meets neighbours i and i + 1. Coordinates only serve as a filter in front
 * of exact signs: no coordinate decides the topology. One object serves all faces in turn.
 */
export class FacePolygon {
  face = -1;
  /** How many neighbours, and corners, there are; 0 once nothing is left of the face. */
  size = 0;
  ring: Int32Array = new Int32Array(32);
  /** x, y, z, error of each corner. */
  corners: Float64Array = new Float64Array(32 * CORNER);
  private spareRing: Int32Array = new Int32Array(32);
  private spareCorners: Float64Array = new Float64Array(32 * CORNER);
  private sides: Int8Array = new Int8Array(32);
  /** The largest coordinate and the largest error of any corner. */
  reach = 0;
  worst = 0;
  /** The face for which each plane was last tried: no plane is tried twice on one face. */
  private readonly tried: Int32Array;

  /** @param frame number of the first of six sides of a cube that holds all corners; they follow the planes */
  constructor(
    private readonly planes: SidePlanes,
    private readonly frame: number,
  ) {
    this.tried = new Int32Array(frame).fill(-1);
  }

  /** Begins with all of a face's plane that lies in the frame. */
  begin(face: number): void {
    const { planes, frame, ring } = this;
    this.face = face;
    this.size = 4;
    this.tried[face] = face;
    const at = 4 * face;
    const h = planes.rows;
    const [x, y, z] = [Math.abs(h[at]!), Math.abs(h[at + 1]!), Math.abs(h[at + 2]!)];
    const k = x >= y && x >= z ? 0 : y >= z ? 1 : 2;
    const turn = h[at + k]! > 0 ? 0 : 2;
    const [i, j] = [(k + 1) % 3, (k + 2) % 3];
    ring[0] = frame + i;
    ring[1 + turn] = frame + j;
    ring[2] = frame + 3 + i;
    ring[3 - turn] = frame + 3 + j;
    for (let c = 0; c < 4; c++) meet(h, face, ring[c]!, ring[(c + 1) % 4]!, this.corners, c * CORNER);
    this.measure();
  }

  /** Takes away what lies outside plane p, if that has not been done. Answers whether a corner has gone. */
  cut(p: number): boolean {
    if (this.tried[p] === this.face) return false;
    this.tried[p] = this.face;
    const { corners, sides, size } = this;
    const { rows } = this.planes;
    const hx = rows[4 * p]!;
    const hy = rows[4 * p + 1]!;
    const hz = rows[4 * p + 2]!;
    const offset = rows[4 * p + 3]!;
    // Three products, three sums and the offset's own rounding, besides the error of the corner itself.
    const length = Math.abs(hx) + Math.abs(hy) + Math.abs(hz);
    const doubt = length * (this.worst + 8 * ULP * this.reach) + 8 * ULP * Math.abs(offset);
    let outside = 0;
    let inside = 0;
    for (let i = 0; i < size; i++) {
      const s = hx * corners[i * CORNER]! + hy * corners[i * CORNER + 1]! + hz * corners[i * CORNER + 2]! - offset;
      const side = s > doubt ? 1 : s < -doubt ? -1 : this.doubtfulSide(i, p, s, length);
      sides[i] = side;
      if (side > 0) outside += 1;
      else if (side < 0) inside += 1;
    }
    if (outside === 0) return inside < size && this.touch(p, inside);
    if (inside === 0) this.size = 0;
    else this.replaceOutside(p);
    return true;
  }

  /** A corner's side of plane p, given h·x − D in doubles and |h1| + |h2| + |h3|: with its own error bound, or exactly. */
  private doubtfulSide(i: number, p: number, s: number, length: number): number {
    const { corners, ring, size, planes } = this;
    const at = i * CORNER;
    const far = Math.max(Math.abs(corners[at]!), Math.abs(corners[at + 1]!), Math.abs(corners[at + 2]!));
    const doubt = length * (corners[at + 3]! + 8 * ULP * far) + 8 * ULP * Math.abs(planes.rows[4 * p + 3]!);
    if (s > doubt) return 1;
    if (s < -doubt) return -1;
    return exactSide(planes, this.face, ring[i]!, ring[i + 1 === size ? 0 : i + 1]!, p);
  }

  /**
   * Plane p cuts nothing off but has corners on it. Where it lies on an edge or on the whole face, the plane that
   * counts is named: of coincident planes the first, none of two that leave nothing between them.
   */
  private touch(p: number, inside: number): boolean {
    const { ring, sides, size } = this;
    if (inside === 0) {
      if (p > this.face && this.facesLike(p)) return false;
      this.size = 0;
      return true;
    }
    for (let i = 0; i < size; i++)
      if (sides[i] === 0 && sides[(i + size - 1) % size] === 0 && this.isRedundant(ring[i]!, p)) ring[i] = p;
    return false;
  }

  /** For a plane that coincides with the face: whether it looks the same way. */
  private facesLike(p: number): boolean {
    const { rows } = this.planes;
    const [f, q] = [4 * this.face, 4 * p];
    return rows[f]! * rows[q]! + rows[f + 1]! * rows[q + 1]! + rows[f + 2]! * rows[q + 2]! > 0;
  }

  /**
   * Whether `old` adds nothing along the line that it, plane p and the face share: its normal lies between theirs.
   * Their cross products are all multiples of the line's direction; one component of it tells their senses.
   */
  private isRedundant(old: number, p: number): boolean {
    const { planes, face } = this;
    let k = 0;
    while (exactCross(planes, face, p, k) === 0) k += 1;
    const sense = exactCross(planes, face, p, k);
    const toFace = exactCross(planes, old, p, k) * sense;
    const toP = exactCross(planes, face, old, k) * sense;
    if (toFace === 0 && toP > 0) return p < old;
    return toFace >= 0 && toP >= 0;
  }

  /** Keeps the edges with an end strictly inside, closes the gap with plane p. */
  private replaceOutside(p: number): void {
    if (this.size + 1 >= this.sides.length) this.makeRoom();
    const { ring, corners, sides, size, face, spareRing, spareCorners } = this;
    const { rows } = this.planes;
    let i = 0;
    while (!(sides[i]! < 0 && sides[i === 0 ? size - 1 : i - 1]! >= 0)) i += 1;
    let kept = 0;
    for (; sides[i]! < 0; i = i + 1 === size ? 0 : i + 1) {
      spareRing[kept] = ring[i]!;
      for (let n = 0; n < CORNER; n++) spareCorners[kept * CORNER + n] = corners[i * CORNER + n]!;
      kept += 1;
    }
    spareRing[kept] = ring[i]!;
    spareRing[kept + 1] = p;
    meet(rows, face, ring[i]!, p, spareCorners, kept * CORNER);
    meet(rows, face, p, spareRing[0]!, spareCorners, (kept + 1) * CORNER);
    this.size = kept + 2;
    this.ring = spareRing;
    this.spareRing = ring;
    this.corners = spareCorners;
    this.spareCorners = corners;
    this.measure();
  }

  private measure(): void {
    const { corners, size } = this;
    let reach = 0;
    let worst = 0;
    for (let at = 0; at < size * CORNER; at += CORNER) {
      reach = Math.max(reach, Math.abs(corners[at]!), Math.abs(corners[at + 1]!), Math.abs(corners[at + 2]!));
      worst = Math.max(worst, corners[at + 3]!);
    }
    this.reach = reach;
    this.worst = worst;
  }

  /** Doubles the room of everything that is as long as the ring. */
  private makeRoom(): void {
    const wider = <T extends Int8Array | Int32Array | Float64Array>(fresh: T, old: T): T => {
      fresh.set(old);
      return fresh;
    };
    this.ring = wider(new Int32Array(2 * this.ring.length), this.ring);
    this.corners = wider(new Float64Array(2 * this.corners.length), this.corners);
    this.sides = wider(new Int8Array(2 * this.sides.length), this.sides);
    this.spareRing = new Int32Array(this.ring.length);
    this.spareCorners = new Float64Array(this.corners.length);
  }
}
