import { fitRectangle, type Point } from '../handling/rectangle-fit.ts';
import type { Mesh } from '../mesh.ts';

/** How a part goes onto a bed. */
export interface BedFit {
  /** Which of its own axes stands upright: 2 as it lies, 0 or 1 turned onto its side. */
  readonly upright: 0 | 1 | 2;
  /** Turn about the upright axis, degrees in [0, 180). */
  readonly turn: number;
}

/** Tries a part as it lies, and turned by right angles, with any turn on the bed; null when nothing fits. */
export function fitOnBed(
  { positions }: Mesh,
  [width, depth, height]: readonly [number, number, number],
): BedFit | null {
  const sides = [
    [2, 0, 1],
    [0, 1, 2],
    [1, 2, 0],
  ] as const;
  for (const [upright, across, along] of sides) {
    let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
    const points: Point[] = [];
    for (let v = 0; v < positions.length; v += 3) {
      const z = positions[v + upright]!;
      [low, high] = [Math.min(low, z), Math.max(high, z)];
      points.push([positions[v + across]!, positions[v + along]!]);
    }
    if (high - low > height * (1 + ROUNDING)) continue;
    const extent = (axis: 0 | 1): number =>
      points.reduce((most, point) => Math.max(most, point[axis]), Number.NEGATIVE_INFINITY) -
      points.reduce((least, point) => Math.min(least, point[axis]), Number.POSITIVE_INFINITY);
    if (extent(0) <= width && extent(1) <= depth) return { upright, turn: 0 };
    const { factor, turn } = fitRectangle(points, [width, depth]);
    if (factor <= 1 + ROUNDING) return { upright, turn: (turn * 180) / Math.PI };
  }
  return null;
}

/** Relative. */
const ROUNDING = 1e-9;
