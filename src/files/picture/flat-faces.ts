import type { Mesh } from '../../print/mesh.ts';
import { endOf, startOf, triangleOf, visitEdges } from '../mesh/half-edges.ts';

/** A mesh's triangles gathered to flat faces of one surface each, and the edges between those that are not flush. */
export interface FlatFaces {
  /** The face of each triangle. */
  readonly faceOf: Uint32Array;
  /** Unit outward normal of each face, three numbers a face. */
  readonly normals: Float64Array;
  /** Triangles in the order of their faces. */
  readonly order: Uint32Array;
  /** Pairs of vertex numbers: edges where the faces on either side differ by more than a degree. */
  readonly creases: Uint32Array;
}

/** Cosine of one degree: below that, faces count as flush and normals as equal. */
const FLUSH = Math.cos(Math.PI / 180);
/** A face takes slivers whatever their normals say, if they lie within this share of the mesh's size of its plane. */
const FLAT = 1e-6;

/**
 * Grows faces from the largest triangles outwards: a neighbour of the same surface joins when it lies in the plane of
 * the first triangle, by its normal or, for slivers whose normals are rounding noise, by its corners. So every face has
 * a normal that can be trusted.
 */
export function flatFaces(mesh: Mesh): FlatFaces {
  const count = mesh.triangles.length / 3;
  const { normals: own, areas } = triangleNormals(mesh);
  const mates = neighbours(mesh);
  const near = FLAT * sizeOf(mesh) + 1e-9;
  const seeds = Uint32Array.from({ length: count }, (_, t) => t).sort((s, t) => areas[t]! - areas[s]! || s - t);
  const faceOf = new Uint32Array(count).fill(count);
  const order = new Uint32Array(count);
  const normals: number[] = [];
  let end = 0;
  for (const seed of seeds) {
    if (faceOf[seed] !== count) continue;
    const face = normals.length / 3;
    const plane = planeOf(mesh, own, seed);
    normals.push(plane[0], plane[1], plane[2]);
    faceOf[seed] = face;
    let next = end;
    order[end++] = seed;
    for (; next < end; next++)
      for (let corner = 0; corner < 3; corner++) {
        const mate = mates[3 * order[next]! + corner]!;
        if (mate >= count || faceOf[mate] !== count || mesh.surface?.[mate] !== mesh.surface?.[seed]) continue;
        if (!joins(mesh, own, mate, plane, near)) continue;
        faceOf[mate] = face;
        order[end++] = mate;
      }
  }
  return { faceOf, normals: Float64Array.from(normals), order, creases: creasesOf(mesh, faceOf, normals) };
}

/** Unit normal and distance from the origin. */
type Plane = readonly [number, number, number, number];

function planeOf({ positions: p, triangles }: Mesh, own: Float64Array, t: number): Plane {
  const [x, y, z] = [own[3 * t]!, own[3 * t + 1]!, own[3 * t + 2]!];
  const length = Math.hypot(x, y, z);
  if (!(length > 0)) return [0, 0, 1, 0]; // without area there is no direction; any unit vector will do
  const a = 3 * triangles[3 * t]!;
  const [u, v, w] = [x / length, y / length, z / length];
  return [u, v, w, u * p[a]! + v * p[a + 1]! + w * p[a + 2]!];
}

function joins({ positions: p, triangles }: Mesh, own: Float64Array, t: number, plane: Plane, near: number): boolean {
  const [x, y, z] = [own[3 * t]!, own[3 * t + 1]!, own[3 * t + 2]!];
  const along = x * plane[0] + y * plane[1] + z * plane[2];
  if (along > 0 && along >= FLUSH * Math.sqrt(x * x + y * y + z * z)) return true;
  for (let corner = 0; corner < 3; corner++) {
    const a = 3 * triangles[3 * t + corner]!;
    if (Math.abs(plane[0] * p[a]! + plane[1] * p[a + 1]! + plane[2] * p[a + 2]! - plane[3]) > near) return false;
  }
  return true;
}

/** Right-hand normals, twice the area long, and these lengths. */
function triangleNormals({ positions: p, triangles }: Mesh): { normals: Float64Array; areas: Float64Array } {
  const normals = new Float64Array(triangles.length);
  const areas = new Float64Array(triangles.length / 3);
  for (let i = 0; i < triangles.length; i += 3) {
    const a = 3 * triangles[i]!;
    const b = 3 * triangles[i + 1]!;
    const c = 3 * triangles[i + 2]!;
    const ux = p[b]! - p[a]!;
    const uy = p[b + 1]! - p[a + 1]!;
    const uz = p[b + 2]! - p[a + 2]!;
    const vx = p[c]! - p[a]!;
    const vy = p[c + 1]! - p[a + 1]!;
    const vz = p[c + 2]! - p[a + 2]!;
    const x = uy * vz - uz * vy;
    const y = uz * vx - ux * vz;
    const z = ux * vy - uy * vx;
    normals[i] = x;
    normals[i + 1] = y;
    normals[i + 2] = z;
    areas[i / 3] = Math.sqrt(x * x + y * y + z * z);
  }
  return { normals, areas };
}

/** For each half-edge the triangle on its other side; the count of triangles where there is not exactly one. */
function neighbours(mesh: Mesh): Uint32Array {
  const count = mesh.triangles.length / 3;
  const mates = new Uint32Array(mesh.triangles.length).fill(count);
  visitEdges(mesh, new Uint8Array(count), (uses) => {
    if (uses.length !== 2) return;
    mates[uses[0]!] = triangleOf(uses[1]!);
    mates[uses[1]!] = triangleOf(uses[0]!);
  });
  return mates;
}

function creasesOf(mesh: Mesh, faceOf: Uint32Array, n: readonly number[]): Uint32Array {
  const creases: number[] = [];
  visitEdges(mesh, new Uint8Array(faceOf.length), (uses) => {
    const [i, j] = [3 * faceOf[triangleOf(uses[0]!)]!, 3 * faceOf[triangleOf(uses.at(-1)!)]!];
    if (i === j && uses.length === 2) return;
    if (n[i]! * n[j]! + n[i + 1]! * n[j + 1]! + n[i + 2]! * n[j + 2]! > FLUSH && uses.length === 2) return;
    creases.push(startOf(mesh, uses[0]!), endOf(mesh, uses[0]!));
  });
  return Uint32Array.from(creases);
}

function sizeOf({ positions }: Mesh): number {
  return positions.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
}
