import { printZone } from '../../crystal/indices.ts';
import type { AxisEnd, AxisLine } from '../../rods/axis-ends.ts';
import { type FacePlane, facePlanes } from '../../shape/face-planes.ts';
import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { boreOutline } from '../rods/solid.ts';
import { angleBetween } from '../vectors.ts';
import { clearDepth } from './clear-depth.ts';
import { type Mouth, mouthOf } from './mouth.ts';

/** Bores for bought metal rod. Lengths in millimetres. */
export interface MetalPlan {
  /** Of the chosen axes, the one that passes through first; `axisLines` gives the highest order first. */
  readonly lines: readonly AxisLine[];
  /** Of the rod. */
  readonly diameter: number;
  readonly fit: 'press' | 'slide';
  /** Bore diameter minus rod diameter for each fit, from the printer's profile. */
  readonly clearance: { readonly press: number; readonly slide: number };
  /** Through: the first axis passes the centre, the others go as deep as a wall allows. Blind: from the surface in. */
  readonly depth: 'through' | { readonly blind: number };
  /** Least plastic between bores, and between a bore and the surface beside it. */
  readonly wall: number;
  /** How far rods shall stand out of the crystal; for the lengths to cut. */
  readonly reach: number;
}

/** A bore at one end of an axis; a bore that passes the centre is two of these with `from` 0. */
export interface BoreEnd {
  readonly line: AxisLine;
  readonly end: AxisEnd;
  readonly mouth: Mouth;
  /** Where it begins, from the centre along the axis. */
  readonly from: number;
  readonly through: boolean;
  /** A blind bore that had to stop before the depth asked for. */
  readonly shortened: boolean;
}

/** A rod is held when its bore is at least this many diameters deep (common practice for dowels). */
const HELD = 2;

/** @throws ObjectError when rods are wider than the crystal or their bores would leave too little to hold them */
export function planBores(shape: ClosedShape, scale: number, plan: MetalPlan): BoreEnd[] {
  refuseStrange(plan);
  const planes = facePlanes(shape, scale);
  const { lines, depth } = plan;
  refuseWide(lines, planes, plan);
  const radius = boreRadius(plan);
  const ends = lines.flatMap((line) => line.ends.map((end) => ({ line, end })));
  const passes = (line: AxisLine): boolean => depth === 'through' && line === lines[0];
  return ends.map(({ line, end }): BoreEnd => {
    const mouth = mouthOf(planes, end.along);
    if (passes(line)) return { line, end, mouth, from: 0, through: true, shortened: false };
    const neighbours = ends
      .filter((other) => other.end !== end)
      .map((other) => ({ angle: angleBetween(end.along, other.end.along), through: passes(other.line) }));
    const nearest = clearDepth(neighbours, radius, plan.wall);
    const wanted = depth === 'through' ? nearest : mouth.exit - depth.blind;
    const from = Math.max(nearest, wanted);
    refuseShallow(line, mouth.exit - from, plan);
    return { line, end, mouth, from, through: false, shortened: from - wanted > 1e-9 };
  });
}

/** Bores are polygons about their circle; this is the radius of their corners. */
export const boreRadius = ({ diameter, clearance, fit }: MetalPlan): number =>
  Math.hypot(...boreOutline(diameter, clearance[fit])[0]!);

function refuseStrange({ diameter, depth, wall, reach }: MetalPlan): void {
  const lengths = { 'a rod diameter': diameter, 'a wall': wall, 'a reach': reach };
  const all = depth === 'through' ? lengths : { ...lengths, 'a depth of bores': depth.blind };
  for (const [what, value] of Object.entries(all))
    if (!(value > 0 || (value === 0 && what === 'a reach')) || !Number.isFinite(value))
      throw new ObjectError('rod-too-wide', `${what} of ${value} mm makes no sense`, 'give millimetres above 0');
}

/** Each bore and a wall about it must lie inside every face that runs beside it. */
function refuseWide(lines: readonly AxisLine[], planes: readonly FacePlane[], plan: MetalPlan): void {
  const radius = boreRadius(plan);
  for (const { ends, direction } of lines) {
    const { along } = ends[0];
    const across = Math.min(...planes.map(({ normal, distance }) => distance / Math.sin(angleBetween(normal, along))));
    if (across - radius >= plan.wall) continue;
    const widest = Math.max(0, 2 * (across - plan.wall) - plan.clearance[plan.fit]);
    throw new ObjectError(
      'rod-too-wide',
      `a bore for ${plan.diameter} mm rod along ${printZone(direction)} leaves less than the wall of ${plan.wall} mm beside it; there is room for rod of ${Math.floor(10 * widest) / 10} mm`,
      'choose thinner rod or a larger crystal',
    );
  }
}

function refuseShallow({ direction }: AxisLine, depth: number, { diameter }: MetalPlan): void {
  if (depth >= HELD * diameter - 1e-9) return;
  throw new ObjectError(
    'rods-crowded',
    `the bore along ${printZone(direction)} would be ${Math.max(0, depth).toFixed(1)} mm deep; ${diameter} mm rod needs ${HELD * diameter} mm to hold`,
    'bore deeper, choose fewer axes or thinner rod, or a larger crystal',
  );
}
