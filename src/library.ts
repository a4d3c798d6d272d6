import { type Cell, metric } from './crystal/cell.ts';
import { completeCell } from './crystal/complete-cell.ts';
import { type Form, form as formOf } from './crystal/form.ts';
import { parseFace, readOptions } from './crystal/indices.ts';
import { interfacialAngle as angleBetween } from './crystal/interfacial.ts';
import { type PointGroup, pointGroup } from './crystal/point-group.ts';
import { type Inspection, inspection } from './inspect.ts';
import { type Made, type ModelSupplies, makeModel } from './make.ts';
import type { Crystal, Resolved } from './recipe/crystal.ts';
import { read } from './recipe/read.ts';
import type { RecipeInput } from './recipe/schema.ts';
import type { Shelf } from './recipe/shelf.ts';
import { polyhedron } from './shape/shape.ts';

/** The name of a preset (`quartz`, `pyrite/pyritohedron`), YAML or JSON text, or the parsed object. */
export type Recipe = RecipeInput | string;

/** The functions that need presets, bound to the shelf they come from. */
export interface Library {
  /** Resolves a recipe to its crystal: group, complete cell, forms. @throws RecipeError with every problem found */
  crystal(recipe: Recipe): Crystal;
  /**
   * Everything known about a crystal as plain data; nothing is written. Crystals that do not close are told as such
   * (`bounded: false`), not thrown. @throws RecipeError
   */
  inspect(recipe: Recipe): Inspection;
  /** Makes the files for printing, in memory. @throws RecipeError, ObjectError */
  make(recipe: Recipe): Promise<Made>;
}

/**
 * The library on a shelf of presets; runs in browsers as in Node.
 * @param supplies the typeface for letters, and what files are to state as the program that made them
 */
export function library(shelf: Shelf, supplies: ModelSupplies): Library {
  const resolved = (recipe: Recipe): Resolved => read(recipe, shelf);
  return {
    crystal: (recipe) => resolved(recipe).crystal,
    inspect: (recipe) => {
      const whole = resolved(recipe);
      return inspection(whole, polyhedron(whole.crystal));
    },
    make: async (recipe) => makeModel(resolved(recipe), supplies),
  };
}

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
