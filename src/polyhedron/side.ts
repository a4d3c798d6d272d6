import { type BigRow, bigCross, bigMeet, bigRow, bigSide } from './big.ts';
import { LARGEST_MULTIPLE, type Offset } from './offset.ts';

/** Half a unit in the last place of 1: every float operation below errs by at most this, relatively. */
export const ULP = 2 ** -53;
/** Normals of whole numbers up to this are multiplied out exactly in doubles: 6·999³·2^18·4 < 2^53. */
const LARGEST_INTEGER_NORMAL = 999;

/** Planes with all that the sign of a corner needs. */
export interface SidePlanes {
  /** h1, h2, h3 and the nearest double to the exact offset of each plane, one plane after the other. */
  readonly rows: Float64Array;
  readonly offset: readonly Offset[];
  /** 1 where the integer shortcut holds: whole normals within bounds and a small multiple. */
  readonly whole: Uint8Array;
  /** Planes that were needed in whole numbers of any size. */
  readonly big: Map<number, BigRow>;
}

/**
 * @param normals h1, h2, h3 of each plane, one after the other
 * @param offset one a plane
 */
export function sidePlanes(normals: ArrayLike<number>, offset: readonly Offset[]): SidePlanes {
  const count = offset.length;
  const rows = new Float64Array(4 * count);
  const whole = new Uint8Array(count);
  for (let p = 0; p < count; p++) {
    const [x, y, z] = [normals[3 * p]!, normals[3 * p + 1]!, normals[3 * p + 2]!];
    const { approximate, multiple } = offset[p]!;
    rows[4 * p] = x;
    rows[4 * p + 1] = y;
    rows[4 * p + 2] = z;
    rows[4 * p + 3] = approximate;
    whole[p] = +(fits(x) && fits(y) && fits(z) && Math.abs(multiple) <= LARGEST_MULTIPLE);
  }
  return { rows, offset, whole, big: new Map() };
}

const fits = (h: number): boolean => Math.abs(h) <= LARGEST_INTEGER_NORMAL && Math.floor(h) === h;

/**
 * Exact sign of `h·x − D` for plane p at the corner of planes a, b, c: 1 outside, 0 on the plane, −1 inside.
 * Integers of one family first (exact), then a filter over at most four families, then whole big numbers.
 */
export function exactSide(s: SidePlanes, a: number, b: number, c: number, p: number): -1 | 0 | 1 {
  if (s.whole[a]! & s.whole[b]! & s.whole[c]! & s.whole[p]!) {
    const quick = integerSide(s, a, b, c, p);
    if (quick !== null) return quick;
  }
  return bigSide(big(s, a), big(s, b), big(s, c), big(s, p));
}

/** Exact sign of component k (0, 1, 2) of the cross product of the normals of planes a and b. */
export function exactCross(s: SidePlanes, a: number, b: number, k: number): -1 | 0 | 1 {
  const [i, j] = [(k + 1) % 3, (k + 2) % 3];
  const left = s.rows[4 * a + i]! * s.rows[4 * b + j]!;
  const right = s.rows[4 * a + j]! * s.rows[4 * b + i]!;
  // One rounding in each product and one in their difference; none where both are whole and small.
  const doubt = s.whole[a]! & s.whole[b]! ? 0 : 3 * ULP * (Math.abs(left) + Math.abs(right));
  if (Math.abs(left - right) > doubt) return left > right ? 1 : -1;
  return doubt === 0 ? 0 : bigCross(big(s, a), big(s, b), k);
}

/** Where three planes meet, exactly, then rounded to doubles. */
export function exactMeet(s: SidePlanes, a: number, b: number, c: number): readonly [number, number, number] {
  return bigMeet(big(s, a), big(s, b), big(s, c));
}

function big(s: SidePlanes, p: number): BigRow {
  const known = s.big.get(p);
  if (known) return known;
  const row = bigRow(s.rows[4 * p]!, s.rows[4 * p + 1]!, s.rows[4 * p + 2]!, s.offset[p]!.exact);
  s.big.set(p, row);
  return row;
}

/** Determinant of three normals; exact where all three are whole. */
function triple({ rows }: SidePlanes, a: number, b: number, c: number): number {
  const [bx, by, bz] = [rows[4 * b]!, rows[4 * b + 1]!, rows[4 * b + 2]!];
  const [cx, cy, cz] = [rows[4 * c]!, rows[4 * c + 1]!, rows[4 * c + 2]!];
  return (
    rows[4 * a]! * (by * cz - bz * cy) + rows[4 * a + 1]! * (bz * cx - bx * cz) + rows[4 * a + 2]! * (bx * cy - by * cx)
  );
}

const families = new Int32Array(4);
const sums = new Float64Array(4);
const units = new Float64Array(4);

/** Null when the filter cannot tell. Scratch arrays are safe: nothing here waits or calls back. */
function integerSide(s: SidePlanes, a: number, b: number, c: number, p: number): -1 | 0 | 1 | null {
  const det = triple(s, a, b, c);
  let used = add(0, s.offset[a]!, triple(s, p, b, c));
  used = add(used, s.offset[b]!, triple(s, p, c, a));
  used = add(used, s.offset[c]!, triple(s, p, a, b));
  used = add(used, s.offset[p]!, -det);
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
