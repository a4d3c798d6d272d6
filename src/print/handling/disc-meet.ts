/** A point in a plane; the others' properties do not matter here. */
export interface Spot {
  readonly x: number;
  readonly y: number;
}

/**
 * The least x of a point that is within a radius of all given points; infinite when there is none. One disc after the
 * other is added: a disc that leaves the best point out has the new one on its rim (Welzl's scheme, 1991).
 * @param spots put into a new order: those that decide come first, which makes the next call with like points fast
 */
export function leastMeeting(spots: Spot[], radius: number): number {
  let [x, y] = [spots[0]!.x - radius, spots[0]!.y];
  const reach = radius * radius * (1 + ROUNDING);
  for (let i = 1; i < spots.length; i++) {
    const spot = spots[i]!;
    if ((x - spot.x) ** 2 + (y - spot.y) ** 2 <= reach) continue;
    const angle = leastOnRim(spots, radius, i);
    spots.copyWithin(1, 0, i);
    spots[0] = spot;
    if (angle === null) return Number.POSITIVE_INFINITY;
    [x, y] = [spot.x + radius * Math.cos(angle), spot.y + radius * Math.sin(angle)];
  }
  return x;
}

/** Relative; the rim point is worked out to about 1e-15. */
const ROUNDING = 1e-12;

/**
 * On the rim of one disc the angle of the point of least x that the discs before it hold; null when they hold none.
 * Discs of one size hold at most half of each other's rims, so what they hold together is one arc.
 */
function leastOnRim(spots: readonly Spot[], radius: number, disc: number): number | null {
  const { x, y } = spots[disc]!;
  let [zero, low, high] = [Number.NaN, 0, 0];
  for (let j = 0; j < disc; j++) {
    const [dx, dy] = [spots[j]!.x - x, spots[j]!.y - y];
    const distance = Math.hypot(dx, dy);
    if (distance === 0) continue;
    if (distance > 2 * radius) return null;
    const half = Math.acos(distance / (2 * radius));
    const towards = Math.atan2(dy, dx);
    if (Number.isNaN(zero)) [zero, low, high] = [towards, -half, half];
    else {
      const turn = wrapped(towards - zero);
      [low, high] = [Math.max(low, turn - half), Math.min(high, turn + half)];
      if (low > high) return null;
    }
  }
  const left = wrapped(Math.PI - zero);
  if (left >= low && left <= high) return Math.PI;
  return Math.cos(zero + low) < Math.cos(zero + high) ? zero + low : zero + high;
}

const wrapped = (angle: number): number => angle - 2 * Math.PI * Math.round(angle / (2 * Math.PI));
