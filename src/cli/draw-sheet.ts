import { PRESET_FOLDER } from '../disk/preset-folder.ts';
import { contactSheet, type SheetEntry } from '../draw/contact-sheet.ts';
import { splitRemark } from '../draw/mineral-name.ts';
import { withOverbars } from '../draw/overbars.ts';
import type { Crystal } from '../recipe/crystal.ts';
import { preset, recipeNames } from '../recipe/shelf.ts';
import { closedOrThrow } from '../shape/closing.ts';
import { polyhedron } from '../shape/shape.ts';
import { type LookFlags, lookFrom, viewFrom } from './draw-options.ts';
import { UsageError } from './failure.ts';
import { recipeFrom } from './recipe-input.ts';

/** Up to this many crystals all get their hidden edges; on larger sheets only those that need them. */
const FEW = 12;

/** Many crystals on one sheet: recipes one by one, every habit of all minerals ("all"), or a whole set. */
export async function sheet(
  words: readonly string[],
  flags: LookFlags & { columns?: string },
): Promise<{ name: string; svg: string }> {
  const { style, hidden } = lookFrom(flags);
  const columns = flags.columns === undefined ? undefined : Number(flags.columns);
  if (columns !== undefined && !(Number.isInteger(columns) && columns > 0))
    throw new UsageError(`--columns is a whole number from 1, not "${flags.columns}".`);
  const recipes = words.flatMap(recipesOf);
  const entries = await Promise.all(recipes.map((recipe) => entry(recipe)));
  const first = await recipeFrom(recipes[0]!);
  const svg = contactSheet(entries, {
    ...(style && { style }),
    ...(hidden && (hidden === 'none' || entries.length <= FEW) && { hidden }),
    ...titleOf(words),
    ...(columns !== undefined && { columns }),
    view: viewFrom(flags.view, first.crystal),
  });
  return {
    name: words.length === 1 && words[0] !== undefined ? `sheet-${words[0].replaceAll('/', '-')}` : 'sheet',
    svg,
  };
}

function recipesOf(word: string): string[] {
  if (word === 'all')
    return PRESET_FOLDER.list('minerals').flatMap((name) =>
      Object.keys(preset(PRESET_FOLDER, 'minerals', name)!.habits).map((shape) => `${name}/${shape}`),
    );
  const set = preset(PRESET_FOLDER, 'sets', word);
  return set ? recipeNames(set).map((key) => `${word}/${key}`) : [word];
}

/** A sheet of all minerals or of one set has a name. */
function titleOf([word, ...more]: readonly string[]): { title?: string } {
  if (word === undefined || more.length > 0) return {};
  if (word === 'all') return { title: 'All mineral presets' };
  const set = preset(PRESET_FOLDER, 'sets', word);
  return set ? { title: set.name } : {};
}

/** Minerals are captioned by name and habit, crystals of a set by the form they show, others by their title. */
async function entry(recipe: string): Promise<SheetEntry> {
  const { crystal } = await recipeFrom(recipe);
  const shape = closedOrThrow(polyhedron(crystal));
  const { mineral, title, forms, group } = crystal;
  if (mineral?.habit) {
    const { name, remark } = splitRemark(mineral.name);
    return { shape, caption: name, subcaption: [mineral.habit, ...(remark === null ? [] : [remark])].join(', ') };
  }
  if (!isOfSet(recipe)) return { shape, caption: withOverbars(title, group.axes) };
  return { shape, caption: capital(forms[0]!.form.name), helpers: helperForms(recipe, crystal) };
}

const isOfSet = (recipe: string): boolean =>
  PRESET_FOLDER.list('sets').includes(recipe.trim().toLowerCase().split('/')[0]!);

/** Numbers of the forms that only close the form which a recipe of a set is about; none for other recipes. */
export const helperForms = (recipe: string, { forms }: Crystal): number[] =>
  isOfSet(recipe) ? forms.map((_, place) => place).slice(1) : [];

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
