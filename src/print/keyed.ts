import type { RodPlan } from '../rods/plan.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { printedKey } from './key/printed-key.ts';
import type { Workbench } from './kit.ts';
import type { Typeface } from './lettering/typeface.ts';
import type { Part } from './part.ts';

/** Between the object and the key beside it in pictures and in the whole file, millimetres. */
const BESIDE = 15;

/** A key of the symbols on this crystal's rods, beside it. @throws ObjectError */
export function keyed(
  bench: Workbench,
  { measures }: ClosedShape,
  scale: number,
  typeface: Typeface,
  { ends, symbolUnit, thickness }: RodPlan,
): { readonly parts: readonly Part[]; readonly remarks: readonly string[] } {
  const tips = ends.flat().map(({ end, tip }) => tip * Math.max(0, end.along[0]));
  const right = Math.max(measures.high[0]! * scale, ...tips) + BESIDE + 2 * symbolUnit;
  const symbols = [...new Set(ends.map(([{ line }]) => line.symbol))];
  const { part, remarks } = printedKey(bench, {
    symbols,
    typeface,
    symbolUnit,
    thickness,
    braille: true,
    at: [right, measures.low[1]! * scale, measures.low[2]! * scale],
  });
  return { parts: [part], remarks };
}
