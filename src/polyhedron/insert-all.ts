import { Carver } from './carve.ts';
import { cellOfDirection } from './cells.ts';
import { vertexOutside } from './locate.ts';
import { PLANE, type PlaneTable } from './plane-table.ts';
import { doubles, integers, withRoom } from './room.ts';
import { Shell } from './shell.ts';
import { exactCross } from './side.ts';

const PLANES_A_CELL = 6;

/**
 * Cuts the frame with plane after plane. First comes the nearest plane of each cell of directions: that makes most of
 * the solid. Each later plane begins its search for a vertex to cut off at a face of its own cell.
 */
export class Inserter {
  readonly shell: Shell;
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

  constructor(private readonly planes: PlaneTable) {
    this.shell = new Shell(planes);
    this.carver = new Carver(this.shell);
  }

  /** Answers whether anything with a volume is left. */
  insertAll(): boolean {
    const { count } = this.planes;
    const side = Math.max(1, Math.round(Math.sqrt(count / PLANES_A_CELL / 6)));
    const cells = 6 * side * side;
    this.sort(side, cells);
    this.shell.begin();
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
    if (edge === -1) edge = shell.into[shell.vertices - 1]!;
    const v = vertexOutside(shell, p, shell.end[edge]!);
    if (v >= 0) {
      if (!this.carver.carve(p, v)) return false;
      hint[cell] = p;
    }
    return true;
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
