import { integers, withRoom } from '../exact/room.ts';
import type { PlaneSet, PlaneSymmetry } from '../planes.ts';

const NO_GROUP: PlaneSymmetry = {
  order: 0,
  product: new Uint8Array(0),
  improper: new Uint8Array(0),
  matrices: new Int8Array(0),
  image: [],
  carrier: new Uint8Array(0),
};

/** What a point group does to planes. */
export class GroupAction {
  symmetry = NO_GROUP;
  /** The form of each plane. */
  form: Int32Array = integers(0);
  /** How many forms there are, and the first plane of each. */
  forms = 0;
  first = integers(64);
  private readonly found: number[] = [];

  load({ form, offsets }: PlaneSet, symmetry: PlaneSymmetry): void {
    this.symmetry = symmetry;
    this.form = form;
    this.forms = offsets.length;
    this.first = withRoom(this.first, this.forms, integers);
    for (let p = form.length - 1; p >= 0; p--) this.first[form[p]!] = p;
  }

  /** The plane to which an operation takes a plane; the frame around them stays what it is. */
  carry(operation: number, plane: number): number {
    const { symmetry, form } = this;
    if (plane >= form.length) return plane;
    return symmetry.image[form[plane]!]![symmetry.product[operation * symmetry.order + symmetry.carrier[plane]!]!]!;
  }

  /** Operations that take a plane to the first one of its form. The list is good until the next question. */
  toFirst(plane: number): readonly number[] {
    const { symmetry, form, found } = this;
    const { order, product } = symmetry;
    const image = symmetry.image[form[plane]!]!;
    const carrier = symmetry.carrier[plane]!;
    const first = this.first[form[plane]!]!;
    found.length = 0;
    for (let operation = 0; operation < order; operation++)
      if (image[product[operation * order + carrier]!] === first) found.push(operation);
    return found;
  }
}
