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
 * The first sound mesh of several attempts, as it is and as it lies; else the first of all. Of bodies with thousands of
 * crossing facets about one in a hundred folds over itself somewhere in single precision, or cannot be tidied; laid out a
 * little differently it does not.
 * @throws what the last attempt throws when none makes a mesh; ObjectErrors at once
 */
export function firstSound(
  isSound: IsSound | undefined,
  lie: (mesh: Mesh) => Mesh,
  attempt: (number: number) => Mesh,
): Laid {
  let first: Laid | undefined;
  for (let number = 0; number < ATTEMPTS; number++) {
    try {
      const placed = attempt(number);
      const laid = { placed, lying: lie(placed) };
      if (!isSound || (isSound(placed) && isSound(laid.lying))) return laid;
      first ??= laid;
    } catch (error) {
      if ((error instanceof ObjectError && error.code !== 'not-sound') || (number === ATTEMPTS - 1 && !first))
        throw error;
    }
  }
  return first!;
}
