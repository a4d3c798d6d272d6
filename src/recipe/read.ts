import type { Resolved } from './crystal.ts';
import { resolve } from './resolve.ts';
import { presetRecipe, type Shelf } from './shelf.ts';
import { structureProblems } from './structure.ts';
import { readText } from './text.ts';

/** A preset's name: letters, digits, points, - and _, with at most one /. Anything else in a text is a recipe. */
const PRESET_NAME = /^\s*\w[\w.-]*(\/[\w.-]+)?\s*$/;

/**
 * Reads a recipe in any of the ways the library takes it: the name of a preset, YAML or JSON text, or the parsed object.
 * @throws RecipeError with all problems found
 */
export function read(recipe: unknown, shelf: Shelf, name = 'recipe'): Resolved {
  if (typeof recipe === 'string' && PRESET_NAME.test(recipe)) return resolve(presetRecipe(shelf, recipe), shelf);
  const written = typeof recipe === 'string' ? readText(recipe, name) : { value: recipe, origin: { name } };
  return resolve(written, shelf, structureProblems(written.value));
}
