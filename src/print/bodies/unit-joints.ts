import type { FacePlane } from '../../shape/face-planes.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { apart, plus, times, type Vector } from '../vectors.ts';
import { largestDisc, type Point } from './convex-polygon.ts';
import type { Cut, Piece } from './cut-piece.ts';
import { type Turn, turned } from './operations.ts';
import { holeDepth, type PinPlan } from './pins.ts';
import { segmentDistance } from './segments.ts';
import { flatFace, inSpace, roomForHole, spread } from './sites.ts';

/** How the first piece is pinned to the neighbour that an operation makes of it, and to the one its inverse makes. */
export interface Joint {
  readonly operation: number;
  /** The inverse operation. */
  readonly back: number;
  /** Points of the middle between both pieces. */
  readonly points: readonly Vector[];
  /** Out of the first piece. */
  readonly normal: Vector;
}

/**
 * Joints with room for pins, the roomiest first; all holes of a piece keep clear of each other. As all pieces are
 * congruent, a hole towards one neighbour is also, carried back by that neighbour's operation, a hole towards another.
 */
export function jointsOf(
  { solid, crystal: { group } }: ClosedShape,
  turns: readonly Turn[],
  piece: Piece,
  planes: readonly FacePlane[],
  cuts: readonly Cut[],
  pins: PinPlan & { readonly wall: number },
): Joint[] {
  const radius = (pins.diameter + pins.clearance) / 2;
  const first = solid.planes.form.length;
  const candidates = piece.faces.flatMap(({ plane, corners }) => {
    const cut = plane - first;
    const operation = cut + 1;
    const back = group.inverseOf[operation];
    if (cut < 0 || back === undefined || back < operation) return [];
    const { normal } = cuts[cut]!;
    const face = { ...flatFace(normal, piece.corners, corners), origin: [0, 0, 0] as const };
    const walls = [...planes, ...cuts.filter((_, i) => i !== cut)];
    const room = roomForHole(face, walls, { radius, margin: pins.wall, from: -holeDepth(pins), to: 0 });
    const disc = largestDisc(room);
    if (!disc) return [];
    const wanted = group.order === 2 ? spread(room, 2).map(({ centre }) => centre) : [disc.centre];
    const places = wanted.map((at: Point) => inSpace(face, at));
    const points = back === operation ? selfPaired(places, turns[operation]!, 2 * radius + pins.wall) : places;
    return [{ operation, back, points, normal, size: disc.radius }];
  });
  const kept: Joint[] = [];
  for (const joint of candidates.toSorted((a, b) => b.size - a.size))
    if (clearOf(joint, kept, turns, holeDepth(pins), 2 * radius + pins.wall)) kept.push(joint);
  return kept;
}

/**
 * The points together with their images under an operation that is its own inverse. A point too near to its image moves
 * to the middle between both, which the operation leaves alone.
 */
function selfPaired(points: readonly Vector[], turn: Turn, least: number): Vector[] {
  const out: Vector[] = [];
  for (const point of points) {
    const image = turned(turn, point);
    const pair = apart(point, image) < least ? [times(plus(point, image), 0.5)] : [point, image];
    if (pair.every((one) => out.every((other) => apart(one, other) >= least))) out.push(...pair);
  }
  return out;
}

type Segment = readonly [Vector, Vector];

/** The axes of a joint's holes in the first piece. */
function segmentsOf({ points, normal, back, operation }: Joint, turns: readonly Turn[], depth: number): Segment[] {
  return points.flatMap((at): Segment[] => {
    const towards: Segment = [at, plus(at, times(normal, -depth))];
    const beyond: Segment = [turned(turns[back]!, at), turned(turns[back]!, plus(at, times(normal, depth)))];
    return back === operation ? [towards] : [towards, beyond];
  });
}

function clearOf(joint: Joint, kept: readonly Joint[], turns: readonly Turn[], depth: number, least: number): boolean {
  const own = segmentsOf(joint, turns, depth);
  const taken = kept.flatMap((other) => segmentsOf(other, turns, depth));
  const meets = (a: Segment, b: Segment): boolean => segmentDistance(a, b) < least;
  return own.every((a, i) => !taken.some((b) => meets(a, b)) && !own.slice(i + 1).some((b) => meets(a, b)));
}

/** A pin between the piece that operation `from` makes and its neighbour across the joint. */
export interface Link {
  readonly from: number;
  readonly joint: Joint;
  readonly at: Vector;
}

/** Pins that join all pieces which joints connect, without closing a ring. */
export function chainOf({ crystal: { group } }: ClosedShape, joints: readonly Joint[]): Link[] {
  const piece = Array.from({ length: group.order }, (_, i) => i);
  const find = (i: number): number => (piece[i] === i ? i : find(piece[i]!));
  return joints.flatMap((joint) =>
    Array.from({ length: group.order }, (_, from) => from).flatMap((from): Link[] => {
      const [a, b] = [find(from), find(group.product[from * group.order + joint.operation]!)];
      if (a === b) return [];
      piece[Math.max(a, b)] = Math.min(a, b);
      return joint.points.map((at) => ({ from, joint, at }));
    }),
  );
}
