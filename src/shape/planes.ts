import { reciprocalLength } from '../crystal/cell.ts';
import type { PointGroup } from '../crystal/point-group.ts';
import { commensurateOffsets } from '../polyhedron/offset.ts';
import type { PlaneSet, PlaneSymmetry } from '../polyhedron/planes.ts';
import type { Crystal } from '../recipe/crystal.ts';

/**
 * The faces of a crystal as half-spaces `h·x ≤ D` in cell coordinates, `D = d·|h|*`, with the point group's action on
 * them. Offsets whose ratio is that of small whole numbers are made exactly so.
 */
export function planesOf({ group, metric, forms }: Crystal): PlaneSet {
  const offsets = commensurateOffsets(
    forms.map(({ form, distance }) => distance * reciprocalLength(metric, form.indices)),
  );
  const first: number[] = [];
  let count = 0;
  for (const { form } of forms) {
    first.push(count);
    count += form.multiplicity;
  }
  const normals = new Float64Array(3 * count);
  const ofForm = new Int32Array(count);
  const carrier = new Uint8Array(count);
  const image = forms.map(({ form }, f) => {
    const start = first[f]!;
    normals.set(form.faces.flat(), 3 * start);
    ofForm.fill(f, start, start + form.multiplicity);
    carrier.set(form.carrier, start);
    return form.imageOf.map((face) => start + face);
  });
  return { normals, form: ofForm, offsets, symmetry: { ...groupAction(group), image, carrier } };
}

const actions = new WeakMap<PointGroup, Omit<PlaneSymmetry, 'image' | 'carrier'>>();

function groupAction(group: PointGroup): Omit<PlaneSymmetry, 'image' | 'carrier'> {
  const known = actions.get(group);
  if (known) return known;
  const action = {
    order: group.order,
    product: group.product,
    improper: Uint8Array.from(group.operations, ({ improper }) => Number(improper)),
    matrices: Int8Array.from(group.operations.flatMap(({ matrix }) => matrix.flat())),
  };
  actions.set(group, action);
  return action;
}
