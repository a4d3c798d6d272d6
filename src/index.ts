/**
 * Goniolith as a library, with the presets that come with it: from a recipe to an exact crystal and to files for
 * printing. `library.ts` is the same without Node, for other shelves of presets.
 */
import { PRESET_FOLDER } from './disk/preset-folder.ts';
import { SUPPLIES } from './disk/supplies.ts';
import { library } from './library.ts';

export const { crystal, inspect, make } = library(PRESET_FOLDER, SUPPLIES);
export type { Cell } from './crystal/cell.ts';
export type { Form } from './crystal/form.ts';
export { type PointGroup, pointGroup } from './crystal/point-group.ts';
export type { Inspection } from './inspect.ts';
export { type FaceIndices, form, interfacialAngle, type Library, library, type Recipe } from './library.ts';
export type { Made, MadeFile, ModelSupplies } from './make.ts';
export type { Crystal } from './recipe/crystal.ts';
export { type RecipeInput, recipeJsonSchema } from './recipe/schema.ts';
export type { Shelf } from './recipe/shelf.ts';
export { distanceRange, vanishesAt } from './shape/presence.ts';
export { polyhedron, type Shape } from './shape/shape.ts';
