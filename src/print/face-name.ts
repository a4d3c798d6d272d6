import { printFace } from '../crystal/indices.ts';
import { miller } from '../crystal/spaces.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { vectorAt } from './vectors.ts';

/** A face in brackets, by its plane number. */
export function faceName({ solid, crystal }: ClosedShape, plane: number): string {
  const [h, k, l] = vectorAt(solid.planes.normals, plane);
  return printFace(miller(h, k, l), crystal.group.axes, { brackets: '(' });
}

/** (10-11) as 10bar11: fit for a file name. */
export const fileWord = (face: string): string => face.replace(/[()]/g, '').replace(/-/g, 'bar').replace(/ /g, '_');
