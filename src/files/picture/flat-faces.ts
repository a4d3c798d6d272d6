import type { Mesh } from '../../print/mesh.ts';
import type { Surface } from '../../print/part.ts';
import { endOf, startOf, triangleOf, visitEdges } from '../mesh/half-edges.ts';

/** A mesh's triangles gathered to flat faces of one surface each, and the edges between those that are not flush. */
export interface FlatFaces extends Creases {
  /** The face of each triangle. */
  readonly faceOf: Uint32Array;
  /** The surface of each face. */
  readonly surfaceOf: Uint16Array;
  /** Unit outward normal of each face, three numbers a face. */
  readonly normals: Float64Array;
  /** Triangles in the order of their faces. */
  readonly order: Uint32Array;
}

/** A surface as it is to be seen. */
export interface SeenSurface extends Surface {
  /** Its triangles stand for something round, as a rod's do: small steps between them get no edge line. */
  readonly curved?: boolean;
}

export interface Creases {
  /** Pairs of vertex numbers: edges where the faces on either side differ by more than a degree. */
  readonly creases: Uint32Array;
  /** The two faces at each of them. */
  readonly sides: Uint32Array;
}

/** Cosine of one degree: below that, faces count as flush and normals as equal. */
const FLUSH = Math.cos(Math.PI / 180);
/** The same for facets of a curved surface: twelve of them round a rod still count as round. */
const ROUND = Math.cos((31 * Math.PI) / 180);
/** A face takes slivers whatever their normals say, if they lie within this share of the mesh's size of its plane. */
const FLAT = 1e-6;

/**
 * Grows faces from the largest triangles outwards: a neighbour of the same surface joins when it lies in the plane of
 * the first triangle, by its normal or, for slivers whose normals are rounding noise, by its corners. So every face has
 * a normal that can be trusted.
 */
export function flatFaces(mesh: Mesh): FlatFaces {
  const faces = known.get(mesh) ?? growFaces(mesh);
  known.set(mesh, faces);
  return faces;
}

/** A picture and a scene of the same meshes need the same faces. */
const known = new WeakMap<Mesh, FlatFaces>();

function growFaces(mesh: Mesh): FlatFaces {
  const count = mesh.triangles.length / 3;
  const { normals: own, areas } = triangleNormals(mesh);
  const mates = mateHalfEdges(mesh);
  const near = FLAT * sizeOf(mesh) + 1e-9;
  const seeds = byArea(areas);
  const faceOf = new Uint32Array(count).fill(count);
  const order = new Uint32Array(count);
  const normals: number[] = [];
  const surfaces: number[] = [];
  let end = 0;
  for (const seed of seeds) {
    if (faceOf[seed] !== count) continue;
    const face = normals.length / 3;
    const plane = planeOf(mesh, own, seed);
    normals.push(plane[0], plane[1], plane[2]);
    surfaces.push(mesh.surface?.[seed] ?? 0);
    faceOf[seed] = face;
    let next = end;
    order[end++] = seed;
    for (; next < end; next++)
      for (let corner = 0; corner < 3; corner++) {
        const mate = triangleOf(mates[3 * order[next]! + corner]!);
        if (mate >= count || faceOf[mate] !== count || mesh.surface?.[mate] !== mesh.surface?.[seed]) continue;
        if (!joins(mesh, own, mate, plane, near)) continue;
        faceOf[mate] = face;
        order[end++] = mate;
      }
  }
  const surfaceOf = Uint16Array.from(surfaces);
  return { faceOf, surfaceOf, normals: Float64Array.from(normals), order, ...creasesOf(mesh, faceOf, normals, mates) };
}

/** The creases to draw: all but the small steps within a curved surface. */
export function drawnEdges(faces: FlatFaces, surfaces: readonly SeenSurface[]): Creases {
  if (!surfaces.some(({ curved }) => curved)) return faces;
  const { creases, sides, surfaceOf, normals: n } = faces;
  const drawn = (_: number, k: number): boolean => {
    const [face, other] = [sides[k & ~1]!, sides[k | 1]!];
    if (face === other || surfaceOf[face] !== surfaceOf[other] || !surfaces[surfaceOf[face]!]?.curved) return true;
    const [i, j] = [3 * face, 3 * other];
    return n[i]! * n[j]! + n[i + 1]! * n[j + 1]! + n[i + 2]! * n[j + 2]! < ROUND;
  };
  return { creases: creases.filter(drawn), sides: sides.filter(drawn) };
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

/** For each half-edge the one that runs against it; their count where there is not exactly one. */
function mateHalfEdges(mesh: Mesh): Uint32Array {
  const count = mesh.triangles.length;
  const mates = new Uint32Array(count).fill(count);
  visitEdges(mesh, new Uint8Array(count / 3), (uses) => {
    if (uses.length !== 2) return;
    mates[uses[0]!] = uses[1]!;
    mates[uses[1]!] = uses[0]!;
  });
  return mates;
}

/** Triangles by falling area, equal ones in their order: one key a triangle, so that numbers are sorted as numbers. */
function byArea(areas: Float64Array): Uint32Array {
  const count = areas.length;
  const most = areas.reduce((value, area) => Math.max(value, area), Number.MIN_VALUE);
  const steps = Math.floor(2 ** 52 / (count + 1));
  const keys = areas.map((area, t) => (steps - Math.floor((area / most) * steps)) * count + t).sort();
  return Uint32Array.from(keys, (key) => key % count);
}

function creasesOf(mesh: Mesh, faceOf: Uint32Array, n: readonly number[], mates: Uint32Array): Creases {
  const creases: number[] = [];
  const sides: number[] = [];
  for (let h = 0; h < mates.length; h++) {
    const mate = mates[h]!;
    if (mate < h) continue;
    const face = faceOf[triangleOf(h)]!;
    const other = mate < mates.length ? faceOf[triangleOf(mate)]! : face;
    const [i, j] = [3 * face, 3 * other];
    const flush = face === other || n[i]! * n[j]! + n[i + 1]! * n[j + 1]! + n[i + 2]! * n[j + 2]! > FLUSH;
    if (flush && mate < mates.length) continue;
    creases.push(startOf(mesh, h), endOf(mesh, h));
    sides.push(face, other);
  }
  return { creases: Uint32Array.from(creases), sides: Uint32Array.from(sides) };
}

function sizeOf({ positions }: Mesh): number {
  return positions.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
}
