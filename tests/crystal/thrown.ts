import { expect } from 'vitest';
import { CrystalError } from '../../src/crystal/errors.ts';

/** The CrystalError that an action throws; anything else fails the test. */
export function thrown(action: () => unknown): CrystalError {
  try {
    action();
  } catch (error) {
    if (error instanceof CrystalError) return error;
    throw error;
  }
  return expect.fail('nothing was thrown');
}
