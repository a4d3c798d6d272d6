import type { Mesh } from '../../print/mesh.ts';

/** How far a stored normal may be off, in degrees. */
const NORMAL_TOLERANCE_DEGREES = 1;
const LEAST_COSINE = Math.cos((NORMAL_TOLERANCE_DEGREES * Math.PI) / 180);

export interface NormalFacts {
  /** Zero, not a number, or off by more than the tolerance. */
  readonly wrong: number;
  /** Of these, the zero ones and those that are not a number. */
  readonly missing: number;
}

/**
 * Compares stored normals with the right-hand rule; triangles without area have no normal and are left out.
 * @param normals three numbers a triangle, of any length.
 */
export function examineNormals(
  { positions: p, triangles }: Mesh,
  normals: Float32Array,
  flat: Uint8Array,
): NormalFacts {
  let wrong = 0;
  let missing = 0;
  for (let t = 0; t < flat.length; t++) {
    if (flat[t] === 1) continue;
    const [x, y, z] = [normals[3 * t] ?? 0, normals[3 * t + 1] ?? 0, normals[3 * t + 2] ?? 0];
    const length = Math.hypot(x, y, z);
    if (!(length > 0 && length < Infinity)) missing++;
    const [a, b, c] = [3 * triangles[3 * t]!, 3 * triangles[3 * t + 1]!, 3 * triangles[3 * t + 2]!];
    const [ux, uy, uz] = [p[b]! - p[a]!, p[b + 1]! - p[a + 1]!, p[b + 2]! - p[a + 2]!];
    const [vx, vy, vz] = [p[c]! - p[a]!, p[c + 1]! - p[a + 1]!, p[c + 2]! - p[a + 2]!];
    const [nx, ny, nz] = [uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx];
    const cosine = (x * nx + y * ny + z * nz) / (length * Math.hypot(nx, ny, nz));
    if (!(cosine >= LEAST_COSINE)) wrong++; // also when the cosine is not a number
  }
  return { wrong, missing };
}
