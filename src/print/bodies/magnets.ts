import type { Manifold } from 'manifold-3d';
import { ObjectError } from '../../shape/object-error.ts';
import type { Workbench } from '../kit.ts';
import { boreOutline } from '../rods/solid.ts';
import type { Vector } from '../vectors.ts';
import { mm } from './body-parts.ts';
import { frameAlong } from './place.ts';

/** Disc magnets in closed pockets; millimetres. */
export interface MagnetPlan {
  readonly diameter: number;
  readonly thickness: number;
  /** Pocket minus magnet, across and in depth. */
  readonly clearance: number;
  /** Printed plastic between a magnet and the cut, by default and at least `LEAST_COVER`. */
  readonly cover?: number;
}

/** Closed pockets are covered by three layers of 0.2 mm at least (common practice). */
export const LEAST_COVER = 0.6;

export const coverOf = ({ cover }: MagnetPlan): number => cover ?? LEAST_COVER;

/** How far from the cut a pocket ends. */
export const pocketEnd = (plan: MagnetPlan): number => coverOf(plan) + plan.thickness + plan.clearance;

/** @throws ObjectError for a cover that could break */
export function refuseThinCover(plan: MagnetPlan): void {
  if (coverOf(plan) >= LEAST_COVER) return;
  throw new ObjectError(
    'magnet',
    `${mm(coverOf(plan))} of plastic over a magnet is too thin to hold it`,
    `choose at least ${mm(LEAST_COVER)}`,
  );
}

/** A pocket on one side of the cut: the side that `into` points to. */
export function pocketTool(bench: Workbench, plan: MagnetPlan, into: Vector, at: Vector): Manifold {
  const pocket = bench.prism([boreOutline(plan.diameter, plan.clearance)], coverOf(plan), pocketEnd(plan));
  return bench.place(pocket, frameAlong(into, at));
}

/** Flux density at the pole of a strong small disc, kilogauss (0.3 T; CPSC magnet guidance, calculated example). */
const POLE_KILOGAUSS = 3;
/** Flux index limit for loose magnets that fit the small-parts cylinder, kG²mm² (16 CFR 1262; EN 71-1 has the same). */
const INDEX_LIMIT = 50;

/** What must be told with magnets. */
export function magnetWarning({ diameter }: MagnetPlan, count: number): string {
  const index = POLE_KILOGAUSS ** 2 * (Math.PI / 4) * diameter ** 2;
  return [
    `This model holds ${count} magnets.`,
    'Swallowed magnets pull together through the wall of the bowel, with holes, sepsis and death as results: if one is',
    'missing, seek medical help at once.',
    `A disc of ${mm(diameter)} with 0.3 T at its pole has a flux index of about ${Math.round(index)} kG²mm²; for loose`,
    `magnets that fit the small-parts cylinder the limit is ${INDEX_LIMIT} kG²mm² (16 CFR 1262.2–.3).`,
    'Dowels alone need no magnets. Check with your safety officer and with local rules before use.',
  ].join(' ');
}

/** When to stop the printer: the halves lie on their cut. */
export const pauseRemark = (plan: MagnetPlan, gap: number): string =>
  `Each half is printed on its cut: pause it at ${mm(pocketEnd(plan) - gap / 2)} above the bed, lay the magnets in with opposite poles facing, and go on.`;
