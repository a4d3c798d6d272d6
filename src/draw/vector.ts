export type Vector = readonly [number, number, number];

/** A point of the page or of the picture plane. */
export type Point = readonly [number, number];

export const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

export const cross = (a: Vector, b: Vector): Vector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

export function unit(v: Vector): Vector {
  const length = Math.hypot(...v);
  return [v[0] / length, v[1] / length, v[2] / length];
}

/** start + length · direction */
export const along = (start: Vector, direction: Vector, length: number): Vector => [
  start[0] + length * direction[0],
  start[1] + length * direction[1],
  start[2] + length * direction[2],
];

export const vectorAt = (values: ArrayLike<number>, index: number): Vector => [
  values[3 * index]!,
  values[3 * index + 1]!,
  values[3 * index + 2]!,
];
