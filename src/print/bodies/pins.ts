import type { Manifold } from 'manifold-3d';
import { GAP } from '../../rods/plan.ts';
import type { Workbench } from '../kit.ts';
import type { Mesh } from '../mesh.ts';
import { ontoBed, type Part } from '../part.ts';
import { boreOutline, rodOutline } from '../rods/solid.ts';
import { ROD_COLOUR } from '../surfaces.ts';
import type { Vector } from '../vectors.ts';
import { frameAlong } from './place.ts';

/** A printed pin that holds two parts together, half in each; millimetres. */
export interface PinPlan {
  readonly diameter: number;
  readonly length: number;
  /** Diameter of its hole minus its own. */
  readonly clearance: number;
}

/** How deep a hole goes on each side of the joint: half the pin, and room at its end. */
export const holeDepth = ({ length }: PinPlan): number => (length + GAP) / 2;

/** Both holes of a pin as one tool, across the joint at `at`. */
export function holeTool(bench: Workbench, plan: PinPlan, normal: Vector, at: Vector): Manifold {
  const depth = holeDepth(plan);
  return bench.place(bench.prism([boreOutline(plan.diameter, plan.clearance)], -depth, depth), frameAlong(normal, at));
}

/** The pins as one part, printed standing. */
export function pinPart(
  bench: Workbench,
  name: string,
  purpose: string,
  { diameter, length }: PinPlan,
  places: readonly { readonly normal: Vector; readonly at: Vector }[],
): Part {
  const pin = bench.prism([rodOutline(diameter)], -length / 2, length / 2);
  const own = (solid: Manifold): Mesh => bench.mesh(solid, 0);
  return {
    name,
    purpose,
    surfaces: [{ name, colour: ROD_COLOUR }],
    mesh: ontoBed([own(pin)])[0]!,
    placed: places.map(({ normal, at }) => own(bench.place(pin, frameAlong(normal, at)))),
  };
}
