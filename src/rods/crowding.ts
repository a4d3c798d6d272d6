import type { AxisEnd } from './axis-ends.ts';
import { AXIS_SYMBOLS } from './axis-symbol.ts';
import type { RodEnd } from './plan.ts';

/** Below this factor a symbol hardly stands out from its rod. */
export const SMALLEST_SYMBOL = 0.5;
/** Neighbouring symbols keep this far apart, millimetres. */
const APART = 1;

/**
 * The factor by which the symbols at their usual size must be made smaller so that none touches another. Each terminal
 * is taken as all points within its symbol's radius of its part of the axis, which holds the plate and a cap's collar.
 * @param diameter of the rods, millimetres
 */
export function roomForSymbols(ends: readonly RodEnd[], diameter: number): number {
  let factor = Number.POSITIVE_INFINITY;
  for (const [i, a] of ends.entries())
    for (const b of ends.slice(i + 1)) {
      const radii = (AXIS_SYMBOLS[a.line.symbol].radius + AXIS_SYMBOLS[b.line.symbol].radius) * diameter;
      factor = Math.min(factor, (apart(a, b) - APART) / radii);
    }
  return factor;
}

/** Distance between the terminals' parts of two axes, which are pieces of two rays from the centre. */
function apart(a: RodEnd, b: RodEnd): number {
  const cos = cosine(a.end, b.end);
  const between = (s: number, t: number): number => Math.sqrt(Math.max(0, s * s + t * t - 2 * s * t * cos));
  const nearest = (s: number, { base, tip }: RodEnd): number => between(s, Math.min(tip, Math.max(base, s * cos)));
  return Math.min(nearest(a.base, b), nearest(a.tip, b), nearest(b.base, a), nearest(b.tip, a));
}

const cosine = ({ along: a }: AxisEnd, { along: b }: AxisEnd): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
