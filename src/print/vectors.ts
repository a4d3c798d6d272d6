export type Vector = readonly [number, number, number];

export const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const cross = (a: Vector, b: Vector): Vector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
export const times = (a: Vector, factor: number): Vector => [a[0] * factor, a[1] * factor, a[2] * factor];
/** `a + factor · b` */
export const plus = (a: Vector, b: Vector, factor = 1): Vector => [
  a[0] + factor * b[0],
  a[1] + factor * b[1],
  a[2] + factor * b[2],
];
export const minus = (a: Vector, b: Vector): Vector => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
export const length = (a: Vector): number => Math.hypot(a[0], a[1], a[2]);
export const unit = (a: Vector): Vector => times(a, 1 / length(a));
export const apart = (a: Vector, b: Vector): number => length(minus(a, b));

export const vectorAt = (values: ArrayLike<number>, index: number): Vector => [
  values[3 * index]!,
  values[3 * index + 1]!,
  values[3 * index + 2]!,
];

/** Two unit vectors that make a right-handed frame with this unit vector, the first as level as can be. */
export function across(normal: Vector): readonly [Vector, Vector] {
  const level = Math.hypot(normal[0], normal[1]);
  const u: Vector = level > 1e-6 ? [-normal[1] / level, normal[0] / level, 0] : [1, 0, 0];
  const first = unit(minus(u, times(normal, dot(u, normal))));
  return [first, cross(normal, first)];
}

/** Angle between two unit vectors, radians; exact for small angles too. */
export const angleBetween = (a: Vector, b: Vector): number => Math.atan2(length(cross(a, b)), dot(a, b));
