import type { PlaneSet, PlaneSymmetry } from './planes.ts';
import { integers, withRoom } from './room.ts';

/** The identity, where there is no group. */
const NOTHING_ELSE: readonly number[] = [0];

/** What a point group does to planes and to the faces that are cut for all others. Without a group: nothing. */
export class GroupAction {
  /** How many faces are cut: one a form, or all of them where there is no group. */
  slots = 0;
  /** The plane of each. */
  first = integers(64);
  private form: Int32Array = integers(0);
  private symmetry: PlaneSymmetry | undefined;
  private readonly found: number[] = [];

  load({ form, offsets, symmetry }: PlaneSet): void {
    this.form = form;
    this.symmetry = symmetry;
    this.slots = symmetry ? offsets.length : form.length;
    this.first = withRoom(this.first, this.slots, integers);
    for (let p = form.length - 1; p >= 0; p--) this.first[symmetry ? form[p]! : p] = p;
  }

  /** The number of a plane's face among those that are cut. */
  slot(plane: number): number {
    return this.symmetry ? this.form[plane]! : plane;
  }

  /** The plane to which an operation takes a plane; the frame around them stays what it is. */
  carry(operation: number, plane: number): number {
    const { symmetry, form } = this;
    if (!symmetry || plane >= form.length) return plane;
    return symmetry.image[form[plane]!]![symmetry.product[operation * symmetry.order + symmetry.carrier[plane]!]!]!;
  }

  isImproper(operation: number): boolean {
    return this.symmetry?.improper[operation] === 1;
  }

  /** Operations that take a plane to the first one of its form. The list is good until the next question. */
  toFirst(plane: number): readonly number[] {
    const { symmetry, form, found } = this;
    if (!symmetry) return NOTHING_ELSE;
    const { order, product, carrier } = symmetry;
    const image = symmetry.image[form[plane]!]!;
    const first = this.first[form[plane]!]!;
    found.length = 0;
    for (let operation = 0; operation < order; operation++)
      if (image[product[operation * order + carrier[plane]!]!] === first) found.push(operation);
    return found;
  }
}
