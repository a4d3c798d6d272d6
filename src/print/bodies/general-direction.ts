import { ObjectError } from '../../shape/object-error.ts';
import { apart, type Vector } from '../vectors.ts';
import { type Turn, turned } from './operations.ts';

/** Directions tried; enough to come within a few degrees of the best. */
const TRIES = 500;
const GOLDEN_ANGLE = Math.PI * (3 - Math.sqrt(5));

/** How far a unit vector is from the nearest of its other images; infinite for a group without any. */
const solitude = (turns: readonly Turn[], direction: Vector): number =>
  turns.slice(1).reduce((least, turn) => Math.min(least, apart(turned(turn, direction), direction)), Infinity);

/** The direction, of many spread evenly by a Fibonacci spiral, that stays farthest from its own images. */
export function generalDirection(turns: readonly Turn[]): Vector {
  const tried = Array.from({ length: TRIES }, (_, i): Vector => {
    const z = 1 - (2 * i + 1) / TRIES;
    const level = Math.sqrt(1 - z * z);
    return [level * Math.cos(i * GOLDEN_ANGLE), level * Math.sin(i * GOLDEN_ANGLE), z];
  });
  return tried.reduce((best, one) => (solitude(turns, one) > solitude(turns, best) * (1 + 1e-9) ? one : best));
}

/** Images of a unit vector closer than this, about 1°, count as one. */
const LEAST_APART = 0.0175;

/** @throws ObjectError for a direction on a symmetry element, whose images are fewer than the operations */
export function refuseSpecial(turns: readonly Turn[], direction: Vector): void {
  if (solitude(turns, direction) >= LEAST_APART) return;
  throw new ObjectError(
    'direction',
    'this direction lies on a symmetry element, or hardly beside one, so pieces would be cut through',
    'choose a direction off all axes and mirror planes, or none: then the best one is found',
  );
}
