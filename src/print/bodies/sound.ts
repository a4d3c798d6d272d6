import { ObjectError } from '../../shape/object-error.ts';
import type { Mesh } from '../mesh.ts';

/** A body in the assembled object and on the bed. */
export interface Laid {
  readonly placed: Mesh;
  readonly lying: Mesh;
}

/** Whether a mesh is fit to be written; the room `files` knows, which this one may not ask by itself. */
export type IsSound = (mesh: Mesh) => boolean;

const ATTEMPTS = 6;

/**
 * The first sound mesh of several attempts, as it is and as it lies; null when none is. Of bodies with thousands of
 * crossing facets about one in a hundred folds over itself somewhere in single precision, or cannot be tidied; laid out a
 * little differently it does not.
 * @throws what an attempt throws, but for `not-sound`
 */
export function firstSound(
  isSound: IsSound | undefined,
  lie: (mesh: Mesh) => Mesh,
  attempt: (number: number) => Mesh,
): Laid | null {
  for (let number = 0; number < ATTEMPTS; number++) {
    try {
      const placed = attempt(number);
      const laid = { placed, lying: lie(placed) };
      if (!isSound || (isSound(placed) && isSound(laid.lying))) return laid;
    } catch (error) {
      if (!(error instanceof ObjectError && error.code === 'not-sound')) throw error;
    }
  }
  return null;
}
