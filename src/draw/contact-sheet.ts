import { printSymbol } from '../crystal/symbol.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { firstLines } from './break-lines.ts';
import { figure, type LineWeights } from './figure.ts';
import { titled } from './heading.ts';
import { lineText } from './line-text.ts';
import { FAINT, PAPER, RULE } from './palette.ts';
import { fitInto } from './project.ts';
import { sheetColumns } from './sheet-columns.ts';
import { element, linePath, svgPage } from './svg.ts';
import { layOutSymbol, symbolText } from './symbol-text.ts';
import type { Point } from './vector.ts';
import type { View } from './view.ts';
import { viewWords } from './view-words.ts';

export interface SheetEntry {
  readonly shape: ClosedShape;
  /** Digits with U+0305 after them get drawn overbars, here and in the further line. */
  readonly caption: string;
  readonly subcaption?: string;
  /** Numbers of the forms that only close what the others leave open; none by default. */
  readonly helpers?: readonly number[];
}

export interface SheetOptions {
  /** By default as many as fill the last row well, at most ten. */
  readonly columns?: number;
  /** Above, over the number of crystals and the view. */
  readonly title?: string;
  readonly view?: View;
  readonly style?: 'tinted' | 'lines';
  /** Edges behind the bodies: by default thin for those of fewer than seven faces, which need them, else left out. */
  readonly hidden?: 'thin' | 'none';
  readonly ground?: 'paper' | 'none';
}

const CELL = 168;
const BOX = 126;
/** Above and beside the box. */
const INSET = (CELL - BOX) / 2;
const MARGIN = 28;
const ABOVE_TITLE = 14;
const UNDER_TITLE = 26;
const WEIGHTS: LineWeights = { outline: 1.4, inner: 0.9, hidden: 0.85 };
/** Type sizes and distances of baselines: every caption is set the same. */
const CAPTION = { size: 16, line: 18, most: 3 };
const SMALL = { size: 13.5, line: 17, most: 2 };
const UNDER_PICTURE = 22;
const UNDER_WORDS = 16;
/** Room for words in a cell, pixels. */
const WORDS = CELL - 14;
/** Solids with fewer faces look like another one when only their front is drawn. */
const FEW_FACES = 7;

/**
 * Many small drawings on one page, each as large as its box allows, with name and point group below.
 * @throws RangeError without entries, or for a number of columns that is not a whole positive one
 */
export function contactSheet(entries: readonly SheetEntry[], options: SheetOptions = {}): string {
  const [first] = entries;
  if (!first) throw new RangeError('A contact sheet needs at least one crystal.');
  const { columns = sheetColumns(entries.length), title, view = 'general', ground = 'paper' } = options;
  if (!(Number.isInteger(columns) && columns > 0))
    throw new RangeError(`A sheet cannot have ${columns} columns; give a whole number from 1.`);
  const cells = entries.map((entry) => ({ ...entry, lines: cellLines(entry) }));
  const rowCount = Math.ceil(entries.length / columns);
  const width = 2 * MARGIN + columns * CELL;
  const count = entries.length === 1 ? 'one crystal' : `${entries.length} crystals`;
  const remarks = [...(title === undefined ? [] : [count]), viewWords(view, first.shape.crystal.group.axes)];
  const heading = titled(title ?? capital(count), null, remarks, width - 2 * MARGIN - 8);
  const tops = [Math.round(ABOVE_TITLE + heading.height + UNDER_TITLE)];
  for (let row = 0; row < rowCount; row++)
    tops.push(tops[row]! + rowHeight(cells.slice(row * columns, (row + 1) * columns)));
  const page = {
    width,
    height: tops[rowCount]! + MARGIN,
    title: title ?? count,
    ground: ground === 'paper' ? PAPER : null,
  };
  return svgPage(page, [
    heading.paint([MARGIN + 4, ABOVE_TITLE]),
    rules(width, tops),
    ...cells.map((cell, i) =>
      paintCell(cell, [MARGIN + (i % columns) * CELL, tops[Math.floor(i / columns)]!], options),
    ),
  ]);
}

/** Room for the words of the fullest cell. */
const rowHeight = (cells: readonly { readonly lines: readonly CellLine[] }[]): number =>
  INSET + BOX + Math.max(...cells.map(({ lines }) => lines.at(-1)!.below)) + UNDER_WORDS;

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

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

interface CellLine {
  readonly text: string;
  readonly kind: 'caption' | 'group' | 'remark';
  /** Distance of its baseline from the foot of the box. */
  readonly below: number;
}

/** The words of a cell from the top: its caption, the point group and the further line. */
function cellLines({ shape, caption, subcaption }: SheetEntry): CellLine[] {
  const broken = (text: string, { size, most }: typeof CAPTION) => firstLines(text, WORDS / size, most);
  const lines = [
    ...broken(caption, CAPTION).map((text) => ({ text, kind: 'caption' as const })),
    { text: printSymbol(shape.crystal.group.hermannMauguin), kind: 'group' as const },
    ...broken(subcaption ?? '', SMALL).map((text) => ({ text, kind: 'remark' as const })),
  ];
  let below = UNDER_PICTURE - CAPTION.line;
  return lines.map(({ text, kind }) => {
    below += kind === 'caption' ? CAPTION.line : kind === 'group' ? SMALL.line + 2 : SMALL.line;
    return { text, kind, below };
  });
}

function paintCell(
  { shape, helpers = [], lines }: SheetEntry & { readonly lines: readonly CellLine[] },
  [x, y]: Point,
  options: SheetOptions,
): string {
  const { view = 'general', style = 'tinted' } = options;
  const hidden = options.hidden ?? (shape.measures.faces.length < FEW_FACES ? 'thin' : 'none');
  const picture = figure(shape, { view, style, hidden, labels: 'none', helpers, weights: WEIGHTS, rods: null });
  const placement = fitInto(picture.bounds, { x: x + INSET, y: y + INSET, width: BOX, height: BOX });
  const foot: Point = [x + CELL / 2, y + INSET + BOX];
  return [picture.paint(placement), ...lines.map((line) => paintLine(line, foot))].join('\n');
}

function paintLine({ text, kind, below }: CellLine, [middle, foot]: Point): string {
  const y = foot + below;
  if (kind === 'caption') return lineText(text, { at: [middle, y], size: CAPTION.size, anchor: 'middle' });
  const { size } = SMALL;
  if (kind === 'remark') return lineText(text, { at: [middle, y], size, fill: FAINT, anchor: 'middle' });
  const symbol = layOutSymbol(text);
  return symbolText(symbol, { start: [middle - (symbol.width * size) / 2, y], size, fill: FAINT });
}
