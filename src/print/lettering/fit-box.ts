import { centroid } from '../../polyhedron/polygon.ts';
import { type Box, BoxRoom, type Disc, type Side } from './box-room.ts';
import type { Point } from './field.ts';

export interface Spot {
  readonly centre: Point;
  /** Largest size of a box, as a multiple of the one given, about that centre; not positive where nothing fits. */
  readonly size: number;
}

/** Sizes that are of use. */
export interface Wanted {
  readonly least: number;
  readonly enough: number;
}

const GRID = 16;
const SEEDS = 3;
const FINEST = 1e-4;
/** Relative gain below which a step is rounding, along a crest that is level for instance. */
const GAIN = 1e-6;
/** Share of the best size that a place nearer to the middle must keep, and how many places are tried. */
const STAYS = 0.96;
const STEPS = 32;
const AROUND = Array.from({ length: 16 }, (_, i): Point => {
  const angle = (i * Math.PI) / 8;
  return [Math.cos(angle), Math.sin(angle)];
});

/** The sides of a convex polygon that runs counter-clockwise. */
export function sidesOf(polygon: readonly Point[]): Side[] {
  return polygon.flatMap(([x, y], i): Side[] => {
    const [tx, ty] = polygon[(i + 1) % polygon.length]!;
    const length = Math.hypot(tx - x, ty - y);
    if (length === 0) return [];
    const [nx, ny] = [(y - ty) / length, (tx - x) / length];
    return [{ nx, ny, room: -(nx * x + ny * y) }];
  });
}

/**
 * The largest box of given proportions within all sides and clear of all discs. A grid of trials finds the hill where
 * discs part the field, small steps climb it, and from there the box goes back to the middle of the polygon as far as it
 * stays about as large.
 * @param wanted no size below `least` is of use, and none above `enough`
 */
export function fitBox(
  polygon: readonly Point[],
  sides: readonly Side[],
  discs: readonly Disc[],
  box: Box,
  { least, enough }: Wanted,
): Spot {
  const room = new BoxRoom(sides, discs, box);
  const [xs, ys] = [polygon.map(([x]) => x), polygon.map(([, y]) => y)];
  const [left, bottom] = [Math.min(...xs), Math.min(...ys)];
  const [width, height] = [Math.max(...xs) - left, Math.max(...ys) - bottom];
  const best = Array.from({ length: GRID * GRID }, (_, i): Spot => {
    const [column, row] = [(i % GRID) + 0.5, Math.floor(i / GRID) + 0.5];
    const centre: Point = [left + (width * column) / GRID, bottom + (height * row) / GRID];
    return { centre, size: room.sizeAt(centre) };
  })
    .sort((a, b) => b.size - a.size)
    .slice(0, SEEDS)
    .map((seed) => climb(seed, room, Math.max(width, height) / GRID))
    .reduce(larger);
  const large = Math.max(STAYS * best.size, Math.min(least, best.size));
  return towards(centroid(polygon), best, room, Math.min(enough, large));
}

const larger = (one: Spot, other: Spot): Spot => (other.size > one.size ? other : one);

function climb(seed: Spot, room: BoxRoom, firstStep: number): Spot {
  let best = seed;
  for (let step = firstStep; step > FINEST * firstStep; ) {
    const [x, y] = best.centre;
    const trials = [...AROUND, ...room.crestAt(best.centre)].map(([dx, dy]): Spot => {
      const centre: Point = [x + step * dx, y + step * dy];
      return { centre, size: room.sizeAt(centre) };
    });
    const better = trials.reduce(larger, best);
    if (better.size - best.size > GAIN * Math.abs(best.size)) best = better;
    else step /= 2;
  }
  return best;
}

/** The place nearest to the middle, on the line from it to the best, where the box is large enough. */
function towards(middle: Point, best: Spot, room: BoxRoom, enough: number): Spot {
  for (let i = 0; i < STEPS; i++) {
    const t = i / STEPS;
    const centre: Point = [middle[0] + t * (best.centre[0] - middle[0]), middle[1] + t * (best.centre[1] - middle[1])];
    const size = room.sizeAt(centre);
    if (size >= enough) return { centre, size };
  }
  return best;
}
