import type { Mesh } from '../mesh.ts';
import { cross, dot, length, minus, type Vector, vectorAt } from '../vectors.ts';

/** Millimetres within which a triangle counts as lying on the bed. */
const ON_BED = 0.01;

/**
 * Area of what hangs over, mm²: triangles that face downwards and lean farther from the vertical than an angle, without
 * those that lie on the bed.
 * @param down unit vector towards the bed
 * @param level where the bed is along it
 * @param angle degrees from the vertical
 */
export function overhangArea({ positions, triangles }: Mesh, down: Vector, level: number, angle: number): number {
  const least = Math.sin((angle * Math.PI) / 180);
  let area = 0;
  for (let t = 0; t < triangles.length; t += 3) {
    const [a, b, c] = [triangles[t]!, triangles[t + 1]!, triangles[t + 2]!].map((vertex) =>
      vectorAt(positions, vertex),
    );
    const normal = cross(minus(b!, a!), minus(c!, a!));
    const twice = length(normal);
    // Faces that lean just so far, as a cube's do at 45°, are not to hang on rounding.
    if (dot(normal, down) <= (least + 1e-6) * twice) continue;
    if (Math.min(dot(a!, down), dot(b!, down), dot(c!, down)) > level - ON_BED) continue;
    area += twice / 2;
  }
  return area;
}
