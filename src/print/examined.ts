import type { Mat4 } from 'manifold-3d';
import type { PrintPlan } from '../recipe/crystal.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { beforePrinting, type PrintingFinding } from './before/findings.ts';
import { restPart } from './before/rest.ts';
import type { BluntBody } from './handling/bevelled.ts';
import { type HandlingFinding, handlingReport } from './handling/report.ts';
import { type Workbench, withSolids } from './kit.ts';
import type { Mesh } from './mesh.ts';
import { jobs, type Part } from './part.ts';

export type ModelFinding = PrintingFinding | HandlingFinding;

/** The parts turned onto the faces on which they print with the least support and the most stability. */
export const laidFlat = (parts: readonly Part[], { printer }: PrintPlan): Promise<Part[]> =>
  withSolids((bench) =>
    jobs(parts).flatMap(([leader, ...others]) => {
      const { mesh, matrix } = restPart(bench, leader!.mesh, printer);
      return [{ ...leader!, mesh }, ...others.map((part) => ({ ...part, mesh: moved(part.mesh, matrix) }))];
    }),
  );

/** @param matrix by columns */
function moved(mesh: Mesh, m: Mat4): Mesh {
  const { positions } = mesh;
  const row = (at: number, i: number): number =>
    m[i]! * positions[at]! + m[4 + i]! * positions[at + 1]! + m[8 + i]! * positions[at + 2]! + m[12 + i]!;
  return { ...mesh, positions: positions.map((_, k) => row(k - (k % 3), k % 3)) };
}

/** What a printer makes of parts that are printed in one job: one body. */
const asPrinted = (bench: Workbench, parts: readonly Part[]): Part[] =>
  jobs(parts).map(([leader, ...others]) => {
    if (others.length === 0) return leader!;
    const solids = [leader!, ...others].map(({ mesh: { positions, triangles } }) =>
      bench.solid({ positions, triangles }),
    );
    return { ...leader!, mesh: bench.mesh(bench.union(solids), 0) };
  });

/** What to know before printing, and before others handle the model: measured values beside the figures they compare to. */
export const examined = (
  parts: readonly Part[],
  shape: ClosedShape,
  scale: number,
  { printer }: PrintPlan,
  blunted: BluntBody | null,
): Promise<ModelFinding[]> =>
  withSolids((bench) => {
    const printed = asPrinted(bench, parts);
    return [
      ...beforePrinting(bench, printed, shape, scale, printer),
      ...handlingReport(bench, printed, shape, scale, blunted ? { body: blunted } : {}),
    ];
  });
