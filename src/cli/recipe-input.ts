import { existsSync } from 'node:fs';
import { basename } from 'node:path';
import { PRESET_FOLDER } from '../disk/preset-folder.ts';
import { decodeText, readInput } from '../disk/read-input.ts';
import type { Resolved } from '../recipe/crystal.ts';
import type { Origin } from '../recipe/problem.ts';
import { resolve } from '../recipe/resolve.ts';
import type { RecipeInput } from '../recipe/schema.ts';
import { presetRecipe } from '../recipe/shelf.ts';
import { LARGEST_RECIPE, readText, type Written } from '../recipe/text.ts';

/**
 * Reads the recipe that an argument names: `-` is standard input, what looks like a file or is one is read as a file,
 * all else is the name of a preset.
 * @param flags what flags say in place of the recipe's `print`
 */
export async function recipeFrom(argument: string, flags: NonNullable<RecipeInput['print']> = {}): Promise<Resolved> {
  const isPreset = !isFile(argument);
  const written = isPreset ? presetRecipe(PRESET_FOLDER, argument) : await fromFile(argument);
  const whole = Object.keys(flags).length > 0 ? withFlags(written, flags) : written;
  if (isPreset) return resolve(whole, PRESET_FOLDER);
  const { structureProblems } = await import('../recipe/structure.ts');
  return resolve(whole, PRESET_FOLDER, structureProblems(whole.value));
}

function isFile(argument: string): boolean {
  if (argument === '-' || /\.(ya?ml|json)$/i.test(argument) || /^[.~]?[/\\]|^\.\./.test(argument)) return true;
  return existsSync(argument) && !PRESET_FOLDER.list('minerals').includes(argument.toLowerCase().split('/')[0]!);
}

async function fromFile(argument: string): Promise<Written> {
  const name = argument === '-' ? 'standard input' : argument;
  const text = decodeText(await readInput(argument, { limit: LARGEST_RECIPE }), name);
  const written = readText(text, name);
  return argument === '-' ? written : named(written, basename(argument).replace(/\.\w+$/, ''));
}

/** A recipe without a title takes its file's name. */
function named(written: Written, title: string): Written {
  const { value } = written;
  const plain = typeof value === 'object' && value !== null && !Array.isArray(value);
  return plain && !('title' in value) && !('mineral' in value) ? { ...written, value: { title, ...value } } : written;
}

/** Flags win over the recipe. What they say has no place in the recipe's text, so problems name the flag's key only. */
function withFlags({ value, origin }: Written, flags: NonNullable<RecipeInput['print']>): Written {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) return { value, origin };
  const own = 'print' in value && typeof value.print === 'object' && value.print !== null ? value.print : {};
  const fromFlags = (key: string | number | undefined): boolean =>
    key !== undefined && String(key).replace('?', '') in flags;
  const placed: Origin = {
    ...origin,
    place: (path) => (path[0] === 'print' && fromFlags(path[1]) ? undefined : origin.place?.(path)),
  };
  return { value: { ...value, print: { ...own, ...flags } }, origin: placed };
}
