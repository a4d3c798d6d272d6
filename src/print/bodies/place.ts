import type { Mat4 } from 'manifold-3d';
import { across, type Vector } from '../vectors.ts';

/** Takes the upright z axis to a direction, the origin to a point. */
export function frameAlong(axis: Vector, at: Vector): Mat4 {
  const [u, v] = across(axis);
  return [u[0], u[1], u[2], 0, v[0], v[1], v[2], 0, axis[0], axis[1], axis[2], 0, at[0], at[1], at[2], 1];
}
