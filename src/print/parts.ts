import type { PrintPlan } from '../recipe/crystal.ts';
import type { PrinterProfile } from '../recipe/schema.ts';
import { AXIS_SYMBOLS } from '../rods/axis-symbol.ts';
import { planRods, type RodPlan } from '../rods/plan.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { crystalMesh } from './body.ts';
import { withSolids } from './kit.ts';
import type { Mesh } from './mesh.ts';
import { ontoBed, type Part, type Surface } from './part.ts';
import { fuseRods } from './rods/fused.ts';
import { boreForRods } from './rods/separate.ts';
import { crystalSurfaces } from './surfaces.ts';

export interface PrintedModel {
  readonly parts: readonly Part[];
  /** Sentences about what was decided on the way. */
  readonly remarks: readonly string[];
}

/** Makes the printable parts of a crystal at its size. @throws ObjectError */
export async function printedParts(
  shape: ClosedShape,
  scale: number,
  { axes, printer }: PrintPlan,
): Promise<PrintedModel> {
  const crystal = crystalMesh(shape, scale);
  const surfaces = crystalSurfaces(shape.crystal, axes?.fit === 'separate' ? 'bores' : 'rods');
  const other = surfaces.length - 1;
  if (!axes) return { parts: [bodyPart('the crystal', crystal, surfaces)], remarks: [] };
  const plan = planRods(shape, scale, axes);
  if (plan.ends.length === 0) return { parts: [bodyPart('the crystal', crystal, surfaces)], remarks: plan.remarks };
  const thin = thinRods(plan, printer);
  return withSolids((bench) => {
    const body = bench.solid(crystal);
    if (axes.fit === 'fused') {
      const mesh = bench.mesh(fuseRods(bench, body, plan), other);
      return {
        parts: [bodyPart('the crystal with its symmetry axes', mesh, surfaces)],
        remarks: [...plan.remarks, ...thin],
      };
    }
    const bored = boreForRods(bench, body, plan, printer.rod.clearance);
    return {
      parts: [bodyPart('the crystal, bored for its rods', bench.mesh(bored.body, other), surfaces), ...bored.rods],
      remarks: [...plan.remarks, ...bored.remarks, ...thin],
    };
  });
}

function bodyPart(purpose: string, mesh: Mesh, surfaces: readonly Surface[]): Part {
  return { name: 'body', purpose, surfaces, mesh: ontoBed([mesh])[0]!, placed: [mesh] };
}

function thinRods({ ends, diameter, symbolUnit }: RodPlan, { name, rod, wall }: PrinterProfile): string[] {
  const remarks: string[] = [];
  if (diameter < rod.smallest)
    remarks.push(`Rods of ${diameter} mm are thinner than the ${rod.smallest} mm that "${name}" prints reliably.`);
  const rim = symbolUnit * Math.min(...ends.flat().map(({ line }) => AXIS_SYMBOLS[line.symbol].rim));
  if (rim < wall)
    remarks.push(
      `The rims of the hollow symbols are ${rim.toFixed(2)} mm, thinner than the ${wall} mm that "${name}" prints.`,
    );
  return remarks;
}
