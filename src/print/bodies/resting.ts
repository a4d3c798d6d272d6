import type { ClosedShape } from '../../shape/shape.ts';
import { unit, type Vector, vectorAt } from '../vectors.ts';

/** What lies on the bed: a plane number of the solid, or a Cartesian direction that points down. */
export type Resting = number | Vector;

/** The unit vector that points at the bed; without a wish that of the largest face. */
export function downwards(shape: ClosedShape, resting: Resting | undefined): Vector {
  if (resting !== undefined && typeof resting !== 'number') return unit(resting);
  return vectorAt(shape.measures.normals, resting ?? largestFace(shape));
}

/** Plane number; of equal ones the first. */
export const largestFace = ({ measures: { area, faces } }: ClosedShape): number =>
  faces.reduce((best, face) => (area[face]! > area[best]! * (1 + 1e-9) ? face : best));
