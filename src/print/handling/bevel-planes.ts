import { edges } from '../../polyhedron/measures.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { dot, plus, unit, type Vector, vectorAt } from '../vectors.ts';
import { cornerAxes } from './corner-axis.ts';

/** A plane that cuts an edge or a corner off: `normal · x ≤ distance`, millimetres, unit normal. */
export interface BevelPlane {
  readonly cuts: 'edge' | 'corner';
  readonly normal: Vector;
  readonly distance: number;
}

/**
 * The planes that blunt every edge and every corner of a crystal at its size.
 *
 * An edge of dihedral angle δ is cut across its bisector at depth `w / (2 tan(δ/2))`, where the wedge is `w` wide. A
 * corner is cut across its axis just so deep that a circle of diameter `w` about the axis lies in the facet: a line at
 * depth h below the corner, tilted so that its normal n has cosine c with the axis, is met at distance `(s c − h) /
 * √(1 − c²)` from the axis by a facet at depth s; the strips have their own h, the faces h = 0 (worked out by hand).
 * @param width of the strips, millimetres, positive
 */
export function bevelPlanes(shape: ClosedShape, scale: number, { width }: { readonly width: number }): BevelPlane[] {
  const { solid, measures } = shape;
  const { positions, normals } = measures;
  const axes = cornerAxes(measures, solid);
  const depth = new Float64Array(axes.length);
  const deepen = (vertex: number, normal: Vector, cut: number): void => {
    const cos = dot(normal, axes[vertex]!);
    const sin = Math.sqrt(Math.max(0, 1 - cos * cos));
    if (cos > 0) depth[vertex] = Math.max(depth[vertex]!, ((width / 2) * sin + cut) / cos);
  };
  for (let face = 0; face + 1 < solid.start.length; face++)
    for (let edge = solid.start[face]!; edge < solid.start[face + 1]!; edge++)
      deepen(solid.corner[edge]!, vectorAt(normals, face), 0);
  const strips = edges(solid, measures).map(({ faces, vertices, dihedral }): BevelPlane => {
    const normal = unit(plus(vectorAt(normals, faces[0]), vectorAt(normals, faces[1])));
    const cut = width / (2 * Math.tan((dihedral * Math.PI) / 360));
    for (const vertex of vertices) deepen(vertex, normal, cut);
    return { cuts: 'edge', normal, distance: scale * dot(normal, vectorAt(positions, vertices[0])) - cut };
  });
  const facets = axes.map((normal, vertex): BevelPlane => {
    const distance = scale * dot(normal, vectorAt(positions, vertex)) - ASIDE * depth[vertex]!;
    return { cuts: 'corner', normal, distance };
  });
  return [...strips, ...facets];
}

/**
 * A little deeper than need be, because at the least depth the facet of a regular corner (the octahedron's) passes
 * through the very points where two strips meet on a face, and rounding would leave edges of no length there.
 */
const ASIDE = 1.05;
