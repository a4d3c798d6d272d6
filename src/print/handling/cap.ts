import { angleBetween, plus, times, unit, type Vector } from '../vectors.ts';

/** Points on a unit sphere, and triangles between them, counter-clockwise seen from outside. */
export interface Cap {
  /** The first ones are the rim, as given. */
  readonly directions: readonly Vector[];
  readonly triangles: readonly number[];
}

/**
 * Fills a convex rim on the unit sphere with triangles: rings that draw the rim in towards its middle, each with as
 * many points as its own arcs need, sewn to the next.
 * @param arcs the rim cut at its corners; each arc ends where the next begins, and its last point is left out
 * @param step radians between points of an arc at most; no edge of the cap is longer than √3 steps
 */
export function sphereCap(arcs: readonly (readonly Vector[])[], step: number): Cap {
  const rim = arcs.flat();
  const middle = unit(rim.reduce<Vector>((sum, point) => plus(sum, point), [0, 0, 0]));
  const farthest = Math.max(...rim.map((point) => angleBetween(middle, point)));
  const rings = Math.max(1, Math.ceil(farthest / (step / 2)));
  const directions: Vector[] = [...rim];
  const triangles: number[] = [];
  let outer = rim.map((_, i) => i);
  let outerArcs = arcs.map((arc) => arc.length);
  for (let ring = 1; ring < rings; ring++) {
    const share = 1 - ring / rings;
    const innerArcs = arcs.map((arc) => Math.max(1, Math.ceil(arc.length * share)));
    const inner: number[] = [];
    arcs.forEach((arc, a) => {
      const last = arcs[(a + 1) % arcs.length]![0]!;
      for (let i = 0; i < innerArcs[a]!; i++) {
        inner.push(directions.length);
        directions.push(between(middle, alongArc(arc, last, i / innerArcs[a]!), share));
      }
    });
    sew(outer, outerArcs, inner, innerArcs, triangles);
    [outer, outerArcs] = [inner, innerArcs];
  }
  directions.push(middle);
  for (const [i, point] of outer.entries())
    triangles.push(directions.length - 1, point, outer[(i + 1) % outer.length]!);
  return { directions, triangles };
}

/** The point at a share of the great arc from one direction to another. */
export function between(from: Vector, to: Vector, share: number): Vector {
  const angle = angleBetween(from, to);
  if (angle === 0 || share === 0) return from;
  return unit(plus(times(from, Math.sin((1 - share) * angle)), to, Math.sin(share * angle)));
}

/** Arcs are evenly divided great arcs, so a share of the arc is a share of its angle. */
const alongArc = (arc: readonly Vector[], last: Vector, share: number): Vector => between(arc[0]!, last, share);

/** Triangles between two rings, arc by arc: always the one next whose share of the arc comes first. */
function sew(
  outer: readonly number[],
  outerArcs: readonly number[],
  inner: readonly number[],
  innerArcs: readonly number[],
  triangles: number[],
): void {
  let [o, i] = [0, 0];
  outerArcs.forEach((outerCount, arc) => {
    const innerCount = innerArcs[arc]!;
    const point = (ring: readonly number[], place: number): number => ring[place % ring.length]!;
    let [a, b] = [0, 0];
    while (a < outerCount || b < innerCount) {
      const [p, q] = [point(outer, o + a), point(inner, i + b)];
      if (b === innerCount || (a < outerCount && (a + 1) * innerCount <= (b + 1) * outerCount))
        triangles.push(p, point(outer, o + ++a), q);
      else triangles.push(p, point(inner, i + ++b), q);
    }
    o += outerCount;
    i += innerCount;
  });
}
