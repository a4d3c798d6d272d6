import type { FacePlane } from '../../shape/face-planes.ts';
import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { times, type Vector } from '../vectors.ts';
import { mm, mmAtMost } from './body-parts.ts';
import type { Point } from './convex-polygon.ts';
import type { Piece } from './cut-piece.ts';
import { sameAfterHalfTurn } from './half-turn.ts';
import type { HalvesPlan } from './halves.ts';
import { pocketEnd } from './magnets.ts';
import { holeDepth } from './pins.ts';
import { type FlatFace, flatFace, inSpace, roomForHole, spread } from './sites.ts';

/** Where two halves are joined: points of the cut. */
export interface JoinSites {
  readonly dowels: readonly Vector[];
  readonly magnets: readonly Vector[];
  readonly remarks: readonly string[];
}

/** @throws ObjectError `dowel`, `magnet` */
export function joinSites(
  halves: readonly Piece[],
  planes: readonly FacePlane[],
  { solid }: ClosedShape,
  plan: HalvesPlan,
): JoinSites {
  const { dowel, magnets = null, plane } = plan;
  if (!dowel && !magnets) return { dowels: [], magnets: [], remarks: [] };
  const [half] = halves;
  const section = half!.faces.find((face) => face.plane === solid.planes.form.length)!;
  const seen = flatFace(plane.normal, half!.corners, section.corners);
  const cut = { ...seen, origin: times(plane.normal, plane.offset) };
  const laid = layOut(cut, planes, plan);
  const dowels = laid.flatMap(({ kind, at }) => (kind === 'dowel' ? [at] : []));
  const keyed = keyHalves(
    halves,
    cut,
    dowels,
    spareBefore(
      laid.map(({ at }) => at),
      plan,
    ),
  );
  return {
    dowels: keyed.dowels.map((at) => inSpace(cut, at)),
    magnets: laid.flatMap(({ kind, at }) => (kind === 'magnet' ? [inSpace(cut, at)] : [])),
    remarks: keyed.remarks,
  };
}

type Kind = 'dowel' | 'magnet';

/** Dowels outside, magnets between them; with little room one magnet a half instead of two. */
function layOut(cut: FlatFace, planes: readonly FacePlane[], plan: HalvesPlan): { kind: Kind; at: Point }[] {
  const count = plan.dowel?.count ?? 0;
  const first = Array<Kind>(Math.ceil(count / 2)).fill('dowel');
  const last = Array<Kind>(Math.floor(count / 2)).fill('dowel');
  const between: Kind[][] = plan.magnets ? [['magnet', 'magnet'], ['magnet']] : [[]];
  for (const magnets of between) {
    const kinds = [...first, ...magnets, ...last];
    const places = placesFor(cut, planes, plan, kinds.length);
    if (places) return kinds.map((kind, i) => ({ kind, at: places[i]! }));
  }
  throw noRoom(cut, planes, plan);
}

/** So many places with room for what is widest and deepest, far enough from each other; else null. */
function placesFor(cut: FlatFace, planes: readonly FacePlane[], plan: HalvesPlan, count: number): Point[] | null {
  const { dowel, magnets = null, wall } = plan;
  const radius = Math.max(0, ...[dowel, magnets].map((one) => (one ? (one.diameter + one.clearance) / 2 : 0)));
  const depth = Math.max(dowel ? holeDepth(dowel) : 0, magnets ? pocketEnd(magnets) : 0);
  const room = roomForHole(cut, planes, { radius, margin: wall, from: -depth, to: depth });
  if (room.length < 3) return null;
  const places = spread(room, count).map(({ centre }) => centre);
  const apart = places.every((p, i) => i === 0 || distance(p, places[i - 1]!) >= 2 * radius + wall);
  return places.length === count && apart ? places : null;
}

