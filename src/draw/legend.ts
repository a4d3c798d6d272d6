import { printFace } from '../crystal/indices.ts';
import { shownForms } from '../shape/presence.ts';
import type { Shape } from '../shape/shape.ts';
import { FAINT, INK, tintOf } from './palette.ts';
import { element } from './svg.ts';
import { layOutSymbol, symbolText, words } from './symbol-text.ts';
import { textWidth } from './text-width.ts';
import type { Point } from './vector.ts';

const ROW = 25;
const SIZE = 15;
/** Letters are a little larger than the rest, in type sizes. */
const LETTER = 17 / 15;
/** Type sizes: a swatch with the gap after it, the gap between two entries, and between two columns. */
const SWATCH = 2;
const GAP = 0.9;
const GUTTER = 1.6;
/** Forms that go into one column before a second one is begun. */
const COLUMN_LENGTH = 4;

interface LegendRow {
  readonly letter: string | null;
  readonly symbol: string;
  readonly name: string;
  readonly tint: string;
}

function rowsOf({ crystal, solid }: Shape, helpers: readonly number[]): LegendRow[] {
  const shown = shownForms(solid);
  return crystal.forms.flatMap(({ form, letter }, place) => {
    if (!shown[place]) return [];
    const symbol = printFace(form.indices, crystal.group.axes, { brackets: '{', overbar: true });
    const helper = form.multiplicity === 1 ? 'helper face' : 'helper faces';
    const name = helpers.includes(place) ? `${form.name}, ${helper}` : form.name;
    return [{ letter, symbol, name, tint: tintOf(place, helpers) }];
  });
}

export interface LegendOptions {
  readonly style: 'tinted' | 'lines';
  /** Numbers of the forms that only close what the others leave open. */
  readonly helpers: readonly number[];
}

export interface Legend {
  /** Height in pixels. */
  readonly height: number;
  paint(x: number, y: number): string;
}

/** Where things stand in a row, in type sizes from its start. */
interface Columns {
  readonly swatch: number;
  /** Room for the letters; 0 where no form has one. */
  readonly letters: number;
  readonly name: number;
  readonly width: number;
}

/**
 * Names every form that shows: its tint, letter, symbol and traditional name, in two columns where there are many and
 * the width in pixels has room for two.
 */
export function legend(shape: Shape, width: number, { style, helpers }: LegendOptions): Legend {
  const rows = rowsOf(shape, helpers);
  const columns = measureRows(rows, style === 'tinted' ? SWATCH : 0);
  const second = Math.max((width + GUTTER * SIZE) / 2, (columns.width + GUTTER) * SIZE);
  const count = rows.length > COLUMN_LENGTH && second + columns.width * SIZE <= width ? 2 : 1;
  const lines = Math.ceil(rows.length / count);
  const size = Math.min(SIZE, width / columns.width);
  return {
    height: lines * ROW,
    paint: (x, y) =>
      rows
        .map((row, i) => {
          const at = [x + Math.floor(i / lines) * second, y + ROW * (i % lines) + ROW - 8] as const;
          return paintRow(row, columns, at, size);
        })
        .join('\n'),
  };
}

const letterWidth = (letter: string): number => Math.max(1, textWidth(letter) * LETTER) + GAP;

function measureRows(rows: readonly LegendRow[], swatch: number): Columns {
  const letters = Math.max(...rows.map(({ letter }) => (letter === null ? 0 : letterWidth(letter))));
  const key = ({ letter, symbol }: LegendRow): number => (letter === null ? 0 : letters) + layOutSymbol(symbol).width;
  const name = swatch + Math.max(...rows.map(key)) + GAP;
  return { swatch, letters, name, width: name + Math.max(...rows.map((row) => textWidth(row.name))) };
}

/** Letter, symbol and name; where there is no letter, the symbol takes its place. */
function paintRow({ letter, symbol, name, tint }: LegendRow, columns: Columns, [x, y]: Point, size: number): string {
  const start = x + columns.swatch * size;
  const symbolAt = letter === null ? start : start + columns.letters * size;
  return (
    (columns.swatch > 0
      ? element('rect', { x, y: y - 13, width: 17, height: 17, rx: 3, fill: tint, stroke: INK, 'stroke-width': 0.8 })
      : '') +
    (letter === null ? '' : words(letter, { at: [start, y], size: size * LETTER, italic: true })) +
    symbolText(layOutSymbol(symbol), { start: [symbolAt, y], size }) +
    words(name, { at: [x + columns.name * size, y], size, fill: FAINT })
  );
}
