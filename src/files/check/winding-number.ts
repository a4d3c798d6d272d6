import type { Mesh } from '../../print/mesh.ts';
import type { Point } from './report.ts';

/**
 * How many times a closed surface goes round a point: 1 inside a solid, -1 inside a surface turned inwards, 0 outside.
 * The sum of the solid angles of its triangles over 4π (A. van Oosterom and J. Strackee, The solid angle of a plane
 * triangle, IEEE Trans. Biomed. Eng. 30, 1983). Not a whole number for a point on the surface.
 */
export function windingNumber({ positions: p, triangles }: Mesh, surface: readonly number[], [x, y, z]: Point): number {
  let sum = 0;
  for (const t of surface) {
    const [a, b, c] = [3 * triangles[3 * t]!, 3 * triangles[3 * t + 1]!, 3 * triangles[3 * t + 2]!];
    const [ax, ay, az] = [p[a]! - x, p[a + 1]! - y, p[a + 2]! - z];
    const [bx, by, bz] = [p[b]! - x, p[b + 1]! - y, p[b + 2]! - z];
    const [cx, cy, cz] = [p[c]! - x, p[c + 1]! - y, p[c + 2]! - z];
    const la = Math.sqrt(ax * ax + ay * ay + az * az);
    const lb = Math.sqrt(bx * bx + by * by + bz * bz);
    const lc = Math.sqrt(cx * cx + cy * cy + cz * cz);
    const above = ax * (by * cz - bz * cy) + ay * (bz * cx - bx * cz) + az * (bx * cy - by * cx);
    const below =
      la * lb * lc +
      (ax * bx + ay * by + az * bz) * lc +
      (bx * cx + by * cy + bz * cz) * la +
      (cx * ax + cy * ay + cz * az) * lb;
    sum += 2 * Math.atan2(above, below);
  }
  return sum / (4 * Math.PI);
}
