import { drawCrystal } from '../draw/crystal.ts';
import { fileStem } from '../make.ts';
import { USUAL_SIZE } from '../recipe/print-plan.ts';
import { planRods } from '../rods/plan.ts';
import { closedOrThrow } from '../shape/closing.ts';
import { millimetresPerUnit } from '../shape/scale.ts';
import { polyhedron } from '../shape/shape.ts';
import { type LookFlags, lookFrom, viewFrom } from './draw-options.ts';
import { helperForms } from './draw-sheet.ts';
import { type PrintFlags, printFlags } from './print-flags.ts';
import { recipeFrom } from './recipe-input.ts';

/** One crystal as SVG, with a name for its file. */
export async function drawing(recipe: string, flags: LookFlags & PrintFlags): Promise<{ name: string; svg: string }> {
  const look = lookFrom(flags);
  const resolved = await recipeFrom(recipe, printFlags(flags));
  const { crystal, print } = resolved;
  const view = viewFrom(flags.view, crystal);
  const shape = closedOrThrow(polyhedron(crystal));
  const sized = print.size !== null || print.axes !== null || flags.height === true;
  const scale = millimetresPerUnit(shape, print.size ?? USUAL_SIZE);
  const svg = drawCrystal(shape, {
    ...look,
    view,
    helpers: helperForms(recipe, crystal),
    ...(print.axes && { axes: planRods(shape, scale, print.axes) }),
    ...(sized && { millimetresPerUnit: scale }),
  });
  return { name: fileStem(resolved), svg };
}
