import type { Mat4 } from 'manifold-3d';
import type { Crystal } from '../../recipe/crystal.ts';
import { dot, type Vector } from '../vectors.ts';

/** A symmetry operation in the Cartesian frame, rows first. */
export type Turn = readonly [Vector, Vector, Vector];

/** All operations of the crystal's group in the Cartesian frame, in the group's order: the identity first. */
export function cartesianTurns({ group, metric: { frame, reciprocalFrame } }: Crystal): Turn[] {
  return group.operations.map(({ matrix }) => {
    const rows = frame.map((row): Vector => {
      const carried = ([0, 1, 2] as const).map(
        (j) => row[0] * matrix[0][j] + row[1] * matrix[1][j] + row[2] * matrix[2][j],
      );
      const [p, q, r] = reciprocalFrame.map((back) => dot(back, [carried[0]!, carried[1]!, carried[2]!]));
      return [p!, q!, r!];
    });
    return [rows[0]!, rows[1]!, rows[2]!];
  });
}

export const turned = (turn: Turn, v: Vector): Vector => [dot(turn[0], v), dot(turn[1], v), dot(turn[2], v)];

/** As the boolean library takes it: by columns. */
export function asMat4([a, b, c]: Turn): Mat4 {
  return [a[0], b[0], c[0], 0, a[1], b[1], c[1], 0, a[2], b[2], c[2], 0, 0, 0, 0, 1];
}
