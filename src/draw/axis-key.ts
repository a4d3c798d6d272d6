import { printSymbol } from '../crystal/symbol.ts';
import { AXIS_SYMBOLS, isRotoinversion, type Outline, orderOf, type RodSymbol } from '../rods/axis-symbol.ts';
import { FAINT, INK, PAPER } from './palette.ts';
import { closedPath, element, svgPage } from './svg.ts';
import { layOutSymbol, symbolText, words } from './symbol-text.ts';

const ORDER: readonly RodSymbol[] = ['2', '3', '4', '6', '-3', '2/m', '-4', '4/m', '-6', '6/m'];
const COLUMNS = 5;
const CELL = { width: 150, height: 168 };
/** Pixels for one rod diameter. */
const UNIT = 18;

/** The key to the symbols in which rods end, as SVG. */
export function axisKey(): string {
  const cells = ORDER.map((symbol, i) => {
    const left = 20 + (i % COLUMNS) * CELL.width;
    const top = 20 + Math.floor(i / COLUMNS) * CELL.height;
    return cell(symbol, left + CELL.width / 2, top);
  });
  const rows = Math.ceil(ORDER.length / COLUMNS);
  const page = {
    width: 40 + COLUMNS * CELL.width,
    height: 30 + rows * CELL.height,
    title: 'Key to the symbols of symmetry axes',
    ground: PAPER,
  };
  return svgPage(page, cells);
}

function cell(symbol: RodSymbol, middle: number, top: number): string {
  const { outline, hollow, island } = AXIS_SYMBOLS[symbol];
  const shape = (points: Outline, fill: string): string =>
    element('path', {
      d: closedPath(points.map(([x, y]) => [middle + UNIT * x, top + 56 - UNIT * y])),
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
