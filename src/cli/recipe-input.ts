import { existsSync } from 'node:fs';
import { basename } from 'node:path';
import { PRESET_FOLDER } from '../disk/preset-folder.ts';
import { decodeText, readInput } from '../disk/read-input.ts';
import { slug } from '../make.ts';
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
  const written = readText(decodeText(await readInput(argument, { limit: LARGEST_RECIPE }), name), name);
  return argument === '-' ? written : named(written, basename(argument).replace(/\.\w+$/, ''));
}

/** A recipe in a file gives its models the file's name, unless it says another. */
function named({ value, origin }: Written, stem: string): Written {
  if (!isRecord(value)) return { value, origin };
  const print = isRecord(value.print) ? value.print : {};
  if (!(value.print === undefined || isRecord(value.print))) return { value, origin };
  const title = value.title === undefined && value.mineral === undefined ? { title: stem } : {};
  return { value: { ...title, ...value, print: { file: slug(stem), ...print } }, origin };
}

/** Flags win over the recipe, and problems with them name the flag. */
function withFlags({ value, origin }: Written, flags: NonNullable<RecipeInput['print']>): Written {
  if (!isRecord(value)) return { value, origin };
  const print = isRecord(value.print) ? value.print : {};
  const elsewhere: Origin['elsewhere'] = ([first, key]) => {
    const flag = String(key).replace('?', '');
    return first === 'print' && flag in flags ? (FLAGS[flag] ?? `--${flag}`) : undefined;
  };
  return { value: { ...value, print: { ...print, ...flags } }, origin: { ...origin, elsewhere } };
}

/** Keys of `print` whose flag is called otherwise. */
const FLAGS: Readonly<Record<string, string>> = { file: '--name', stl: '--text' };

const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);
