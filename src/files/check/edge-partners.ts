import type { Mesh } from '../../print/mesh.ts';
import { apexOf, endOf, startOf } from '../mesh/half-edges.ts';

type Vector = readonly [number, number, number];

/** Angles closer than this, in radians, count as one direction; a double atan2 is good to about 1e-15. */
const SAME_DIRECTION = 1e-9;

/**
 * For an edge with more than two triangles, as many in one direction as in the other: which two bound the same piece of
 * material. Each triangle that uses the edge forwards has its material on the clockwise side, seen against the edge's
 * direction; its partner is the next backward one in that sense. So two solids that touch along an edge stay two.
 * @returns pairs of half-edges.
 */
export function partnersAround(mesh: Mesh, uses: Uint32Array): [number, number][] {
  const start = startOf(mesh, uses[0]!);
  const end = endOf(mesh, uses[0]!);
  const axis = difference(mesh, start, end);
  const zero = difference(mesh, start, apexOf(mesh, uses[0]!));
  const quarter = cross(axis, zero);
  const level = cross(quarter, axis);
  const angle = (h: number): number => {
    const arm = difference(mesh, start, apexOf(mesh, h));
    return Math.atan2(dot(arm, quarter) * Math.sqrt(dot(axis, axis)), dot(arm, level));
  };
  const backward = [...uses].filter((h) => startOf(mesh, h) !== start);
  const forward = [...uses].filter((h) => startOf(mesh, h) === start);
  return forward.map((h) => {
    const turn = (g: number): number => {
      const back = (angle(h) - angle(g) + 4 * Math.PI) % (2 * Math.PI);
      return back < SAME_DIRECTION ? 2 * Math.PI : back;
    };
    const partner = backward.reduce((best, g) => (turn(g) < turn(best) ? g : best));
    backward.splice(backward.indexOf(partner), 1);
    return [h, partner];
  });
}

const difference = ({ positions: p }: Mesh, from: number, to: number): Vector => [
  p[3 * to]! - p[3 * from]!,
  p[3 * to + 1]! - p[3 * from + 1]!,
  p[3 * to + 2]! - p[3 * from + 2]!,
];

const cross = (u: Vector, v: Vector): Vector => [
  u[1] * v[2] - u[2] * v[1],
  u[2] * v[0] - u[0] * v[2],
  u[0] * v[1] - u[1] * v[0],
];

const dot = (u: Vector, v: Vector): number => u[0] * v[0] + u[1] * v[1] + u[2] * v[2];
