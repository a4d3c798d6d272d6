import type { Mesh } from '../../print/mesh.ts';
import { visitOverlaps } from '../mesh/box-pairs.ts';
import { endOf, startOf, triangleOf } from '../mesh/half-edges.ts';
import { Findings, pointOf } from './findings.ts';
import type { Point } from './report.ts';

/**
 * A vertex counts as lying on an edge when it is no farther off than this many float32 steps at the mesh's greatest
 * coordinate: rounding moves each of the three points by half a step along each axis.
 */
const T_JUNCTION_STEPS = 2;
/** One step of float32 relative to the number, at most. */
const FLOAT32_STEP = 2 ** -23;

/**
 * Ends of open edges that lie within another open edge: the meeting that the format's vertex-to-vertex rule forbids
 * (M. Burns, Automated Fabrication, section 6.5: a vertex of one triangle cannot lie on the side of another).
 * @param openHalfEdges as `examineEdges` found them.
 * @param same for each vertex the first one at its place.
 */
export function findJunctions(mesh: Mesh, openHalfEdges: readonly number[], same: Uint32Array): Findings {
  const found = new Findings();
  const greatest = mesh.positions.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  const reach = T_JUNCTION_STEPS * FLOAT32_STEP * greatest;
  const told = new Set<number>();
  const look = (h: number, edge: number): void => {
    for (const vertex of [startOf(mesh, h), endOf(mesh, h)]) {
      if (told.has(same[vertex]!)) continue;
      const [a, b] = [pointOf(mesh, startOf(mesh, edge)), pointOf(mesh, endOf(mesh, edge))];
      const point = pointOf(mesh, vertex);
      if (!liesWithin(point, a, b, reach)) continue;
      told.add(same[vertex]!);
      found.add(() => ({ points: [point, a, b], triangles: [triangleOf(h), triangleOf(edge)] }));
    }
  };
  visitOverlaps(boxesOf(mesh, openHalfEdges, reach), (i, j) => {
    look(openHalfEdges[i]!, openHalfEdges[j]!);
    look(openHalfEdges[j]!, openHalfEdges[i]!);
    return true;
  });
  return found;
}

/** Whether the point lies on the segment from a to b, but not at its ends, give or take `reach`. */
function liesWithin(point: Point, a: Point, b: Point, reach: number): boolean {
  const along = [b[0] - a[0], b[1] - a[1], b[2] - a[2]] as const;
  const from = [point[0] - a[0], point[1] - a[1], point[2] - a[2]] as const;
  const length = Math.hypot(...along);
  if (length <= 2 * reach) return false;
  const run = (along[0] * from[0] + along[1] * from[1] + along[2] * from[2]) / length;
  if (run <= reach || run >= length - reach) return false;
  const part = run / length;
  return Math.hypot(from[0] - part * along[0], from[1] - part * along[1], from[2] - part * along[2]) <= reach;
}

function boxesOf(mesh: Mesh, halfEdges: readonly number[], reach: number): Float64Array {
  const boxes = new Float64Array(6 * halfEdges.length);
  for (let i = 0; i < halfEdges.length; i++) {
    const [a, b] = [pointOf(mesh, startOf(mesh, halfEdges[i]!)), pointOf(mesh, endOf(mesh, halfEdges[i]!))];
    for (let axis = 0; axis < 3; axis++) {
      boxes[6 * i + axis] = Math.min(a[axis]!, b[axis]!) - reach;
      boxes[6 * i + axis + 3] = Math.max(a[axis]!, b[axis]!) + reach;
    }
  }
  return boxes;
}
