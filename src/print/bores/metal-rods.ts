import type { Manifold } from 'manifold-3d';
import { reach } from '../../polyhedron/measures.ts';
import type { RodSymbol } from '../../rods/axis-symbol.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import type { Workbench } from '../kit.ts';
import { boreOutline, toEnd } from '../rods/solid.ts';
import { type BoreEnd, type MetalPlan, planBores } from './metal-plan.ts';
import { boreRemarks } from './metal-remarks.ts';

/** Pieces of bought rod to cut, all alike. */
export interface CutRod {
  readonly symbol: RodSymbol;
  /** Millimetres. */
  readonly diameter: number;
  readonly length: number;
  readonly count: number;
}

export interface BoredForMetal {
  readonly body: Manifold;
  readonly bores: readonly BoreEnd[];
  readonly rods: readonly CutRod[];
  readonly remarks: readonly string[];
}

/** How far a tool stands out of the crystal's farthest point, millimetres. */
const OVERSHOOT = 1;

/**
 * Bores a body along symmetry axes for bought metal rod. Only the first axis can pass the centre; the bores of all others
 * are blind and keep a wall from it and from each other.
 * @param body the crystal in its own frame, whatever else has been done to it
 * @throws ObjectError `rod-too-wide`, `rods-crowded`
 */
export function boreForMetal(
  bench: Workbench,
  body: Manifold,
  shape: ClosedShape,
  scale: number,
  plan: MetalPlan,
): BoredForMetal {
  const bores = planBores(shape, scale, plan);
  if (bores.length === 0)
    return { body, bores, rods: [], remarks: ['The point group has no symmetry axes of this choice to bore along.'] };
  const outline = boreOutline(plan.diameter, plan.clearance[plan.fit]);
  const tops = bores.map(({ end }) => scale * reach(shape.measures.positions, end.along) + OVERSHOOT);
  const tools = bores.flatMap((bore, i) => {
    if (bore.through && bore.end !== bore.line.ends[0]) return [];
    const from = bore.through ? -tops[i + 1]! : bore.from;
    return [bench.place(bench.prism([outline], from, tops[i]!), toEnd(bore.end))];
  });
  const rods = rodsToCut(bores, plan);
  return { body: bench.subtract(body, tools), bores, rods, remarks: boreRemarks(bores, rods, plan) };
}

/** Equal pieces are counted together, to a tenth of a millimetre: nobody saws more exactly. */
function rodsToCut(bores: readonly BoreEnd[], { diameter, reach: out }: MetalPlan): CutRod[] {
  const pieces = bores.flatMap(({ line, end, mouth, from, through }) => {
    if (!through) return [{ symbol: line.symbol, length: mouth.exit - from + out }];
    if (end !== line.ends[0]) return [];
    const length = bores.reduce((sum, one) => (one.line === line ? sum + one.mouth.exit + out : sum), 0);
    return [{ symbol: line.symbol, length }];
  });
  const kinds = new Map<string, CutRod>();
  for (const { symbol, length } of pieces) {
    const tenths = Math.round(length * 10) / 10;
    const key = `${symbol} ${tenths}`;
    kinds.set(key, { symbol, diameter, length: tenths, count: (kinds.get(key)?.count ?? 0) + 1 });
  }
  return [...kinds.values()];
}
