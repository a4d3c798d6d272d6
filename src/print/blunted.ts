import { edges } from '../polyhedron/measures.ts';
import type { BluntPlan } from '../recipe/crystal.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { type BluntBody, bevelledBody } from './handling/bevelled.ts';
import { roundedBody } from './handling/rounded.ts';

/** How far blunting takes a face back from its sharpest edge, millimetres; letters stay inside that. */
export function bluntedInset({ solid, measures }: ClosedShape, plan: BluntPlan): number {
  const sharpest = Math.min(...edges(solid, measures).map(({ dihedral }) => dihedral));
  const half = (sharpest * Math.PI) / 360;
  return plan.kind === 'round' ? plan.radius / Math.tan(half) : plan.width / (2 * Math.sin(half));
}

/** The crystal with edges and corners blunted as asked. @throws ObjectError */
export const bluntedBody = (shape: ClosedShape, scale: number, plan: BluntPlan): BluntBody =>
  plan.kind === 'round' ? roundedBody(shape, scale, plan) : bevelledBody(shape, scale, plan);
