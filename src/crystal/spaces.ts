/**
 * The three spaces a crystallographer counts in. Face indices are rows and transform with the inverse matrix,
 * zone symbols are columns and transform with the matrix itself, so the compiler keeps them apart.
 */

declare const space: unique symbol;

type Triple = readonly [number, number, number];

/** Face indices (hkl): a row of integers in the reciprocal basis. */
export type Miller = Triple & { readonly [space]: 'face' };

/** A zone or direction [uvw]: a column of integers in the cell's basis. */
export type Zone = Triple & { readonly [space]: 'zone' };

/** A point or vector in cell coordinates (fractions of a, b, c). */
export type CellVector = Triple & { readonly [space]: 'cell' };

/** A vector in the right-handed Cartesian frame of `cell.ts` (z ∥ c, y ∥ b*). */
export type Cartesian = Triple & { readonly [space]: 'cartesian' };

/** A 3×3 matrix of integers, rows first; acts on columns of the cell's basis: x′ = W x. */
export type IntegerMatrix = readonly [Triple, Triple, Triple];

const triple = (a: number, b: number, c: number): Triple => [a, b, c];

export const miller = (h: number, k: number, l: number): Miller => triple(h, k, l) as Miller;
export const zone = (u: number, v: number, w: number): Zone => triple(u, v, w) as Zone;
export const cellVector = (x: number, y: number, z: number): CellVector => triple(x, y, z) as CellVector;
export const cartesian = (x: number, y: number, z: number): Cartesian => triple(x, y, z) as Cartesian;
