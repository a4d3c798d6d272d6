import { normal as faceNormal } from '../crystal/cell.ts';
import type { PrintPlan, StandPlan } from '../recipe/crystal.ts';
import { AXIS_SYMBOLS } from '../rods/axis-symbol.ts';
import type { RodEnd, RodPlan } from '../rods/plan.ts';
import type { ClosedShape } from '../shape/shape.ts';
import type { Workbench } from './kit.ts';
import type { Typeface } from './lettering/typeface.ts';
import { brailleLines, labelLines } from './stand/label-lines.ts';
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
  }: { readonly printer: PrintPlan['printer']; readonly typeface: Typeface; readonly rods: RodPlan | null },
): Stand {
  const lines = plan.text ?? labelLines(shape.crystal);
  return makeStand(bench, shape, scale, {
    attitude: plan.down ? { down: faceNormal(shape.crystal.metric, plan.down) } : 'c-up',
    typeface,
    clearance: printer.freeClearance,
    wall: printer.usualWall,
    lines,
    ...(plan.braille && { braille: plan.text ? plan.text.slice(0, 2) : brailleLines(shape.crystal) }),
    ...(plan.qr !== null && { code: plan.qr }),
    contrast: plan.contrast,
    ...(rods && { rods: rods.ends.flat().flatMap((end) => rodLines(end, rods)) }),
  });
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
