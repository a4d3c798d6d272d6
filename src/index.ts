/**
 * Goniolith as a library: from a recipe to an exact crystal and to files for printing. A recipe is the name of a
 * preset (`quartz`, `pyrite/pyritohedron`), YAML or JSON text, or the parsed object.
 */

import { type Cell, metric } from './crystal/cell.ts';
import { completeCell } from './crystal/complete-cell.ts';
import { type Form, form as formOf } from './crystal/form.ts';
import { parseFace, readOptions } from './crystal/indices.ts';
import { interfacialAngle as angleBetween } from './crystal/interfacial.ts';
import { type PointGroup, pointGroup } from './crystal/point-group.ts';
import { PRESET_FOLDER } from './disk/preset-folder.ts';
import { type Inspection, inspection } from './inspect.ts';
import { type Made, makeModel } from './make.ts';
import type { Crystal, Resolved } from './recipe/crystal.ts';
import { read } from './recipe/read.ts';
import type { RecipeInput } from './recipe/schema.ts';
import { polyhedron } from './shape/shape.ts';

const resolved = (recipe: RecipeInput | string): Resolved => read(recipe, PRESET_FOLDER);

/** Resolves a recipe to its crystal: group, complete cell, forms. @throws RecipeError with every problem found */
export const crystal = (recipe: RecipeInput | string): Crystal => resolved(recipe).crystal;

/**
 * Everything known about a crystal as plain data; nothing is written. Crystals that do not close are told as such
 * (`bounded: false`), not thrown. @throws RecipeError
 */
export function inspect(recipe: RecipeInput | string): Inspection {
  const read = resolved(recipe);
  return inspection(read, polyhedron(read.crystal));
}

/** Makes the files for printing, in memory. @throws RecipeError, ObjectError */
export const make = (recipe: RecipeInput | string): Promise<Made> => makeModel(resolved(recipe));

/** Face indices as a list of three, or four on hexagonal axes, or as text such as "10-11". */
export type FaceIndices = readonly number[] | string;

/**
 * The form {hkl} of a point group: name, multiplicity, whether it is closed, and all its faces, the given one first.
 * @param group a group, or its symbol in any known spelling
 * @throws CrystalError
 */
export function form(group: PointGroup | string, indices: FaceIndices): Omit<Form, 'imageOf' | 'carrier'> {
  const known = typeof group === 'string' ? pointGroup(group) : group;
  const { imageOf: _, carrier: __, ...facts } = formOf(known, parseFace(indices, readOptions(known.axes)));
  return facts;
}

/**
 * Angle in degrees between the outward normals of two faces.
 * @param cell a, b, c in ångström, angles in degrees; what is left out is 90°, b = a, c = a. With a = b and gamma = 120°
 * faces may have four indices
 * @throws CrystalError
 */
export function interfacialAngle(cell: Partial<Cell>, face1: FaceIndices, face2: FaceIndices): number {
  const { a = 1, b = a, c = a, alpha = 90, beta = 90, gamma = 90 } = cell;
  const whole = completeCell({ a, b, c, alpha, beta, gamma }, 'triclinic');
  const options = readOptions(gamma === 120 && a === b ? 'hexagonal' : 'triclinic');
  return angleBetween(metric(whole, 'triclinic'), parseFace(face1, options), parseFace(face2, options));
}

export { recipeJsonSchema } from './recipe/schema.ts';
export { distanceRange, vanishesAt } from './shape/presence.ts';
export type { Shape } from './shape/shape.ts';
export type { Cell, Crystal, Form, Inspection, Made, PointGroup, RecipeInput };
export { pointGroup, polyhedron };
