import { printZone } from '../crystal/indices.ts';
import { reach } from '../polyhedron/measures.ts';
import type { AxesPlan } from '../recipe/crystal.ts';
import { exitOf, type FacePlane, facePlanes, metPlanes } from '../shape/face-planes.ts';
import { ObjectError } from '../shape/object-error.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { type AxisEnd, type AxisLine, axisLines } from './axis-ends.ts';
import { AXIS_SYMBOLS } from './axis-symbol.ts';
import { roomForSymbols, SMALLEST_SYMBOL } from './crowding.ts';

/** All lengths in millimetres, measured from the crystal's centre along the axis. */
export interface RodEnd {
  readonly line: AxisLine;
  readonly end: AxisEnd;
  /** Where the axis leaves the crystal. */
  readonly exit: number;
  /** Farthest out that the rod's flat end lies wholly inside the crystal. */
  readonly root: number;
  /** Underside of the terminal. */
  readonly base: number;
  /** Outer face of the terminal. */
  readonly tip: number;
}

/** Rods with all lengths decided. */
export interface RodPlan {
  /** Two ends a line, in the order of the lines. */
  readonly ends: readonly (readonly [RodEnd, RodEnd])[];
  readonly diameter: number;
  /** Millimetres for one unit of the axis symbols. */
  readonly symbolUnit: number;
  /** Of the terminals, which are plates. */
  readonly thickness: number;
  readonly remarks: readonly string[];
}

/** Bodies stay this far from what they must not touch, millimetres. */
export const GAP = 0.5;
/** A cap's collar, and the wall around its socket, millimetres. */
export const COLLAR = { length: 4, wall: 1.6 };
/** Terminal thickness in rod diameters. */
const THICKNESS = 1;

/**
 * Finds the chosen axes of a crystal at its size, and how far each rod goes. Terminals clear the crystal and, as far as
 * there is room, each other.
 * A group without any axes gives a plan without rods, unless certain axes were asked for.
 * @throws ObjectError when no axis fits the choice, the rods are wider than the crystal, or separate rods would touch
 */
export function planRods(shape: ClosedShape, millimetresPerUnit: number, plan: AxesPlan): RodPlan {
  const lines = axisLines(shape.crystal, plan);
  if (lines.length === 0 && (plan.orders || plan.directions)) throw noAxis(shape, plan);
  const planes = facePlanes(shape, millimetresPerUnit);
  refuseWideRods(lines, planes, plan.diameter);
  const lay = (symbolUnit: number): (readonly [RodEnd, RodEnd])[] =>
    lines.map((line) => {
      const [first, second] = line.ends;
      const top = ({ along }: AxisEnd): number => millimetresPerUnit * reach(shape.measures.positions, along);
      const layOne = (end: AxisEnd): RodEnd => layEnd(line, end, { planes, top: top(end) }, plan, symbolUnit);
      return [layOne(first), layOne(second)];
    });
  const room = roomForSymbols(lay(plan.diameter).flat(), plan.diameter);
  const factor = Math.min(1, Math.max(room, SMALLEST_SYMBOL));
  const ends = lay(plan.diameter * factor);
  const crowded = roomForSymbols(ends.flat(), plan.diameter) < factor;
  if (crowded && plan.fit === 'separate')
    throw new ObjectError('rods-crowded', 'the ends of separate rods would touch each other', CROWDED_HINT);
  const remarks = remarksOn(ends, plan, factor, crowded);
  return {
    ends,
    diameter: plan.diameter,
    symbolUnit: plan.diameter * factor,
    thickness: THICKNESS * plan.diameter,
    remarks,
  };
}

export const CROWDED_HINT = 'choose fewer axes or thinner rods, a larger crystal, or fused rods';

/** The crystal as one end of an axis meets it: its faces, and its farthest corner in that direction. */
interface Obstacle {
  readonly planes: readonly FacePlane[];
  readonly top: number;
}

function layEnd(line: AxisLine, end: AxisEnd, { planes, top }: Obstacle, plan: AxesPlan, symbolUnit: number): RodEnd {
  const radius = plan.diameter / 2;
  const thickness = THICKNESS * plan.diameter;
  const met = metPlanes(planes, end.along);
  const exit = exitOf(planes, [0, 0, 0], end.along);
  const root = Math.min(...met.map(({ cos, sin, distance }) => (distance - GAP - radius * sin) / cos));
  /** Nearest place at which a disc across the axis clears the crystal: beyond its top, or outside one face's plane. */
  const clear = (r: number): number =>
    Math.min(top + GAP, ...met.map(({ cos, sin, distance }) => (distance + GAP + r * sin) / cos));
  const collar = plan.fit === 'separate' ? clear(radius + COLLAR.wall + GAP) + COLLAR.length : 0;
  const base = Math.max(exit + plan.reach - thickness, clear(AXIS_SYMBOLS[line.symbol].radius * symbolUnit), collar);
  return { line, end, exit, root, base, tip: base + thickness };
}

/** A rod fits when a disc of its width, and a little more, across the axis at the centre lies inside every face. */
function refuseWideRods(lines: readonly AxisLine[], planes: readonly FacePlane[], diameter: number): void {
  for (const { ends, direction } of lines) {
    const across = Math.min(...planes.map(({ normal, distance }) => distance / sineBetween(normal, ends[0].along)));
    const widest = 2 * (across - GAP);
    if (diameter <= widest) continue;
    throw new ObjectError(
      'rod-too-wide',
      `a rod of ${number(diameter)} mm along ${printZone(direction)} is wider than the crystal, which leaves room for ${number(Math.max(0, widest))} mm there`,
      `choose a thinner rod (axes: { diameter: … }) or a larger size`,
    );
  }
}

const sineBetween = (a: FacePlane['normal'], b: FacePlane['normal']): number =>
  Math.hypot(a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]);

function remarksOn(
  ends: readonly (readonly [RodEnd, RodEnd])[],
  plan: AxesPlan,
  factor: number,
  crowded: boolean,
): string[] {
  if (ends.length === 0) return ['The point group has no symmetry axes, so there are no rods.'];
  const remarks: string[] = [];
  if (factor < 1)
    remarks.push(
      `The symbols at the rods' ends are made ${Math.round(100 * factor)} % of their usual size, so that neighbours stay apart; a larger crystal leaves more room.`,
    );
  if (crowded)
    remarks.push('Even so some of them run into each other: choose fewer axes, thinner rods or a larger crystal.');
  const longest = Math.max(...ends.flat().map(({ tip, exit }) => tip - exit));
  if (longest > plan.reach + 0.05)
    remarks.push(
      `Some rods stand out up to ${number(longest)} mm instead of ${number(plan.reach)} mm, so that their ends clear the faces.`,
    );
  return remarks;
}

function noAxis({ crystal: { group } }: ClosedShape, { orders, directions }: AxesPlan): ObjectError {
  const asked = [
    ...(orders ? [`of order ${orders.join(' or ')}`] : []),
    ...(directions ? [`along ${directions.map((d) => printZone(d)).join(' or ')}`] : []),
  ].join(' or ');
  return new ObjectError(
    'no-axis',
    `point group ${group.hermannMauguin} has no symmetry axis ${asked}`,
    `\`goniolith group ${group.key}\` lists its elements`,
  );
}

const number = (value: number): string => String(Number(value.toFixed(1)));
