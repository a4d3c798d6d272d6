import type { Manifold } from 'manifold-3d';
import { convexHull } from '../../polyhedron/polygon.ts';
import type { FacePlane } from '../../shape/face-planes.ts';
import { ObjectError } from '../../shape/object-error.ts';
import { dot, type Vector } from '../vectors.ts';
import { type Field, onField, type Point } from './field.ts';

/** A vertex this near to the plane lies in it, millimetres: the boolean library rounds to a tenth of that. */
const IN_PLANE = 1e-3;

/** The outline of a body's flat, counter-clockwise. Holes in it are not seen. @throws ObjectError `text` without a flat */
export function flatOutline(body: Manifold, { normal, distance }: FacePlane, field: Field): Point[] {
  const { vertProperties, numProp } = body.getMesh();
  const points: Point[] = [];
  for (let at = 0; at < vertProperties.length; at += numProp) {
    const point: Vector = [vertProperties[at]!, vertProperties[at + 1]!, vertProperties[at + 2]!];
    if (Math.abs(dot(normal, point) - distance) < IN_PLANE) points.push(onField(field, point));
  }
  const outline = convexHull(points);
  if (outline.length >= 3) return outline;
  throw new ObjectError(
    'text',
    'the body does not rest on a flat face, so there is no place for text underneath',
    'let it rest on one of its faces, or put the text on a stand',
  );
}
