import { ULP } from './side.ts';

/** Numbers kept for a corner: x, y, z and the bound of their error. */
export const CORNER = 4;

const largest = (x: number, y: number, z: number): number => Math.max(Math.abs(x), Math.abs(y), Math.abs(z));

/**
 * Where three planes meet, as doubles with a bound of their error.
 * Writes x, y, z and the error (of the worst of the three coordinates, ∞ when nothing is known) to `out[at…at+3]`.
 * @param rows h1, h2, h3, D of each plane
 */
export function meet(rows: Float64Array, a: number, b: number, c: number, out: Float64Array, at: number): void {
  const ax = rows[4 * a]!;
  const ay = rows[4 * a + 1]!;
  const az = rows[4 * a + 2]!;
  const ad = rows[4 * a + 3]!;
  const bx = rows[4 * b]!;
  const by = rows[4 * b + 1]!;
  const bz = rows[4 * b + 2]!;
  const bd = rows[4 * b + 3]!;
  const cx = rows[4 * c]!;
  const cy = rows[4 * c + 1]!;
  const cz = rows[4 * c + 2]!;
  const cd = rows[4 * c + 3]!;
  const bcx = by * cz - bz * cy;
  const bcy = bz * cx - bx * cz;
  const bcz = bx * cy - by * cx;
  const det = ax * bcx + ay * bcy + az * bcz;
  const x = (ad * bcx + bd * (cy * az - cz * ay) + cd * (ay * bz - az * by)) / det;
  const y = (ad * bcy + bd * (cz * ax - cx * az) + cd * (az * bx - ax * bz)) / det;
  const z = (ad * bcz + bd * (cx * ay - cy * ax) + cd * (ax * by - ay * bx)) / det;
  out[at] = x;
  out[at + 1] = y;
  out[at + 2] = z;
  const na = largest(ax, ay, az);
  const nb = largest(bx, by, bz);
  const nc = largest(cx, cy, cz);
  // Each numerator has 6 products of at most |D|·n·n′, det 6 of at most na·nb·nc; each carries at most 7 roundings.
  const numerator = 2 * (Math.abs(ad) * nb * nc + Math.abs(bd) * nc * na + Math.abs(cd) * na * nb);
  const determinant = 6 * na * nb * nc;
  const certain = Math.abs(det) - 8 * ULP * determinant;
  const error = (8 * ULP * (numerator + largest(x, y, z) * determinant)) / certain;
  out[at + 3] = certain > 0 ? error : Number.POSITIVE_INFINITY;
}
