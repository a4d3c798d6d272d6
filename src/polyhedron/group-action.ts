import type { PlaneSet, PlaneSymmetry } from './planes.ts';

/** What a point group does to planes and to the faces that are cut for all others. Without a group: nothing. */
export class GroupAction {
  /** The planes that are cut: the first of each form, or all of them where there is no group. */
  readonly first: Int32Array;
  private readonly form: Int32Array;
  private readonly symmetry: PlaneSymmetry | undefined;

  constructor({ form, offsets, symmetry }: PlaneSet) {
    this.form = form;
    this.symmetry = symmetry;
    this.first = new Int32Array(symmetry ? offsets.length : form.length);
    for (let p = form.length - 1; p >= 0; p--) this.first[symmetry ? form[p]! : p] = p;
  }

  /** The number of a plane's face among those that are cut. */
  slot(plane: number): number {
    return this.symmetry ? this.form[plane]! : plane;
  }

  /** The plane to which an operation takes a plane. */
  carry(operation: number, plane: number): number {
    const { symmetry, form } = this;
    if (!symmetry) return plane;
    return symmetry.image[form[plane]!]![symmetry.product[operation * symmetry.order + symmetry.carrier[plane]!]!]!;
  }

  /** Operations that take a plane to the first one of its form. */
  toFirst(plane: number): readonly number[] {
    const { symmetry, form } = this;
    if (!symmetry) return NOTHING_ELSE;
    const { order, product, carrier, image } = symmetry;
    const first = this.first[form[plane]!]!;
    const found: number[] = [];
    for (let operation = 0; operation < order; operation++)
      if (image[form[plane]!]![product[operation * order + carrier[plane]!]!] === first) found.push(operation);
    return found;
  }
}

/** The identity, where there is no group. */
const NOTHING_ELSE: readonly number[] = [0];
