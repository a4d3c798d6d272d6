import { isRotoinversion, orderOf, type RodSymbol } from './axis-symbol.ts';

/** An axis in words: "3-fold", "4-fold rotoinversion". */
export const axisWords = (symbol: RodSymbol): string =>
  `${orderOf(symbol)}-fold${isRotoinversion(symbol) ? ' rotoinversion' : ''}`;
