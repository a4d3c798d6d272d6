import { across, angleBetween, dot, length, minus, plus, unit, type Vector, vectorAt } from '../vectors.ts';
import { leastMeeting } from './disc-meet.ts';
import { SMALL_PARTS } from './figures.ts';

/** How a piece lies in the gauge, in its own coordinates: the way out of the cylinder, and to its deep side. */
export interface Lie {
  readonly out: Vector;
  readonly deep: Vector;
}

export type SmallPartVerdict =
  | { readonly verdict: 'fits'; readonly lie: Lie }
  | { readonly verdict: 'does not fit' }
  /** No way in was found, but there may be one into a gauge larger by `within` millimetres. */
  | { readonly verdict: 'undecided'; readonly within: number };

const RADIUS = SMALL_PARTS.across / 2;
/** Depth along the cylinder's axis. The bottom slopes by 45°: over 31.7 mm it falls from 25.4 to 57.1 mm. */
const MIDDLE_DEPTH = (SMALL_PARTS.least + SMALL_PARTS.greatest) / 2;
/** From the rim over the shallow side to the bottom at the deep side: nothing longer has room. */
const LONGEST = Math.hypot(SMALL_PARTS.across, SMALL_PARTS.greatest);
/**
 * How much faster than the points the depth that a piece needs can change: the top by one, a point on the slope by
 * √2.
 */
const DEPTH_RATE = 1 + Math.SQRT2;
/** Millimetres; nearer than this to the limit, the answer is undecided. */
const UNDECIDED_WITHIN = 0.05;
/** Positions tried, times corners, before the answer is given up as undecided: about a second. */
const MOST_WORK = 20_000_000;

/**
 * Whether a piece goes wholly into the small-parts cylinder, any way round: a rigid motion that takes its corners
 * into the gauge, which is convex. All directions of the axis are searched by cells on the sphere, and about each the
 * turn of the slope: a cell is ruled out when even a gauge larger by all that turning within the cell can move a
 * corner has no room (branch and bound; the bound is rigorous up to rounding), and a piece fits when the middle of a
 * cell does.
 * @param inscribed radius of any ball that lies in the hull; a known one saves the search
 * @param points corners of the piece or of its convex hull, three numbers each, millimetres
 */
export function smallPart(points: Float64Array, { inscribed = 0, most = MOST_WORK } = {}): SmallPartVerdict {
  if (inscribed > RADIUS) return { verdict: 'does not fit' };
  const piece = centred(points);
  if (piece.radius <= RADIUS) return { verdict: 'fits', lie: { out: [0, 0, 1], deep: [1, 0, 0] } };
  if (longestLine(piece.points) > LONGEST) return { verdict: 'does not fit' };
  const search = new Search(piece);
  let cells = octants();
  while (cells.length > 0) {
    const next: Cell[] = [];
    for (const cell of cells) {
      const found = search.cell(cell);
      if (found === 'open') next.push(...quarters(cell));
      else if (found !== 'closed') return { verdict: 'fits', lie: found };
    }
    if (next.length === 0) break;
    const within = (DEPTH_RATE + 1) * search.widest;
    if (within <= UNDECIDED_WITHIN || search.work > most) return { verdict: 'undecided', within };
    search.widest = 0;
    cells = next;
  }
  return { verdict: 'does not fit' };
}

interface Piece {
  readonly points: readonly Vector[];
  /** Of a sphere about the origin that holds them. */
  readonly radius: number;
}

/**
 * The points about the middle of a nearly smallest sphere (Bădoiu and Clarkson 2003: steps towards the farthest
 * point).
 */
function centred(positions: Float64Array): Piece {
  const points = Array.from({ length: positions.length / 3 }, (_, i) => vectorAt(positions, i));
  let middle = points[0]!;
  const farthestFrom = (from: Vector): Vector => {
    let [far, most] = [from, 0];
    for (const point of points) {
      const away = distance(point, from);
      if (away > most) [far, most] = [point, away];
    }
    return far;
  };
  for (let step = 1; step <= 200; step++) {
    const far = farthestFrom(middle);
    middle = plus(middle, minus(far, middle), 1 / (step + 1));
  }
  const moved = points.map((point) => minus(point, middle));
  return { points: moved, radius: distance(farthestFrom(middle), middle) };
}

const distance = (a: Vector, b: Vector): number => length(minus(a, b));

