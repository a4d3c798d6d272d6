import { cross, dot, times, unit, type Vector } from '../vectors.ts';

/** How a crystal stands: c upright, or resting on a face whose outward normal (crystal's frame) then points down. */
export type Attitude = 'c-up' | { readonly down: Vector };

/** Directions of the stand in the crystal's frame, all unit vectors: to the right, away from the viewer, up. */
export interface Stance {
  readonly right: Vector;
  readonly away: Vector;
  readonly up: Vector;
}

/** With c up the crystal's x points at the viewer and y to the right; otherwise it is tipped over from there. */
export function stanceOf(attitude: Attitude): Stance {
  const upright: Stance = { right: [0, 1, 0], away: [-1, 0, 0], up: [0, 0, 1] };
  if (attitude === 'c-up') return upright;
  const up = times(unit(attitude.down), -1);
  const turn = (v: Vector): Vector => shortestTurn(upright.up, up, v);
  return { right: turn(upright.right), away: turn(upright.away), up };
}

/** The turn that takes one unit vector to another by the shortest way, by Rodrigues' formula; half a turn is about y. */
function shortestTurn(from: Vector, to: Vector, v: Vector): Vector {
  const cos = dot(from, to);
  if (cos < -1 + HALF_TURN) return [-v[0], v[1], -v[2]];
  const axis = cross(from, to);
  const turned = cross(axis, v);
  const along = dot(axis, v) / (1 + cos);
  return [
    v[0] * cos + turned[0] + axis[0] * along,
    v[1] * cos + turned[1] + axis[1] * along,
    v[2] * cos + turned[2] + axis[2] * along,
  ];
}

const HALF_TURN = 1e-12;

/** A point of the crystal's frame in the stand's directions, the origin kept. */
export const inStance = ({ right, away, up }: Stance, p: Vector): Vector => [dot(right, p), dot(away, p), dot(up, p)];
