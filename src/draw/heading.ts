import { printSymbol } from '../crystal/symbol.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { breakLines } from './break-lines.ts';
import { lineText } from './line-text.ts';
import { splitRemark } from './mineral-name.ts';
import { withOverbars } from './overbars.ts';
import { FAINT } from './palette.ts';
import { layOutSymbol, symbolText, words } from './symbol-text.ts';
import { textWidth } from './text-width.ts';
import { titleLines } from './title-lines.ts';
import type { Point } from './vector.ts';

export interface Heading {
  /** Pixels, from above the first line to the foot of the last. */
  readonly height: number;
  /** @param at upper left corner */
  paint(at: Point): string;
}

const UNDER = { size: 17, line: 24, first: 32 };
const DOT = '  ·  ';
/** Heights in sizes of the title's type: of its capitals with some air, and from line to line. */
const TITLE = { first: 0.93, line: 1.22 };

/** The name, and under it the point group with overbars and what is known besides, within a width in pixels. */
export function heading({ crystal }: ClosedShape, width: number): Heading {
  const { group, mineral } = crystal;
  const symbol = printSymbol(group.hermannMauguin);
  const { name, remark } = nameOf(crystal);
  const rest = [mineral?.habit ?? null, remark, mineral ? subscripts(mineral.formula) : group.system];
  const remarks = rest.filter((part) => part !== null);
  return name === null ? titled(symbol, null, remarks, width) : titled(name, symbol, remarks, width);
}

/** A title, and under it remarks in small type, the first perhaps a symbol. Widths and heights in pixels. */
export function titled(title: string, symbol: string | null, remarks: readonly string[], width: number): Heading {
  const { lines, size } = titleLines(title, width);
  const lower = remarkLines(symbol, remarks, width / UNDER.size);
  const last = size * (TITLE.first + TITLE.line * (lines.length - 1));
  const lowerAt = (i: number): number => last + UNDER.first + UNDER.line * i;
  return {
    height: lower.length === 0 ? last : lowerAt(lower.length - 1),
    paint: ([x, y]) =>
      [
        ...lines.map((line, i) => lineText(line, { at: [x, y + size * (TITLE.first + TITLE.line * i)], size })),
        ...lower.flatMap((parts, i) => parts.map((part) => remarkText(part, [x, y + lowerAt(i)]))),
      ].join('\n'),
  };
}

interface Remark {
  readonly text: string;
  readonly isSymbol: boolean;
  /** Where it starts, in type sizes. */
  readonly start: number;
}

/** Remarks in order, as many in a line as there is room for; `room` in type sizes. */
function remarkLines(symbol: string | null, remarks: readonly string[], room: number): Remark[][] {
  const lines: Remark[][] = [];
  let x = room;
  const add = (text: string, width: number, isSymbol: boolean): void => {
    const dot = textWidth(DOT);
    if (x + dot + width <= room) {
      lines.at(-1)!.push({ text: DOT, isSymbol: false, start: x }, { text, isSymbol, start: x + dot });
      x += dot + width;
    } else {
      lines.push([{ text, isSymbol, start: 0 }]);
      x = width;
    }
  };
  if (symbol !== null) add(symbol, layOutSymbol(symbol).width, true);
  for (const text of remarks.flatMap((remark) => breakLines(remark, room))) add(text, textWidth(text), false);
  return lines;
}

function remarkText({ text, isSymbol, start }: Remark, [x, y]: Point): string {
  const { size } = UNDER;
  if (isSymbol) return symbolText(layOutSymbol(text), { start: [x + start * size, y], size });
  if (text === DOT)
    return words('·', { at: [x + (start + textWidth(DOT) / 2) * size, y], size, fill: FAINT, anchor: 'middle' });
  return lineText(text, { at: [x + start * size, y], size, fill: FAINT });
}

/** The name is null for a crystal that is known by its point group only. */
function nameOf({ title, mineral, group }: ClosedShape['crystal']): {
  readonly name: string | null;
  readonly remark: string | null;
} {
  if (title === `Crystal of point group ${group.hermannMauguin}`) return { name: null, remark: null };
  const isMinerals = mineral && (title === mineral.name || title === `${mineral.name}, ${mineral.habit}`);
  return isMinerals ? splitRemark(mineral.name) : { name: withOverbars(title, group.axes), remark: null };
}

/** Figures after a chemical symbol or a bracket go below the line. */
const subscripts = (formula: string): string =>
  formula.replace(/(?<=[\p{L})\]])\d+/gu, (figures) =>
    figures.replace(/\d/g, (figure) => String.fromCodePoint(0x2080 + Number(figure))),
  );
