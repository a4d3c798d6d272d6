import type { Part } from '../part.ts';

/** A body made into parts. */
export interface BodyParts {
  readonly parts: readonly Part[];
  /** Sentences about what was decided on the way. */
  readonly remarks: readonly string[];
  /** Sentences about what could do harm. */
  readonly warnings: readonly string[];
}

/** A length in words: at most two decimals. */
export const mm = (value: number): string => `${Number(value.toFixed(2))} mm`;

/** A length that still fits, rounded down to hundredths. */
export const mmAtMost = (value: number): string => mm(Math.floor(value * 100 + 1e-6) / 100);
