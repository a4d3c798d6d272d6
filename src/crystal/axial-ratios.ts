import type { Cell } from './cell.ts';
import { completeCell } from './complete-cell.ts';
import { CrystalError } from './errors.ts';
import type { Axes } from './setting.ts';

/** Axial ratios a : b : c. What is left out is 1: b in general, a where a = b. */
export interface AxialRatios {
  readonly a?: number;
  readonly b?: number;
  readonly c: number;
}

type Angles = Partial<Pick<Cell, 'alpha' | 'beta' | 'gamma'>>;

/**
 * A cell in the proportions that older books print, a : b : c with b = 1, or a : c with a = 1 on tetragonal and
 * hexagonal axes ("0.5:1:0.7", "a : c = 1 : 1,0999"). The edges are the ratios themselves, taken as ångström: shapes
 * and angles depend on nothing else.
 * @throws CrystalError `axial-ratio`, and the codes of `completeCell`
 */
export function fromAxialRatios(ratios: string | AxialRatios, axes: Axes, angles: Angles = {}): Cell {
  const { a, b, c } = typeof ratios === 'string' ? readRatios(ratios, axes) : ratios;
  const square = axes === 'tetragonal' || axes === 'hexagonal';
  if (!square && a === undefined) {
    throw new CrystalError('axial-ratio', 'the axial ratios need a beside c', 'give them as a : b : c with b = 1');
  }
  const edges = square ? { a: a ?? b ?? 1, b: b ?? a ?? 1, c } : { a: a ?? 1, b: b ?? 1, c };
  return completeCell({ ...edges, ...angles }, axes);
}

function readRatios(text: string, axes: Axes): AxialRatios {
  const values = text
    .replace(/^[^=]*=/, '')
    .split(':')
    .map((part) => part.trim().replace(',', '.'))
    .map((part) => (part === '' ? Number.NaN : Number(part)));
  const square = axes === 'tetragonal' || axes === 'hexagonal';
  const [first, second, third] = values;
  const readable = values.every((value) => Number.isFinite(value) && value > 0);
  if (readable && values.length === 3) return { a: first!, b: second!, c: third! };
  if (readable && values.length === 2 && square) return { a: first!, c: second! };
  throw new CrystalError(
    'axial-ratio',
    `"${text}" cannot be read as axial ratios`,
    square
      ? 'write them as a : c, for instance 1 : 0.6439'
      : 'write them as a : b : c, for instance 0.8153 : 1 : 1.3136',
  );
}
