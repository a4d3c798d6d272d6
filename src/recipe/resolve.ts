import { metric } from '../crystal/cell.ts';
import type { PointGroup } from '../crystal/point-group.ts';
import type { MineralFacts, Resolved } from './crystal.ts';
import { type Problem, RecipeError } from './problem.ts';
import { ProblemList } from './problem-list.ts';
import { readCell, readGroup } from './read-cell.ts';
import { readForms } from './read-forms.ts';
import { type ChosenMineral, factsOf, readMineral } from './read-mineral.ts';
import { readPrint } from './read-print.ts';
import type { RecipeInput } from './schema.ts';
import type { Shelf } from './shelf.ts';
import type { Written } from './text.ts';
import { withoutFaults } from './without-faults.ts';

/**
 * Understands a recipe: looks up presets, reads symbols, completes the cell.
 * @param faults what `structureProblems` found in it; presets need no such look. It is handed in because the library
 * behind it takes longer to load than a crystal takes to compute.
 * @throws RecipeError with every problem found, each with its place
 */
export function resolve({ value, origin }: Written, shelf: Shelf, faults: readonly Problem[] = []): Resolved {
  const problems = new ProblemList(faults);
  const recipe = withoutFaults(value, faults);
  const mineral = readMineral(recipe, shelf, problems);
  const group = groupOf(recipe, mineral, problems);
  refuseForeignHabit(recipe, mineral, group, problems);
  const cell = group && problems.attempt('cell', ['cell'], () => readCell(recipe.cell ?? mineral?.cell, group));
  const forms =
    mineral === undefined && !recipe.forms
      ? undefined
      : readForms(recipe, mineral ?? null, problems.has(['pointGroup']) ? undefined : group, problems);
  const print = readPrint(recipe, group, shelf, problems);
  if (problems.all.length > 0 || !group || !cell || !forms || !print) throw new RecipeError(origin, problems.all);
  const facts = mineral ? factsOf(mineral, recipe) : null;
  const title = recipe.title ?? titleOf(facts, group);
  return { crystal: { title, mineral: facts, group, cell, metric: metric(cell, group.axes), forms }, print };
}

function groupOf(
  recipe: RecipeInput,
  mineral: ChosenMineral | null | undefined,
  problems: ProblemList,
): PointGroup | undefined {
  const symbol = recipe.pointGroup ?? mineral?.pointGroup;
  if (symbol !== undefined)
    return problems.attempt('unknown-group', ['pointGroup'], () => readGroup(symbol, recipe.cell));
  const told =
    mineral === undefined ||
    problems.has(['mineral']) ||
    problems.has(['pointGroup']) ||
    problems.all.some(({ path }) => path.length === 0);
  if (!told)
    problems.say(
      'missing',
      [],
      'neither a mineral nor a pointGroup is given',
      'Add one of them, for instance  mineral: quartz  or  pointGroup: m-3m',
    );
  return undefined;
}

function titleOf(facts: MineralFacts | null, group: PointGroup): string {
  if (!facts) return `Crystal of point group ${group.hermannMauguin}`;
  return facts.habit === null ? facts.name : `${facts.name}, ${facts.habit}`;
}

/** A habit's forms belong to the mineral's own group and axes. */
function refuseForeignHabit(
  recipe: RecipeInput,
  mineral: ChosenMineral | null | undefined,
  group: PointGroup | undefined,
  problems: ProblemList,
): void {
  if (!mineral || !group || recipe.forms !== undefined || group.key === mineral.pointGroup) return;
  const message = `${mineral.id} has point group ${mineral.pointGroup}, and its habits belong to that`;
  problems.say('unknown-group', ['pointGroup'], message, 'Leave out pointGroup, or give forms of your own');
}
