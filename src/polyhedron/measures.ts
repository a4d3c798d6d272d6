import type { PlaneSet } from './planes.ts';
import type { Solid } from './solid.ts';

type Vector = readonly [number, number, number];

/** Nine numbers, rows first, that take the basis of the planes to a Cartesian frame. */
export type Frame = ArrayLike<number>;

export interface Edge {
  /** The two faces (plane numbers) that meet in it, the smaller first. */
  readonly faces: readonly [number, number];
  /** Its two vertices. */
  readonly vertices: readonly [number, number];
  readonly length: number;
  /** Angle inside the solid between the two faces, degrees. The trade's interfacial angle is 180° minus this. */
  readonly dihedral: number;
}

/** What can be measured on a bounded solid. Lengths are in the unit of the frame. */
export interface Measures {
  /** Cartesian vertices, three numbers each. */
  readonly positions: Float64Array;
  /** Plane numbers of the faces that appear, in the planes' order. */
  readonly faces: readonly number[];
  /** Area of every plane's face; 0 where it does not appear. */
  readonly area: Float64Array;
  /** Outward unit normals of every plane, three numbers each. */
  readonly normals: Float64Array;
  /** Central distance of every plane: from the origin along its normal. */
  readonly distance: Float64Array;
  readonly surface: number;
  readonly volume: number;
  readonly centroid: Vector;
  /** Lowest and highest coordinate along x, y and z. */
  readonly low: Vector;
  readonly high: Vector;
  /** Radii of the spheres about the centre (the origin) that touch the nearest face and pass the farthest vertex. */
  readonly inscribedRadius: number;
  readonly circumscribedRadius: number;
}

/** Measures a bounded solid. @throws RangeError for a solid that is open or empty. */
export function measure(solid: Solid, frame: Frame): Measures {
  if (solid.state !== 'bounded') throw new RangeError(`A solid that is ${solid.state} has no measures.`);
  const positions = toFrame(solid.vertices, frame);
  const count = solid.planes.form.length;
  const { normals, distance } = cartesianPlanes(solid.planes, frame);
  const area = new Float64Array(count);
  const faces: number[] = [];
  const centroid = [0, 0, 0];
  let [surface, pyramids, inscribed] = [0, 0, Number.POSITIVE_INFINITY];
  for (let f = 0; f < count; f++) {
    if (solid.start[f] === solid.start[f + 1]) continue;
    faces.push(f);
    const size = polygon(solid, positions, f);
    // Along the plane's own normal: the polygon of a sliver is too thin to tell its own.
    area[f] = Math.max(0, dot(size.areaVector, vectorAt(normals, f)));
    surface += area[f]!;
    pyramids += area[f]! * distance[f]!;
    inscribed = Math.min(inscribed, distance[f]!);
    for (let axis = 0; axis < 3; axis++) centroid[axis]! += size.pyramid[axis]!;
  }
  const volume = pyramids / 3;
  const spread = extremes(positions);
  return {
    positions,
    faces,
    area,
    normals,
    distance,
    surface,
    volume,
    centroid: [centroid[0]! / volume, centroid[1]! / volume, centroid[2]! / volume],
    low: spread.low,
    high: spread.high,
    inscribedRadius: inscribed,
    circumscribedRadius: spread.radius,
  };
}

/** All edges of a bounded solid, each once. */
export function edges(solid: Solid, { positions, normals }: Measures): Edge[] {
  const found: Edge[] = [];
  for (let f = 0; f + 1 < solid.start.length; f++)
    for (let e = solid.start[f]!; e < solid.start[f + 1]!; e++) {
      const other = solid.neighbour[e]!;
      if (other < f) continue;
      const end = solid.corner[e]!;
      const start = solid.corner[e === solid.start[f] ? solid.start[f + 1]! - 1 : e - 1]!;
      const along = subtract(vectorAt(positions, end), vectorAt(positions, start));
      const [a, b] = [vectorAt(normals, f), vectorAt(normals, other)];
      const between = Math.atan2(Math.hypot(...cross(a, b)), dot(a, b));
      found.push({
        faces: [f, other],
        vertices: [start, end],
        length: Math.hypot(...along),
        dihedral: 180 - (between * 180) / Math.PI,
      });
    }
  return found;
}

