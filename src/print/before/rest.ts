import type { Mat4 } from 'manifold-3d';
import { convexHull, type Point } from '../../polyhedron/polygon.ts';
import { hullOf } from '../handling/hull.ts';
import type { Workbench } from '../kit.ts';
import type { Mesh } from '../mesh.ts';
import { across, cross, dot, length, minus, plus, times, unit, type Vector, vectorAt } from '../vectors.ts';
import { centreOfMass, surfaceArea } from './mass.ts';
import { overhangArea } from './overhang.ts';

/** How a part rests on the bed. Millimetres. */
export interface Resting {
  /** By columns, the fourth being the shift: takes the part onto the bed, into the positive octant. */
  readonly matrix: Mat4;
  /** The part so turned. */
  readonly mesh: Mesh;
  /** Area within the outline of what touches the bed. */
  readonly footprint: number;
  /** Least distance from the point below the centre of mass to that outline. */
  readonly margin: number;
  /** Angle by which it can be tilted before it falls over, degrees. */
  readonly tilt: number;
  /** Area that needs support. */
  readonly overhang: number;
}

/**
 * Lays a part on the face of its convex hull that leaves least overhang; among those alike within a hundredth of the
 * surface the one on which it stands most firmly, then the lowest, then the one that turns it least.
 * @param overhang angle from the vertical beyond which a face needs support, degrees
 */
export function restPart(bench: Workbench, mesh: Mesh, { overhang }: { readonly overhang: number }): Resting {
  const hull = hullOf(bench, mesh);
  const centre = centreOfMass(mesh);
  const facets = hullFacets(hull).sort((a, b) => b.area - a.area);
  const most = Math.max(...facets.map(({ area }) => area));
  const large = facets.filter(({ area }) => area >= SMALLEST_SHARE * most).slice(0, MOST_CANDIDATES);
  const stand = (some: readonly Facet[]): Standing[] =>
    some.map((facet) => standing(facet, hull, centre, mesh, overhang)).filter(({ margin }) => margin > 0);
  const firm = stand(large);
  const candidates = firm.length > 0 ? firm : stand(facets);
  const surface = surfaceArea(hull);
  const rank = ({ under, tilt, height, turned }: Standing): number[] => [
    Math.round((100 * under) / surface),
    -Math.round(tilt),
    Math.round(10 * height),
    -turned,
  ];
  const best = candidates.reduce((one, other) => (isBefore(rank(other), rank(one)) ? other : one));
  return laidDown(best, mesh);
}

/** Facets that are smaller than this share of the largest are no place to stand on. */
const SMALLEST_SHARE = 0.02;
const MOST_CANDIDATES = 60;

function isBefore(a: readonly number[], b: readonly number[]): boolean {
  const place = a.findIndex((value, i) => Math.abs(value - b[i]!) > 1e-6);
  return place >= 0 && a[place]! < b[place]!;
}

interface Facet {
  readonly normal: Vector;
  readonly corners: readonly Vector[];
  readonly area: number;
}

/** The flat faces of a hull: triangles whose normals agree are one facet. */
function hullFacets({ positions, triangles }: Mesh): Facet[] {
  const groups: { normal: Vector; sum: Vector; corners: Vector[] }[] = [];
  const found: { normal: Vector; area: Vector; corners: Vector[] }[] = [];
  for (let t = 0; t < triangles.length; t += 3) {
    const corners = [
      vectorAt(positions, triangles[t]!),
      vectorAt(positions, triangles[t + 1]!),
      vectorAt(positions, triangles[t + 2]!),
    ];
    const area = times(cross(minus(corners[1]!, corners[0]!), minus(corners[2]!, corners[0]!)), 0.5);
    if (length(area) > 0) found.push({ normal: unit(area), area, corners });
  }
  found.sort((a, b) => length(b.area) - length(a.area));
  for (const { normal, area, corners } of found) {
    const group = groups.find((one) => dot(one.normal, normal) > SAME_FACE);
    if (group) {
      group.sum = plus(group.sum, area);
      group.corners.push(...corners);
    } else if (length(area) > SEED_SHARE * length(found[0]!.area)) groups.push({ normal, sum: area, corners });
  }
  return groups.map(({ sum, corners }) => ({ normal: unit(sum), corners, area: length(sum) }));
}

