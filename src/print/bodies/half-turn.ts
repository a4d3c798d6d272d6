import { dot, minus, plus, times, type Vector } from '../vectors.ts';

/** Points nearer than this share of the whole count as one. */
const SAME = 1e-6;

/** Whether a set of points is the same after half a turn about a line. */
export function sameAfterHalfTurn(
  points: readonly Vector[],
  { through, along }: { readonly through: Vector; readonly along: Vector },
): boolean {
  const size = Math.max(...points.map((p) => Math.hypot(...minus(p, through))));
  return points.every((point) => {
    const from = minus(point, through);
    const turned = plus(through, minus(times(along, 2 * dot(from, along)), from));
    return points.some((other) => Math.hypot(...minus(other, turned)) < SAME * size);
  });
}