/** Vertex numbers of a face, counter-clockwise seen from outside; empty where it does not appear. */
export function faceCorners(solid: Solid, face: number): number[] {
  return Array.from(solid.corner.subarray(solid.start[face], solid.start[face + 1]));
}

/** How far the solid reaches in a direction: the largest `direction · v` over its Cartesian vertices. */
export function reach(positions: ArrayLike<number>, direction: Vector): number {
  let farthest = Number.NEGATIVE_INFINITY;
  for (let at = 0; at < positions.length; at += 3)
    farthest = Math.max(farthest, dot(vectorAt(positions, at / 3), direction));
  return farthest;
}

function polygon(solid: Solid, positions: Float64Array, face: number) {
  const first = vectorAt(positions, solid.corner[solid.start[face]!]!);
  const areaVector: [number, number, number] = [0, 0, 0];
  const pyramid: [number, number, number] = [0, 0, 0];
  for (let e = solid.start[face]! + 1; e + 1 < solid.start[face + 1]!; e++) {
    const [p, q] = [vectorAt(positions, solid.corner[e]!), vectorAt(positions, solid.corner[e + 1]!)];
    const half = cross(subtract(p, first), subtract(q, first));
    const sixfold = dot(first, half);
    for (let axis = 0; axis < 3; axis++) {
      areaVector[axis]! += half[axis]! / 2;
      pyramid[axis]! += ((first[axis]! + p[axis]! + q[axis]!) * sixfold) / 24;
    }
  }
  return { areaVector, pyramid };
}

function extremes(positions: Float64Array) {
  const low = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  const high = low.map((value) => -value);
  let radius = 0;
  for (let at = 0; at < positions.length; at += 3) {
    const point = vectorAt(positions, at / 3);
    radius = Math.max(radius, Math.hypot(...point));
    for (let axis = 0; axis < 3; axis++) {
      low[axis] = Math.min(low[axis]!, point[axis]!);
      high[axis] = Math.max(high[axis]!, point[axis]!);
    }
  }
  return { low: toVector(low), high: toVector(high), radius };
}

function toFrame(points: Float64Array, m: Frame): Float64Array {
  const out = new Float64Array(points.length);
  for (let at = 0; at < points.length; at += 3)
    for (let row = 0; row < 3; row++)
      out[at + row] = m[3 * row]! * points[at]! + m[3 * row + 1]! * points[at + 1]! + m[3 * row + 2]! * points[at + 2]!;
  return out;
}

/** Normals are rows: they go to the frame by its inverse, whose rows are cross products of the frame's columns. */
function cartesianPlanes({ normals: rows, form, offsets }: PlaneSet, m: Frame) {
  const column = (j: number): Vector => [m[j]!, m[3 + j]!, m[6 + j]!];
  const [a, b, c] = [column(0), column(1), column(2)];
  const det = dot(a, cross(b, c));
  const dual = [cross(b, c), cross(c, a), cross(a, b)];
  const normals = new Float64Array(rows.length);
  const distance = new Float64Array(form.length);
  for (let p = 0; p < form.length; p++) {
    const n = [0, 1, 2].map(
      (k) => (rows[3 * p]! * dual[0]![k]! + rows[3 * p + 1]! * dual[1]![k]! + rows[3 * p + 2]! * dual[2]![k]!) / det,
    );
    const length = Math.hypot(...n);
    normals.set(
      n.map((value) => value / length),
      3 * p,
    );
    distance[p] = offsets[form[p]!]!.approximate / length;
  }
  return { normals, distance };
}

const toVector = (v: readonly number[]): Vector => [v[0]!, v[1]!, v[2]!];
const vectorAt = (values: ArrayLike<number>, index: number): Vector => [
  values[3 * index]!,
  values[3 * index + 1]!,
  values[3 * index + 2]!,
];
const subtract = (a: Vector, b: Vector): Vector => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const cross = (a: Vector, b: Vector): Vector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
