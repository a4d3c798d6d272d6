import { centroid } from '../polyhedron/polygon.ts';
import { boundsOf, extentOf, signedArea } from './project.ts';
import type { Point } from './vector.ts';

/** Width and height of a label set in a type of size 1. */
export interface LabelBox {
  readonly width: number;
  readonly height: number;
}

export interface LabelPlace {
  readonly centre: Point;
  /** The largest type size at which the label fits there, at most the one asked for. */
  readonly size: number;
}

/** A straight line with `x·nx + y·ny + shift` growing into the room that is left for the label. */
export type HalfPlane = readonly [nx: number, ny: number, shift: number];

/** Share of the best size that a label may give up to stand nearer to the middle of its face. */
const PULL_TO_MIDDLE = 0.25;
/** Free room about a label that is still worth having, as a multiple of the room that it needs. */
const COMFORT = 1.5;
/** Sides shorter than this, pixels, are rounding: their direction means nothing. */
const SHORTEST = 1e-6;
const GRID = 14;
const REFINEMENTS = 14;

/** Where a label fits best when it may lie askew. */
export interface TurnedPlace extends LabelPlace {
  /** Of its line on the page, degrees, positive clockwise; 0 for one that stands level. */
  readonly turn: number;
}

/** A level label smaller than this share of the type size asked for may be turned along a side of the face … */
const POOR = 0.75;
/** … where it can be larger by this factor. */
const GAIN = 1.3;

/** As `placeLabel`, level where that serves, else along one of the face's sides. */
export function placeLabelTurned(
  face: readonly Point[],
  box: LabelBox,
  obstacles: readonly (readonly Point[])[],
  enough: number,
): TurnedPlace {
  const level: TurnedPlace = { ...placeLabel(face, box, obstacles, enough), turn: 0 };
  if (level.size >= POOR * enough) return level;
  let best: TurnedPlace | null = null;
  for (const turn of directions(face)) {
    const back = turned(-turn);
    const spot = placeLabel(
      face.map(back),
      box,
      obstacles.map((obstacle) => obstacle.map(back)),
      enough,
    );
    if (spot.size > (best?.size ?? 0)) best = { size: spot.size, centre: turned(turn)(spot.centre), turn };
  }
  return best && best.size >= GAIN * level.size ? best : level;
}

/** Turns of the page by an angle in degrees, positive clockwise because y points down. */
export function turned(degrees: number): (point: Point) => Point {
  const [cos, sin] = [Math.cos((degrees * Math.PI) / 180), Math.sin((degrees * Math.PI) / 180)];
  return ([x, y]) => [x * cos - y * sin, x * sin + y * cos];
}

/** Directions of a polygon's sides between −90° and 90°, so that nothing along them stands on its head. */
function directions(polygon: readonly Point[]): number[] {
  const angles = polygon.flatMap(([x, y], i) => {
    const [nextX, nextY] = polygon[(i + 1) % polygon.length]!;
    const [dx, dy] = [nextX - x, nextY - y];
    if (Math.hypot(dx, dy) < SHORTEST) return [];
    return [Math.atan(dy / dx) * (180 / Math.PI)];
  });
  return [...new Set(angles.map((angle) => Math.round(angle)))];
}

/**
 * Where a label fits best in a convex face, clear of convex obstacles, as in finding a polygon's pole of
 * inaccessibility but for a box instead of a circle: a grid of trials, refined about the best.
 * @param enough no larger type size is of use
 */
export function placeLabel(
  face: readonly Point[],
  { width, height }: LabelBox,
  obstacles: readonly (readonly Point[])[],
  enough: number,
): LabelPlace {
  const inside = inwardLines(face);
  const around = obstacles.filter((obstacle) => boundsOverlap(obstacle, face)).map(outwardLines);
  /** Type size at which the box about (x, y) just touches the line; boxes are measured along the line's normal. */
  const sizeAt = ([x, y]: Point, [nx, ny, shift]: HalfPlane): number =>
    (x * nx + y * ny + shift) / ((Math.abs(nx) * width + Math.abs(ny) * height) / 2);
  const room = (p: Point): number =>
    Math.min(
      ...inside.map((line) => sizeAt(p, line)),
      // Two convex shapes are apart when a side of one of them separates them.
      ...around.map((lines) => Math.max(...lines.map((line) => sizeAt(p, line)))),
    );
  const middle = centroid(face);
  const bounds = boundsOf(face);
  const extent = extentOf(bounds);
  const across = Math.hypot(extent.width, extent.height);
  const worth = (p: Point): number =>
    Math.min(room(p), COMFORT * enough) *
    (1 - (PULL_TO_MIDDLE * Math.hypot(p[0] - middle[0], p[1] - middle[1])) / across);

  let best = middle;
  const consider = (p: Point): void => {
    if (worth(p) > worth(best)) best = p;
  };
  for (let i = 1; i < GRID; i++)
    for (let j = 1; j < GRID; j++)
      consider([bounds.low[0] + (extent.width * i) / GRID, bounds.low[1] + (extent.height * j) / GRID]);
  for (let step = 0.5 / GRID, round = 0; round < REFINEMENTS; round++, step *= 0.7) {
    const [x, y] = best;
    for (const dx of [-1, 0, 1])
      for (const dy of [-1, 0, 1]) consider([x + dx * step * extent.width, y + dy * step * extent.height]);
  }
  return { centre: best, size: Math.max(0, Math.min(room(best), enough)) };
}

/** Whether two polygons might meet. */
function boundsOverlap(a: readonly Point[], b: readonly Point[]): boolean {
  const [p, q] = [boundsOf(a), boundsOf(b)];
  return [0, 1].every((axis) => p.low[axis]! <= q.high[axis]! && q.low[axis]! <= p.high[axis]!);
}

/** The sides of a convex polygon, positive inside. */
export function inwardLines(polygon: readonly Point[]): HalfPlane[] {
  const sense = Math.sign(signedArea(polygon));
  return polygon.flatMap(([x, y], i): HalfPlane[] => {
    const [nextX, nextY] = polygon[(i + 1) % polygon.length]!;
    const length = Math.hypot(nextX - x, nextY - y);
    if (length < SHORTEST) return [];
    const [nx, ny] = [(sense * (y - nextY)) / length, (sense * (nextX - x)) / length];
    return [[nx, ny, -(nx * x + ny * y)]];
  });
}

/** Lines that keep a box off a convex polygon, positive outside: its sides, and the sides that a box has. */
function outwardLines(polygon: readonly Point[]): HalfPlane[] {
  const { low, high } = boundsOf(polygon);
  return [
    ...inwardLines(polygon).map(([nx, ny, shift]): HalfPlane => [-nx, -ny, -shift]),
    [1, 0, -high[0]],
    [-1, 0, low[0]],
    [0, 1, -high[1]],
    [0, -1, low[1]],
  ];
}
