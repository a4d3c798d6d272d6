import type { Mesh } from '../../print/mesh.ts';
import { visitOverlaps } from '../mesh/box-pairs.ts';
import { type Corners, trianglesMeet } from '../mesh/triangle-meet.ts';
import { Findings } from './findings.ts';
import type { Point } from './report.ts';

/** Counting stops here: a mesh that lies on itself everywhere has more pairs than anyone wants to wait for. */
export const MOST_TOUCHING = 100_000;

export interface TouchingFacts {
  readonly touching: Findings;
  /** False when counting stopped. */
  readonly counted: boolean;
}

/**
 * Pairs of triangles that meet otherwise than in common corners or a common edge. Exact.
 * @param same for each vertex the first one at its place; corners at one place count as common.
 * @param flat 1 for triangles without area, which are left out, as are pairs on the same three points.
 */
export function findTouching(mesh: Mesh, same: Uint32Array, flat: Uint8Array): TouchingFacts {
  const solid = Uint32Array.from({ length: flat.length }, (_, t) => t).filter((t) => flat[t] === 0);
  const boxes = boxesOf(mesh, solid);
  const touching = new Findings();
  const corners = Array.from(
    solid,
    (t): Corners => [
      same[mesh.triangles[3 * t]!]!,
      same[mesh.triangles[3 * t + 1]!]!,
      same[mesh.triangles[3 * t + 2]!]!,
    ],
  );
  visitOverlaps(boxes, (i, j) => {
    if (!trianglesMeet(mesh.positions, corners[i]!, corners[j]!)) return true;
    const triangles = [solid[i]!, solid[j]!].sort((a, b) => a - b);
    touching.add(() => ({ points: [middleOfOverlap(boxes, i, j)], triangles }));
    return touching.count < MOST_TOUCHING;
  });
  return { touching, counted: touching.count < MOST_TOUCHING };
}

function boxesOf({ positions, triangles }: Mesh, chosen: Uint32Array): Float64Array {
  const boxes = new Float64Array(6 * chosen.length);
  for (let i = 0; i < chosen.length; i++) {
    for (let axis = 0; axis < 3; axis++) {
      const a = positions[3 * triangles[3 * chosen[i]!]! + axis]!;
      const b = positions[3 * triangles[3 * chosen[i]! + 1]! + axis]!;
      const c = positions[3 * triangles[3 * chosen[i]! + 2]! + axis]!;
      boxes[6 * i + axis] = Math.min(a, b, c);
      boxes[6 * i + axis + 3] = Math.max(a, b, c);
    }
  }
  return boxes;
}

/** What two triangles have in common lies in what their boxes have in common. */
function middleOfOverlap(boxes: Float64Array, i: number, j: number): Point {
  const middle = (axis: number): number => {
    const from = Math.max(boxes[6 * i + axis]!, boxes[6 * j + axis]!);
    const to = Math.min(boxes[6 * i + axis + 3]!, boxes[6 * j + axis + 3]!);
    return (from + to) / 2;
  };
  return [middle(0), middle(1), middle(2)];
}
