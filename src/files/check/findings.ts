import type { Mesh } from '../../print/mesh.ts';
import type { Finding, Place, Point } from './report.ts';

/** How many places a finding names. */
const NAMED = 5;

/** Counts a fault and keeps its first places. */
export class Findings implements Finding {
  count = 0;
  readonly first: Place[] = [];

  /** The place is only worked out if it is kept. */
  add(place: () => Place): void {
    this.count++;
    if (this.first.length < NAMED) this.first.push(place());
  }
}

/** The position of a vertex. */
export function pointOf({ positions }: Mesh, vertex: number): Point {
  return [positions[3 * vertex]!, positions[3 * vertex + 1]!, positions[3 * vertex + 2]!];
}

/** The three corners of a triangle as a place. */
export function placeOfTriangle(mesh: Mesh, triangle: number): Place {
  const corners = [...mesh.triangles.subarray(3 * triangle, 3 * triangle + 3)];
  return { points: corners.map((corner) => pointOf(mesh, corner)), triangles: [triangle] };
}
