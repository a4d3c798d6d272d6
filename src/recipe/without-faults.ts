import type { Path, Problem } from './problem.ts';
import type { RecipeInput } from './schema.ts';

/** The recipe with everything taken out that is known to be of the wrong shape; what is left can be taken at its word. */
export function withoutFaults(value: unknown, faults: readonly Problem[]): RecipeInput {
  if (!isRecord(value)) return {};
  return faults.reduce<RecipeInput>((recipe, { path }) => without(recipe, path), { ...value });
}

function without<T>(value: T, path: Path): T {
  const [key, ...rest] = path;
  if (key === undefined) return value;
  if (Array.isArray(value)) return value.map((entry, i) => (i === key ? inner(entry, rest) : entry)) as T;
  if (!isRecord(value)) return value;
  const kept = Object.entries(value).flatMap(([name, own]) => {
    if (name !== key) return [[name, own]];
    return rest.length === 0 ? [] : [[name, without(own, rest)]];
  });
  return Object.fromEntries(kept) as T;
}

const inner = (entry: unknown, rest: Path): unknown => (rest.length === 0 ? {} : without(entry, rest));

const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);
