import type { PrintPlan } from '../recipe/crystal.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { beforePrinting, type PrintingFinding } from './before/findings.ts';
import { restPart } from './before/rest.ts';
import type { BluntBody } from './handling/bevelled.ts';
import { type HandlingFinding, handlingReport } from './handling/report.ts';
import { withSolids } from './kit.ts';
import type { Part } from './part.ts';

export type ModelFinding = PrintingFinding | HandlingFinding;

/** The parts turned onto the faces on which they print with the least support and the most stability. */
export const laidFlat = (parts: readonly Part[], { printer }: PrintPlan): Promise<Part[]> =>
  withSolids((bench) => parts.map((part) => ({ ...part, mesh: restPart(bench, part.mesh, printer).mesh })));

/** What to know before printing, and before others handle the model: measured values beside the figures they compare to. */
export const examined = (
  parts: readonly Part[],
  shape: ClosedShape,
  scale: number,
  { printer }: PrintPlan,
  blunted: BluntBody | null,
): Promise<ModelFinding[]> =>
  withSolids((bench) => [
    ...beforePrinting(bench, parts, shape, scale, printer),
    ...handlingReport(bench, parts, shape, scale, blunted ? { body: blunted } : {}),
  ]);
