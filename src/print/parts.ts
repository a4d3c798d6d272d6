import type { ClosedHabit } from '../habit/habit.ts';
import { planRods } from '../habit/rod-plan.ts';
import type { PrintPlan } from '../recipe/crystal.ts';
import { crystalMesh } from './body.ts';
import { fuseRods } from './fused-rods.ts';
import { withSolids } from './kit.ts';
import { ontoBed, type Part } from './part.ts';
import { boreForRods } from './separate-rods.ts';

export interface PrintedModel {
  readonly parts: readonly Part[];
  /** Sentences about what was decided on the way. */
  readonly remarks: readonly string[];
}

/** Makes the printable parts of a crystal at its size. @throws ObjectError */
export async function printedParts(
  habit: ClosedHabit,
  scale: number,
  { axes, printer }: PrintPlan,
): Promise<PrintedModel> {
  const crystal = crystalMesh(habit, scale);
  if (!axes) return { parts: [bodyPart('the crystal', crystal)], remarks: [] };
  const plan = planRods(habit, scale, axes);
  if (plan.ends.length === 0) return { parts: [bodyPart('the crystal', crystal)], remarks: plan.remarks };
  const thin =
    axes.diameter < printer.rod.smallest
      ? [
          `Rods of ${axes.diameter} mm are thinner than the ${printer.rod.smallest} mm that "${printer.name}" prints reliably.`,
        ]
      : [];
  return withSolids((bench) => {
    const body = bench.solid(crystal);
    if (axes.fit === 'fused') {
      const mesh = bench.mesh(fuseRods(bench, body, plan));
      return { parts: [bodyPart('the crystal with its symmetry axes', mesh)], remarks: [...plan.remarks, ...thin] };
    }
    const bored = boreForRods(bench, body, plan, printer.rod.clearance);
    return {
      parts: [bodyPart('the crystal, bored for its rods', bench.mesh(bored.body)), ...bored.rods],
      remarks: [...plan.remarks, ...bored.remarks, ...thin],
    };
  });
}

function bodyPart(purpose: string, mesh: Part['mesh']): Part {
  return { name: 'body', purpose, mesh: ontoBed([mesh])[0]!, placed: [mesh] };
}
