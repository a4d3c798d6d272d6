import { printFace } from '../crystal/indices.ts';
import { shownForms } from '../shape/presence.ts';
import type { Shape } from '../shape/shape.ts';
import { FAINT, INK, tintOf } from './palette.ts';
import { element } from './svg.ts';
import { layOutSymbol, symbolText, words } from './symbol-text.ts';

export const LEGEND_ROW = 25;
const SIZE = 15;
/** Forms that go into one column before a second one is begun. */
const COLUMN_LENGTH = 4;

interface LegendRow {
  readonly letter: string | null;
  readonly symbol: string;
  readonly name: string;
  readonly tint: string;
}

function rowsOf({ crystal, solid }: Shape): LegendRow[] {
  const shown = shownForms(solid);
  return crystal.forms.flatMap(({ form, letter }, place) => {
    if (!shown[place]) return [];
    const symbol = printFace(form.indices, crystal.group.axes, { brackets: '{', overbar: true });
    return [{ letter, symbol, name: form.name, tint: tintOf(place) }];
  });
}

export interface Legend {
  /** Height in pixels. */
  readonly height: number;
  paint(x: number, y: number): string;
}

/** Names every form that shows: its tint, letter, symbol and traditional name. */
export function legend(shape: Shape, width: number, style: 'tinted' | 'lines'): Legend {
  const rows = rowsOf(shape);
  const columns = rows.length > COLUMN_LENGTH ? 2 : 1;
  const lines = Math.ceil(rows.length / columns);
  const letters = rows.some(({ letter }) => letter !== null) ? 28 : 0;
  const symbols = Math.max(...rows.map(({ symbol }) => layOutSymbol(symbol).width)) * SIZE + 14;
  const swatch = style === 'tinted' ? 30 : 0;
  const paintRow = ({ letter, symbol, name, tint }: LegendRow, x: number, y: number): string =>
    (swatch
      ? element('rect', { x, y: y - 13, width: 17, height: 17, rx: 3, fill: tint, stroke: INK, 'stroke-width': 0.8 })
      : '') +
    (letter === null ? '' : words(letter, { at: [x + swatch, y], size: SIZE + 2, italic: true })) +
    symbolText(layOutSymbol(symbol), { start: [x + swatch + letters, y], size: SIZE }) +
    words(name, { at: [x + swatch + letters + symbols, y], size: SIZE, fill: FAINT });
  return {
    height: lines * LEGEND_ROW,
    paint: (x, y) =>
      rows
        .map((row, i) =>
          paintRow(row, x + (Math.floor(i / lines) * width) / columns, y + LEGEND_ROW * (i % lines) + LEGEND_ROW - 8),
        )
        .join('\n'),
  };
}
