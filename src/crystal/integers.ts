import { type IntegerMatrix, type Miller, miller, type Zone, zone } from './spaces.ts';

/** Exact arithmetic on integer triples and 3×3 matrices. No result is ever −0, so that equal values compare equal. */
export type IntegerTriple = readonly [number, number, number];

export const IDENTITY: IntegerMatrix = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** Greatest common divisor, never negative; gcd(0, 0) = 0. */
export function gcd(a: number, b: number): number {
  let [x, y] = [Math.abs(a), Math.abs(b)];
  while (y !== 0) [x, y] = [y, x % y];
  return x;
}

// The leading 0 turns a sum of negative zeros into 0.
const dot = (p: IntegerTriple, q: IntegerTriple): number => 0 + p[0] * q[0] + p[1] * q[1] + p[2] * q[2];

export const column = (m: IntegerMatrix, j: 0 | 1 | 2): IntegerTriple => [m[0][j], m[1][j], m[2][j]];

const mapTriple = (t: IntegerTriple, f: (value: number) => number): IntegerTriple => [f(t[0]), f(t[1]), f(t[2])];

/** Vector product of two integer triples: two faces give their zone, two zones their face. */
export function cross(p: IntegerTriple, q: IntegerTriple): IntegerTriple {
  return [0 + p[1] * q[2] - p[2] * q[1], 0 + p[2] * q[0] - p[0] * q[2], 0 + p[0] * q[1] - p[1] * q[0]];
}

/** W x: a matrix applied to a column. */
export const matrixTimesColumn = (m: IntegerMatrix, x: IntegerTriple): IntegerTriple => [
  dot(m[0], x),
  dot(m[1], x),
  dot(m[2], x),
];

/** h W: a row times a matrix. */
export const rowTimesMatrix = (h: IntegerTriple, m: IntegerMatrix): IntegerTriple => [
  dot(h, column(m, 0)),
  dot(h, column(m, 1)),
  dot(h, column(m, 2)),
];

/** Image of a direction, u′ = W u. */
export const turnZone = (m: IntegerMatrix, u: Zone): Zone => zone(...matrixTimesColumn(m, u));

/** Image of a face under the operation whose *inverse* matrix is given, h′ = h W⁻¹. */
export const turnFace = (h: Miller, inverseMatrix: IntegerMatrix): Miller =>
  miller(...rowTimesMatrix(h, inverseMatrix));

export const multiply = (a: IntegerMatrix, b: IntegerMatrix): IntegerMatrix => [
  rowTimesMatrix(a[0], b),
  rowTimesMatrix(a[1], b),
  rowTimesMatrix(a[2], b),
];

export const trace = (m: IntegerMatrix): number => m[0][0] + m[1][1] + m[2][2];

export const determinant = (m: IntegerMatrix): number => dot(m[0], cross(m[1], m[2]));

export const scaleMatrix = (m: IntegerMatrix, factor: number): IntegerMatrix => {
  const scaled = (row: IntegerTriple) => mapTriple(row, (value) => 0 + value * factor);
  return [scaled(m[0]), scaled(m[1]), scaled(m[2])];
};

export const addMatrices = (a: IntegerMatrix, b: IntegerMatrix): IntegerMatrix => {
  const sum = (i: 0 | 1 | 2): IntegerTriple => [a[i][0] + b[i][0], a[i][1] + b[i][1], a[i][2] + b[i][2]];
  return [sum(0), sum(1), sum(2)];
};

/** Inverse of a matrix with determinant ±1, by its adjugate; any other determinant is a programming error. */
export function inverse(m: IntegerMatrix): IntegerMatrix {
  const sign = determinant(m);
  if (Math.abs(sign) !== 1) throw new RangeError(`inverse: the determinant must be 1 or -1, not ${sign}`);
  const [p, q, r] = [cross(m[1], m[2]), cross(m[2], m[0]), cross(m[0], m[1])];
  const adjugate: IntegerMatrix = [
    [p[0], q[0], r[0]],
    [p[1], q[1], r[1]],
    [p[2], q[2], r[2]],
  ];
  return scaleMatrix(adjugate, sign);
}

/** The triple divided by its greatest common divisor; its sense is kept. (0 0 0) stays as it is. */
export function primitive(t: IntegerTriple): IntegerTriple {
  const divisor = gcd(gcd(t[0], t[1]), t[2]);
  return divisor === 0 ? t : mapTriple(t, (value) => 0 + value / divisor);
}

/** Lowest terms with the first non-zero member positive: one name for both ends of a line. */
export function lineTerms(t: IntegerTriple): IntegerTriple {
  const lowest = primitive(t);
  return (lowest.find((value) => value !== 0) ?? 0) < 0 ? opposite(lowest) : lowest;
}

export const opposite = (t: IntegerTriple): IntegerTriple => mapTriple(t, (value) => 0 - value);

export const isZero = (t: IntegerTriple): boolean => t[0] === 0 && t[1] === 0 && t[2] === 0;

/** Lexicographic order. */
export const compareTriples = (p: IntegerTriple, q: IntegerTriple): number => p[0] - q[0] || p[1] - q[1] || p[2] - q[2];

/** Key of a triple or a matrix for Maps and Sets. */
export const keyOf = (value: IntegerTriple | IntegerMatrix): string => value.join(',');
