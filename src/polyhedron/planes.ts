import type { Offset } from './offset.ts';

/**
 * Half-spaces `h·x ≤ D`, gathered in forms that share one offset. Normals are rows in whatever basis the points `x`
 * are columns of; for a crystal they are face indices and cell coordinates.
 */
export interface PlaneSet {
  /** h1, h2, h3 of each plane, one after the other; planes of one form stand together. */
  readonly normals: Float64Array;
  /** The form of each plane. */
  readonly form: Int32Array;
  /** One offset a form. */
  readonly offsets: readonly Offset[];
  /** Where the planes come from a point group: its action on them. Absent: every plane is cut by itself. */
  readonly symmetry?: PlaneSymmetry;
}

/** A finite group of matrices that permutes the planes of each form. */
export interface PlaneSymmetry {
  readonly order: number;
  /** `product[a * order + b]` is the operation "first b, then a". */
  readonly product: Uint8Array;
  /** 1 for operations that turn a left hand into a right one. */
  readonly improper: Uint8Array;
  /** Nine integers an operation, rows first, acting on points. */
  readonly matrices: Int8Array;
  /** For each form, the plane to which each operation takes the form's first plane. */
  readonly image: readonly Int32Array[];
  /** For each plane, an operation that takes its form's first plane to it. */
  readonly carrier: Uint8Array;
}

/** Planes without symmetry: every plane is a form of its own. */
export function loosePlanes(normals: Float64Array, offsets: readonly Offset[]): PlaneSet {
  return { normals, form: Int32Array.from(offsets, (_, plane) => plane), offsets };
}
