import { printZone } from '../../crystal/indices.ts';
import { axisWords } from '../../rods/axis-words.ts';
import { type BoreEnd, boreRadius, type MetalPlan } from './metal-plan.ts';
import type { CutRod } from './metal-rods.ts';

const number = (value: number): string => String(Number(value.toFixed(1)));
/** More names than this nobody reads. */
const MOST_NAMES = 6;
/** Bores by their directions, or by their number and kinds. */
function towards(bores: readonly BoreEnd[]): string {
  if (bores.length <= MOST_NAMES) return `towards ${bores.map(({ end }) => printZone(end.direction)).join(', ')}`;
  const kinds = new Map<string, number>();
  for (const { line } of bores) kinds.set(axisWords(line.symbol), (kinds.get(axisWords(line.symbol)) ?? 0) + 1);
  return `at ${[...kinds].map(([words, count]) => `${count} ends of ${words} axes`).join(' and ')}`;
}

/** What was decided: which rods pass, where mouths are no clean holes in a face, and what to cut. */
export function boreRemarks(bores: readonly BoreEnd[], rods: readonly CutRod[], plan: MetalPlan): string[] {
  return [...passing(bores, plan), ...mouths(bores, plan), toCut(rods, plan), ...alone(plan)];
}

function passing(bores: readonly BoreEnd[], { wall, depth }: MetalPlan): string[] {
  const [through] = bores.filter((bore) => bore.through);
  const shortened = bores.filter((bore) => bore.shortened);
  const split = [...new Set(bores.filter((bore) => !bore.through).map(({ line }) => line))];
  const named =
    split.length > MOST_NAMES
      ? `those of the other ${split.length} axes`
      : `those along ${split.map(({ direction }) => printZone(direction)).join(', ')}`;
  const remarks: string[] = [];
  if (through && split.length > 0)
    remarks.push(
      `The ${axisWords(through.line.symbol)} bore along ${printZone(through.line.direction)} passes through the centre; ${named} are blind from both ends, with at least ${wall} mm of plastic between all bores.`,
    );
  if (shortened.length > 0 && depth !== 'through')
    remarks.push(
      `Bores ${towards(shortened)} end before the ${number(depth.blind)} mm asked for, so that ${wall} mm of plastic stay between bores.`,
    );
  return remarks;
}

/** Bores whose rim meets an edge of the crystal: the rod then stands in it. */
function mouths(bores: readonly BoreEnd[], plan: MetalPlan): string[] {
  const radius = boreRadius(plan);
  const at = (place: 'edge' | 'corner'): readonly BoreEnd[] => bores.filter(({ mouth }) => mouth.through === place);
  const inFaces = bores.filter(({ mouth }) => mouth.through === 'face');
  const over = inFaces.filter(({ mouth }) => mouth.room < radius);
  const thin = inFaces.filter(({ mouth }) => mouth.room >= radius && mouth.room < radius + plan.wall);
  const told = (which: readonly BoreEnd[], words: string): string[] =>
    which.length === 0 ? [] : [`Bores ${towards(which)} ${words}`];
  return [
    ...told(
      at('edge'),
      'leave through an edge of the crystal, so those rods stand in the edge and take a piece of it.',
    ),
    ...told(at('corner'), 'leave through a corner of the crystal, so those rods stand in place of the corner.'),
    ...told(over, 'are wider than the room on their face and break out over its edges.'),
    ...told(thin, `come nearer to an edge of the crystal than the wall of ${plan.wall} mm: the rim there is thin.`),
  ];
}

function toCut(rods: readonly CutRod[], { diameter, reach, fit, clearance }: MetalPlan): string {
  const list = rods.map(({ symbol, length, count }) => `${count} of ${number(length)} mm (${axisWords(symbol)})`);
  return `Metal rod of ${diameter} mm to cut: ${list.join(', ')}; each stands out ${number(reach)} mm. The bores are ${clearance[fit]} mm wider, for a ${fit === 'press' ? 'press' : 'sliding'} fit.`;
}

/** Design guides advise to drill out holes of 2 mm and less, which filament printers close up. */
const DRILL = 2;
const alone = ({ diameter }: MetalPlan): string[] =>
  diameter > DRILL
    ? []
    : [`Bores for ${diameter} mm rod come out tight in filament: be ready to clear them with a drill.`];
