export type Vector = readonly [number, number, number];

export const at = (values: ArrayLike<number>, index: number): Vector => [
  values[3 * index]!,
  values[3 * index + 1]!,
  values[3 * index + 2]!,
];
export const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const cross = (a: Vector, b: Vector): Vector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
export const plus = (a: Vector, b: Vector, times = 1): Vector => [
  a[0] + times * b[0],
  a[1] + times * b[1],
  a[2] + times * b[2],
];
export const minus = (a: Vector, b: Vector): Vector => plus(a, b, -1);
export const scaled = (a: Vector, by: number): Vector => [a[0] * by, a[1] * by, a[2] * by];
export const lengthOf = ([x, y, z]: Vector): number => Math.sqrt(x * x + y * y + z * z);
export const unit = (a: Vector): Vector => scaled(a, 1 / lengthOf(a));

/** Angle between two unit vectors, radians; exact for small angles too. */
export const angleBetween = (a: Vector, b: Vector): number => Math.atan2(lengthOf(cross(a, b)), dot(a, b));

/** Two unit vectors that make a right-handed frame with a third: `[e, f]` with `e × f = axis`. */
export function across(axis: Vector): [Vector, Vector] {
  const least = axis.reduce((best, value, i) => (Math.abs(value) < Math.abs(axis[best]!) ? i : best), 0);
  const helper: Vector = [Number(least === 0), Number(least === 1), Number(least === 2)];
  const e = unit(cross(helper, axis));
  return [e, cross(axis, e)];
}
