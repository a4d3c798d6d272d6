import { FacePolygon } from './clip.ts';
import type { GroupAction } from './group-action.ts';
import { CORNER } from './meet.ts';
import { Nearby } from './nearby.ts';
import type { SidePlanes } from './side.ts';

/** Finished polygons, one after the other. Slot s has entries `start[s]` … `end[s] − 1`; a face that is not there, none. */
export class CutFaces {
  readonly start: Int32Array;
  readonly end: Int32Array;
  /** The plane on the other side of each edge. */
  ring = new Int32Array(64);
  /** x, y, z and error of the corner at the end of each edge. */
  corners = new Float64Array(64 * CORNER);
  /** The slot of each entry. */
  owner = new Int32Array(64);
  size = 0;
  /** The largest coordinate of any corner. */
  reach = 0;
  /** Whether some face reaches to infinity. */
  open = false;

  constructor(slots: number) {
    this.start = new Int32Array(slots);
    this.end = new Int32Array(slots);
  }

  add(slot: number, { ring, corners, size, reach, worst }: FacePolygon): void {
    if (this.size + size > this.ring.length) this.makeRoom(size);
    this.start[slot] = this.size;
    for (let i = 0; i < size; i++) {
      this.ring[this.size + i] = ring[i]!;
      this.owner[this.size + i] = slot;
    }
    for (let i = 0; i < size * CORNER; i++) this.corners[this.size * CORNER + i] = corners[i]!;
    // A corner that is not known at all may be anywhere; the other faces tell the size.
    if (worst < Number.POSITIVE_INFINITY) this.reach = Math.max(this.reach, reach);
    this.size += size;
    this.end[slot] = this.size;
  }

  private makeRoom(size: number): void {
    const room = 2 * (this.ring.length + size);
    const [ring, corners, owner] = [new Int32Array(room), new Float64Array(room * CORNER), new Int32Array(room)];
    ring.set(this.ring);
    corners.set(this.corners);
    owner.set(this.owner);
    Object.assign(this, { ring, corners, owner });
  }
}

/**
 * Cuts the first face of each form that appears.
 *
 * The faces of a convex solid hang together, so it is enough to begin with one that appears and to go on to the
 * neighbours of what is finished: a plane that is never named as a neighbour has no face. A face comes with planes that
 * are known to border it or to lie close by, and after cutting with them there is little left to do.
 */
export function cutFaces(planes: SidePlanes, count: number, action: GroupAction): CutFaces {
  return new Walk(planes, count, action).faces;
}

class Walk {
  readonly faces: CutFaces;
  private readonly polygon: FacePolygon;
  private readonly nearby: Nearby;
  /** Slots to do, in order, and whether each has been put there. */
  private readonly queue: Int32Array;
  private readonly queued: Uint8Array;
  private waiting = 0;
  /** Finished edges that name a slot: the last of each, and the one before each. */
  private readonly naming: Int32Array;
  private before = new Int32Array(64);

  constructor(
    planes: SidePlanes,
    private readonly count: number,
    private readonly action: GroupAction,
  ) {
    const slots = action.first.length;
    this.faces = new CutFaces(slots);
    this.polygon = new FacePolygon(planes, count);
    this.nearby = new Nearby(planes.rows, count);
    this.queue = new Int32Array(slots);
    this.queued = new Uint8Array(slots);
    this.naming = new Int32Array(slots).fill(-1);
    if (slots > 0) this.walk(slots);
  }

  private walk(slots: number): void {
    this.ask(this.action.slot(this.nearby.nearest()));
    for (let done = 0; done < this.waiting; done++) {
      this.finish(this.queue[done]!);
      // Nothing found yet, or an open solid, whose faces need not hang together: no face is left out.
      const last = done + 1 === this.waiting;
      if (last && (this.faces.open || this.faces.size === 0)) for (let slot = 0; slot < slots; slot++) this.ask(slot);
    }
  }

  private ask(slot: number): void {
    if (this.queued[slot] === 1) return;
    this.queued[slot] = 1;
    this.queue[this.waiting] = slot;
    this.waiting += 1;
  }

  /** Cuts one face, and asks for its neighbours. */
  private finish(slot: number): void {
    const { polygon, faces, count } = this;
    polygon.begin(this.action.first[slot]!);
    this.cutWithKnown(slot);
    if (polygon.size > 0) this.nearby.cut(polygon);
    if (polygon.size === 0) return;
    faces.add(slot, polygon);
    if (this.before.length < faces.ring.length) {
      const wider = new Int32Array(faces.ring.length);
      wider.set(this.before);
      this.before = wider;
    }
    for (let edge = faces.start[slot]!; edge < faces.end[slot]!; edge++) {
      const neighbour = faces.ring[edge]!;
      if (neighbour >= count) faces.open = true;
      else this.name(this.action.slot(neighbour), edge);
    }
  }

  private name(slot: number, edge: number): void {
    this.ask(slot);
    this.before[edge] = this.naming[slot]!;
    this.naming[slot] = edge;
  }

  /** Finished faces that name this one are its neighbours, and so, most often, are the planes beside it in their rings. */
  private cutWithKnown(slot: number): void {
    const { faces, action } = this;
    const { ring, owner, start, end } = faces;
    for (let edge = this.naming[slot]!; edge !== -1; edge = this.before[edge]!) {
      const face = owner[edge]!;
      const left = ring[edge === start[face] ? end[face]! - 1 : edge - 1]!;
      const right = ring[edge + 1 === end[face] ? start[face]! : edge + 1]!;
      for (const operation of action.toFirst(ring[edge]!)) {
        this.cutWith(operation, action.first[face]!);
        this.cutWith(operation, left);
        this.cutWith(operation, right);
      }
    }
  }

  private cutWith(operation: number, plane: number): void {
    if (plane < this.count && this.polygon.size > 0) this.polygon.cut(this.action.carry(operation, plane));
  }
}
