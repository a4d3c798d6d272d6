import type { Mesh } from '../mesh.ts';

/** Whether a mesh is fit to be written; the room `files` knows, which this one may not ask by itself. */
export type IsSound = (mesh: Mesh) => boolean;

const ATTEMPTS = 6;

/**
 * The first sound mesh of several attempts, else the first of all. Of bodies with thousands of crossing facets about one
 * in a hundred folds over itself somewhere in single precision; laid out a little differently it does not.
 */
export function firstSound(isSound: IsSound | undefined, attempt: (number: number) => Mesh): Mesh {
  const first = attempt(0);
  if (!isSound || isSound(first)) return first;
  for (let number = 1; number < ATTEMPTS; number++) {
    const mesh = attempt(number);
    if (isSound(mesh)) return mesh;
  }
  return first;
}
