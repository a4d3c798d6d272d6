import { CORNER } from '../exact/meet.ts';
import type { PlaneTable } from '../exact/plane-table.ts';
import { bytes, doubles, integers, withRoom } from '../exact/room.ts';
import { FacePolygon } from './clip.ts';
import type { GroupAction } from './group-action.ts';
import { Nearby } from './nearby.ts';

/**
 * The first face of each form that appears, cut by all planes. Form f has the edges `start[f]` … `end[f] − 1`; a face
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
  /** The form of each edge. */
  private owner = integers(256);
  /** Edges that name a form as neighbour: the last of each form, and the one before each. */
  private naming = integers(64);
  private before = integers(256);
  /** Forms to do, in order, and whether each has been put there. */
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
    const forms = this.action.forms;
    this.clear(forms);
    if (forms === 0) return;
    this.nearby.load(this.planes);
    this.ask(this.action.form[this.nearby.nearest(this.planes)]!);
    for (let done = 0; done < this.waiting; done++) {
      this.finish(this.queue[done]!);
      // Nothing found yet, or an open solid, whose faces need not hang together: no face is left out.
      const last = done + 1 === this.waiting;
      if (last && (this.open || this.size === 0)) for (let form = 0; form < forms; form++) this.ask(form);
    }
  }

  private clear(forms: number): void {
    this.start = withRoom(this.start, forms, integers).fill(0, 0, forms);
    this.end = withRoom(this.end, forms, integers).fill(0, 0, forms);
    this.naming = withRoom(this.naming, forms, integers).fill(-1, 0, forms);
    this.queued = withRoom(this.queued, forms, bytes).fill(0, 0, forms);
    this.queue = withRoom(this.queue, forms, integers);
    this.size = 0;
    this.waiting = 0;
    this.reach = 0;
    this.open = false;
  }

  private ask(form: number): void {
    if (this.queued[form] === 1) return;
    this.queued[form] = 1;
    this.queue[this.waiting] = form;
    this.waiting += 1;
  }

  private finish(form: number): void {
    const { polygon, action, planes } = this;
    polygon.begin(action.first[form]!);
    this.cutWithKnown(form);
    if (polygon.size > 0) this.nearby.cut(polygon);
    if (polygon.size === 0) return;
    this.keep(form);
    for (let edge = this.start[form]!; edge < this.end[form]!; edge++) {
      const neighbour = this.ring[edge]!;
      if (neighbour < planes.count) this.name(action.form[neighbour]!, edge);
      else this.open = true;
    }
  }

  private name(form: number, edge: number): void {
    this.ask(form);
    this.before[edge] = this.naming[form]!;
    this.naming[form] = edge;
  }

  /** Finished faces that name this one are its neighbours, and so, most often, are the planes beside it in their rings. */
  private cutWithKnown(form: number): void {
    const { ring, owner, start, end, action } = this;
    for (let edge = this.naming[form]!; edge !== -1; edge = this.before[edge]!) {
      const face = owner[edge]!;
      const left = ring[edge === start[face] ? end[face]! - 1 : edge - 1]!;
      const right = ring[edge + 1 === end[face] ? start[face]! : edge + 1]!;
      for (const operation of action.toFirst(ring[edge]!)) this.settle(operation, action.first[face]!, left, right);
    }
  }

  private settle(operation: number, face: number, left: number, right: number): void {
    const { action, polygon } = this;
    const back = action.symmetry.improper[operation] === 1;
    polygon.settle(
      action.carry(operation, face),
      action.carry(operation, back ? left : right),
      action.carry(operation, back ? right : left),
    );
  }

  private keep(form: number): void {
    const { ring, corners, size, reach, worst } = this.polygon;
    const from = this.size;
    this.makeRoom(from + size);
    for (let i = 0; i < size; i++) {
      this.ring[from + i] = ring[i]!;
      this.owner[from + i] = form;
    }
    for (let i = 0; i < size * CORNER; i++) this.corners[from * CORNER + i] = corners[i]!;
    // A corner that is not known at all may be anywhere; the other faces tell the size.
    if (worst < Number.POSITIVE_INFINITY) this.reach = Math.max(this.reach, reach);
    this.start[form] = from;
    this.end[form] = from + size;
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
