import { cellOfDirection } from '../exact/cells.ts';
import { CORNER } from '../exact/meet.ts';
import { PLANE, type PlaneTable } from '../exact/plane-table.ts';
import { doubles, integers, withRoom } from '../exact/room.ts';
import type { FacePolygon } from './clip.ts';

/** Numbers kept for a cell. */
const CELL = 6;
/** By trial: from 5 to 24 it makes little difference. */
const PLANES_A_CELL = 8;
/** Far more than the few roundings in any bound below. */
const DOUBT = 2 ** -44;

/**
 * Which planes could cut a polygon at all, by bounds in doubles that always err towards "could". Index space is taken
 * as if it were Euclidean: that changes no sign of h·x − D, and a bound needs no true lengths.
 *
 * Let plane p be û·x ≤ δ with |û| = 1, let the polygon lie on a face with unit normal n̂, and let those of its corners
 * that are not settled lie within radius r of their mean c. For such a corner v = c + w, w is at right angles to n̂,
 * hence û·w ≤ r·|û × n̂| and
 *
 *     û·v ≤ û·c + r·√(1 − (û·n̂)²).
 *
 * Where that stays below δ, p cuts nothing. Planes are sorted into cells of similar directions. For all planes of a
 * cell with mean direction u and |û − u| ≤ e, the same bound holds with û·c ≤ u·c + e|c| and |û × n̂| ≤ |u × n̂| + e,
 * and is compared with the smallest δ of the cell.
 *
 * Doubles: û, δ and c err by a few units of 2^-53, a corner by the bound that it carries (each coordinate, so less than
 * 2 of it in length), and the mean is off the face's plane by no more; `DOUBT` and 8 such bounds are more than all that.
 */
export class Nearby {
  /** Unit normal and distance of each plane, sorted by cell. */
  private unit = doubles(4 * 64);
  /** Plane at each place of `unit`, and the place of each plane. */
  private plane = integers(64);
  private place = integers(64);
  /** How many cells there are, where each begins in `unit`, and the cell of each plane. */
  private count = 0;
  private start = integers(64);
  private cellOf = integers(64);
  /** For each cell: mean direction u, |u|², e, smallest δ. */
  private cells = doubles(64 * CELL);
  /** For the polygon at hand: how many corners are not settled, their places, c, |c|, r, and the bound of errors. */
  private loose = 0;
  private looseCorners = integers(64);
  private readonly ball = doubles(6);

  /** Sorts the planes of a table into cells. */
  load({ rows, count }: PlaneTable): void {
    const side = Math.max(1, Math.round(Math.sqrt(count / PLANES_A_CELL / 6)));
    this.count = 6 * side * side;
    this.makeRoom(count);
    const { start, cellOf } = this;
    start.fill(0, 0, this.count + 1);
    for (let p = 0; p < count; p++) {
      const cell = cellOfDirection(rows[PLANE * p]!, rows[PLANE * p + 1]!, rows[PLANE * p + 2]!, side);
      cellOf[p] = cell;
      start[cell]! += 1;
    }
    // Now the end of each cell; putting its planes there from the back leaves its beginning.
    for (let cell = 1; cell <= this.count; cell++) start[cell]! += start[cell - 1]!;
    for (let p = count - 1; p >= 0; p--) this.put(p, rows);
    for (let cell = 0; cell < this.count; cell++) this.measureCell(cell);
  }

  /** The plane nearest to the origin; the first of several. */
  nearest({ count }: PlaneTable): number {
    const { unit, place } = this;
    let best = 0;
    for (let p = 1; p < count; p++) if (unit[4 * place[p]! + 3]! < unit[4 * place[best]! + 3]!) best = p;
    return best;
  }

  /** Cuts a polygon with every plane that may reach it, those of similar direction first. */
  cut(polygon: FacePolygon): void {
    const { cellOf, place, unit, count } = this;
    const first = cellOf[polygon.face]!;
    const at = 4 * place[polygon.face]!;
    const nx = unit[at]!;
    const ny = unit[at + 1]!;
    const nz = unit[at + 2]!;
    this.enclose(polygon);
    for (let k = 0; k < count && polygon.size > 0 && this.loose > 0; k++) {
      const cell = first + k < count ? first + k : first + k - count;
      if (this.cellReaches(cell, nx, ny, nz)) this.cutWithCell(cell, polygon, nx, ny, nz);
    }
  }

  private cutWithCell(cell: number, polygon: FacePolygon, nx: number, ny: number, nz: number): void {
    const { unit, plane, ball } = this;
    let cx = ball[0]!;
    let cy = ball[1]!;
    let cz = ball[2]!;
    let square = ball[4]! * ball[4]!;
    let doubt = ball[5]!;
    const end = this.start[cell + 1]!;
    for (let i = this.start[cell]!; i < end; i++) {
      const x = unit[4 * i]!;
      const y = unit[4 * i + 1]!;
      const z = unit[4 * i + 2]!;
      const gap = unit[4 * i + 3]! - (x * cx + y * cy + z * cz) - doubt;
      const along = x * nx + y * ny + z * nz;
      if (gap > 0 && gap * gap > square * (1 - along * along + DOUBT)) continue;
      if (!polygon.cut(plane[i]!)) continue;
      if (polygon.size === 0) return;
      this.enclose(polygon);
      if (this.loose === 0) return;
      cx = ball[0]!;
      cy = ball[1]!;
      cz = ball[2]!;
      square = ball[4]! * ball[4]!;
      doubt = ball[5]!;
    }
  }

