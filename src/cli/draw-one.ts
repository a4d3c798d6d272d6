import { drawCrystal } from '../draw/crystal.ts';
import { closedOrThrow } from '../habit/closing.ts';
import { polyhedron } from '../habit/habit.ts';
import { planRods } from '../habit/rod-plan.ts';
import { millimetresPerUnit } from '../habit/scale.ts';
import { fileStem } from '../make.ts';
import { USUAL_SIZE } from '../recipe/print-plan.ts';
import { type LookFlags, lookFrom, viewFrom } from './draw-options.ts';
import { type PrintFlags, printFlags } from './print-flags.ts';
import { recipeFrom } from './recipe-input.ts';

/** One crystal as SVG, with a name for its file. */
export async function drawing(recipe: string, flags: LookFlags & PrintFlags): Promise<{ name: string; svg: string }> {
  const look = lookFrom(flags);
  const resolved = await recipeFrom(recipe, printFlags(flags));
  const { crystal, print } = resolved;
  const view = viewFrom(flags.view, crystal);
  const habit = closedOrThrow(polyhedron(crystal));
  const sized = print.size !== null || print.axes !== null || flags.height === true;
  const scale = millimetresPerUnit(habit, print.size ?? USUAL_SIZE);
  const svg = drawCrystal(habit, {
    ...look,
    view,
    ...(print.axes && { axes: planRods(habit, scale, print.axes) }),
    ...(sized && { millimetresPerUnit: scale }),
  });
  return { name: fileStem(resolved), svg };
}
