import type { Manifold, Mat4 } from 'manifold-3d';
import { printZone } from '../../crystal/indices.ts';
import type { AxisEnd } from '../../rods/axis-ends.ts';
import { axisWords } from '../../rods/axis-words.ts';
import { COLLAR, GAP, type RodEnd, type RodPlan } from '../../rods/plan.ts';
import { ObjectError } from '../../shape/object-error.ts';
import { clearDepth } from '../bores/clear-depth.ts';
import type { Workbench } from '../kit.ts';
import { ontoBed, type Part } from '../part.ts';
import { ROD_COLOUR } from '../surfaces.ts';
import { angleBetween } from '../vectors.ts';
import { boreOutline, HOLLOW_DEPTH, rodOutline, terminal, toEnd } from './solid.ts';

/** Plastic left between two bores that meet near the centre, millimetres. */
const WALL = 1.2;

/** Rods to push in, the bored body, and what to say about them. */
export interface Bored {
  readonly body: Manifold;
  readonly rods: readonly Part[];
  readonly remarks: readonly string[];
}

/**
 * Bores the body for rods that are printed by themselves. Only one rod can pass the centre: the first line's, which is
 * of the highest order; its far symbol is a cap. Rods of all other lines are split and end short of the centre.
 * @throws ObjectError when the bores would leave too little to hold a rod
 */
export function boreForRods(bench: Workbench, body: Manifold, plan: RodPlan, clearance: number): Bored {
  const [through, ...split] = plan.ends;
  const bore = boreOutline(plan.diameter, clearance);
  const halves = split.flat().map((end) => ({ end, from: blindDepth(end, plan, clearance) }));
  const tools = [
    bench.place(bench.prism([bore], -through![1].tip, through![0].tip), toEnd(through![0].end)),
    ...halves.map(({ end, from }) => bench.place(bench.prism([bore], from, end.tip), toEnd(end.end))),
  ];
  return {
    body: bench.subtract(body, tools),
    rods: [...throughParts(bench, through!, plan, clearance), ...halfParts(bench, halves, plan)],
    remarks: tell(through!, split),
  };
}

/** Where a blind bore ends: so far from the centre that a wall stays between it and every other bore. */
function blindDepth(end: RodEnd, plan: RodPlan, clearance: number): number {
  const radius = Math.hypot(...boreOutline(plan.diameter, clearance)[0]!);
  const others = plan.ends.flat().filter(({ line }) => line !== end.line);
  const neighbours = others.map(({ end: { along }, line }) => ({
    angle: angleBetween(end.end.along, along),
    through: line === plan.ends[0]![0].line,
  }));
  const depth = clearDepth(neighbours, radius, WALL);
  if (end.exit - depth >= 2 * plan.diameter) return depth;
  throw new ObjectError(
    'rods-crowded',
    `separate rods leave too little to hold the one along ${printZone(end.line.direction)}: ${Math.max(0, end.exit - depth).toFixed(1)} mm of bore`,
    'choose fewer axes or thinner rods, a larger crystal, or fused rods',
  );
}

function throughParts(
  bench: Workbench,
  [near, far]: readonly [RodEnd, RodEnd],
  plan: RodPlan,
  clearance: number,
): Part[] {
  const symbol = near.line.symbol;
  const floor = far.tip - (HOLLOW_DEPTH + 0.25) * plan.thickness;
  const collar = [rodOutline(plan.diameter + clearance + 2 * COLLAR.wall)];
  const shaft = bench.prism([rodOutline(plan.diameter)], GAP / 2 - floor, (near.base + near.tip) / 2);
  const rod = bench.union([shaft, terminal(bench, symbol, plan, near.base, near.tip)]);
  const plate = terminal(bench, symbol, plan, far.base, far.tip);
  const sleeve = bench.prism(collar, far.base - COLLAR.length, (far.base + far.tip) / 2);
  const socket = bench.prism([boreOutline(plan.diameter, clearance)], far.base - 2 * COLLAR.length, floor);
  const cap = bench.subtract(bench.union([plate, sleeve]), [socket]);
  const axis = axisWords(symbol);
  const name = fileWord(symbol);
  return [
    part(bench, `rod-${name}-through`, `${axis} rod that passes through the centre`, rod, [near.end]),
    part(bench, `cap-${name}`, `symbol to glue on the far end of the ${axis} rod`, cap, [far.end]),
  ];
}

/** Equal half rods are one part with several places. */
function halfParts(bench: Workbench, halves: readonly { end: RodEnd; from: number }[], plan: RodPlan): Part[] {
  const kinds = new Map<string, { end: RodEnd; from: number; ends: AxisEnd[] }>();
  for (const { end, from } of halves) {
    const key = [end.line.symbol, ...[from, end.base].map((value) => value.toFixed(6))].join(' ');
    const kind = kinds.get(key) ?? { end, from, ends: [] };
    kind.ends.push(end.end);
    kinds.set(key, kind);
  }
  const total = new Map<string, number>();
  const names = [...kinds.values()].map(({ end }) => {
    const name = fileWord(end.line.symbol);
    total.set(name, (total.get(name) ?? 0) + 1);
    return `rod-${name}${total.get(name) === 1 ? '' : `-${total.get(name)}`}`;
  });
  return [...kinds.values()].map(({ end, from, ends }, i) => {
    const shaft = bench.prism([rodOutline(plan.diameter)], from + GAP, (end.base + end.tip) / 2);
    const rod = bench.union([shaft, terminal(bench, end.line.symbol, plan, end.base, end.tip)]);
    const towards = ends.map(({ direction }) => printZone(direction)).join(' ');
    return part(bench, names[i]!, `${axisWords(end.line.symbol)} half rod for ${towards}`, rod, ends);
  });
}

function part(bench: Workbench, name: string, purpose: string, solid: Manifold, ends: readonly AxisEnd[]): Part {
  const [mesh] = ontoBed([bench.mesh(bench.place(solid, UPSIDE_DOWN), 0)]);
  const surfaces = [{ name, colour: ROD_COLOUR, curved: true }];
  return {
    name,
    purpose,
    surfaces,
    mesh: mesh!,
    placed: ends.map((end) => bench.mesh(bench.place(solid, toEnd(end)), 0)),
  };
}

/** Rods are printed standing on their symbol. */
const UPSIDE_DOWN: Mat4 = [1, 0, 0, 0, 0, -1, 0, 0, 0, 0, -1, 0, 0, 0, 0, 1];

const fileWord = (symbol: string): string => symbol.replace('-', 'bar').replace('/', '_');

function tell([near]: readonly [RodEnd, RodEnd], split: readonly (readonly [RodEnd, RodEnd])[]): string[] {
  const named = (words: string, { line }: RodEnd): string =>
    `${axisWords(line.symbol)}${words} along ${printZone(line.direction)}`;
  const through = `The ${named(' rod', near)} passes through the centre; the symbol at its far end is a cap to glue on.`;
  if (split.length === 0) return [through];
  return [through, `Split at the centre into two half rods each: ${split.map(([end]) => named('', end)).join(', ')}.`];
}
