import type { ClosedShape } from './shape.ts';

type Vector = readonly [number, number, number];

/** A face of the crystal at its size: `normal · x ≤ distance`, millimetres. */
export interface FacePlane {
  readonly normal: Vector;
  readonly distance: number;
}

/** The faces that appear, at a size. */
export function facePlanes({ solid, measures, crystal }: ClosedShape, millimetresPerUnit: number): FacePlane[] {
  return measures.faces.map((face) => ({
    normal: [measures.normals[3 * face]!, measures.normals[3 * face + 1]!, measures.normals[3 * face + 2]!],
    distance: crystal.forms[solid.planes.form[face]!]!.distance * millimetresPerUnit,
  }));
}

/** How far a line from `start` goes until it leaves the first plane; infinite without planes, 0 from outside. */
export function exitOf(planes: readonly FacePlane[], start: Vector, along: Vector): number {
  let least = Number.POSITIVE_INFINITY;
  for (const { normal, distance } of planes) {
    const cos = dot(normal, along);
    if (cos < PARALLEL) continue;
    least = Math.min(least, (distance - dot(normal, start)) / cos);
  }
  return Math.max(least, 0);
}

/** A plane as an axis meets it: cosine and sine of the angle between the axis and the plane's normal. */
export interface MetPlane {
  readonly cos: number;
  readonly sin: number;
  readonly distance: number;
}

/** The planes that an axis from the centre runs into; parallel ones and those behind are left out. */
export function metPlanes(planes: readonly FacePlane[], along: Vector): MetPlane[] {
  return planes.flatMap(({ normal, distance }) => {
    const cos = dot(normal, along);
    return cos < PARALLEL ? [] : [{ cos, sin: Math.sqrt(Math.max(0, 1 - cos * cos)), distance }];
  });
}

/** Cosine below which a line counts as parallel to a face: far below any angle between lattice directions in use. */
const PARALLEL = 1e-9;

const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
