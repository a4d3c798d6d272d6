import { type FacePlane, metPlanes } from '../../shape/face-planes.ts';

type Vector = readonly [number, number, number];

/** Where an axis leaves the crystal, and how much room a bore along it has there. Lengths in millimetres. */
export interface Mouth {
  readonly through: 'face' | 'edge' | 'corner';
  /** From the centre along the axis. */
  readonly exit: number;
  /**
   * Radius of the widest round bore along the axis that leaves through one face only; 0 where the axis leaves through an
   * edge or a corner, infinite where only faces bound it that run along the axis or lean over the mouth; a bore as wide
   * as the crystal allows at its centre stays clear of those.
   */
  readonly room: number;
}

/** Exits closer than this are one: an edge or a corner, millimetres. */
const SAME = 1e-6;

/**
 * A line beside the axis, shifted across it by u, meets the plane n at (D − n·u) / cos. It meets the first face f before
 * another one g for every shift of length r as long as r·|n_g/cos_g − n_f/cos_f| does not exceed the difference of the
 * two exits; that difference vector has no part along the axis.
 */
export function mouthOf(planes: readonly FacePlane[], along: Vector): Mouth {
  const met = planes
    .flatMap((plane) => {
      const [one] = metPlanes([plane], along);
      return one ? [{ normal: plane.normal, cos: one.cos, exit: plane.distance / one.cos }] : [];
    })
    .sort((a, b) => a.exit - b.exit);
  const [first, ...others] = met;
  const ties = met.filter(({ exit }) => exit - first!.exit < SAME).length;
  if (ties > 1) return { through: ties === 2 ? 'edge' : 'corner', exit: first!.exit, room: 0 };
  const room = others.reduce((least, { normal, cos, exit }) => {
    const apart = Math.hypot(...[0, 1, 2].map((i) => normal[i]! / cos - first!.normal[i]! / first!.cos));
    return Math.min(least, (exit - first!.exit) / apart);
  }, Number.POSITIVE_INFINITY);
  return { through: 'face', exit: first!.exit, room };
}
