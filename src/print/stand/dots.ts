import type { BrailleSize } from '../lettering/braille.ts';
import type { Point } from '../lettering/field.ts';
import type { Mesh } from '../mesh.ts';

/** Sides of a dot seen from above, and rings from its foot to its top. */
const SIDES = 16;
const RINGS = 4;

/**
 * Braille dots as one mesh: caps of spheres, all corners on the sphere, standing on a round foot.
 * @param at their middles; `ground` the height of the surface they stand on, `foot` where they begin, at or below it
 */
export function dotMesh(at: readonly Point[], { base, height }: BrailleSize, ground: number, foot: number): Mesh {
  const radius = ((base / 2) ** 2 + height ** 2) / (2 * height);
  const half = Math.atan2(base / 2, radius - height);
  const rings = Array.from({ length: RINGS }, (_, ring) => {
    const angle = half * (1 - ring / RINGS);
    return { out: radius * Math.sin(angle), z: ground + height - radius * (1 - Math.cos(angle)) };
  });
  if (foot < ground) rings.unshift({ out: base / 2, z: foot });
  const positions: number[] = [];
  const triangles: number[] = [];
  for (const [x, y] of at) {
    const first = positions.length / 3;
    for (const { out, z } of rings)
      for (let side = 0; side < SIDES; side++) {
        const angle = (2 * Math.PI * side) / SIDES;
        positions.push(x + out * Math.cos(angle), y + out * Math.sin(angle), z);
      }
    const bottom = positions.length / 3;
    positions.push(x, y, rings[0]!.z, x, y, ground + height);
    triangles.push(...capTriangles(first, bottom, rings.length));
  }
  return { positions: Float64Array.from(positions), triangles: Uint32Array.from(triangles) };
}

function capTriangles(first: number, bottom: number, rings: number): number[] {
  const out: number[] = [];
  const last = first + (rings - 1) * SIDES;
  for (let side = 0; side < SIDES; side++) {
    const next = (side + 1) % SIDES;
    out.push(bottom, first + next, first + side, last + side, last + next, bottom + 1);
    for (let ring = first; ring < last; ring += SIDES) {
      const [a, b, c, d] = [ring + side, ring + next, ring + SIDES + next, ring + SIDES + side];
      out.push(a, b, c, a, c, d);
    }
  }
  return out;
}
