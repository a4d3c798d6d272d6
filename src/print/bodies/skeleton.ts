import { edges } from '../../polyhedron/measures.ts';
import type { RodPlan } from '../../rods/plan.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { dot, length, minus, plus, times, unit, type Vector, vectorAt } from '../vectors.ts';

/** Corners and edges of a crystal at its size, millimetres. */
export interface Skeleton {
  readonly corners: readonly Vector[];
  readonly edges: readonly (readonly [Vector, Vector])[];
}

export function crystalSkeleton({ solid, measures }: ClosedShape, scale: number): Skeleton {
  const { positions } = measures;
  const corners = Array.from({ length: positions.length / 3 }, (_, v) => times(vectorAt(positions, v), scale));
  return { corners, edges: edges(solid, measures).map(({ vertices: [a, b] }) => [corners[a]!, corners[b]!] as const) };
}

/** Whether some rod runs into a strut, so that all rods, which meet at the centre, hang together with the frame. */
export function isHeld(skeleton: Skeleton, rods: RodPlan | null, strut: number): boolean {
  const reach = (strut + (rods?.diameter ?? 0)) / 4;
  return (rods?.ends ?? []).flat().some(({ end, exit }) => {
    const out = times(end.along, exit);
    return skeleton.edges.some(([a, b]) => distanceTo(out, a, b) < reach);
  });
}

function distanceTo(point: Vector, a: Vector, b: Vector): number {
  const edge = minus(b, a);
  const t = Math.min(1, Math.max(0, dot(minus(point, a), edge) / dot(edge, edge)));
  return length(minus(point, plus(a, times(edge, t))));
}

/**
 * Three corners to hold something at the centre from: the nearest one, and then those that point away from all chosen
 * so far as much as can be.
 */
export function stayTips(corners: readonly Vector[]): Vector[] {
  const nearest = corners.reduce((best, corner) => (length(corner) < length(best) * (1 - 1e-9) ? corner : best));
  const chosen = [nearest];
  while (chosen.length < 3) {
    const lean = (corner: Vector): number => Math.max(...chosen.map((tip) => dot(unit(tip), unit(corner))));
    chosen.push(corners.reduce((best, corner) => (lean(corner) < lean(best) - 1e-9 ? corner : best)));
  }
  return chosen;
}
