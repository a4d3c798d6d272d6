import type { Offset } from '../offset.ts';
import { bigCross, bigMeet, bigSide, bigTriple } from './big.ts';
import { PLANE, type PlaneTable } from './plane-table.ts';

/** Half a unit in the last place of 1: every float operation errs by at most this, relatively. */
export const ULP = 2 ** -53;

/**
 * Exact sign of `h·x − D` for plane p at the corner of planes a, b, c: 1 outside, 0 on the plane, −1 inside.
 * Integers of one family first (exact), then a filter over at most four families, then whole big numbers.
 */
export function exactSide(table: PlaneTable, a: number, b: number, c: number, p: number): -1 | 0 | 1 {
  const { whole } = table;
  if (whole[a]! & whole[b]! & whole[c]! & whole[p]!) {
    const quick = integerSide(table, a, b, c, p);
    if (quick !== null) return quick;
  }
  return bigSide(table.bigRow(a), table.bigRow(b), table.bigRow(c), table.bigRow(p));
}

/** Exact sign of component k (0, 1, 2) of the cross product of the normals of planes a and b. */
export function exactCross(table: PlaneTable, a: number, b: number, k: number): -1 | 0 | 1 {
  const { rows, whole } = table;
  const [i, j] = [(k + 1) % 3, (k + 2) % 3];
  const left = rows[PLANE * a + i]! * rows[PLANE * b + j]!;
  const right = rows[PLANE * a + j]! * rows[PLANE * b + i]!;
  // One rounding in each product and one in their difference; none where both are whole and small.
  const exact = (whole[a]! & whole[b]!) === 1;
  const doubt = exact ? 0 : 3 * ULP * (Math.abs(left) + Math.abs(right));
  if (Math.abs(left - right) > doubt) return left > right ? 1 : -1;
  return exact ? 0 : bigCross(table.bigRow(a), table.bigRow(b), k);
}

/** Exact sign of the determinant of three planes' normals. */
export function exactTriple(table: PlaneTable, a: number, b: number, c: number): -1 | 0 | 1 {
  const { rows, whole } = table;
  const det = triple(table, a, b, c);
  const exact = (whole[a]! & whole[b]! & whole[c]!) === 1;
  // Six products, each with at most five roundings.
  const size = rows[PLANE * a + 4]! * rows[PLANE * b + 4]! * rows[PLANE * c + 4]!;
  const doubt = exact ? 0 : 8 * ULP * 6 * size;
  if (Math.abs(det) > doubt) return det > 0 ? 1 : -1;
  return exact ? 0 : bigTriple(table.bigRow(a), table.bigRow(b), table.bigRow(c));
}

/** Where three planes meet, exactly, then rounded to doubles. */
export function exactMeet(table: PlaneTable, a: number, b: number, c: number): readonly [number, number, number] {
  return bigMeet(table.bigRow(a), table.bigRow(b), table.bigRow(c));
}

/** Determinant of three normals; exact where all three are whole. */
function triple({ rows }: PlaneTable, a: number, b: number, c: number): number {
  const [ia, ib, ic] = [PLANE * a, PLANE * b, PLANE * c];
  const [bx, by, bz] = [rows[ib]!, rows[ib + 1]!, rows[ib + 2]!];
  const [cx, cy, cz] = [rows[ic]!, rows[ic + 1]!, rows[ic + 2]!];
  return rows[ia]! * (by * cz - bz * cy) + rows[ia + 1]! * (bz * cx - bx * cz) + rows[ia + 2]! * (bx * cy - by * cx);
}

const families = new Int32Array(4);
const sums = new Float64Array(4);
const units = new Float64Array(4);

/** Null when the filter cannot tell. Scratch arrays are safe: nothing here waits or calls back. */
function integerSide(table: PlaneTable, a: number, b: number, c: number, p: number): -1 | 0 | 1 | null {
  const det = triple(table, a, b, c);
  let used = add(0, table.offset(a), triple(table, p, b, c));
  used = add(used, table.offset(b), triple(table, p, c, a));
  used = add(used, table.offset(c), triple(table, p, a, b));
  used = add(used, table.offset(p), -det);
  let sum = 0;
  let size = 0;
  let live = 0;
  for (let i = 0; i < used; i++) {
    const term = units[i]! * sums[i]!;
    sum += term;
    size += Math.abs(term);
    if (term !== 0) live += 1;
  }
  // One rounding in each unit, one in each product, three in the sum.
  if (live > 1 && Math.abs(sum) <= 8 * ULP * size) return null;
  if (sum === 0) return 0;
  return sum > 0 === det > 0 ? 1 : -1;
}

function add(used: number, offset: Offset, cofactor: number): number {
  for (let i = 0; i < used; i++)
    if (families[i] === offset.family) {
      sums[i]! += offset.multiple * cofactor;
      return used;
    }
  families[used] = offset.family;
  units[used] = offset.unit;
  sums[used] = offset.multiple * cofactor;
  return used + 1;
}