/** The largest distance between two of the points. */
export function longestLine(points: readonly Vector[]): number {
  let longest = 0;
  for (let i = 0; i < points.length; i++) {
    const [x, y, z] = points[i]!;
    for (let j = i + 1; j < points.length; j++) {
      const other = points[j]!;
      longest = Math.max(longest, (other[0] - x) ** 2 + (other[1] - y) ** 2 + (other[2] - z) ** 2);
    }
  }
  return Math.sqrt(longest);
}

/** A triangle of axis directions; `middle` is within `reach` radians of all of them. */
interface Cell {
  readonly corners: readonly [Vector, Vector, Vector];
  readonly middle: Vector;
  readonly reach: number;
}

function cellOf(a: Vector, b: Vector, c: Vector): Cell {
  const middle = unit(plus(plus(a, b), c));
  return {
    corners: [a, b, c],
    middle,
    reach: Math.max(angleBetween(middle, a), angleBetween(middle, b), angleBetween(middle, c)),
  };
}

function octants(): Cell[] {
  const sides = [1, -1] as const;
  return sides.flatMap((x) => sides.flatMap((y) => sides.map((z) => cellOf([x, 0, 0], [0, y, 0], [0, 0, z]))));
}

function quarters({ corners: [a, b, c] }: Cell): Cell[] {
  const [ab, bc, ca] = [unit(plus(a, b)), unit(plus(b, c)), unit(plus(c, a))];
  return [cellOf(a, ab, ca), cellOf(ab, b, bc), cellOf(ca, bc, c), cellOf(ab, bc, ca)];
}

/**
 * A corner of the piece as a cell sees it: along two directions across the axis and along it; x runs to the deep
 * side.
 */
interface Seen {
  readonly point: Vector;
  e: number;
  f: number;
  out: number;
  x: number;
  y: number;
}

class Search {
  /** Positions tried times corners. */
  work = 0;
  /** The largest movement of a corner in a cell that stayed open. */
  widest = 0;
  private readonly seen: Seen[];

  constructor(private readonly piece: Piece) {
    this.seen = piece.points.map((point) => ({ point, e: 0, f: 0, out: 0, x: 0, y: 0 }));
  }

  cell({ middle, reach }: Cell): 'open' | 'closed' | Lie {
    const [e, f] = across(middle);
    for (const seen of this.seen) {
      seen.e = dot(seen.point, e);
      seen.f = dot(seen.point, f);
      seen.out = dot(seen.point, middle);
    }
    const moved = this.piece.radius * reach;
    if (this.need(0, RADIUS + moved) === Number.POSITIVE_INFINITY) return 'closed';
    const wide = this.need(0, RADIUS) === Number.POSITIVE_INFINITY;
    const open = wide && this.turns(0, moved / RADIUS, moved) === 'open';
    const found = open ? 'open' : this.turns(Math.PI, Math.PI, moved);
    if (found === 'open') this.widest = Math.max(this.widest, moved);
    if (typeof found === 'string') return found;
    const deep = plus([0, 0, 0], e, Math.cos(found));
    return { out: middle, deep: plus(deep, f, Math.sin(found)) };
  }

  /**
   * Turns of the slope from `turn − half` to `turn + half`: open, closed, or one that fits. A turn leaves the piece
   * in the cylinder, where it moves no corner farther towards the slope than the cylinder's radius times the angle.
   */
  private turns(turn: number, half: number, moved: number): 'open' | 'closed' | number {
    const room = MIDDLE_DEPTH + DEPTH_RATE * moved + (RADIUS + moved) * half;
    if (this.need(turn, RADIUS + moved) > room) return 'closed';
    if (this.need(turn, RADIUS) <= MIDDLE_DEPTH) return turn;
    if (RADIUS * half <= moved) return 'open';
    const first = this.turns(turn - half / 2, half / 2, moved);
    return first === 'closed' ? this.turns(turn + half / 2, half / 2, moved) : first;
  }

  /**
   * The depth on the axis of the shallowest sloping cylinder of a radius that holds the piece; infinite if too wide.
   */
  private need(turn: number, radius: number): number {
    this.work += this.seen.length;
    const [cos, sin] = [Math.cos(turn), Math.sin(turn)];
    let [top, lowest] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
    for (const seen of this.seen) {
      seen.x = cos * seen.e + sin * seen.f;
      seen.y = cos * seen.f - sin * seen.e;
      top = Math.max(top, seen.out);
      lowest = Math.min(lowest, seen.out + seen.x);
    }
    return top - lowest + leastMeeting(this.seen, radius);
  }
}
