import { reciprocalLength } from '../crystal/cell.ts';
import type { Miller } from '../crystal/spaces.ts';
import { exactOffsets } from '../polyhedron/offset.ts';
import { openDirections } from '../polyhedron/open.ts';
import { loosePlanes } from '../polyhedron/planes.ts';
import { intersect, type Solid } from '../polyhedron/solid.ts';
import type { Crystal } from '../recipe/crystal.ts';
import { planesOf } from './planes.ts';

/** Whether each form of a crystal shows at least one face. */
export function shownForms({ planes, start }: Solid): boolean[] {
  const shown = planes.offsets.map(() => false);
  planes.form.forEach((form, plane) => {
    if (start[plane] !== start[plane + 1]) shown[form] = true;
  });
  return shown;
}

/**
 * The distance at which a form vanishes: below it the form cuts the crystal that all other forms make, from it on it
 * does not. Null when no distance is too large, because the others leave the crystal open there.
 * The value is the support of the other forms in the face's direction (how far they reach along its normal).
 */
export function vanishesAt(crystal: Crystal, form: number): number | null {
  const others = { ...crystal, forms: crystal.forms.filter((_, f) => f !== form) };
  const { indices } = crystal.forms[form]!.form;
  const support = supportOf(others, indices);
  return support === null ? null : support / reciprocalLength(crystal.metric, indices);
}

/** The range of distances within which a form shows together with all others that show now. */
export interface DistanceRange {
  /** At this distance, or below, the form has swallowed another one; 0 when it never does. */
  readonly swallowsAt: number;
  /** From this distance on the form has vanished; null when it never does. */
  readonly vanishesAt: number | null;
}

const HALVINGS = 48;

/**
 * The range between swallowing another form and vanishing. A form that only shows farther in starts from there. The
 * lower end is found by halving on the exact kernel, to a relative 1e-12.
 */
export function distanceRange(crystal: Crystal, form: number): DistanceRange {
  const end = vanishesAt(crystal, form);
  const at = (distance: number): boolean[] =>
    shownForms(
      intersect(planesOf({ ...crystal, forms: crystal.forms.with(form, { ...crystal.forms[form]!, distance }) })),
    );
  const start = Math.min(crystal.forms[form]!.distance, end ?? Number.POSITIVE_INFINITY);
  const others = at(start);
  const allShow = (distance: number): boolean => at(distance).every((shown, f) => f === form || shown || !others[f]);
  let [low, high] = [0, start];
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (low + high) / 2;
    if (allShow(middle)) high = middle;
    else low = middle;
  }
  return { swallowsAt: high < start * 2 ** (1 - HALVINGS) ? 0 : high, vanishesAt: end };
}

/** Largest h·x over a crystal, which may be open in other directions; null when it is open in this one. */
function supportOf(crystal: Crystal, h: Miller): number | null {
  if (crystal.forms.length === 0) return null;
  const planes = planesOf(crystal);
  const solid = intersect(planes);
  if (solid.state === 'bounded') return largest(solid.vertices, h);
  const open = openDirections(planes.normals);
  if (open.some((ray) => dot(ray, 0, h) > 0)) return null;
  return largest(closedFarAway(crystal), h);
}

/**
 * Vertices of an open crystal after faces so far out that they change no corner of it: no coordinate of a true corner
 * exceeds 6·H²·D for whole normals up to H (Cramer's rule), and the six faces of a box stand beyond that.
 */
function closedFarAway(crystal: Crystal): Float64Array {
  const { normals, form, offsets } = planesOf(crystal);
  const distances = Array.from(form, (f) => offsets[f]!.approximate);
  const largestIndex = normals.reduce((most, value) => Math.max(most, Math.abs(value)), 1);
  const reach = 12 * largestIndex ** 2 * Math.max(...distances);
  const box = [1, 0, 0, 0, 1, 0, 0, 0, 1, -1, 0, 0, 0, -1, 0, 0, 0, -1];
  const offsetsWithBox = exactOffsets([...distances, ...Array<number>(6).fill(reach)]);
  return intersect(loosePlanes(Float64Array.from([...normals, ...box]), offsetsWithBox)).vertices;
}

function largest(points: Float64Array, h: Miller): number {
  let most = Number.NEGATIVE_INFINITY;
  for (let at = 0; at < points.length; at += 3) most = Math.max(most, dot(points, at, h));
  return most;
}

const dot = (v: ArrayLike<number>, at: number, h: Miller): number =>
  v[at]! * h[0] + v[at + 1]! * h[1] + v[at + 2]! * h[2];
