import { PLANE, type PlaneTable } from './plane-table.ts';
import { ULP } from './side.ts';

/** Numbers kept for a corner: x, y, z and the bound of their error. */
export const CORNER = 4;

/**
 * Where three planes meet, as doubles with a bound of their error.
 * Writes x, y, z and the error (of the worst of the three coordinates, ∞ when nothing is known) to `out[at…at+3]`.
 * @param rows the planes of a `PlaneTable`
 */
export function meet(rows: Float64Array, a: number, b: number, c: number, out: Float64Array, at: number): void {
  const ia = PLANE * a;
  const ib = PLANE * b;
  const ic = PLANE * c;
  const ax = rows[ia]!;
  const ay = rows[ia + 1]!;
  const az = rows[ia + 2]!;
  const ad = rows[ia + 3]!;
  const na = rows[ia + 4]!;
  const bx = rows[ib]!;
  const by = rows[ib + 1]!;
  const bz = rows[ib + 2]!;
  const bd = rows[ib + 3]!;
  const nb = rows[ib + 4]!;
  const cx = rows[ic]!;
  const cy = rows[ic + 1]!;
  const cz = rows[ic + 2]!;
  const cd = rows[ic + 3]!;
  const nc = rows[ic + 4]!;
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
  // Each numerator has 6 products of at most |D|·n·n′, det 6 of at most na·nb·nc; each carries at most 7 roundings.
  const reach = Math.max(Math.abs(x), Math.abs(y), Math.abs(z));
  const numerator = 2 * (Math.abs(ad) * nb * nc + Math.abs(bd) * nc * na + Math.abs(cd) * na * nb);
  const determinant = 6 * na * nb * nc;
  const certain = Math.abs(det) - 8 * ULP * determinant;
  out[at + 3] = certain > 0 ? (8 * ULP * (numerator + reach * determinant)) / certain : Number.POSITIVE_INFINITY;
}

/**
 * The error above which a vertex is worked out exactly before it is handed out. A solid around the origin is about as
 * thin as its nearest plane is near, and even a needle is to have good areas and angles; of others the width is unknown.
 * @param reach the largest coordinate
 */
export function tolerableError({ nearest }: PlaneTable, reach: number): number {
  return nearest > 0 ? 2 ** -34 * Math.min(nearest, reach) : 2 ** -44 * reach;
}
