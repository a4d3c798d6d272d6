import { convexHull } from '../polyhedron/polygon.ts';
import { AXIS_SYMBOLS, type Outline } from '../rods/axis-symbol.ts';
import type { RodEnd, RodPlan } from '../rods/plan.ts';
import { exitOf, type FacePlane } from '../shape/face-planes.ts';
import { project } from './project.ts';
import { along, cross, dot, type Point, type Vector } from './vector.ts';
import type { ViewFrame } from './view.ts';
import { EDGE_ON, stateOf } from './visible.ts';

/** What a piece of a rod shows; every kind has its own colour. */
export type RodPieceKind = 'rod' | 'side' | 'symbol' | 'hollow';

export interface RodPiece {
  readonly kind: RodPieceKind;
  /** To be painted before the crystal's body, which may cover it, or after. */
  readonly layer: 'behind' | 'before';
  /** In the picture plane, millimetres. */
  readonly outline: readonly Point[];
  /** What of its outline is drawn as lines; a rod has none where it goes on in its other layer. */
  readonly rims: readonly (readonly Point[])[];
}

/** Laid out as for printing (a `RodPlan` is one), or only some of the ends. */
export interface DrawnRods extends Pick<RodPlan, 'diameter' | 'symbolUnit'> {
  readonly ends: readonly (readonly RodEnd[])[];
}

/**
 * The pieces of all rods in painting order. Why painting in order is exact here:
 * - Against the body. A point that stands out of the crystal lies outside the plane of some face, and the whole crystal
 *   lies inside. If that face does not turn away from the viewer, the way from the point to the viewer only leads
 *   farther out, so the crystal cannot cover the point; if it turns away, the way from the crystal to the viewer only
 *   leads farther in, so the point cannot cover the crystal.
 * - Among rods. All start at one centre. A rod that makes the angle a with the line of sight has depth s·cot a where it
 *   is seen at the distance s from the centre, so of two rods seen in one place the one with the smaller angle is nearer.
 */
export function rodPieces(
  { ends, diameter, symbolUnit }: DrawnRods,
  planes: readonly FacePlane[],
  frame: ViewFrame,
): RodPiece[] {
  return ends
    .flat()
    .map((laid) => ({ laid, nearness: dot(laid.end.along, frame.toward) }))
    .sort((a, b) => a.nearness - b.nearness)
    .flatMap(({ laid, nearness }) => {
      const shaft = shaftPieces(laid, diameter / 2, planes, frame);
      const plate = platePieces(laid, symbolUnit, planes, frame);
      return nearness > 0 ? [...shaft, ...plate] : [...plate, ...shaft];
    });
}

/** Lines along a rod by which its seen half is drawn, less one. */
const STRIPS = 32;

/**
 * The seen half of a round rod, from where each line of its surface leaves the crystal. From where a line is outside
 * the plane of a face that does not turn away, it belongs before the body; a rod that leaves through an edge or a corner
 * may have lines that start behind.
 */
function shaftPieces(laid: RodEnd, radius: number, planes: readonly FacePlane[], frame: ViewFrame): RodPiece[] {
  const axis = laid.end.along;
  const across = cross(axis, frame.toward);
  const sine = Math.hypot(...across);
  if (sine < EDGE_ON) return []; // seen end-on
  const sideways: Vector = [across[0] / sine, across[1] / sine, across[2] / sine];
  const facing = cross(sideways, axis);
  const notAway = planes.filter(({ normal }) => stateOf(normal, frame.toward) !== 'back');
  const lines = Array.from({ length: STRIPS + 1 }, (_, strip) => {
    const angle = (Math.PI * strip) / STRIPS;
    const start = along(along([0, 0, 0], sideways, radius * Math.cos(angle)), facing, radius * Math.sin(angle));
    const at = (height: number): Point => project(frame, along(start, axis, Math.min(height, laid.base)));
    const [exit, clear] = [exitOf(planes, start, axis), exitOf(notAway, start, axis)];
    return { foot: at(exit), clear: at(clear), top: at(laid.base), seen: exit === clear, short: clear >= laid.base };
  });
  const [first, last] = [lines[0]!, lines[STRIPS]!];
  const tops = lines.map(({ top }) => top).reverse();
  const pieces: RodPiece[] = [];
  if (lines.some(({ seen }) => !seen))
    pieces.push({
      kind: 'rod',
      layer: 'behind',
      outline: [...lines.map(({ foot }) => foot), ...tops],
      rims: [first, last].map(({ foot, top }) => [foot, top]),
    });
  if (lines.some(({ short }) => !short))
    pieces.push({
      kind: 'rod',
      layer: 'before',
      outline: [...lines.map(({ clear }) => clear), ...tops],
      rims: [...[first, last].map(({ clear, top }) => [clear, top]), ...seenFeet(lines)],
    });
  return pieces;
}

/** Where a rod stands on faces that do not turn away: runs of neighbouring feet. */
function seenFeet(lines: readonly { foot: Point; seen: boolean }[]): Point[][] {
  const runs: Point[][] = [[]];
  for (const { foot, seen } of lines) {
    if (seen) runs.at(-1)!.push(foot);
    else runs.push([]);
  }
  return runs.filter((run) => run.length > 1);
}

/** The terminal: a plate with the outline of its symbol across the axis. Its face shows from the outer side only. */
function platePieces(laid: RodEnd, symbolUnit: number, planes: readonly FacePlane[], frame: ViewFrame): RodPiece[] {
  const { end, line, base, tip } = laid;
  const { outline, hollow, island } = AXIS_SYMBOLS[line.symbol];
  const spread = cross(end.along, end.across);
  const corner = ([x, y]: readonly [number, number], height: number): Vector =>
    along(along(along([0, 0, 0], end.across, x * symbolUnit), spread, y * symbolUnit), end.along, height);
  const flat = (shape: Outline, height: number): Point[] => shape.map((p) => project(frame, corner(p, height)));
  const state = stateOf(end.along, frame.toward);
  const corners = outline.map((p) => corner(p, base));
  const layer = layerOf(corners, end.along, planes, frame);
  const side = convexHull([...flat(outline, base), ...flat(outline, tip)]);
  const piece = (kind: RodPieceKind, shape: readonly Point[]): RodPiece => ({
    kind,
    layer,
    outline: shape,
    rims: kind === 'side' ? [[...shape, ...shape.slice(0, 1)]] : [],
  });
  if (state === 'edge-on') return [piece('side', side)];
  if (state === 'back') return [piece('side', side), piece('symbol', flat(outline, base))];
  return [
    piece('side', side),
    piece('symbol', flat(outline, tip)),
    ...(hollow ? [piece('hollow', flat(hollow, tip))] : []),
    ...(island ? [piece('symbol', flat(island, tip))] : []),
  ];
}

/** Millimetres; far above rounding, far below what shows. */
const TOUCHING = 1e-6;

/**
 * By a plane that keeps the plate from the crystal: of a face, or else the plate's own underside. Planes that do so come
 * with their images by the axis, and if the axis leans towards the viewer so does one of them; the plate is then painted
 * before the body like the rod that it covers.
 */
function layerOf(
  corners: readonly Vector[],
  axis: Vector,
  planes: readonly FacePlane[],
  { toward }: ViewFrame,
): RodPiece['layer'] {
  const between = planes.filter(({ normal, distance }) =>
    corners.every((corner) => dot(normal, corner) > distance - TOUCHING),
  );
  const normals = between.length > 0 ? between.map(({ normal }) => normal) : [axis];
  return normals.every((normal) => stateOf(normal, toward) === 'back') ? 'behind' : 'before';
}
