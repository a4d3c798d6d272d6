import type { Mat4 } from 'manifold-3d';
import { cross, dot, times, unit, type Vector } from '../vectors.ts';

export type Point = readonly [number, number];

/** A plane with the directions that text on it takes: `right × up = normal`, so that it reads from outside. */
export interface Field {
  /** The point of the plane nearest to the crystal's centre, millimetres. */
  readonly origin: Vector;
  readonly right: Vector;
  readonly up: Vector;
  readonly normal: Vector;
}

/** Sine below which a plane counts as level, so that upright has no meaning on it. */
const LEVEL = 1e-6;

/**
 * The field of a face `normal · x = distance`. Up on the face is up in space (+z); on level faces it is +y, which is
 * towards b*.
 */
export function fieldOf(normal: Vector, distance: number): Field {
  const towards: Vector = Math.hypot(normal[0], normal[1]) < LEVEL ? [0, 1, 0] : [0, 0, 1];
  const part = dot(towards, normal);
  const up = unit([towards[0] - part * normal[0], towards[1] - part * normal[1], towards[2] - part * normal[2]]);
  return { origin: times(normal, distance), right: cross(up, normal), up, normal };
}

/** The same field with text that runs upwards instead of to the right. */
export const quarterTurn = ({ origin, right, up, normal }: Field): Field => ({
  origin,
  normal,
  right: up,
  up: times(right, -1),
});

export const onField = ({ origin, right, up }: Field, point: Vector): Point => {
  const from: Vector = [point[0] - origin[0], point[1] - origin[1], point[2] - origin[2]];
  return [dot(from, right), dot(from, up)];
};

/** Takes x to the right, y up and z outwards of the field. */
export const toField = ({ origin: [x, y, z], right, up, normal }: Field): Mat4 => [
  ...right,
  0,
  ...up,
  0,
  ...normal,
  0,
  x,
  y,
  z,
  1,
];
