import { printZone } from '../crystal/indices.ts';
import { type AxisEnd, type AxisLine, axisLines } from '../habit/axis-ends.ts';
import { AXIS_SYMBOLS } from '../habit/axis-symbol.ts';
import type { ClosedHabit } from '../habit/habit.ts';
import { reach } from '../polyhedron/measures.ts';
import type { AxesPlan } from '../recipe/crystal.ts';
import { PrintError } from './print-error.ts';

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

export interface RodPlan {
  /** Two ends a line, in the order of the lines. */
  readonly ends: readonly (readonly [RodEnd, RodEnd])[];
  readonly diameter: number;
  /** Millimetres for one unit of the axis symbols. */
  readonly symbolUnit: number;
  readonly thickness: number;
  readonly remarks: readonly string[];
}

/** Bodies stay this far from what they must not touch. */
export const GAP = 0.5;
/** Terminal thickness in rod diameters. */
const THICKNESS = 1;
/** A cap's collar, and the wall around its socket (see `separate-rods.ts`). */
export const COLLAR = { length: 4, wall: 1.6 };

interface Plane {
  readonly normal: readonly [number, number, number];
  readonly distance: number;
}

/**
 * Finds the chosen axes of a crystal at its size, and how far each rod goes.
 * @throws PrintError when no axis fits the choice, or the rods are wider than the crystal
 */
export function planRods(habit: ClosedHabit, scale: number, plan: AxesPlan): RodPlan {
  const lines = axisLines(habit.crystal, plan);
  if (lines.length === 0) throw noAxis(habit, plan);
  const planes = facePlanes(habit, scale);
  const top = ({ along }: AxisEnd): number => scale * reach(habit.measures.positions, along);
  const { diameter } = plan;
  refuseWideRods(lines, planes, diameter);
  const draft = lines.map(({ ends }) => ends.map((end) => exitOf(end, planes)));
  const factor = roomForSymbols(lines, draft, plan.reach, diameter);
  const symbolUnit = diameter * factor;
  const ends = lines.map((line) => {
    const [first, second] = line.ends.map((end) => layEnd(line, end, { planes, top: top(end) }, plan, symbolUnit));
    return [first!, second!] as const;
  });
  return { ends, diameter, symbolUnit, thickness: THICKNESS * diameter, remarks: remarksOn(ends, plan, factor) };
}

/** The crystal as one end of an axis meets it: its faces, and its farthest corner in that direction. */
interface Obstacle {
  readonly planes: readonly Plane[];
  readonly top: number;
}

function layEnd(line: AxisLine, end: AxisEnd, { planes, top }: Obstacle, plan: AxesPlan, symbolUnit: number): RodEnd {
  const radius = plan.diameter / 2;
  const thickness = THICKNESS * plan.diameter;
  const facing = facingPlanes(end, planes);
  const exit = exitOf(end, planes);
  const root = Math.min(...facing.map(({ cos, sin, distance }) => (distance - GAP - radius * sin) / cos));
  /** Nearest place at which a disc across the axis clears the crystal: beyond its top, or outside one face's plane. */
  const clear = (r: number): number =>
    Math.min(top + GAP, ...facing.map(({ cos, sin, distance }) => (distance + GAP + r * sin) / cos));
  const collar = plan.fit === 'separate' ? clear(radius + COLLAR.wall + GAP) + COLLAR.length : 0;
  const base = Math.max(exit + plan.reach - thickness, clear(AXIS_SYMBOLS[line.symbol].radius * symbolUnit), collar);
  return { line, end, exit, root, base, tip: base + thickness };
}

function facingPlanes({ along }: AxisEnd, planes: readonly Plane[]) {
  return planes.flatMap(({ normal, distance }) => {
    const cos = dot(normal, along);
    return cos > 1e-9 ? [{ cos, sin: Math.sqrt(Math.max(0, 1 - cos * cos)), distance }] : [];
  });
}

