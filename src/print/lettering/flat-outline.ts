import type { Manifold } from 'manifold-3d';
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
  const outline = convexOutline(points);
  if (outline.length >= 3) return outline;
  throw new ObjectError(
    'text',
    'the body does not rest on a flat face, so there is no place for text underneath',
    'let it rest on one of its faces, or put the text on a stand',
  );
}

/** Convex hull, counter-clockwise, without points on its sides (monotone chain, Andrew 1979). */
export function convexOutline(points: readonly Point[]): Point[] {
  const sorted = [...points].sort((p, q) => p[0] - q[0] || p[1] - q[1]);
  return [...chain(sorted), ...chain(sorted.toReversed())];
}

function chain(sorted: readonly Point[]): Point[] {
  const out: Point[] = [];
  for (const point of sorted) {
    while (out.length > 1 && turn(out.at(-2)!, out.at(-1)!, point) <= 0) out.pop();
    out.push(point);
  }
  return out.slice(0, -1);
}

const turn = (p: Point, q: Point, r: Point): number => (q[0] - p[0]) * (r[1] - p[1]) - (q[1] - p[1]) * (r[0] - p[0]);
