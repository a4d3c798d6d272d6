import { OVERBAR } from '../crystal/marks.ts';
import { INK } from './palette.ts';
import { element, escapeText, linePath, num } from './svg.ts';
import type { Point } from './vector.ts';

/** Faces with lining figures, so that overbars stand level. */
export const SERIF = "'DejaVu Serif', 'Source Serif 4', 'Noto Serif', 'Times New Roman', serif";

/** Width of a character in type sizes; every one is set in the middle of its own width, whatever the font's is. */
const WIDTHS: Readonly<Record<string, number>> = {
  ' ': 0.3,
  '{': 0.58,
  '}': 0.58,
  '(': 0.42,
  ')': 0.42,
  '[': 0.42,
  ']': 0.42,
  '/': 0.38,
  m: 0.88,
  ',': 0.32,
  ';': 0.34,
  '.': 0.32,
};
const USUAL_WIDTH = 0.6;
/** Heights above the baseline in type sizes: tops of figures, and the overbar over them. */
const FIGURE_HEIGHT = 0.73;
const BAR_HEIGHT = 0.86;
const BAR_WEIGHT = 0.06;
/** Half of the overbar's length. */
const HALF_BAR = 0.24;

interface Glyph {
  readonly character: string;
  readonly bar: boolean;
  /** Its middle, in type sizes from the start. */
  readonly at: number;
}

/** A symbol of indices or of a point group, laid out character by character; digits with U+0305 get a drawn bar. */
export interface SymbolText {
  readonly glyphs: readonly Glyph[];
  /** In type sizes. */
  readonly width: number;
  readonly height: number;
}

/** @param text for instance from `printFace` or `printSymbol` with true overbars */
export function layOutSymbol(text: string): SymbolText {
  const glyphs: Glyph[] = [];
  let width = 0;
  for (const character of text) {
    if (character === OVERBAR) {
      const last = glyphs.pop();
      if (last) glyphs.push({ ...last, bar: true });
      continue;
    }
    const own = WIDTHS[character] ?? USUAL_WIDTH;
    glyphs.push({ character, bar: false, at: width + own / 2 });
    width += own;
  }
  const barred = glyphs.some(({ bar }) => bar);
  return { glyphs, width, height: barred ? BAR_HEIGHT + BAR_WEIGHT : FIGURE_HEIGHT };
}

export interface SymbolPlace {
  /** Left end of the baseline. */
  readonly start: Point;
  readonly size: number;
  readonly fill?: string;
}

/** The symbol with every character at its place and its overbars as drawn lines, the same in every renderer. */
export function symbolText(symbol: SymbolText, { start: [x, y], size, fill = INK }: SymbolPlace): string {
  const characters = symbol.glyphs.flatMap(({ character, at }) =>
    character === ' '
      ? []
      : [
          element(
            'tspan',
            { x: x + at * size, ...(/\p{L}/u.test(character) && { 'font-style': 'italic' }) },
            escapeText(character),
          ),
        ],
  );
  const look = { y, 'font-family': SERIF, 'font-size': size, 'text-anchor': 'middle', fill };
  const bars = barsOf(symbol, [x, y], size);
  const barPath = { d: bars, stroke: fill, 'stroke-width': BAR_WEIGHT * size, fill: 'none' };
  return element('text', look, ...characters) + (bars === '' ? '' : element('path', barPath));
}

/** One bar a digit; over a number of several digits, which has blanks about it, the bars join. */
function barsOf({ glyphs }: SymbolText, [x, y]: Point, size: number): string {
  const joins = glyphs.some(({ character }) => character === ' ');
  const height = y - BAR_HEIGHT * size;
  const runs: [number, number][] = [];
  for (const [i, { bar, at }] of glyphs.entries()) {
    if (!bar) continue;
    const last = runs.at(-1);
    if (joins && last && glyphs[i - 1]!.bar) last[1] = at + HALF_BAR;
    else runs.push([at - HALF_BAR, at + HALF_BAR]);
  }
  return linePath(
    runs.map(([from, to]) => [
      [x + from * size, height],
      [x + to * size, height],
    ]),
  );
}

export interface TextPlace {
  readonly at: Point;
  readonly size: number;
  readonly fill?: string;
  readonly anchor?: 'start' | 'middle' | 'end';
  readonly italic?: boolean;
}

/** Ordinary words. */
export function words(text: string, { at: [x, y], size, fill = INK, anchor, italic }: TextPlace): string {
  const attributes = {
    x: num(x),
    y: num(y),
    'font-family': SERIF,
    'font-size': size,
    'text-anchor': anchor === 'start' ? undefined : anchor,
    'font-style': italic ? 'italic' : undefined,
    fill,
  };
  return element('text', attributes, escapeText(text));
}
