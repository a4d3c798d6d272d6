import type { AxisEnd, AxisLine } from '../habit/axis-ends.ts';
import { AXIS_SYMBOLS } from '../habit/axis-symbol.ts';
import type { ClosedHabit } from '../habit/habit.ts';
import { reach as reachOf } from '../polyhedron/measures.ts';
import { dot, type Vector, vectorAt } from './vector.ts';

/** Symmetry axes to be drawn as rods. */
export interface AxisRods {
  readonly lines: readonly AxisLine[];
  /** How far a rod stands out of the crystal, its terminal included, millimetres. */
  readonly reach: number;
  /** Millimetres. */
  readonly diameter: number;
}

/** One end of an axis; heights in millimetres from the crystal's centre along the axis. */
export interface LaidEnd {
  readonly line: AxisLine;
  readonly end: AxisEnd;
  /** Underside of the terminal, which is a plate. */
  readonly base: number;
  /** Its outer face. */
  readonly tip: number;
}

/** Rods with all lengths decided, for instance as they are going to be printed. */
export interface LaidRods {
  readonly ends: readonly (readonly LaidEnd[])[];
  /** Millimetres. */
  readonly diameter: number;
  /** Millimetres for one unit of the axis symbols. */
  readonly symbolUnit: number;
}

/** A face of the crystal at its size: `normal · x ≤ distance`, millimetres. */
export interface FacePlane {
  readonly normal: Vector;
  readonly distance: number;
}

export function facePlanes({ solid, measures }: ClosedHabit, millimetresPerUnit: number): FacePlane[] {
  return measures.faces.map((plane) => {
    const normal = vectorAt(measures.normals, plane);
    const corner = vectorAt(measures.positions, solid.corner[solid.start[plane]!]!);
    return { normal, distance: dot(normal, corner) * millimetresPerUnit };
  });
}

/** Terminal thickness in rod diameters. */
const THICKNESS = 1;
/** Symbols of neighbouring axes are made smaller until they are this far apart, in rod diameters. */
const APART = 0.3;
const SMALLEST_SYMBOL = 0.5;

/**
 * Decides how far rods go. A rod is made longer than `reach` where its terminal would cut into a face otherwise: the
 * plate lies beyond the crystal's top along the axis, or outside one face's plane.
 */
export function layRods(
  habit: ClosedHabit,
  { lines, reach, diameter }: AxisRods,
  millimetresPerUnit: number,
): LaidRods {
  const planes = facePlanes(habit, millimetresPerUnit);
  const exits = lines.map(({ ends }) => ends.map(({ along }) => exitOf(planes, [0, 0, 0], along)));
  const symbolUnit = diameter * roomForSymbols(lines, exits, reach, diameter);
  const ends = lines.map((line, i) =>
    line.ends.map((end, j): LaidEnd => {
      const top = millimetresPerUnit * reachOf(habit.measures.positions, end.along);
      const clear = clearHeight(planes, top, end.along, AXIS_SYMBOLS[line.symbol].radius * symbolUnit);
      const tip = Math.max(exits[i]![j]! + reach, clear + THICKNESS * diameter);
      return { line, end, base: tip - THICKNESS * diameter, tip };
    }),
  );
  return { ends, diameter, symbolUnit };
}

/** How far a line from `start` goes until it leaves the first plane; infinite without planes. */
export function exitOf(planes: readonly FacePlane[], start: Vector, along: Vector): number {
  let least = Number.POSITIVE_INFINITY;
  for (const { normal, distance } of planes) {
    const cos = dot(normal, along);
    if (cos < 1e-9) continue; // parallel to the face, or moving away from it
    least = Math.min(least, (distance - dot(normal, start)) / cos);
  }
  return Math.max(least, 0);
}

/** Lowest place along an axis at which a disc across it is clear of the crystal. */
function clearHeight(planes: readonly FacePlane[], top: number, along: Vector, radius: number): number {
  const outside = planes.flatMap(({ normal, distance }) => {
    const cos = dot(normal, along);
    return cos < 1e-9 ? [] : [(distance + radius * Math.sqrt(Math.max(0, 1 - cos * cos))) / cos];
  });
  return Math.min(top, ...outside);
}

/** The factor, at most 1, by which all symbols are made smaller so that none touches another. */
function roomForSymbols(
  lines: readonly AxisLine[],
  exits: readonly (readonly number[])[],
  reach: number,
  diameter: number,
): number {
  const discs = lines.flatMap(({ ends, symbol }, i) =>
    ends.map(({ along }, j) => ({
      at: along.map((value) => value * (exits[i]![j]! + reach)),
      radius: AXIS_SYMBOLS[symbol].radius * diameter,
    })),
  );
  let factor = 1;
  for (const [i, a] of discs.entries())
    for (const b of discs.slice(i + 1)) {
      const distance = Math.hypot(...a.at.map((value, axis) => value - b.at[axis]!));
      factor = Math.min(factor, (distance - APART * diameter) / (a.radius + b.radius));
    }
  return Math.max(factor, SMALLEST_SYMBOL);
}
