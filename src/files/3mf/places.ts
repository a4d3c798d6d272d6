import type { Mesh } from '../../print/mesh.ts';
import type { Point } from '../check/report.ts';

/** Millimetres between the boxes of neighbours: wider than a brim, and no slicer takes the parts for one object. */
const GAP = 8;

/**
 * Shifts that lay meshes out side by side without overlap in the positive octant, all standing on z = 0: in rows of
 * about the width that makes the whole square, deepest first. Millimetres.
 */
export function sideBySide(meshes: readonly Mesh[]): Point[] {
  const boxes = meshes.map(boxOf);
  const widths = boxes.map(({ low, high }) => high[0] - low[0] + GAP);
  const depths = boxes.map(({ low, high }) => high[1] - low[1] + GAP);
  const area = widths.reduce((sum, width, i) => sum + width * depths[i]!, 0);
  const row = Math.max(...widths, Math.sqrt(area) * 1.1);
  const order = meshes.map((_, i) => i).sort((i, j) => depths[j]! - depths[i]! || i - j);
  const shifts = new Array<Point>(meshes.length);
  let [x, y, depth] = [0, 0, 0];
  for (const i of order) {
    if (x + widths[i]! > row && x > 0) [x, y, depth] = [0, y + depth, 0];
    const { low } = boxes[i]!;
    shifts[i] = [roundUp(x - low[0]), roundUp(y - low[1]), roundUp(-low[2])];
    x += widths[i]!;
    depth = Math.max(depth, depths[i]!);
  }
  return shifts;
}

/** One shift for all, so that the whole stands in the positive octant and the parts keep their places. */
export function inPlace(meshes: readonly Mesh[]): Point[] {
  const boxes = meshes.map(boxOf);
  const shift = (axis: 0 | 1 | 2): number => roundUp(-Math.min(...boxes.map(({ low }) => low[axis])));
  const common: Point = [shift(0), shift(1), shift(2)];
  return meshes.map(() => common);
}

/** To whole micrometres, never below: what stands at 0 must not dip under it. */
const roundUp = (value: number): number => Math.ceil(value * 1000 - 1e-6) / 1000 + 0;

interface Box {
  readonly low: Point;
  readonly high: Point;
}

function boxOf({ positions }: Mesh): Box {
  const low: [number, number, number] = [Infinity, Infinity, Infinity];
  const high: [number, number, number] = [-Infinity, -Infinity, -Infinity];
  for (let i = 0; i < positions.length; i++) {
    const axis = (i % 3) as 0 | 1 | 2;
    low[axis] = Math.min(low[axis], positions[i]!);
    high[axis] = Math.max(high[axis], positions[i]!);
  }
  return { low, high };
}
