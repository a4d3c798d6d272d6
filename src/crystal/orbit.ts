import { type IntegerTriple, isZero, keyOf, turnFace } from './integers.ts';
import type { PointGroup } from './point-group.ts';
import type { Miller } from './spaces.ts';

/** The faces that the group makes of one. */
export interface Orbit {
  /** The given face first. */
  readonly faces: readonly Miller[];
  /** For each operation the number of the face to which it takes the first one. */
  readonly imageOf: Int32Array;
  /** For each face an operation that takes the first one to it. */
  readonly carrier: Uint8Array;
}

export function orbit(group: PointGroup, face: Miller): Orbit {
  const faces: Miller[] = [];
  const carrier: number[] = [];
  const number = new Map<string, number>();
  const imageOf = Int32Array.from(group.operations, ({ inverse }, operation) => {
    const image = turnFace(face, inverse);
    const known = number.get(keyOf(image));
    if (known !== undefined) return known;
    number.set(keyOf(image), faces.length);
    carrier.push(operation);
    return faces.push(image) - 1;
  });
  return { faces, imageOf, carrier: Uint8Array.from(carrier) };
}

export const sumOfFaces = (faces: readonly Miller[]): IntegerTriple =>
  faces.reduce<IntegerTriple>(([h, k, l], face) => [h + face[0], k + face[1], l + face[2]], [0, 0, 0]);

export const hasZeroSum = (faces: readonly Miller[]): boolean => isZero(sumOfFaces(faces));
