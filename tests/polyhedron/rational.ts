/**
 * Plain whole-number geometry for the tests: slow, obvious, and written without a look at the kernel's own arithmetic.
 * A plane is four whole numbers h1, h2, h3, D (any positive multiple of it is the same half-space); a point is four
 * whole numbers X, Y, Z, W with W > 0, standing for (X/W, Y/W, Z/W).
 */
import type { Offset } from '../../src/polyhedron/offset.ts';
import type { PlaneSet } from '../../src/polyhedron/planes.ts';

export type Row = readonly [bigint, bigint, bigint, bigint];

/** The bits of a double, read as mantissa × 2^exponent (IEEE 754). */
export function decode(value: number): { mantissa: bigint; exponent: number } {
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, value);
  const bits = view.getBigUint64(0);
  const power = Number((bits >> 52n) & 0x7ffn);
  const tail = bits & ((1n << 52n) - 1n);
  const size = power === 0 ? tail : tail | (1n << 52n);
  return { mantissa: bits >> 63n ? -size : size, exponent: Math.max(power, 1) - 1075 };
}

/** A half-space as whole numbers. */
export function rowOf(normal: readonly [number, number, number], offset: Offset): Row {
  const parts = normal.map(decode);
  const lowest = Math.min(...parts.map(({ exponent }) => exponent));
  const whole = parts.map(({ mantissa, exponent }) => mantissa << BigInt(exponent - lowest));
  const { numerator, denominator } = offset.exact;
  const [up, down] = lowest < 0 ? [1n << BigInt(-lowest), 1n] : [1n, 1n << BigInt(lowest)];
  const [h, k, l] = whole.map((value) => value * denominator * down);
  return [h!, k!, l!, numerator * up];
}

export function rowsOf({ normals, form, offsets }: PlaneSet): Row[] {
  return Array.from(form, (f, p) => rowOf([normals[3 * p]!, normals[3 * p + 1]!, normals[3 * p + 2]!], offsets[f]!));
}

const minor = (a: Row, b: Row, i: number, j: number): bigint => a[i]! * b[j]! - a[j]! * b[i]!;

/** 3×3 determinant of columns i, j, k. */
const minor3 = (a: Row, b: Row, c: Row, i: number, j: number, k: number): bigint =>
  a[i]! * minor(b, c, j, k) - a[j]! * minor(b, c, i, k) + a[k]! * minor(b, c, i, j);

/** Cramer's rule; null where the planes have no single point in common. */
export function cornerOf(a: Row, b: Row, c: Row): Row | null {
  const w = minor3(a, b, c, 0, 1, 2);
  if (w === 0n) return null;
  const [x, y, z] = [minor3(a, b, c, 3, 1, 2), minor3(a, b, c, 0, 3, 2), minor3(a, b, c, 0, 1, 3)];
  return w > 0n ? [x, y, z, w] : [-x, -y, -z, -w];
}

/** 1 outside the half-space, 0 on its plane, −1 inside. */
export function sideOf(plane: Row, [x, y, z, w]: Row): -1 | 0 | 1 {
  const value = plane[0] * x + plane[1] * y + plane[2] * z - plane[3] * w;
  return value === 0n ? 0 : value > 0n ? 1 : -1;
}

const bits = (value: bigint): number => (value < 0n ? -value : value).toString(2).length;

/** A point's coordinates as doubles. */
export function decimals([x, y, z, w]: Row): number[] {
  return [x, y, z].map((value) => {
    const shift = bits(w) - bits(value) + 70;
    const whole = shift > 0 ? (value << BigInt(shift)) / w : value / (w << BigInt(-shift));
    return Number(whole) / 2 ** shift;
  });
}
