import { dot, type Point, type Vector, vectorAt } from './vector.ts';
import type { ViewFrame } from './view.ts';

/** Orthographic projection onto the picture plane: to the right, upwards. */
export const project = ({ right, up }: ViewFrame, point: Vector): Point => [dot(right, point), dot(up, point)];

/** The same for points in one array, three numbers each. */
export const projectAll = (frame: ViewFrame, positions: ArrayLike<number>): Point[] =>
  Array.from({ length: positions.length / 3 }, (_, i) => project(frame, vectorAt(positions, i)));

/** Where the picture plane lies on the page: pixels for each unit, and the place of the crystal's centre. */
export interface Placement {
  readonly scale: number;
  readonly x: number;
  readonly y: number;
}

/** On the page y points down. */
export const place = ({ scale, x, y }: Placement, point: Point): Point => [x + scale * point[0], y - scale * point[1]];

export interface Bounds {
  readonly low: Point;
  readonly high: Point;
}

export function boundsOf(points: readonly Point[]): Bounds {
  let [left, bottom, right, top] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const [x, y] of points) {
    left = Math.min(left, x);
    right = Math.max(right, x);
    bottom = Math.min(bottom, y);
    top = Math.max(top, y);
  }
  return { low: [left, bottom], high: [right, top] };
}

export const extentOf = ({ low, high }: Bounds): { width: number; height: number } => ({
  width: high[0] - low[0],
  height: high[1] - low[1],
});

/** The largest placement that keeps `bounds` within a box of the page, in its middle. */
export function fitInto(
  bounds: Bounds,
  box: { readonly x: number; readonly y: number; readonly width: number; readonly height: number },
): Placement {
  const { low, high } = bounds;
  const { width, height } = extentOf(bounds);
  const scale = Math.min(box.width / width, box.height / height);
  return {
    scale,
    x: box.x + box.width / 2 - (scale * (low[0] + high[0])) / 2,
    y: box.y + box.height / 2 + (scale * (low[1] + high[1])) / 2,
  };
}

/** The area inside a polygon, positive when it runs counter-clockwise. */
export function signedArea(polygon: readonly Point[]): number {
  let twice = 0;
  for (const [i, [x, y]] of polygon.entries()) {
    const [nextX, nextY] = polygon[(i + 1) % polygon.length]!;
    twice += x * nextY - nextX * y;
  }
  return twice / 2;
}
