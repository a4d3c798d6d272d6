import { type Zone, zone } from '../crystal/spaces.ts';
import { type Measures, measure } from '../polyhedron/measures.ts';
import { openDirections } from '../polyhedron/open.ts';
import { intersect, type Solid } from '../polyhedron/solid.ts';
import type { Crystal } from '../recipe/crystal.ts';
import { planesOf } from './planes.ts';

/** The shape of a crystal: the solid that its faces enclose, in the recipe's own unit of length. */
export interface Shape {
  readonly crystal: Crystal;
  readonly solid: Solid;
  /** Null when the faces do not close. */
  readonly measures: Measures | null;
  /** Directions along which the faces leave the crystal open; empty when they close. */
  readonly openAlong: readonly Zone[];
}

/** A shape whose faces close. */
export interface ClosedShape extends Shape {
  readonly measures: Measures;
}

/** Runs the kernel on a resolved crystal. Open combinations are no error here; see `openAlong`. */
export function polyhedron(crystal: Crystal): Shape {
  const solid = intersect(planesOf(crystal));
  const closed = solid.state === 'bounded';
  return {
    crystal,
    solid,
    measures: closed ? measure(solid, crystal.metric.frame.flat()) : null,
    openAlong: closed ? [] : openDirections(solid.planes.normals).map(([u, v, w]) => zone(u, v, w)),
  };
}

export const isClosed = (shape: Shape): shape is ClosedShape => shape.measures !== null;
