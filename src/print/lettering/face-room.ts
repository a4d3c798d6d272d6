import { faceCorners } from '../../polyhedron/measures.ts';
import type { FacePlane } from '../../shape/face-planes.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { dot, type Vector, vectorAt } from '../vectors.ts';
import type { Disc, Side } from './box-room.ts';
import { type Field, onField, type Point } from './field.ts';
import { sidesOf } from './fit-box.ts';
import { ROOT } from './solids.ts';
import type { LetterStyle } from './style.ts';

/** A rod, bore or drain that comes out along a line; millimetres. */
export interface RodExit {
  readonly along: Vector;
  readonly radius: number;
  /** A point of its middle line; the crystal's centre when absent. */
  readonly through?: Vector;
}

/** Where letters may stand on a face. */
export interface Room {
  readonly polygon: readonly Point[];
  readonly sides: readonly Side[];
  readonly discs: readonly Disc[];
}

/** The corners of a face on its field, counter-clockwise, millimetres. */
export function facePolygon({ solid, measures }: ClosedShape, scale: number, face: number, field: Field): Point[] {
  return faceCorners(solid, face).map((corner) => {
    const [x, y, z] = vectorAt(measures.positions, corner);
    return onField(field, [x * scale, y * scale, z * scale]);
  });
}

/** Cosine to the field below which a rod runs along the face instead of through it. */
const ALONG = 1e-3;

/**
 * The room on a face: within its edges by the margin, off the rods, and where the ground of the letters keeps its
 * distance from every face behind, so that nothing breaks out where the crystal is thin. Null where no place does.
 */
export function roomOn(
  polygon: readonly Point[],
  field: Field,
  planes: readonly FacePlane[],
  rods: readonly RodExit[],
  style: LetterStyle,
): Room | null {
  const within = sidesOf(polygon).map((side) => ({ ...side, room: side.room - style.margin }));
  const behind = groundSides(field, planes, style);
  if (!behind) return null;
  return { polygon, sides: [...within, ...behind], discs: rods.flatMap((rod) => discOf(rod, field, style.margin)) };
}

/** Lines on the face beyond which its ground, at the letters' depth, comes too near to another plane. */
function groundSides(field: Field, planes: readonly FacePlane[], { relief, depth, wall }: LetterStyle): Side[] | null {
  const [deep, left] = relief === 'engraved' ? [depth, wall] : [ROOT, 0];
  const sides: Side[] = [];
  for (const { normal, distance } of planes) {
    if (dot(normal, field.normal) >= 0) continue;
    const room = distance - left - dot(normal, field.origin) + deep * dot(normal, field.normal);
    const [nx, ny] = [-dot(normal, field.right), -dot(normal, field.up)];
    const length = Math.hypot(nx, ny);
    if (length > ALONG) sides.push({ nx: nx / length, ny: ny / length, room: room / length });
    else if (room < 0) return null;
  }
  return sides;
}

/** A rod cuts a face in an ellipse; the disc is about its longer half axis. */
function discOf({ along, radius, through: [x, y, z] = [0, 0, 0] }: RodExit, field: Field, margin: number): Disc[] {
  const cos = dot(along, field.normal);
  if (cos < ALONG) return [];
  const far = (dot(field.origin, field.normal) - dot([x, y, z], field.normal)) / cos;
  const centre = onField(field, [x + along[0] * far, y + along[1] * far, z + along[2] * far]);
  return [{ centre, radius: radius / cos + margin }];
}
