import type { Manifold } from 'manifold-3d';
import { hullOf } from '../handling/hull.ts';
import type { Workbench } from '../kit.ts';
import { type Mesh, meshVolume } from '../mesh.ts';
import { cross, dot, length, minus, plus, times, unit, type Vector, vectorAt } from '../vectors.ts';

export const CONVEX_WIDTH = 'smallest width of a convex body';
const RAYS = 'rays from the middles of triangles';

export interface Thickness {
  /** Millimetres. */
  readonly thinnest: number;
  readonly how: typeof CONVEX_WIDTH | typeof RAYS;
}

/** Relative difference in volume to the convex hull within which a body counts as convex. */
const CONVEX = 1e-4;
const MOST_RAYS = 1500;
/** Only a wall whose other side faces back within 60° counts: towards its edge every wedge is thin. */
const FACING = -0.5;

/**
 * The thinnest place of a part: of a convex body its smallest width, else the shortest way through, by rays from the
 * middles of its triangles straight inwards; when there are very many, evenly chosen ones.
 * @param fine number of a surface of strokes, from which no rays start
 */
export function thinnestWall(bench: Workbench, mesh: Mesh, fine?: number): Thickness {
  const hull = hullOf(bench, mesh);
  if (meshVolume(mesh) > (1 - CONVEX) * meshVolume(hull)) return { thinnest: smallestWidth(hull), how: CONVEX_WIDTH };
  const solid = bench.solid({ positions: mesh.positions, triangles: mesh.triangles });
  const lengths = rays(mesh, fine).map(({ from, inwards }) => wayThrough(solid, from, inwards));
  const thinnest = lengths.reduce((least, length) => Math.min(least, length), Number.POSITIVE_INFINITY);
  return Number.isFinite(thinnest) ? { thinnest, how: RAYS } : { thinnest: smallestWidth(hull), how: CONVEX_WIDTH };
}

/**
 * Least distance between two parallel planes that hold a hull: both touch it in a facet and a corner, or in an edge
 * each (Houle and Toussaint 1988). Of hulls with very many corners, which are round, the largest triangles alone are
 * tried.
 */
function smallestWidth({ positions, triangles }: Mesh): number {
  const round = positions.length > 3 * MOST_CORNERS;
  const [normals, sides]: [Vector[], Vector[]] = [[], []];
  for (let t = 0; t < triangles.length; t += 3) {
    const [a, b, c] = [triangles[t]!, triangles[t + 1]!, triangles[t + 2]!].map((vertex) =>
      vectorAt(positions, vertex),
    );
    const normal = cross(minus(b!, a!), minus(c!, a!));
    if (length(normal) < SLIVER) continue;
    if (round) normals.push(normal);
    else {
      addDirection(normals, normal);
      for (const side of [minus(b!, a!), minus(c!, b!), minus(a!, c!)]) addDirection(sides, side);
    }
  }
  const large = round ? normals.sort((a, b) => length(b) - length(a)).slice(0, MOST_CORNERS) : normals;
  const between = sides.flatMap((one, i) => sides.slice(i + 1).map((other) => cross(one, other)));
  return [...large, ...between.filter((one) => length(one) > PARALLEL)]
    .map(unit)
    .reduce((least, direction) => Math.min(least, widthAlong(positions, direction)), Number.POSITIVE_INFINITY);
}

const MOST_CORNERS = 100;
/** Sine of the angle below which two sides have no common normal to speak of. */
const PARALLEL = 1e-3;

function addDirection(known: Vector[], direction: Vector): void {
  const one = unit(direction);
  if (!known.some((other) => Math.abs(dot(one, other)) > ALIKE)) known.push(one);
}

function widthAlong(positions: Float64Array, direction: Vector): number {
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (let v = 0; 3 * v < positions.length; v++) {
    const along = dot(vectorAt(positions, v), direction);
    [low, high] = [Math.min(low, along), Math.max(high, along)];
  }
  return high - low;
}

/** Twice the area, mm², below which single precision does not tell a triangle's direction. */
const SLIVER = 1e-4;
const ALIKE = 1 - 1e-6;

function rays({ positions, triangles, surface }: Mesh, fine?: number): { from: Vector; inwards: Vector }[] {
  const all: { from: Vector; inwards: Vector }[] = [];
  const count = triangles.length / 3;
  const every = Math.max(1, count / MOST_RAYS);
  for (let place = 0; place < count; place += every) {
    const t = 3 * Math.floor(place);
    if (fine !== undefined && surface?.[t / 3] === fine) continue;
    const [a, b, c] = [triangles[t]!, triangles[t + 1]!, triangles[t + 2]!].map((vertex) =>
      vectorAt(positions, vertex),
    );
    const normal = cross(minus(b!, a!), minus(c!, a!));
    const size = length(normal);
    if (size < SLIVER) continue;
    all.push({ from: times(plus(plus(a!, b!), c!), 1 / 3), inwards: times(normal, -1 / size) });
  }
  return all;
}

/** Millimetres; a ray starts this far inside, so as not to meet the triangle that it comes from. */
const START = 1e-3;
const FAR = 1e4;

function wayThrough(solid: Manifold, from: Vector, inwards: Vector): number {
  const start = plus(from, inwards, START);
  const [first] = solid.rayCast([...start], [...plus(from, inwards, FAR)]);
  if (!first || -dot(inwards, first.normal) > FACING) return Number.POSITIVE_INFINITY;
  return length(minus(first.position, from));
}
