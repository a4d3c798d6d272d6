import { dot, type Metric, type RealMatrix } from './cell.ts';
import { toDegrees } from './exact-angle.ts';
import { cross, type IntegerTriple } from './integers.ts';
import type { Miller, Zone } from './spaces.ts';

const product = (p: IntegerTriple, m: RealMatrix, q: IntegerTriple): number =>
  p[0] * dot(m[0], q) + p[1] * dot(m[1], q) + p[2] * dot(m[2], q);

/**
 * Interfacial angle in degrees, 0 to 180, between the outward *normals* of two faces; its supplement is the dihedral
 * angle. The zone of the two faces is their exact integer cross product, so that nearly parallel faces lose nothing:
 * |g₁ × g₂| = |zone| / V.
 */
export function interfacialAngle({ direct, reciprocal, volume }: Metric, first: Miller, second: Miller): number {
  const zone = cross(first, second);
  const sine = Math.sqrt(product(zone, direct, zone)) / volume;
  return toDegrees(Math.atan2(sine, product(first, reciprocal, second)));
}

/** Angle in degrees, 0 to 180, between two directions. */
export function zoneAngle({ direct, reciprocal, volume }: Metric, first: Zone, second: Zone): number {
  const plane = cross(first, second);
  const sine = Math.sqrt(product(plane, reciprocal, plane)) * volume;
  return toDegrees(Math.atan2(sine, product(first, direct, second)));
}
