import { FacePolygon } from './clip.ts';
import type { GroupAction } from './group-action.ts';
import { CORNER } from './meet.ts';
import { Nearby } from './nearby.ts';
import type { PlaneTable } from './plane-table.ts';
import { bytes, doubles, integers, withRoom } from './room.ts';

/**
 * The first face of each form that appears, cut by all planes. Slot s has the edges `start[s]` … `end[s] − 1`; a face
 * that does not appear has none.
 *
 * The faces of a convex solid hang together, so it is enough to begin with one that appears and to go on to the
 * neighbours of what is finished: a plane that is never named as a neighbour has no face. A face comes with planes that
 * are known to border it or to lie close by, and after cutting with them there is little left to do.
 */
export class CutFaces {
  start = integers(64);
  end = integers(64);
  /** The plane on the other side of each edge. */
  ring = integers(256);
  /** x, y, z and error of the corner at the end of each edge. */
  corners = doubles(256 * CORNER);
  /** The largest coordinate of any corner. */
  reach = 0;
  /** Whether some face reaches to infinity. */
  open = false;
  private size = 0;
  /** The slot of each edge. */
  private owner = integers(256);
  /** Edges that name a slot as neighbour: the last of each slot, and the one before each. */
  private naming = integers(64);
  private before = integers(256);
  /** Slots to do, in order, and whether each has been put there. */
  private queue = integers(64);
  private queued = bytes(64);
  private waiting = 0;
  private readonly nearby = new Nearby();
  private readonly polygon: FacePolygon;

  constructor(
    private readonly planes: PlaneTable,
    private readonly action: GroupAction,
  ) {
    this.polygon = new FacePolygon(planes);
  }

  /** Cuts the faces of the planes that table and action hold now. */
  cut(): void {
    const slots = this.action.slots;
    this.clear(slots);
    if (slots === 0) return;
    this.nearby.load(this.planes);
    this.ask(this.action.slot(this.nearby.nearest(this.planes)));
    for (let done = 0; done < this.waiting; done++) {
      this.finish(this.queue[done]!);
      // Nothing found yet, or an open solid, whose faces need not hang together: no face is left out.
      const last = done + 1 === this.waiting;
      if (last && (this.open || this.size === 0)) for (let slot = 0; slot < slots; slot++) this.ask(slot);
    }
  }

  private clear(slots: number): void {
    this.start = withRoom(this.start, slots, integers).fill(0, 0, slots);
    this.end = withRoom(this.end, slots, integers).fill(0, 0, slots);
    this.naming = withRoom(this.naming, slots, integers).fill(-1, 0, slots);
    this.queued = withRoom(this.queued, slots, bytes).fill(0, 0, slots);
    this.queue = withRoom(this.queue, slots, integers);
    this.size = 0;
    this.waiting = 0;
    this.reach = 0;
    this.open = false;
  }

  private ask(slot: number): void {
    if (this.queued[slot] === 1) return;
    this.queued[slot] = 1;
    this.queue[this.waiting] = slot;
    this.waiting += 1;
  }

  private finish(slot: number): void {
    const { polygon, action, planes } = this;
    polygon.begin(action.first[slot]!);
    this.cutWithKnown(slot);
    if (polygon.size > 0) this.nearby.cut(polygon);
    if (polygon.size === 0) return;
    this.keep(slot);
    for (let edge = this.start[slot]!; edge < this.end[slot]!; edge++) {
      const neighbour = this.ring[edge]!;
      if (neighbour < planes.count) this.name(action.slot(neighbour), edge);
      else this.open = true;
    }
  }

  private name(slot: number, edge: number): void {
    this.ask(slot);
    this.before[edge] = this.naming[slot]!;
    this.naming[slot] = edge;
  }

  /** Finished faces that name this one are its neighbours, and so, most often, are the planes beside it in their rings. */
  private cutWithKnown(slot: number): void {
    const { ring, owner, start, end, action } = this;
    for (let edge = this.naming[slot]!; edge !== -1; edge = this.before[edge]!) {
      const face = owner[edge]!;
      const left = ring[edge === start[face] ? end[face]! - 1 : edge - 1]!;
      const right = ring[edge + 1 === end[face] ? start[face]! : edge + 1]!;
      for (const operation of action.toFirst(ring[edge]!)) this.settle(operation, action.first[face]!, left, right);
    }
  }

  private settle(operation: number, face: number, left: number, right: number): void {
    const { action, polygon } = this;
    const back = action.isImproper(operation);
    polygon.settle(
      action.carry(operation, face),
      action.carry(operation, back ? left : right),
      action.carry(operation, back ? right : left),
    );
  }

  private keep(slot: number): void {
    const { ring, corners, size, reach, worst } = this.polygon;
    const from = this.size;
    this.makeRoom(from + size);
    for (let i = 0; i < size; i++) {
      this.ring[from + i] = ring[i]!;
      this.owner[from + i] = slot;
    }
    for (let i = 0; i < size * CORNER; i++) this.corners[from * CORNER + i] = corners[i]!;
    // A corner that is not known at all may be anywhere; the other faces tell the size.
    if (worst < Number.POSITIVE_INFINITY) this.reach = Math.max(this.reach, reach);
    this.start[slot] = from;
    this.end[slot] = from + size;
    this.size = from + size;
  }

  private makeRoom(room: number): void {
    if (this.ring.length >= room) return;
    this.ring = withRoom(this.ring, room, integers);
    this.owner = withRoom(this.owner, room, integers);
    this.before = withRoom(this.before, room, integers);
    this.corners = withRoom(this.corners, room * CORNER, doubles);
  }
}
