import { OVERBAR } from '../../crystal/marks.ts';
import { AXIS_SYMBOLS, type RodSymbol } from '../../rods/axis-symbol.ts';
import { axisWords } from '../../rods/axis-words.ts';

/** The Hermann–Mauguin symbol as it is printed: a true overbar for rotoinversion axes. */
export const hermannMauguin = (symbol: RodSymbol): string =>
  symbol.startsWith('-') ? `${symbol.slice(1)}${OVERBAR}` : symbol;

/** "4-fold rotoinversion", "2-fold and mirror". */
export const symbolWords = (symbol: RodSymbol): string =>
  `${axisWords(symbol)}${symbol.endsWith('/m') ? ' and mirror' : ''}`;

/** Each symbol once, in the order of the table: rotations, with mirrors, rotoinversions. */
export function inOrder(symbols: readonly RodSymbol[]): RodSymbol[] {
  const order: readonly RodSymbol[] = ['2', '3', '4', '6', '2/m', '4/m', '6/m', '-3', '-4', '-6'];
  return order.filter((symbol) => symbols.includes(symbol));
}

/** All ten symbols. */
export const ALL_SYMBOLS: readonly RodSymbol[] = inOrder(Object.keys(AXIS_SYMBOLS) as RodSymbol[]);
