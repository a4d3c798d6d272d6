import { PRESET_FOLDER } from './disk/preset-folder.ts';
import { polyhedron } from './habit/habit.ts';
import { type Inspection, inspection } from './inspect.ts';
import type { Crystal, Resolved } from './recipe/crystal.ts';
import { read } from './recipe/read.ts';

const resolved = (recipe: unknown): Resolved => read(recipe, PRESET_FOLDER);

export const crystal = (recipe: unknown): Crystal => resolved(recipe).crystal;
export function inspect(recipe: unknown): Inspection {
  const r = resolved(recipe);
  return inspection(r, polyhedron(r.crystal));
}
export { polyhedron };