const exitOf = (end: AxisEnd, planes: readonly Plane[]): number =>
  Math.min(...facingPlanes(end, planes).map(({ cos, distance }) => distance / cos));

function refuseWideRods(lines: readonly AxisLine[], planes: readonly Plane[], diameter: number): void {
  for (const { ends, direction } of lines) {
    const across = Math.min(
      ...planes.flatMap(({ normal, distance }) => {
        const cos = dot(normal, ends[0].along);
        const sin = Math.sqrt(Math.max(0, 1 - cos * cos));
        return sin > 1e-9 ? [distance / sin] : [];
      }),
    );
    const widest = 2 * (across - GAP);
    if (diameter <= widest) continue;
    throw new PrintError(
      'rod-too-wide',
      `a rod of ${number(diameter)} mm along ${printZone(direction)} is wider than the crystal, which leaves room for ${number(Math.max(0, widest))} mm there`,
      `choose a thinner rod (axes: { diameter: … }) or a larger size`,
    );
  }
}

/** Symbols of neighbouring axes must not touch: the factor, at most 1, by which all are made smaller for that. */
function roomForSymbols(
  lines: readonly AxisLine[],
  exits: readonly number[][],
  reach: number,
  diameter: number,
): number {
  const all = lines.flatMap(({ ends, symbol }, i) =>
    ends.map(({ along }, j) => {
      const out = exits[i]![j]! + reach;
      return { at: along.map((value) => value * out), radius: AXIS_SYMBOLS[symbol].radius * diameter };
    }),
  );
  let factor = 1;
  for (const [i, a] of all.entries())
    for (const b of all.slice(i + 1)) {
      const apart = Math.hypot(a.at[0]! - b.at[0]!, a.at[1]! - b.at[1]!, a.at[2]! - b.at[2]!);
      factor = Math.min(factor, (apart - 2 * GAP) / (a.radius + b.radius));
    }
  return Math.max(factor, SMALLEST_SYMBOL);
}

/** Below this a symbol hardly stands out from its rod. */
const SMALLEST_SYMBOL = 0.5;

function remarksOn(ends: readonly (readonly [RodEnd, RodEnd])[], plan: AxesPlan, factor: number): string[] {
  const remarks: string[] = [];
  if (factor < 1)
    remarks.push(
      `The symbols at the rods' ends are made ${Math.round(100 * factor)} % of their usual size, so that neighbours stay apart; a larger crystal leaves more room.`,
    );
  const longest = Math.max(...ends.flat().map(({ tip, exit }) => tip - exit));
  if (longest > plan.reach + 0.05)
    remarks.push(
      `Some rods stand out up to ${number(longest)} mm instead of ${number(plan.reach)} mm, so that their ends clear the faces.`,
    );
  return remarks;
}

function facePlanes({ solid, measures, crystal }: ClosedHabit, scale: number): Plane[] {
  return measures.faces.map((face) => ({
    normal: [measures.normals[3 * face]!, measures.normals[3 * face + 1]!, measures.normals[3 * face + 2]!],
    distance: crystal.forms[solid.planes.form[face]!]!.distance * scale,
  }));
}

function noAxis({ crystal: { group } }: ClosedHabit, { orders, directions }: AxesPlan): PrintError {
  const asked = [
    ...(orders ? [`of order ${orders.join(' or ')}`] : []),
    ...(directions ? [`along ${directions.map((d) => printZone(d)).join(' or ')}`] : []),
  ].join(' or ');
  return new PrintError(
    'no-axis',
    `point group ${group.hermannMauguin} has no symmetry axis ${asked}`,
    `\`goniolith group ${group.key}\` lists its elements`,
  );
}

const number = (value: number): string => String(Number(value.toFixed(1)));
const dot = (a: readonly number[], b: readonly number[]): number => a[0]! * b[0]! + a[1]! * b[1]! + a[2]! * b[2]!;
