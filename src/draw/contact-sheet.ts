import { OVERBAR } from '../crystal/marks.ts';
import { printSymbol } from '../crystal/symbol.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { figure, type LineWeights } from './figure.ts';
import { FAINT, PAPER, RULE } from './palette.ts';
import { fitInto } from './project.ts';
import { element, linePath, svgPage } from './svg.ts';
import { layOutSymbol, symbolText, words } from './symbol-text.ts';
import type { Point } from './vector.ts';
import type { View } from './view.ts';

export interface SheetEntry {
  readonly shape: ClosedShape;
  readonly caption: string;
  /** A further line; digits with U+0305 after them get drawn overbars. */
  readonly subcaption?: string;
}

export interface SheetOptions {
  /** As many as make the sheet about square by default. */
  readonly columns?: number;
  readonly title?: string;
  readonly view?: View;
  readonly style?: 'tinted' | 'lines';
  /** Edges behind the bodies: left out by default. */
  readonly hidden?: 'thin' | 'none';
  readonly ground?: 'paper' | 'none';
}

const CELL = 156;
const BOX = 118;
const MARGIN = 28;
const TITLE = 54;
const WEIGHTS: LineWeights = { outline: 1.4, inner: 0.9, hidden: 0.6 };
const LINE = 16;
/** All captions have one type size, the one that the longest needs; those that would need less than this, their own. */
const CAPTION = 13;
const SMALLEST_COMMON = 11;

/**
 * Many small drawings on one page, each as large as its box allows, with name and point group below.
 * @throws RangeError without entries, or for a number of columns that is not a whole positive one
 */
export function contactSheet(entries: readonly SheetEntry[], options: SheetOptions = {}): string {
  if (entries.length === 0) throw new RangeError('A contact sheet needs at least one crystal.');
  const { columns = Math.ceil(Math.sqrt(entries.length)), title, ground = 'paper' } = options;
  if (!(Number.isInteger(columns) && columns > 0))
    throw new RangeError(`A sheet cannot have ${columns} columns; give a whole number from 1.`);
  const rows = Math.ceil(entries.length / columns);
  const rowHeight = (CELL + BOX) / 2 + LINE * (entries.some(({ subcaption }) => subcaption) ? 3 : 2) + 14;
  const captionSize = Math.max(SMALLEST_COMMON, Math.min(...entries.map(({ caption }) => sizeFor(caption, CAPTION))));
  const top = MARGIN + (title === undefined ? 0 : TITLE);
  const width = 2 * MARGIN + columns * CELL;
  const page = {
    width,
    height: top + rows * rowHeight + MARGIN,
    title: title ?? `${entries.length} crystals`,
    ground: ground === 'paper' ? PAPER : null,
  };
  return svgPage(page, [
    title === undefined ? '' : words(title, { at: [MARGIN + 8, MARGIN + 28], size: 25 }),
    rules(
      width,
      Array.from({ length: rows + 1 }, (_, row) => top + row * rowHeight),
    ),
    ...entries.map((entry, i) =>
      cell(entry, [MARGIN + (i % columns) * CELL, top + Math.floor(i / columns) * rowHeight], {
        ...options,
        captionSize,
      }),
    ),
  ]);
}

const rules = (width: number, heights: readonly number[]): string =>
  element('path', {
    d: linePath(
      heights.map((y) => [
        [MARGIN, y],
        [width - MARGIN, y],
      ]),
    ),
    stroke: RULE,
    'stroke-width': 1,
  });

interface Layout extends SheetOptions {
  readonly captionSize: number;
}

function cell({ shape, caption, subcaption }: SheetEntry, [x, y]: Point, options: Layout): string {
  const { view = 'general', style = 'tinted', hidden = 'none' } = options;
  const inset = (CELL - BOX) / 2;
  const picture = figure(shape, { view, style, hidden, labels: 'none', weights: WEIGHTS, rods: null });
  const placement = fitInto(picture.bounds, { x: x + inset, y: y + inset, width: BOX, height: BOX });
  const middle = x + CELL / 2;
  const under = y + inset + BOX + LINE + 6;
  return [
    picture.paint(placement),
    words(caption, { at: [middle, under], size: sizeFor(caption, options.captionSize), anchor: 'middle' }),
    line(printSymbol(shape.crystal.group.hermannMauguin), [middle, under + LINE]),
    subcaption ? line(subcaption, [middle, under + 2 * LINE]) : '',
  ].join('\n');
}

/** A type size at which words fit into a cell; they take about half a type size a character. */
const sizeFor = (text: string, usual: number): number =>
  Math.max(6, Math.min(usual, (CELL - 6) / (0.57 * [...text].length)));

/** A small line in the middle of a cell, set as a symbol when it has overbars or is a point group. */
function line(text: string, [x, y]: Point): string {
  const size = 12;
  if (!text.includes(OVERBAR) && !/^[\dm/]+$/.test(text))
    return words(text, { at: [x, y], size: sizeFor(text, size), fill: FAINT, anchor: 'middle' });
  const symbol = layOutSymbol(text);
  return symbolText(symbol, { start: [x - (symbol.width * size) / 2, y], size, fill: FAINT });
}
