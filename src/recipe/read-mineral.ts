import type { MineralFacts } from './crystal.ts';
import type { ProblemList } from './problem-list.ts';
import type { MineralPreset, RecipeInput } from './schema.ts';
import { preset, type Shelf, unknownHabit, unknownMineral } from './shelf.ts';

/** A mineral preset with the habit that the recipe chose from it. */
export type ChosenMineral = MineralPreset & { readonly id: string; readonly habit: string };

/** The mineral that a recipe names; null when it names none, undefined when there is none of that name. */
export function readMineral(
  { mineral: id, habit }: RecipeInput,
  shelf: Shelf,
  problems: ProblemList,
): ChosenMineral | null | undefined {
  if (id === undefined) {
    if (habit !== undefined)
      problems.say(
        'missing',
        ['habit'],
        'a habit belongs to a mineral, and none is given',
        'Add mineral: and its name.',
      );
    return null;
  }
  const found = preset(shelf, 'minerals', id.toLowerCase());
  if (!found) {
    const { message, hint } = unknownMineral(shelf, id);
    problems.say('unknown-mineral', ['mineral'], message, hint);
    return undefined;
  }
  const habits = Object.keys(found.habits);
  if (habit === undefined || Object.hasOwn(found.habits, habit))
    return { ...found, id: id.toLowerCase(), habit: habit ?? habits[0]! };
  const { message, hint } = unknownHabit(id, habit, habits);
  problems.say('unknown-habit', ['habit'], message, hint);
  return undefined;
}

/** What of the preset still holds: its habit where the recipe has no forms, its source where it has no cell or group. */
export function factsOf(
  { id, name, formula, habit, habits, source }: ChosenMineral,
  recipe: RecipeInput,
): MineralFacts {
  return {
    id,
    name,
    formula,
    habit: recipe.forms === undefined ? habit : null,
    isFirstHabit: habit === Object.keys(habits)[0],
    source: recipe.cell === undefined && recipe.pointGroup === undefined ? source : null,
  };
}
