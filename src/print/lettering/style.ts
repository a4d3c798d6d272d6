import type { Wanted } from './fit-box.ts';
import type { TextLayout } from './lay-out.ts';
import type { Relief } from './solids.ts';
import type { Typeface } from './typeface.ts';

/** How letters on a body are made. Lengths in millimetres; what depends on a printer comes from its profile. */
export interface LetterStyle {
  readonly typeface: Typeface;
  readonly relief: Relief;
  /** How deep engraved letters go, or how far raised ones stand out. */
  readonly depth: number;
  /** Thinnest stroke that prints. */
  readonly stroke: number;
  /** Heights of capitals and figures: no smaller, because nobody could read it; no larger, because nobody needs it. */
  readonly height: { readonly smallest: number; readonly largest: number };
  /** Least distance from letters to the edges of their face. */
  readonly margin: number;
  /** Material left under engraved letters, and between them and any other face. */
  readonly wall: number;
}

/** Type size that gives capitals this height. */
export const sizeFor = ({ capital }: Typeface, height: number): number => height / capital;

/** Type sizes between which a text prints and can be read, and above which larger ones are of no use. */
export function wantedSizes({ typeface, height, stroke }: LetterStyle, layout: TextLayout): Wanted {
  const least = Math.max(sizeFor(typeface, height.smallest), stroke / layout.stroke);
  return { least, enough: Math.max(least, sizeFor(typeface, height.largest)) };
}

/** Space between neighbouring letters, in type sizes: as much as a stroke, so that gaps print where strokes do. */
export const gapOf = ({ stroke }: Typeface): number => stroke;
