/** A bore that another one must keep away from: how its axis lies to the other's, and whether it passes the centre. */
export interface Neighbour {
  /** Between the two rays from the centre, radians. */
  readonly angle: number;
  readonly through: boolean;
}

/**
 * How far from the centre a blind bore with a flat end must stop so that a wall stays between it and all others, which
 * are as wide. Two blind bores are kept apart by the plane that halves their angle: each stays half the wall from it. A
 * bore that passes the centre is kept away from by the nearest point of the blind one's rim.
 * @param radius of the bores to the corners of their section; `wall` the plastic between them
 */
export function clearDepth(neighbours: readonly Neighbour[], radius: number, wall: number): number {
  return neighbours.reduce((depth, { angle, through }) => {
    if (!through) return Math.max(depth, (radius * Math.cos(angle / 2) + wall / 2) / Math.sin(angle / 2));
    const acute = Math.min(angle, Math.PI - angle);
    return Math.max(depth, (radius + wall + radius * Math.cos(acute)) / Math.sin(acute));
  }, 0);
}
