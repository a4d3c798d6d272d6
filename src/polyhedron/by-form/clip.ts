import { CORNER, meet } from '../exact/meet.ts';
import { PLANE, type PlaneTable } from '../exact/plane-table.ts';
import { doubles, integers, signs, withRoom } from '../exact/room.ts';
import { exactCross, exactSide, ULP } from '../exact/side.ts';

/**
 * One face's polygon while other planes cut it. It is kept as the ring of neighbour planes, counter-clockwise seen
 * from outside; corner i is where the face meets neighbours i and i + 1. Coordinates only serve as a filter in front
 * of exact signs: no coordinate decides the topology. One object serves all faces in turn.
 */
export class FacePolygon {
  face = -1;
  /** How many neighbours, and corners, there are; 0 once nothing is left of the face. */
  size = 0;
  ring = integers(32);
  /** x, y, z, error of each corner. */
  corners = doubles(32 * CORNER);
  /** The largest coordinate and the largest error of any corner. */
  reach = 0;
  worst = 0;
  private spareRing = integers(32);
  private spareCorners = doubles(32 * CORNER);
  private sides = signs(32);
  /** A new number for each face, so that marks of earlier ones need not be wiped. */
  private turn = 0;
  /** The turn in which each plane was last tried: no plane is tried twice on one face. */
  private tried = integers(64);
  /** The turn in which each neighbour was last settled, and its own neighbours round the two corners. */
  private settled = integers(64);
  private previous = integers(64);
  private next = integers(64);

  constructor(private readonly planes: PlaneTable) {}

  /** Begins with all of a face's plane that lies in the frame. */
  begin(face: number): void {
    const { ring } = this;
    const { rows: h, count: frame } = this.planes;
    this.makeMarks(frame + 6);
    this.face = face;
    this.size = 4;
    this.tried[face] = this.turn;
    const at = PLANE * face;
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

  /**
   * Cuts with a neighbour whose own polygon is finished, and with the two planes beside this face in its ring: on this
   * face they come right before and right after it, unless more than three planes meet in the corner.
   */
  settle(neighbour: number, previous: number, next: number): void {
    this.settled[neighbour] = this.turn;
    this.previous[neighbour] = previous;
    this.next[neighbour] = next;
    this.cut(neighbour);
    this.cut(previous);
    this.cut(next);
  }

  /**
   * Whether corner i is known as a vertex of the solid, because it is a corner of a finished face as well. No plane cuts
   * it off, so a plane that stays clear of all other corners need not be tried. Names stay right, too: of an edge between
   * two settled corners the neighbour is a face of the solid that holds the whole edge, and no third face does.
   */
  isSettled(i: number): boolean {
    const before = this.ring[i]!;
    const after = this.ring[i + 1 === this.size ? 0 : i + 1]!;
    if (this.settled[before] === this.turn && this.next[before] === after) return true;
    return this.settled[after] === this.turn && this.previous[after] === before;
  }

  /** Takes away what lies outside plane p, if that has not been done. Answers whether a corner has gone. */
  cut(p: number): boolean {
    const { corners, sides, size, planes, tried } = this;
    if (p >= planes.count || size === 0 || tried[p] === this.turn) return false;
    tried[p] = this.turn;
    const { rows } = planes;
    const hx = rows[PLANE * p]!;
    const hy = rows[PLANE * p + 1]!;
    const hz = rows[PLANE * p + 2]!;
    const offset = rows[PLANE * p + 3]!;
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
    const doubt = length * (corners[at + 3]! + 8 * ULP * far) + 8 * ULP * Math.abs(planes.rows[PLANE * p + 3]!);
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
    const [f, q] = [PLANE * this.face, PLANE * p];
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

  private makeRoom(): void {
    const room = this.sides.length + 1;
    this.ring = withRoom(this.ring, room, integers);
    this.corners = withRoom(this.corners, room * CORNER, doubles);
    this.spareRing = withRoom(this.spareRing, room, integers);
    this.spareCorners = withRoom(this.spareCorners, room * CORNER, doubles);
    this.sides = withRoom(this.sides, room, signs);
  }

  private makeMarks(room: number): void {
    this.turn += 1;
    if (this.turn === 2 ** 30) {
      this.tried.fill(0);
      this.settled.fill(0);
      this.turn = 1;
    }
    if (this.settled.length >= room) return;
    this.tried = withRoom(this.tried, room, integers);
    this.settled = withRoom(this.settled, room, integers);
    this.previous = withRoom(this.previous, room, integers);
    this.next = withRoom(this.next, room, integers);
  }
}
