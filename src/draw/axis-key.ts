import { printSymbol } from '../crystal/symbol.ts';
import { AXIS_SYMBOLS, isRotoinversion, type Outline, orderOf, type RodSymbol } from '../rods/axis-symbol.ts';
import { FAINT, INK, PAPER } from './palette.ts';
import { closedPath, element, svgPage } from './svg.ts';
import { layOutSymbol, symbolText, words } from './symbol-text.ts';

/** A column for each order: its rotation axis, rotoinversion axis, and the axis with a mirror across. */
const COLUMNS: readonly (readonly RodSymbol[])[] = [
  ['2', '2/m'],
  ['3', '-3'],
  ['4', '-4', '4/m'],
  ['6', '-6', '6/m'],
];
const CELL = { width: 170, height: 164 };
const MARGIN = 20;
/** Pixels for one rod diameter. */
const UNIT = 18;

/** The key to the symbols in which rods end, as SVG. */
export function axisKey(): string {
  const cells = COLUMNS.flatMap((symbols, column) =>
    symbols.map((symbol, row) => cell(symbol, MARGIN + (column + 0.5) * CELL.width, MARGIN + row * CELL.height)),
  );
  const rows = Math.max(...COLUMNS.map((symbols) => symbols.length));
  const page = {
    width: 2 * MARGIN + COLUMNS.length * CELL.width,
    height: MARGIN + 10 + rows * CELL.height,
    title: 'Key to the symbols of symmetry axes',
    ground: PAPER,
  };
  return svgPage(page, cells);
}

function cell(symbol: RodSymbol, middle: number, top: number): string {
  const { outline, hollow, island } = AXIS_SYMBOLS[symbol];
  // A symbol's x axis, to which its lens and its triangle point, stands upright here.
  const shape = (points: Outline, fill: string): string =>
    element('path', {
      d: closedPath(points.map(([x, y]) => [middle - UNIT * y, top + 56 - UNIT * x])),
      fill,
      stroke: INK,
      'stroke-width': 1.2,
    });
  const name = layOutSymbol(printSymbol(symbol));
  const size = 22;
  return [
    shape(outline, INK),
    ...(hollow ? [shape(hollow, PAPER)] : []),
    ...(island ? [shape(island, INK)] : []),
    symbolText(name, { start: [middle - (name.width * size) / 2, top + 128], size }),
    words(spoken(symbol), { at: [middle, top + 150], size: 13, fill: FAINT, anchor: 'middle' }),
  ].join('\n');
}

function spoken(symbol: RodSymbol): string {
  const order = orderOf(symbol);
  if (isRotoinversion(symbol)) return `${order}-fold rotoinversion`;
  return symbol.endsWith('m') ? `${order}-fold, mirror across` : `${order}-fold rotation`;
}
