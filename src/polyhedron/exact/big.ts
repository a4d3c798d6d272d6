import { type Fraction, fractionOf } from '../offset.ts';

/**
 * The last resort: planes and corners in whole numbers of any size. Slow, never wrong, and asked only where doubles
 * with a proven bound cannot tell.
 */

/** A half-space times a positive number that makes all four of its numbers whole. */
export type BigRow = readonly [bigint, bigint, bigint, bigint];

export function bigRow(x: number, y: number, z: number, offset: Fraction): BigRow {
  const [h, k, l] = [fractionOf(x), fractionOf(y), fractionOf(z)];
  // Denominators of doubles are powers of two: the largest is a multiple of the others.
  const common = [h, k, l].reduce((most, { denominator }) => (denominator > most ? denominator : most), 1n);
  const scale = common * offset.denominator;
  const whole = ({ numerator, denominator }: Fraction): bigint => (numerator * scale) / denominator;
  return [whole(h), whole(k), whole(l), offset.numerator * common];
}

const triple = (a: BigRow, b: BigRow, c: BigRow): bigint =>
  a[0] * (b[1] * c[2] - b[2] * c[1]) + a[1] * (b[2] * c[0] - b[0] * c[2]) + a[2] * (b[0] * c[1] - b[1] * c[0]);

const sign = (value: bigint): -1 | 0 | 1 => (value === 0n ? 0 : value > 0n ? 1 : -1);

/** Sign of the determinant of three normals. */
export const bigTriple = (a: BigRow, b: BigRow, c: BigRow): -1 | 0 | 1 => sign(triple(a, b, c));

/** Sign of h·x − D for plane p at the corner of a, b and c, which must have a single point in common. */
export function bigSide(a: BigRow, b: BigRow, c: BigRow, p: BigRow): -1 | 0 | 1 {
  const det = triple(a, b, c);
  const sum = a[3] * triple(p, b, c) + b[3] * triple(p, c, a) + c[3] * triple(p, a, b) - p[3] * det;
  return det > 0n ? sign(sum) : sign(-sum);
}

/** Sign of component k of the cross product of two normals. */
export function bigCross(a: BigRow, b: BigRow, k: number): -1 | 0 | 1 {
  const [i, j] = [(k + 1) % 3, (k + 2) % 3];
  return sign(a[i]! * b[j]! - a[j]! * b[i]!);
}

/** The corner of three planes, by Cramer's rule, each coordinate to within 2^-60 of itself. */
export function bigMeet(a: BigRow, b: BigRow, c: BigRow): readonly [number, number, number] {
  const det = triple(a, b, c);
  const x = triple([a[3], a[1], a[2], 0n], [b[3], b[1], b[2], 0n], [c[3], c[1], c[2], 0n]);
  const y = triple([a[0], a[3], a[2], 0n], [b[0], b[3], b[2], 0n], [c[0], c[3], c[2], 0n]);
  const z = triple([a[0], a[1], a[3], 0n], [b[0], b[1], b[3], 0n], [c[0], c[1], c[3], 0n]);
  return [quotient(x, det), quotient(y, det), quotient(z, det)];
}

function quotient(numerator: bigint, denominator: bigint): number {
  if (numerator === 0n) return 0;
  // Shifted so that the whole quotient has 64 to 72 bits, then back.
  const shift = bits(denominator) - bits(numerator) + 68;
  const shifted = shift >= 0 ? (numerator << BigInt(shift)) / denominator : numerator / (denominator << BigInt(-shift));
  return Number(shifted) * 2 ** -shift;
}

const bits = (value: bigint): number => value.toString(16).length * 4;
