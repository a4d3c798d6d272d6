import type { Manifold, Mat4 } from 'manifold-3d';
import type { AxisEnd } from '../../rods/axis-ends.ts';
import { AXIS_SYMBOLS, type Outline, type RodSymbol } from '../../rods/axis-symbol.ts';
import type { RodPlan } from '../../rods/plan.ts';
import type { Workbench } from '../kit.ts';

/** A rod's flat sides may lie this far inside its circle, millimetres. */
const CHORD_ERROR = 0.02;
/** Depth of the hollow in a symbol, in terminal thicknesses. */
export const HOLLOW_DEPTH = 0.4;

/**
 * Corners of the polygon that stands for a circle: a multiple of 12, so that rods share the symmetry of their axes.
 * Rod and bore of one axis have the same number, and so lie side to side.
 */
const sides = (radius: number): number =>
  Math.max(24, 12 * Math.ceil(Math.PI / Math.acos(1 - CHORD_ERROR / radius) / 12));

/** A rod's section: its corners lie on the circle, so that it is nowhere thicker than stated. */
export function rodOutline(diameter: number): Outline {
  return ring(sides(diameter / 2), diameter / 2);
}

/** A bore's section for a rod of this diameter: its sides touch the circle, so that it is nowhere narrower than stated. */
export function boreOutline(rodDiameter: number, clearance: number): Outline {
  const count = sides(rodDiameter / 2);
  return ring(count, (rodDiameter + clearance) / 2 / Math.cos(Math.PI / count));
}

const ring = (count: number, radius: number): Outline =>
  Array.from({ length: count }, (_, i) => {
    const angle = (2 * Math.PI * i) / count;
    return [radius * Math.cos(angle), radius * Math.sin(angle)] as const;
  });

/** The terminal of an axis: its symbol as a plate between two heights, hollowed from above. */
export function terminal(bench: Workbench, symbol: RodSymbol, plan: RodPlan, from: number, to: number): Manifold {
  const { outline, hollow, island } = AXIS_SYMBOLS[symbol];
  const sized = (shape: Outline): Outline => shape.map(([x, y]) => [x * plan.symbolUnit, y * plan.symbolUnit] as const);
  const plate = bench.prism([sized(outline)], from, to);
  if (!hollow) return plate;
  const cut = [sized(hollow), ...(island ? [sized(island).toReversed()] : [])];
  return bench.subtract(plate, [bench.prism(cut, to - HOLLOW_DEPTH * plan.thickness, to + plan.thickness)]);
}

/** Takes the upright z axis to an end of an axis, x to its symbol's x direction. */
export function toEnd({ along: [ax, ay, az], across: [bx, by, bz] }: AxisEnd): Mat4 {
  return [bx, by, bz, 0, ay * bz - az * by, az * bx - ax * bz, ax * by - ay * bx, 0, ax, ay, az, 0, 0, 0, 0, 1];
}
