import type { Manifold } from 'manifold-3d';
import { AXIS_SYMBOLS } from '../../rods/axis-symbol.ts';
import type { RodPlan } from '../../rods/plan.ts';
import type { Workbench } from '../kit.ts';
import { hullOf } from '../lettering/solids.ts';
import { cross, times, unit, type Vector } from '../vectors.ts';

/** A round bar from one point to another in the crystal's frame, millimetres. */
export interface RodLine {
  readonly from: Vector;
  readonly to: Vector;
  readonly radius: number;
}

/** Rods as bars: the shafts, and the circles about the symbols at their ends. */
export function rodLines({ ends, diameter, symbolUnit }: RodPlan): RodLine[] {
  return ends.flat().flatMap(({ line, end: { along }, base, tip }) => [
    { from: [0, 0, 0] as const, to: times(along, base), radius: diameter / 2 },
    { from: times(along, base), to: times(along, tip), radius: symbolUnit * AXIS_SYMBOLS[line.symbol].radius },
  ]);
}

const SIDES = 24;

/** The room in which a rod can be lifted straight up, with clearance: a bar and its copy raised by `lift`, hulled. */
export function rodSlot(
  bench: Workbench,
  { from, to, radius }: RodLine,
  up: Vector,
  clearance: number,
  lift: number,
): Manifold {
  const along = unit([to[0] - from[0], to[1] - from[1], to[2] - from[2]]);
  const length = Math.hypot(to[0] - from[0], to[1] - from[1], to[2] - from[2]);
  const aside = unit(cross(along, Math.abs(along[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0]));
  const across = cross(along, aside);
  const wide = (radius + clearance) / Math.cos(Math.PI / SIDES);
  const ring = Array.from({ length: SIDES }, (_, i): [number, number] => {
    const angle = (2 * Math.PI * i) / SIDES;
    return [wide * Math.cos(angle), wide * Math.sin(angle)];
  });
  const upright = bench.prism([ring], -clearance, length + clearance);
  const bar = bench.place(upright, [...aside, 0, ...across, 0, ...along, 0, ...from, 1]);
  const [x, y, z] = times(up, lift);
  const raised = bench.place(bar, [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0, x, y, z, 1]);
  return hullOf(bench, bench.union([bar, raised]));
}

/** How low a rod reaches along `up`, its thickness included. */
export function lowestOf({ from, to, radius }: RodLine, up: Vector): number {
  const along = unit([to[0] - from[0], to[1] - from[1], to[2] - from[2]]);
  const cos = along[0] * up[0] + along[1] * up[1] + along[2] * up[2];
  const height = (p: Vector): number => p[0] * up[0] + p[1] * up[1] + p[2] * up[2];
  return Math.min(height(from), height(to)) - radius * Math.sqrt(Math.max(0, 1 - cos * cos));
}