function noRoom(cut: FlatFace, planes: readonly FacePlane[], plan: HalvesPlan): ObjectError {
  const { dowel, magnets = null } = plan;
  const asked = [
    ...(dowel ? [`${dowel.count} dowels of ${mm(dowel.diameter)} by ${mm(dowel.length)}`] : []),
    ...(magnets ? [`magnets of ${mm(magnets.diameter)}`] : []),
  ].join(' and ');
  const shorter = dowel && !magnets ? longestDowel(cut, planes, plan) : 0;
  return new ObjectError(
    magnets ? 'magnet' : 'dowel',
    `the cut has no room for ${asked} with ${mm(plan.wall)} of plastic around them`,
    shorter > 0
      ? `dowels of ${mmAtMost(shorter)} length would fit; or choose thinner or fewer ones, or a larger crystal`
      : 'choose thinner, shorter or fewer ones, a larger crystal, or a plane nearer to the centre',
  );
}

const HALVINGS = 20;

/** The longest dowels of this width for which there is room, 0 for none. */
function longestDowel(cut: FlatFace, planes: readonly FacePlane[], plan: HalvesPlan): number {
  const dowel = plan.dowel!;
  let [low, high] = [0, dowel.length];
  for (let i = 0; i < HALVINGS; i++) {
    const length = (low + high) / 2;
    if (placesFor(cut, planes, { ...plan, dowel: { ...dowel, length } }, dowel.count)) low = length;
    else high = length;
  }
  return low < dowel.diameter ? 0 : low;
}

/** How far the last dowel can move towards its neighbour, millimetres. */
function spareBefore(places: readonly Point[], { dowel, magnets = null, wall }: HalvesPlan): number {
  const [neighbour, last] = places.slice(-2);
  const diameter = Math.max(0, ...[dowel, magnets].map((one) => (one ? one.diameter + one.clearance : 0)));
  return neighbour && last ? distance(neighbour, last) - diameter - wall : 0;
}

/**
 * The last dowel moves by this share of its distance from the first, and by so many millimetres at least, when the cut
 * alone would let the halves be joined turned round: enough to see.
 */
const OFF_MIDDLE = { share: 0.15, least: 1 };

/**
 * Dowels are all alike, so halves can be pushed together after half a turn about the middle between them. Where the
 * outlines of the cut would then match although the halves do not, one dowel moves off its place.
 */
function keyHalves(halves: readonly Piece[], cut: FlatFace, dowels: readonly Point[], spare: number) {
  const [first, last] = [dowels[0], dowels.at(-1)];
  if (!first || !last) return { dowels, remarks: [] };
  if (dowels.length === 1)
    return { dowels, remarks: ['One dowel lets the halves turn against each other: mark how they belong together.'] };
  const middle: Point = [(first[0] + last[0]) / 2, (first[1] + last[1]) / 2];
  const outline = cut.polygon.map((p) => inSpace(cut, p));
  const axis = { through: inSpace(cut, middle), along: cut.normal };
  const sameOutline = sameAfterHalfTurn(outline, axis);
  const harmless = halves.some(({ corners, faces }) => {
    const used = [...new Set(faces.flatMap((face) => face.corners))];
    return sameAfterHalfTurn(
      used.map((v): Vector => [corners[3 * v]!, corners[3 * v + 1]!, corners[3 * v + 2]!]),
      axis,
    );
  });
  if (!sameOutline || harmless) return { dowels, remarks: [] };
  const whole = distance(first, last);
  const by = Math.min(spare, OFF_MIDDLE.share * whole);
  if (by < OFF_MIDDLE.least)
    return { dowels, remarks: ['The halves also match turned round: mark how they belong together.'] };
  const moved: Point = [last[0] + (by / whole) * (first[0] - last[0]), last[1] + (by / whole) * (first[1] - last[1])];
  return {
    dowels: [...dowels.slice(0, -1), moved],
    remarks: ['One dowel stands nearer to the middle than the other, so that the halves match in one way only.'],
  };
}

const distance = (p: Point, q: Point): number => Math.hypot(p[0] - q[0], p[1] - q[1]);
