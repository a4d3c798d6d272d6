import { ObjectError } from '../../shape/object-error.ts';
import { type BrailleSize, brailleCells, brailleDots, type Cell } from '../lettering/braille.ts';
import type { Point } from '../lettering/field.ts';
import { layOutText, stackLines, type TextLayout } from '../lettering/lay-out.ts';
import { sizeFor } from '../lettering/style.ts';
import type { Typeface } from '../lettering/typeface.ts';
import { LONGEST_LINE, MOST_LINES, type StandOptions, type StandSizes } from './options.ts';

/** From baseline to baseline in heights of capitals: within the 1.35 to 1.70 of ADA 2010 703.2.8. */
const PITCH = 1.65;

/** Raised lines and their room, millimetres. */
export interface RaisedText {
  readonly layout: TextLayout;
  /** Millimetres of a type size. */
  readonly size: number;
  readonly width: number;
  readonly height: number;
}

/** @throws ObjectError `text` for a line that is too long, too many lines, characters that the typeface lacks */
export function raisedText(
  { typeface, lines = [] }: StandOptions,
  sizes: StandSizes,
  widest: number,
): RaisedText | null {
  if (lines.length === 0) return null;
  assertFew(lines, 'raised');
  const size = sizeFor(typeface, sizes.letterHeight);
  const layouts = lines.map((line, i) => {
    assertShort(line, i, 'the plaque');
    const layout = layOutText(typeface, line.trim(), sizes.letterGap / size);
    const width = lineWidth(typeface, line, sizes);
    if (width > widest) throw tooWide(line, i, 'the plaque', `${sizes.letterHeight} mm letters`, width, widest);
    return layout;
  });
  const layout = stackLines(layouts, PITCH * typeface.capital, 'left');
  const { left, right, top, bottom } = layout.box;
  return { layout, size, width: size * (right - left), height: size * (top - bottom) };
}

/** Of a raised line, millimetres. */
export function lineWidth(typeface: Typeface, line: string, { letterHeight, letterGap }: StandSizes): number {
  const size = sizeFor(typeface, letterHeight);
  const { box } = layOutText(typeface, line.trim(), letterGap / size);
  return size * (box.right - box.left);
}

/** Of a line in braille, millimetres. */
export const brailleWidth = (line: string, sizes: BrailleSize): number => widthOf(brailleCells(line.trim()), sizes);

/** Lines in braille and their room, millimetres, dots' bases included. */
export interface BrailleText {
  readonly lines: readonly (readonly Cell[])[];
  /** Middles of the dots from the lower left corner of the room. */
  readonly dots: readonly Point[];
  readonly width: number;
  readonly height: number;
}

/** @throws ObjectError `text` for a line that is too long, too many lines, characters without a sign */
export function brailleText({ braille = [] }: StandOptions, sizes: BrailleSize, widest: number): BrailleText | null {
  if (braille.length === 0) return null;
  assertFew(braille, 'braille');
  const lines = braille.map((line, i) => {
    assertShort(line, i, 'the braille');
    const cells = brailleCells(line.trim());
    const width = widthOf(cells, sizes);
    if (width > widest)
      throw tooWide(line, i, 'the braille', `${cells.length} cells of ${sizes.cell} mm`, width, widest);
    return cells;
  });
  const height = (lines.length - 1) * sizes.line + 2 * sizes.dot + sizes.base;
  const corner = sizes.base / 2;
  const dots = brailleDots(lines, sizes).map(([x, y]): Point => [corner + x, height - corner + y]);
  return { lines, dots, width: Math.max(...lines.map((cells) => widthOf(cells, sizes))), height };
}

const widthOf = (cells: readonly Cell[], { cell, dot, base }: BrailleSize): number =>
  (cells.length - 1) * cell + dot + base;

function assertFew(lines: readonly string[], kind: string): void {
  if (lines.length <= MOST_LINES) return;
  throw new ObjectError(
    'text',
    `the plaque has ${lines.length} ${kind} lines; it may have ${MOST_LINES}`,
    'keep to the name, formula, point group, forms and scale',
  );
}

function assertShort(line: string, index: number, where: string): void {
  if (line.trim() === '')
    throw new ObjectError('text', `line ${index + 1} of ${where} is blank`, 'leave it out, or write something');
  const count = [...line.normalize('NFC').replace(/\u0305/g, '')].length;
  if (count <= LONGEST_LINE) return;
  throw new ObjectError(
    'text',
    `line ${index + 1} of ${where}, "${[...line].slice(0, 24).join('')}…", has ${count} characters; a line may have ${LONGEST_LINE}`,
    'shorten it or break it into lines',
  );
}

const tooWide = (line: string, index: number, where: string, how: string, width: number, widest: number): ObjectError =>
  new ObjectError(
    'text',
    `line ${index + 1} of ${where}, "${line.trim()}", is ${Math.ceil(width)} mm wide in ${how}; there is room for ${Math.floor(widest)} mm`,
    'shorten it, break it into two lines, or choose smaller letters or a wider plaque',
  );
