import { cellOfDirection } from '../exact/cells.ts';
import { PLANE, type PlaneTable } from '../exact/plane-table.ts';
import { doubles, integers, withRoom } from '../exact/room.ts';
import { exactCross } from '../exact/side.ts';
import { Carver } from './carve.ts';
import { Climber } from './climb.ts';
import { Shell } from './shell.ts';

const PLANES_A_CELL = 6;

/**
 * Cuts the frame with plane after plane. First comes the nearest plane of each cell of directions: that makes most of
 * the solid. Each later plane begins its search for a vertex to cut off at a face of its own cell.
 *
 * Tried before: cutting each plane's face by itself, as `by-form` does for the first face of a form. It takes three to
 * four times as long, since every vertex is found by at least three faces.
 */
export class Inserter {
  readonly shell: Shell;
  private readonly climber: Climber;
  private readonly carver: Carver;
  /** Planes in the order in which they are put in, and the cell of each plane. */
  private order = integers(64);
  private cellOf = integers(64);
  /** Where each cell begins in the order. */
  private start = integers(64);
  /** Distance of each plane from the origin, as if the axes were Cartesian. Only the order depends on it. */
  private distance = doubles(64);
  /** A plane of each cell that had a face when it was put in. */
  private hint = integers(64);
  /** The plane that made the last face: it is there. */
  private latest = 0;

  constructor(private readonly planes: PlaneTable) {
    this.shell = new Shell(planes);
    this.climber = new Climber(this.shell);
    this.carver = new Carver(this.shell);
  }

  /** Answers whether anything with a volume is left. */
  insertAll(): boolean {
    const { count } = this.planes;
    const side = Math.max(1, Math.round(Math.sqrt(count / PLANES_A_CELL / 6)));
    const cells = 6 * side * side;
    this.sort(side, cells);
    this.shell.begin();
    this.latest = count;
    this.hint = withRoom(this.hint, cells, integers).fill(count, 0, cells);
    for (let cell = 0; cell < cells; cell++)
      if (this.start[cell]! < this.start[cell + 1]! && !this.insert(this.order[this.start[cell]!]!)) return false;
    for (let cell = 0; cell < cells; cell++)
      for (let i = this.start[cell]! + 1; i < this.start[cell + 1]!; i++)
        if (!this.insert(this.order[i]!)) return false;
    return true;
  }

  private insert(p: number): boolean {
    const { shell, hint } = this;
    const cell = this.cellOf[p]!;
    let edge = shell.edgeOf[hint[cell]!]!;
    if (edge === -1) edge = shell.edgeOf[this.latest]!;
    const side = this.climber.climb(p, shell.end[edge]!);
    if (side === 0) this.nameFirst(p);
    if (side <= 0) return true;
    hint[cell] = p;
    this.latest = p;
    return this.carver.carve(p, this.climber.vertex);
  }

  /** A plane that touches: where it coincides with a face there, the first of the two counts. */
  private nameFirst(p: number): void {
    const { edgeOf, face, next, twin, into } = this.shell;
    const first = into[this.climber.vertex]!;
    let e = first;
    do {
      const f = face[e]!;
      if (p < f && this.coincide(p, f)) {
        edgeOf[p] = edgeOf[f]!;
        edgeOf[f] = -1;
        if (this.latest === f) this.latest = p;
        for (let around = e; face[around] === f; around = next[around]!) face[around] = p;
      }
      e = twin[next[e]!]!;
    } while (e !== first);
  }

  /** For two planes through one vertex: whether they are one plane and look the same way. */
  private coincide(p: number, f: number): boolean {
    const { planes } = this;
    for (let k = 0; k < 3; k++) if (exactCross(planes, p, f, k) !== 0) return false;
    const { rows } = planes;
    const [i, j] = [PLANE * p, PLANE * f];
    return rows[i]! * rows[j]! + rows[i + 1]! * rows[j + 1]! + rows[i + 2]! * rows[j + 2]! > 0;
  }

  private sort(side: number, cells: number): void {
    const { rows, count } = this.planes;
    this.order = withRoom(this.order, count, integers);
    this.cellOf = withRoom(this.cellOf, count, integers);
    this.distance = withRoom(this.distance, count, doubles);
    this.start = withRoom(this.start, cells + 1, integers).fill(0, 0, cells + 1);
    const { order, cellOf, distance, start } = this;
    for (let p = 0; p < count; p++) {
      const x = rows[PLANE * p]!;
      const y = rows[PLANE * p + 1]!;
      const z = rows[PLANE * p + 2]!;
      const cell = cellOfDirection(x, y, z, side);
      cellOf[p] = cell;
      distance[p] = rows[PLANE * p + 3]! / Math.sqrt(x * x + y * y + z * z);
      start[cell]! += 1;
    }
    // Now the end of each cell; putting its planes there from the back leaves its beginning.
    for (let cell = 1; cell <= cells; cell++) start[cell]! += start[cell - 1]!;
    for (let p = count - 1; p >= 0; p--) {
      const cell = cellOf[p]!;
      const i = start[cell]! - 1;
      start[cell] = i;
      order[i] = p;
    }
    for (let cell = 0; cell < cells; cell++) {
      const first = start[cell]!;
      for (let i = first + 1; i < start[cell + 1]!; i++)
        if (distance[order[i]!]! < distance[order[first]!]!) [order[i], order[first]] = [order[first]!, order[i]!];
    }
  }
}
