import { normal as faceNormal } from '../crystal/cell.ts';
import type { Crystal, StandPlan } from '../recipe/crystal.ts';
import type { PrinterProfile } from '../recipe/schema.ts';
import { AXIS_SYMBOLS } from '../rods/axis-symbol.ts';
import type { RodEnd, RodPlan } from '../rods/plan.ts';
import type { ClosedShape } from '../shape/shape.ts';
import type { Workbench } from './kit.ts';
import type { Typeface } from './lettering/typeface.ts';
import { fitLines } from './stand/fit-lines.ts';
import { brailleLines, labelLines } from './stand/label-lines.ts';
import { MOST_LINES, STAND_SIZES } from './stand/options.ts';
import { brailleWidth, lineWidth } from './stand/plaque-text.ts';
import type { RodLine } from './stand/rod-slots.ts';
import { makeStand, type Stand } from './stand/stand.ts';

/** The stand of a crystal, with its label as the recipe states it or as the crystal gives it. @throws ObjectError */
export function standing(
  bench: Workbench,
  shape: ClosedShape,
  scale: number,
  plan: StandPlan,
  {
    printer,
    typeface,
    rods,
  }: { readonly printer: PrinterProfile; readonly typeface: Typeface; readonly rods: RodPlan | null },
): Stand {
  const label = plan.text
    ? { lines: plan.text, sizes: STAND_SIZES, remarks: [] }
    : ownLabel(shape.crystal, typeface, printer);
  const { widest } = widestFor(printer);
  const braille = plan.text ? plan.text.slice(0, 2) : ownBraille(shape.crystal, widest);
  const stand = makeStand(bench, shape, scale, {
    attitude: plan.down ? { down: faceNormal(shape.crystal.metric, plan.down) } : 'c-up',
    typeface,
    clearance: printer.freeClearance,
    wall: printer.usualWall,
    lines: label.lines,
    sizes: { ...label.sizes, widest },
    ...(plan.braille && { braille }),
    ...(plan.qr !== null && { code: plan.qr }),
    contrast: plan.contrast,
    ...(rods && { rods: rods.ends.flat().flatMap((end) => rodLines(end, rods)) }),
  });
  return { ...stand, remarks: [...stand.remarks, ...label.remarks] };
}

/** Letters as small as tactile signs may have them where the same can also be seen (ADA 2010 Standards 703.2.5). */
const SMALL_LETTERS = 13;

/** No plaque is wider than the bed. */
const widestFor = ({ bed }: PrinterProfile) => ({ widest: Math.min(STAND_SIZES.widest, Math.max(bed[0], bed[1])) });

/** The crystal's own label, broken into lines, in small letters where usual ones do not fit, without what fits in neither. */
function ownLabel(crystal: Crystal, typeface: Typeface, printer: PrinterProfile) {
  const room = widestFor(printer).widest - 2 * STAND_SIZES.border;
  const inLetters = (letterHeight: number) => {
    const sizes = { ...STAND_SIZES, letterHeight };
    const fitted = fitLines(labelLines(crystal), (line) => lineWidth(typeface, line, sizes), room);
    return { ...fitted, lines: fitted.lines.slice(0, MOST_LINES), sizes };
  };
  const usual = inLetters(STAND_SIZES.letterHeight);
  const chosen = usual.tooWide.length === 0 ? usual : inLetters(SMALL_LETTERS);
  const remarks = chosen.tooWide.map(
    (line) => `The plaque has no room for "${line}"; give the stand a text of its own to say it.`,
  );
  return { lines: chosen.lines, sizes: chosen.sizes, remarks };
}

function ownBraille(crystal: Crystal, widest: number): readonly string[] {
  const room = widest - 2 * STAND_SIZES.border;
  return fitLines(brailleLines(crystal), (line) => brailleWidth(line, STAND_SIZES.braille), room).lines;
}

/** What of a rod is in a cradle's way: its shaft, and its terminal with the symbol's radius. */
function rodLines({ line, end, root, base, tip }: RodEnd, { diameter, symbolUnit }: RodPlan): RodLine[] {
  const at = (reach: number): readonly [number, number, number] => [
    end.along[0] * reach,
    end.along[1] * reach,
    end.along[2] * reach,
  ];
  return [
    { from: at(root), to: at(tip), radius: diameter / 2 },
    { from: at(base), to: at(tip), radius: AXIS_SYMBOLS[line.symbol].radius * symbolUnit },
  ];
}
