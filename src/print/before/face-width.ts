import { faceCorners } from '../../polyhedron/measures.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { cross, dot, length, minus, vectorAt } from '../vectors.ts';

/**
 * Smallest width of a face between two parallel lines in its plane, one of them along a side; in the crystal's unit.
 */
export function narrowestFace({ solid, measures }: ClosedShape, face: number): number {
  const normal = vectorAt(measures.normals, face);
  const corners = faceCorners(solid, face).map((vertex) => vectorAt(measures.positions, vertex));
  return corners.reduce((least, corner, i) => {
    const side = minus(corners[(i + 1) % corners.length]!, corner);
    const inwards = cross(normal, side);
    const reach = corners.reduce((most, other) => Math.max(most, dot(minus(other, corner), inwards)), 0);
    return Math.min(least, reach / length(side));
  }, Number.POSITIVE_INFINITY);
}
