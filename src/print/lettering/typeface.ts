import type { Font } from 'opentype.js';
import * as opentype from 'opentype.js';
import { ObjectError } from '../../shape/object-error.ts';

type Reader = Pick<typeof opentype, 'parse'>;

/** In Node the package is one object without names of its own; bundlers take its module, which has no default. */
const { parse }: Reader = (({ default: whole, ...own }: Reader & { default?: Reader }) => whole ?? own)(opentype);

/** A typeface read from its file. Lengths in type sizes (em), y upwards from the baseline. */
export interface Typeface {
  readonly font: Font;
  /** Height of capitals and figures. */
  readonly capital: number;
  /** Thinnest stroke, taken where the O is thinnest. */
  readonly stroke: number;
}

/**
 * A typeface from the bytes of a WOFF, TrueType or OpenType file (WOFF2 is not read).
 * @throws ObjectError `text` for bytes that are no such file
 */
export function readTypeface(bytes: Uint8Array): Typeface {
  const font = parsed(bytes);
  const high = font.charToGlyph('H').getBoundingBox();
  return { font, capital: high.y2 / font.unitsPerEm, stroke: thinnestOfO(font) / font.unitsPerEm };
}

function parsed(bytes: Uint8Array): Font {
  try {
    return parse(new Uint8Array(bytes).buffer);
  } catch (cause) {
    const why = cause instanceof Error ? cause.message : String(cause);
    throw new ObjectError(
      'text',
      `the typeface cannot be read: ${why}`,
      'give the bytes of a WOFF, TrueType or OpenType file',
    );
  }
}

/** The O is drawn as two contours; its stroke is what lies between them at the four extremes. */
function thinnestOfO(font: Font): number {
  const contours: { x: number; y: number }[][] = [];
  for (const command of font.charToGlyph('O').path.commands) {
    if (command.type === 'M') contours.push([]);
    if (command.type !== 'Z') contours.at(-1)!.push(command);
  }
  const boxes = contours.map((points) => {
    const [xs, ys] = [points.map(({ x }) => x), points.map(({ y }) => y)];
    return [Math.min(...xs), Math.min(...ys), -Math.max(...xs), -Math.max(...ys)] as const;
  });
  const [one, other] = boxes;
  return Math.min(...[0, 1, 2, 3].map((side) => Math.abs(one![side]! - other![side]!)));
}

/** @throws ObjectError `text`, listing every character that the typeface lacks */
export function assertGlyphs({ font }: Typeface, characters: Iterable<string>, text: string): void {
  const missing = [...new Set(characters)].filter((one) => !font.charToGlyphIndex(one));
  if (missing.length === 0) return;
  const list = missing.map((one) => `${one} (U+${one.codePointAt(0)!.toString(16).toUpperCase().padStart(4, '0')})`);
  throw new ObjectError(
    'text',
    `the typeface has no sign for ${list.join(', ')} in "${text}"`,
    'write these in Latin letters, or choose a typeface that has them',
  );
}
