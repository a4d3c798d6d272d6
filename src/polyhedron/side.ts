import { type Fraction, fractionOf, LARGEST_MULTIPLE, type Offset } from './offset.ts';

/** Half a unit in the last place of 1: every float operation below errs by at most this, relatively. */
const ULP = 2 ** -53;
/** Normals of whole numbers up to this are multiplied out exactly in doubles: 6·999³·2^18·4 < 2^53. */
const LARGEST_INTEGER_NORMAL = 999;

/** Planes with all that the sign of a corner needs, one entry a plane. */
export interface SidePlanes {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly z: Float64Array;
  /** Nearest doubles to the exact offsets. */
  readonly d: Float64Array;
  readonly offset: readonly Offset[];
  /** 1 where the integer shortcut holds: whole normals within bounds and a small multiple. */
  readonly whole: Uint8Array;
}

export function sidePlanes(normals: ArrayLike<number>, offset: readonly Offset[]): SidePlanes {
  const count = offset.length;
  const take = (axis: number): Float64Array => Float64Array.from(offset, (_, p) => normals[3 * p + axis] ?? 0);
  const [x, y, z] = [take(0), take(1), take(2)];
  const fits = (h: number): boolean => Number.isInteger(h) && Math.abs(h) <= LARGEST_INTEGER_NORMAL;
  const whole = new Uint8Array(count);
  offset.forEach(({ multiple }, p) => {
    whole[p] = +(Math.abs(multiple) <= LARGEST_MULTIPLE && fits(x[p]!) && fits(y[p]!) && fits(z[p]!));
  });
  return { x, y, z, d: Float64Array.from(offset, (o) => o.approximate), offset, whole };
}

/**
 * Where three planes meet, as doubles with a bound of their error.
 * Writes x, y, z and the error (largest of the three coordinates, ∞ when nothing is known) to `out[at…at+3]`.
 */
export function meet(s: SidePlanes, a: number, b: number, c: number, out: Float64Array, at: number): void {
  const [ax, ay, az, da] = [s.x[a]!, s.y[a]!, s.z[a]!, s.d[a]!];
  const [bx, by, bz, db] = [s.x[b]!, s.y[b]!, s.z[b]!, s.d[b]!];
  const [cx, cy, cz, dc] = [s.x[c]!, s.y[c]!, s.z[c]!, s.d[c]!];
  const [bcx, bcy, bcz] = [by * cz - bz * cy, bz * cx - bx * cz, bx * cy - by * cx];
  const det = ax * bcx + ay * bcy + az * bcz;
  const x = da * bcx + db * (cy * az - cz * ay) + dc * (ay * bz - az * by);
  const y = da * bcy + db * (cz * ax - cx * az) + dc * (az * bx - ax * bz);
  const z = da * bcz + db * (cx * ay - cy * ax) + dc * (ax * by - ay * bx);
  out[at] = x / det;
  out[at + 1] = y / det;
  out[at + 2] = z / det;
  const reach = Math.max(Math.abs(out[at]!), Math.abs(out[at + 1]!), Math.abs(out[at + 2]!));
  const [na, nb, nc] = [largest(ax, ay, az), largest(bx, by, bz), largest(cx, cy, cz)];
  // Each numerator has 6 products of at most |D|·n·n′, det 6 of at most na·nb·nc; each carries at most 6 roundings.
  const numerator = 2 * (Math.abs(da) * nb * nc + Math.abs(db) * nc * na + Math.abs(dc) * na * nb);
  const determinant = 6 * na * nb * nc;
  const doubt = Math.abs(det) - 8 * ULP * determinant;
  out[at + 3] = doubt > 0 ? (8 * ULP * (numerator + reach * determinant)) / doubt : Number.POSITIVE_INFINITY;
}

const largest = (x: number, y: number, z: number): number => Math.max(Math.abs(x), Math.abs(y), Math.abs(z));

/**
 * Exact sign of `h·x − D` for plane p at the corner of planes a, b, c: 1 outside, 0 on the plane, −1 inside.
 * Integers of one family first (exact), then a filter over at most four families, then whole big numbers.
 */
export function exactSide(s: SidePlanes, a: number, b: number, c: number, p: number): -1 | 0 | 1 {
  if (s.whole[a]! & s.whole[b]! & s.whole[c]! & s.whole[p]!) {
    const quick = integerSide(s, a, b, c, p);
    if (quick !== null) return quick;
  }
  return bigSide(s, a, b, c, p);
}

const triple = (s: SidePlanes, a: number, b: number, c: number): number =>
  s.x[a]! * (s.y[b]! * s.z[c]! - s.z[b]! * s.y[c]!) +
  s.y[a]! * (s.z[b]! * s.x[c]! - s.x[b]! * s.z[c]!) +
  s.z[a]! * (s.x[b]! * s.y[c]! - s.y[b]! * s.x[c]!);

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
  return (Math.sign(sum) * Math.sign(det)) as -1 | 0 | 1;
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

type Row = readonly [bigint, bigint, bigint, bigint];

/** A plane times a positive number that makes all four of its numbers whole. */
function bigRow(s: SidePlanes, p: number): Row {
  const terms: Fraction[] = [fractionOf(s.x[p]!), fractionOf(s.y[p]!), fractionOf(s.z[p]!), s.offset[p]!.exact];
  const [x, y, z, d] = terms.map(({ numerator }, i) =>
    terms.reduce((product, { denominator }, j) => (i === j ? product : product * denominator), numerator),
  );
  return [x!, y!, z!, d!];
}

const bigTriple = (a: Row, b: Row, c: Row): bigint =>
  a[0] * (b[1] * c[2] - b[2] * c[1]) + a[1] * (b[2] * c[0] - b[0] * c[2]) + a[2] * (b[0] * c[1] - b[1] * c[0]);

function bigSide(s: SidePlanes, pa: number, pb: number, pc: number, pp: number): -1 | 0 | 1 {
  const [a, b, c, p] = [bigRow(s, pa), bigRow(s, pb), bigRow(s, pc), bigRow(s, pp)];
  const det = bigTriple(a, b, c);
  const sum = a[3] * bigTriple(p, b, c) + b[3] * bigTriple(p, c, a) + c[3] * bigTriple(p, a, b) - p[3] * det;
  if (sum === 0n) return 0;
  return sum > 0n === det > 0n ? 1 : -1;
}
