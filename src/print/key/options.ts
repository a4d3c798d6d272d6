import type { RodSymbol } from '../../rods/axis-symbol.ts';
import { BRAILLE_SIZE, type BrailleSize } from '../lettering/braille.ts';
import type { Typeface } from '../lettering/typeface.ts';

/** What a key shows and how. Lengths in millimetres. */
export interface KeyOptions {
  readonly symbols: readonly RodSymbol[];
  readonly typeface: Typeface;
  /** Millimetres for one unit of the axis symbols, as on the rods' ends (`RodPlan`). */
  readonly symbolUnit: number;
  /** Of the symbols, as on the rods' ends (`RodPlan`). */
  readonly thickness: number;
  /** The name of each axis in braille beside its symbol. */
  readonly braille: boolean;
  readonly sizes?: Partial<KeySizes>;
  /** Where the key lies in the assembled object; by default at the origin. */
  readonly at?: readonly [number, number, number];
}

export interface KeySizes {
  /** Height of capitals and figures. */
  readonly letterHeight: number;
  /** How far letters stand out. */
  readonly raise: number;
  /** Between rows, and between a symbol and its letters. */
  readonly gap: number;
  /** Between braille and what stands beside it. */
  readonly brailleGap: number;
  readonly border: number;
  readonly plaque: number;
  /** Rounding of the plaque's corners. */
  readonly corner: number;
  /** Rows in a column, where there is no braille. */
  readonly rows: number;
  readonly braille: BrailleSize;
}

/**
 * ADA 2010 Standards 703.2 and 703.3: letters raised at least 0.8 mm, 16 to 51 mm high, 13 at least where the same can also
 * be read otherwise (here from the symbol and from braille), at least 3.2 mm apart, 9.5 mm from borders and braille.
 * Plaque at least 1.5 mm: Round Table guidelines for 3D prints.
 */
export const KEY_SIZES: KeySizes = {
  letterHeight: 13,
  raise: 0.8,
  gap: 5,
  brailleGap: 9.5,
  border: 9.5,
  plaque: 2,
  corner: 4,
  rows: 5,
  braille: BRAILLE_SIZE,
};