/**
 * Facets without a triangle of this share of the largest, such as those of roundings, are no place to stand on
 * either.
 */
const SEED_SHARE = 1e-3;

/** Cosine of 0.06°: what single precision makes of one plane. */
const SAME_FACE = 1 - 5e-7;

interface Standing {
  readonly down: Vector;
  readonly level: number;
  readonly footprint: number;
  readonly margin: number;
  readonly tilt: number;
  readonly under: number;
  readonly height: number;
  /** Cosine between the direction that becomes "down" and the one that was. */
  readonly turned: number;
}

function standing(facet: Facet, hull: Mesh, centre: Vector, mesh: Mesh, overhang: number): Standing {
  const down = facet.normal;
  const [e, f] = across(down);
  const outline = convexHull(facet.corners.map((corner): Point => [dot(corner, e), dot(corner, f)]));
  const level = Math.max(...facet.corners.map((corner) => dot(corner, down)));
  const margin = marginInside(outline, [dot(centre, e), dot(centre, f)]);
  let lowest = Number.POSITIVE_INFINITY;
  for (let v = 0; 3 * v < hull.positions.length; v++) lowest = Math.min(lowest, dot(vectorAt(hull.positions, v), down));
  const above = level - dot(centre, down);
  return {
    down,
    level,
    footprint: facet.area,
    margin,
    tilt: (Math.atan2(margin, above) * 180) / Math.PI,
    under: overhangArea(mesh, down, level, overhang),
    height: level - lowest,
    turned: -down[2],
  };
}

/** Least distance from a point to the sides of a convex outline, negative outside. */
function marginInside(outline: readonly Point[], [x, y]: Point): number {
  if (outline.length < 3) return Number.NEGATIVE_INFINITY;
  return outline.reduce((least, [fromX, fromY], i) => {
    const [toX, toY] = outline[(i + 1) % outline.length]!;
    const side = (toX - fromX) * (y - fromY) - (toY - fromY) * (x - fromX);
    return Math.min(least, side / Math.hypot(toX - fromX, toY - fromY));
  }, Number.POSITIVE_INFINITY);
}

function laidDown({ down, footprint, margin, tilt, under }: Standing, mesh: Mesh): Resting {
  const rows = leastTurn(down);
  const low = [0, 1, 2].map(() => Number.POSITIVE_INFINITY);
  const turned = new Float64Array(mesh.positions.length);
  for (let v = 0; 3 * v < turned.length; v++)
    rows.forEach((row, axis) => {
      const value = dot(row, vectorAt(mesh.positions, v));
      turned[3 * v + axis] = value;
      low[axis] = Math.min(low[axis]!, value);
    });
  const [a, b, c] = rows;
  const shift = low.map((value) => (value === 0 ? 0 : -value));
  return {
    matrix: [
      ...[a[0], b[0], c[0], 0, a[1], b[1], c[1], 0, a[2], b[2], c[2], 0],
      ...[shift[0]!, shift[1]!, shift[2]!, 1],
    ] as Mat4,
    mesh: { ...mesh, positions: turned.map((value, i) => value - low[i % 3]!) },
    footprint,
    margin,
    tilt,
    overhang: under,
  };
}

/** Rows of the rotation that takes a direction to −z by the least turn (Rodrigues' formula). */
function leastTurn(down: Vector): [Vector, Vector, Vector] {
  const [x, y, z] = down;
  if (z > 1 - 1e-12)
    return [
      [1, 0, 0],
      [0, -1, 0],
      [0, 0, -1],
    ];
  const share = 1 / (1 - z);
  return [
    [1 - share * x * x, -share * x * y, x],
    [-share * x * y, 1 - share * y * y, y],
    [-x, -y, -z],
  ].map((row): Vector => [row[0]!, row[1]!, row[2]!]) as [Vector, Vector, Vector];
}
