import { nearest } from '../crystal/nearest.ts';
import { SETTINGS } from '../crystal/setting.ts';
import { either } from './either.ts';
import { type Problem, RecipeError } from './problem.ts';
import type { MineralPreset, PrinterProfile, SetPreset } from './schema.ts';
import { readText, type Written } from './text.ts';

/** Where presets are kept: a folder of YAML files, or whatever a browser has in its place. */
export interface Shelf {
  /** Names of the files of one kind, without ending, in alphabetical order. */
  list(kind: PresetKind): readonly string[];
  /** The text of one file, or undefined when there is none of that name. */
  read(kind: PresetKind, name: string): string | undefined;
}

export type PresetKind = 'minerals' | 'sets' | 'printers';

interface Kinds {
  minerals: MineralPreset;
  sets: SetPreset;
  printers: PrinterProfile;
}

/**
 * A preset file as written, or null when the shelf has none of that name. The files belong to the project and a test
 * checks each against its schema, so what is read here is taken at its word.
 */
export function preset<K extends PresetKind>(shelf: Shelf, kind: K, name: string): Kinds[K] | null {
  const text = /^\w[\w.-]*$/.test(name) ? shelf.read(kind, name) : undefined;
  return text === undefined ? null : (readText(text, `${kind}/${name}`).value as Kinds[K]);
}

/**
 * The recipe that a preset's name stands for: `quartz`, `pyrite/pyritohedron`, or `32-groups/m-3m` from a set.
 * @throws RecipeError with the nearest names when there is none
 */
export function presetRecipe(shelf: Shelf, id: string): Written {
  const [name = '', part, ...more] = id.trim().toLowerCase().split('/');
  const origin = { name: id };
  const refuse = (problem: Omit<Problem, 'path'>): never => {
    throw new RecipeError(origin, [{ ...problem, path: [] }]);
  };
  const mineral = preset(shelf, 'minerals', name);
  if (mineral && more.length === 0) {
    if (part === undefined || Object.hasOwn(mineral.habits, part))
      return { value: { mineral: name, ...(part !== undefined && { habit: part }) }, origin };
    return refuse({ code: 'unknown-habit', ...unknownHabit(name, part, Object.keys(mineral.habits)) });
  }
  const set = preset(shelf, 'sets', name);
  if (set && part !== undefined && more.length === 0) {
    const recipe = Object.hasOwn(set.recipes, part) ? set.recipes[part] : undefined;
    if (recipe) return { value: { ...recipe, print: { file: fileWord(name, part), ...recipe.print } }, origin };
    return refuse({
      code: 'unknown-mineral',
      message: `the set ${name} has no "${part}".`,
      hint: guess(nearest(part, Object.keys(set.recipes), 4), `\`goniolith presets ${name}\` lists them.`),
    });
  }
  if (set)
    return refuse({
      code: 'unknown-mineral',
      message: `${name} is a set of ${Object.keys(set.recipes).length} crystals.`,
      hint: `Name one of them: ${name}/${Object.keys(set.recipes)[0]}; \`goniolith presets ${name}\` lists them.`,
    });
  return refuse({ code: 'unknown-mineral', ...unknownMineral(shelf, name) });
}

/** Names of a set's recipes in the usual order of their point groups, from triclinic to cubic. */
export function recipeNames({ recipes }: SetPreset): string[] {
  const place = (name: string): number => {
    const symbol = String(recipes[name]?.pointGroup);
    return SETTINGS.findIndex(({ key, pointGroup }) => key === symbol || pointGroup === symbol);
  };
  return Object.keys(recipes).sort((a, b) => place(a) - place(b));
}

export const unknownMineral = (shelf: Shelf, name: string) => ({
  message: `no mineral "${name}" among the presets.`,
  hint: guess(
    nearest(name, [...shelf.list('minerals'), ...shelf.list('sets')], 3),
    '`goniolith presets` lists all; a recipe can also give pointGroup, cell and forms itself.',
  ),
});

export const unknownHabit = (mineral: string, habit: string, known: readonly string[]) => ({
  message: `${mineral} has no habit "${habit}" here.`,
  hint: `It has ${either(known, 'and')}.`,
});

const guess = (near: readonly string[], otherwise: string): string =>
  near.length > 0 ? `Did you mean ${either(near)}? ${otherwise}` : otherwise;

/** A set's name and a recipe's key as a file name, which has no place for a minus sign that means an overbar. */
const fileWord = (set: string, key: string): string => `${set}-${key.replace(/-(?=\d)/g, 'bar')}`;
