import type { Manifold } from 'manifold-3d';
import type { RodEnd, RodPlan } from '../../rods/plan.ts';
import type { Workbench } from '../kit.ts';
import { rodOutline, terminal, toEnd } from './solid.ts';

/**
 * The crystal and its rods as one solid. Each rod starts inside the crystal, where the crystal's own matter joins all of
 * them, so that nothing needs to cross at the centre.
 */
export function fuseRods(bench: Workbench, body: Manifold, plan: RodPlan): Manifold {
  return bench.union([body, ...rodSolids(bench, plan)]);
}

/** Rods with their ends, in the crystal's frame. */
export const rodSolids = (bench: Workbench, plan: RodPlan): Manifold[] =>
  plan.ends.flat().map((end) => bench.place(rodSolid(bench, end, plan), toEnd(end.end)));

function rodSolid(bench: Workbench, { line, root, base, tip }: RodEnd, plan: RodPlan): Manifold {
  const shaft = bench.prism([rodOutline(plan.diameter)], Math.max(0, root - plan.diameter), (base + tip) / 2);
  return bench.union([shaft, terminal(bench, line.symbol, plan, base, tip)]);
}