  private cellReaches(cell: number, nx: number, ny: number, nz: number): boolean {
    const { cells, ball } = this;
    const at = cell * CELL;
    const x = cells[at]!;
    const y = cells[at + 1]!;
    const z = cells[at + 2]!;
    const farthest = x * ball[0]! + y * ball[1]! + z * ball[2]! + cells[at + 4]! * (ball[3]! + ball[4]!);
    const gap = cells[at + 5]! - farthest - ball[5]!;
    const along = x * nx + y * ny + z * nz;
    return !(gap > 0 && gap * gap > ball[4]! * ball[4]! * (cells[at + 3]! - along * along + DOUBT));
  }

  /** Counts the corners that are not settled, and finds their mean and a radius about it. */
  private enclose(polygon: FacePolygon): void {
    const { corners, size, worst } = polygon;
    this.looseCorners = withRoom(this.looseCorners, size, integers);
    const { looseCorners } = this;
    let count = 0;
    let cx = 0;
    let cy = 0;
    let cz = 0;
    for (let i = 0; i < size; i++) {
      if (polygon.isSettled(i)) continue;
      const at = i * CORNER;
      looseCorners[count] = at;
      count += 1;
      cx += corners[at]!;
      cy += corners[at + 1]!;
      cz += corners[at + 2]!;
    }
    this.loose = count;
    if (count === 0) return;
    cx /= count;
    cy /= count;
    cz /= count;
    let square = 0;
    for (let i = 0; i < count; i++) {
      const at = looseCorners[i]!;
      const x = corners[at]! - cx;
      const y = corners[at + 1]! - cy;
      const z = corners[at + 2]! - cz;
      square = Math.max(square, x * x + y * y + z * z);
    }
    const { ball } = this;
    ball[0] = cx;
    ball[1] = cy;
    ball[2] = cz;
    ball[3] = Math.sqrt(cx * cx + cy * cy + cz * cz);
    ball[4] = Math.sqrt(square);
    ball[5] = 8 * worst + DOUBT * (ball[3] + ball[4]);
  }

  private put(p: number, rows: Float64Array): void {
    const { start, cellOf, plane, place, unit } = this;
    const cell = cellOf[p]!;
    const i = start[cell]! - 1;
    start[cell] = i;
    plane[i] = p;
    place[p] = i;
    const x = rows[PLANE * p]!;
    const y = rows[PLANE * p + 1]!;
    const z = rows[PLANE * p + 2]!;
    const length = Math.sqrt(x * x + y * y + z * z);
    const distance = rows[PLANE * p + 3]! / length;
    unit[4 * i] = x / length;
    unit[4 * i + 1] = y / length;
    unit[4 * i + 2] = z / length;
    // Shortened by more than its rounding.
    unit[4 * i + 3] = distance - DOUBT * Math.abs(distance);
  }

  private makeRoom(count: number): void {
    this.unit = withRoom(this.unit, 4 * count, doubles);
    this.plane = withRoom(this.plane, count, integers);
    this.place = withRoom(this.place, count, integers);
    this.cellOf = withRoom(this.cellOf, count, integers);
    this.start = withRoom(this.start, this.count + 1, integers);
    this.cells = withRoom(this.cells, this.count * CELL, doubles);
  }

  private measureCell(cell: number): void {
    const { start, unit, cells } = this;
    const [from, to] = [4 * start[cell]!, 4 * start[cell + 1]!];
    if (from === to) {
      cells[cell * CELL + 5] = Number.POSITIVE_INFINITY;
      return;
    }
    let x = 0;
    let y = 0;
    let z = 0;
    let nearest = Number.POSITIVE_INFINITY;
    let square = 0;
    for (let i = from; i < to; i += 4) {
      x += unit[i]!;
      y += unit[i + 1]!;
      z += unit[i + 2]!;
      if (unit[i + 3]! < nearest) nearest = unit[i + 3]!;
    }
    const share = 4 / (to - from);
    x *= share;
    y *= share;
    z *= share;
    for (let i = from; i < to; i += 4) {
      const [dx, dy, dz] = [unit[i]! - x, unit[i + 1]! - y, unit[i + 2]! - z];
      square = Math.max(square, dx * dx + dy * dy + dz * dz);
    }
    const at = cell * CELL;
    cells[at] = x;
    cells[at + 1] = y;
    cells[at + 2] = z;
    cells[at + 3] = x * x + y * y + z * z;
    cells[at + 4] = Math.sqrt(square) + DOUBT;
    cells[at + 5] = nearest;
  }
}
