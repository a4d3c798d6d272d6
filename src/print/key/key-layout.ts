import { AXIS_SYMBOLS, type RodSymbol } from '../../rods/axis-symbol.ts';
import { brailleCells, brailleDots } from '../lettering/braille.ts';
import type { Point } from '../lettering/field.ts';
import { layOutText, type TextLayout } from '../lettering/lay-out.ts';
import { gapOf, sizeFor } from '../lettering/style.ts';
import type { KeyOptions, KeySizes } from './options.ts';
import { hermannMauguin, symbolWords } from './words.ts';

/** One symbol with what it means; places on the plaque, its front left corner at the origin. Millimetres. */
export interface KeyRow {
  readonly symbol: RodSymbol;
  readonly middle: Point;
  readonly label: TextLayout;
  /** Where the label's own origin goes. */
  readonly labelAt: Point;
  /** Middles of the dots. */
  readonly dots: readonly Point[];
}

export interface KeyLayout {
  readonly rows: readonly KeyRow[];
  /** Millimetres of a type size. */
  readonly size: number;
  readonly width: number;
  readonly height: number;
}

interface Extent {
  readonly left: number;
  readonly right: number;
  readonly bottom: number;
  readonly top: number;
}

/** Symbols below each other, the label of each to its right, its braille to the right of that. */
export function layOutKey(symbols: readonly RodSymbol[], options: KeyOptions, sizes: KeySizes): KeyLayout {
  const { typeface, symbolUnit, braille } = options;
  const size = sizeFor(typeface, sizes.letterHeight);
  const entries = symbols.map(
    (symbol): Entry => ({
      symbol,
      extent: extentOf(symbol, symbolUnit),
      label: layOutText(typeface, hermannMauguin(symbol), gapOf(typeface)),
      dots: braille ? dotsOf(symbol, sizes) : [],
    }),
  );
  const widest = (of: (entry: Entry) => number): number => Math.max(...entries.map(of));
  const symbolWidth = widest(({ extent }) => extent.right - extent.left);
  const labelWidth = widest(({ label: { box } }) => (box.right - box.left) * size);
  const dotWidth = braille ? widest(({ dots }) => Math.max(...dots.map(([x]) => x))) + sizes.braille.base / 2 : 0;
  const column = symbolWidth + sizes.gap + labelWidth + (braille ? sizes.brailleGap + dotWidth : 0);
  const columns = columnsOf(entries, braille ? entries.length : sizes.rows);
  const tall = (entry: Entry): number => heightOf(entry, size);
  const used = (some: readonly Entry[]): number =>
    some.reduce((sum, entry) => sum + tall(entry) + sizes.gap, -sizes.gap);
  const height = 2 * sizes.border + Math.max(...columns.map(used));
  const rows = columns.flatMap((some, i) => {
    const left = sizes.border + i * (column + COLUMNS_APART * sizes.gap);
    return some.map((entry, row): KeyRow => {
      const above = some.slice(0, row).reduce((sum, before) => sum + tall(before) + sizes.gap, 0);
      const y = height - sizes.border - above - tall(entry) / 2;
      const { symbol, extent, label, dots } = entry;
      const { box } = label;
      const labelLeft = left + symbolWidth + sizes.gap;
      const dotsLeft = labelLeft + labelWidth + sizes.brailleGap;
      return {
        symbol,
        middle: [left + symbolWidth / 2 - (extent.left + extent.right) / 2, y - (extent.bottom + extent.top) / 2],
        label,
        labelAt: [labelLeft - size * box.left, y - (size * (box.bottom + box.top)) / 2],
        dots: dots.map(([dx, dy]): Point => [dotsLeft + dx, y + dy]),
      };
    });
  });
  const width = 2 * sizes.border + columns.length * (column + COLUMNS_APART * sizes.gap) - COLUMNS_APART * sizes.gap;
  return { rows, size, width, height };
}

interface Entry extends Pick<KeyRow, 'symbol' | 'label' | 'dots'> {
  readonly extent: Extent;
}

/** In gaps. */
const COLUMNS_APART = 3;

const columnsOf = (entries: readonly Entry[], rows: number): Entry[][] =>
  Array.from({ length: Math.ceil(entries.length / rows) }, (_, i) => entries.slice(i * rows, (i + 1) * rows));

const heightOf = ({ extent, label: { box } }: Entry, size: number): number =>
  Math.max(extent.top - extent.bottom, (box.top - box.bottom) * size);

/** A symbol as it stands on the plaque: its x direction upwards, so that triangles stand on a side. */
export const upright = ([x, y]: readonly [number, number]): Point => [0 - y, x];

function extentOf(symbol: RodSymbol, unit: number): Extent {
  const points = AXIS_SYMBOLS[symbol].outline.map(upright);
  const [xs, ys] = [points.map(([x]) => x * unit), points.map(([, y]) => y * unit)];
  return { left: Math.min(...xs), right: Math.max(...xs), bottom: Math.min(...ys), top: Math.max(...ys) };
}

/** From the left edge of the first dot and the middle of the line. */
function dotsOf(symbol: RodSymbol, { braille }: KeySizes): Point[] {
  const dots = brailleDots([brailleCells(symbolWords(symbol))], braille);
  return dots.map(([x, y]): Point => [x + braille.base / 2, y + braille.dot]);
}
