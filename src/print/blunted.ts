import type { BluntPlan } from '../recipe/crystal.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { type BluntBody, bevelledBody } from './handling/bevelled.ts';
import { roundedBody } from './handling/rounded.ts';

/** The crystal with edges and corners blunted as asked. @throws ObjectError */
export const bluntedBody = (shape: ClosedShape, scale: number, plan: BluntPlan): BluntBody =>
  plan.kind === 'round' ? roundedBody(shape, scale, plan) : bevelledBody(shape, scale, plan);
