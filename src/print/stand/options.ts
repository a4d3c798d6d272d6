import { BRAILLE_SIZE, type BrailleSize } from '../lettering/braille.ts';
import type { Typeface } from '../lettering/typeface.ts';
import type { Attitude } from './attitude.ts';
import type { RodLine } from './rod-slots.ts';

/** What a stand is to carry and how. Lengths in millimetres. */
export interface StandOptions {
  readonly attitude: Attitude;
  readonly typeface: Typeface;
  /** Between the crystal and its cradle, everywhere; from the printer's profile. */
  readonly clearance: number;
  /** Thinnest wall of the cradle; from the printer's profile. */
  readonly wall: number;
  /** Raised lines, for instance name, formula, point group, forms and scale. */
  readonly lines?: readonly string[];
  /** Lines in braille, below the raised ones. */
  readonly braille?: readonly string[];
  /** Text of a QR code, usually an address. */
  readonly code?: string;
  /** Letters, braille and code as parts of their own, for a second colour; else they are one with the stand. */
  readonly contrast?: boolean;
  /** Rods that are fixed in the crystal; the cradle leaves room for them. */
  readonly rods?: readonly RodLine[];
  /** How deep the crystal sits; by default a third of its height, at most 25 mm. */
  readonly hold?: number;
  readonly sizes?: Partial<StandSizes>;
}

export interface StandSizes {
  /** Height of capitals; the 16 mm of tactile signs, 13 at least where the same text can also be seen. */
  readonly letterHeight: number;
  /** How far letters stand out. */
  readonly raise: number;
  /** Least gap between raised letters, and to the borders, to braille and to the cradle. */
  readonly letterGap: number;
  readonly border: number;
  /** Thickness of the plaque and rounding of its corners. */
  readonly plaque: number;
  readonly corner: number;
  /** Largest width of the plaque. */
  readonly widest: number;
  readonly braille: BrailleSize;
  /** Side of a QR module and how far it stands out. */
  readonly module: number;
  readonly codeHeight: number;
}

/**
 * ADA 2010 Standards 703.2 and 703.3: letters raised at least 0.8 mm, 16 to 51 mm high, 3.2 mm apart, 9.5 mm from
 * borders and braille. Plaque at least 1.5 mm: Round Table guidelines for 3D prints. Width: the usual 220 mm bed.
 * QR modules: three lines of a 0.4 mm nozzle (common practice).
 */
export const STAND_SIZES: StandSizes = {
  letterHeight: 16,
  raise: 0.8,
  letterGap: 3.2,
  border: 9.5,
  plaque: 2,
  corner: 4,
  widest: 220,
  braille: BRAILLE_SIZE,
  module: 1.2,
  codeHeight: 0.6,
};

/** A line that people can take in (Smithsonian Guidelines for Accessible Exhibition Design), and lines on a plaque. */
export const LONGEST_LINE = 55;
export const MOST_LINES = 8;
