import { length, minus, plus, times, unit, type Vector, vectorAt } from '../vectors.ts';

/**
 * For each corner of a convex solid the direction in which it points: the sum of its faces' normals, each weighted by
 * the face's angle at the corner. It leans towards no face and away from every edge (Bærentzen and Aanæs 2005, "Signed
 * distance computation using the angle weighted pseudonormal"), and keeps the corner's symmetry.
 */
export function cornerAxes(
  { positions, normals }: { readonly positions: Float64Array; readonly normals: Float64Array },
  { start, corner }: { readonly start: Int32Array; readonly corner: Int32Array },
): Vector[] {
  const sums: Vector[] = Array.from({ length: positions.length / 3 }, () => [0, 0, 0]);
  for (let face = 0; face + 1 < start.length; face++) {
    const [from, to] = [start[face]!, start[face + 1]!];
    for (let edge = from; edge < to; edge++) {
      const vertex = corner[edge]!;
      const before = corner[edge === from ? to - 1 : edge - 1]!;
      const after = corner[edge + 1 === to ? from : edge + 1]!;
      const angle = opening(vectorAt(positions, before), vectorAt(positions, vertex), vectorAt(positions, after));
      sums[vertex] = plus(sums[vertex]!, vectorAt(normals, face), angle);
    }
  }
  return sums.map(unit);
}

function opening(before: Vector, vertex: Vector, after: Vector): number {
  const [a, b] = [minus(before, vertex), minus(after, vertex)];
  const [p, q] = [times(a, length(b)), times(b, length(a))];
  return 2 * Math.atan2(length(minus(p, q)), length(plus(p, q)));
}
