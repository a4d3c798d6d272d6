import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { crystalMesh } from '../body.ts';
import type { Workbench } from '../kit.ts';
import type { Part } from '../part.ts';
import { crystalSurfaces } from '../surfaces.ts';
import { type BodyParts, mm, mmAtMost } from './body-parts.ts';
import { insetPiece, pieceMesh } from './cut-piece.ts';
import { drainRemarks, drainTool, placeDrains } from './drains.ts';
import { inwards, together } from './face-mesh.ts';
import { lieOn } from './lie.ts';
import { downwards, type Resting } from './resting.ts';

/** All lengths in millimetres. */
export interface HollowPlan {
  readonly wall: number;
  /** Holes through which resin runs out; null leaves the cavity sealed. */
  readonly drains: { readonly diameter: number; readonly count: number } | null;
  /** By default the largest face. */
  readonly resting?: Resting;
}

/**
 * The crystal with a cavity whose every face is parallel to the crystal's and one wall further in. Forms may vanish
 * from the cavity; none can appear in it that the crystal does not show.
 * @throws ObjectError `wall` when nothing is left to hollow out, `drain` when no face has room for a drain hole
 */
export function hollowBody(bench: Workbench, shape: ClosedShape, scale: number, plan: HollowPlan): BodyParts {
  const cavity = plan.wall > 0 ? insetPiece(shape, scale, plan.wall) : null;
  if (!cavity) throw tooThick(shape, scale, plan.wall);
  const surfaces = crystalSurfaces(shape.crystal, 'cavity');
  const other = surfaces.length - 1;
  const outer = crystalMesh(shape, scale);
  const inner = pieceMesh(cavity, () => other);
  const down = downwards(shape, plan.resting);
  const asPart = (mesh: Part['mesh'], purpose: string): Part => ({
    name: 'body',
    purpose,
    surfaces,
    mesh: lieOn(mesh, down),
    placed: [mesh],
  });
  if (!plan.drains) {
    const sealed = together([outer, inwards(inner)]);
    const part = asPart(sealed, `the crystal, hollow, with walls of ${mm(plan.wall)}`);
    return { parts: [part], remarks: [SEALED], warnings: [] };
  }
  const drains = placeDrains(shape, cavity, down, plan.wall, plan.drains);
  const body = bench.subtract(bench.solid(outer), [
    bench.solid(inner),
    ...drains.map((drain) => drainTool(bench, drain)),
  ]);
  const part = asPart(bench.mesh(body, other), `the crystal, hollow, with walls of ${mm(plan.wall)} and drain holes`);
  return { parts: [part], remarks: drainRemarks(drains, plan.drains.diameter), warnings: [] };
}

const SEALED =
  'The cavity is sealed: well for filament, but in a resin print it would hold liquid resin, which needs drain holes.';

function tooThick(shape: ClosedShape, scale: number, wall: number): ObjectError {
  const largest = largestInset(shape, scale);
  return new ObjectError(
    'wall',
    wall > 0
      ? `walls of ${mm(wall)} leave nothing to hollow out: half the crystal's thinnest part is ${mm(largest)}`
      : `a wall of ${mm(wall)} is no wall`,
    `choose a wall between 0 and ${mmAtMost(largest)}, a larger crystal, or a solid body`,
  );
}

const HALVINGS = 40;

/** How far the faces can move in until nothing is left: the radius of the largest ball in the crystal, millimetres. */
export function largestInset(shape: ClosedShape, scale: number): number {
  let [low, high] = [0, shape.measures.circumscribedRadius * scale];
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (low + high) / 2;
    if (insetPiece(shape, scale, middle)) low = middle;
    else high = middle;
  }
  return low;
}
