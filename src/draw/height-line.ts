import type { ClosedShape } from '../shape/shape.ts';
import type { OnBody } from './figure.ts';
import { FAINT } from './palette.ts';
import { type Placement, place, project } from './project.ts';
import { element, linePath } from './svg.ts';
import { words } from './symbol-text.ts';
import { type Point, type Vector, vectorAt } from './vector.ts';
import type { ViewFrame } from './view.ts';

export interface HeightLine {
  /** What lies beside the body. */
  readonly svg: string;
  /** The end that is seen on the body, where one is: a point on a face. */
  readonly onBody: OnBody;
}

/** Pixels: how far ticks and extension lines pass the line, and the room that a label keeps from an extension line. */
const TICK = 6;
const CLEAR = 3;
/** Cosine of a tilt that does not foreshorten heights by as much as the paper shows. */
const UPRIGHT = 1 - 1e-6;
/** Below this c is seen end-on, and a height has no length on the page. */
const END_ON = 1e-9;

/**
 * A dimension line for the height along c at `x` on the page, between thin lines from the crystal's highest and lowest
 * points, or the middles of its top and base. It is as much foreshortened as c is, and says then that the height is the
 * true one. Null where the view is along c.
 */
export function heightLine(
  shape: ClosedShape,
  frame: ViewFrame,
  placement: Placement,
  { x, millimetresPerUnit }: { readonly x: number; readonly millimetresPerUnit: number },
): HeightLine | null {
  if (Math.abs(frame.up[2]) < END_ON) return null;
  const { low, high } = shape.measures;
  const spot = (point: Vector): Point => place(placement, project(frame, point));
  const ends = [
    { point: spot(extreme(shape, 1)), isSeen: frame.toward[2] >= 0 },
    { point: spot(extreme(shape, -1)), isSeen: frame.toward[2] <= 0 },
  ] as const;
  const levels = ends.map(({ point }) => point[1]);
  const stroke = { stroke: FAINT, fill: 'none' };
  const line = linePath([
    [
      [x, levels[0]!],
      [x, levels[1]!],
    ],
    ...levels.map((y) => [[x - TICK, y] as const, [x + TICK, y] as const] as const),
  ]);
  const extension = ({ point }: (typeof ends)[number]): string =>
    element('path', { d: linePath([[[x + TICK, point[1]], point]]), ...stroke, 'stroke-width': 0.7 });
  const seen = ends.filter(({ isSeen }) => isSeen);
  const hidden = ends.filter(({ isSeen }) => !isSeen);
  const millimetres = (high[2] - low[2]) * millimetresPerUnit;
  return {
    svg: [
      element('path', { d: line, ...stroke, 'stroke-width': 1 }),
      ...heightWords([x - 10, (levels[0]! + levels[1]!) / 2], millimetres, frame.up[2] < UPRIGHT),
      ...hidden.map(extension),
    ].join('\n'),
    onBody: {
      svg: seen
        .map((end) => extension(end) + element('circle', { cx: end.point[0], cy: end.point[1], r: 1.8, fill: FAINT }))
        .join('\n'),
      places: seen.map(({ point: [end, y] }) => [
        [x, y - CLEAR],
        [end + CLEAR, y - CLEAR],
        [end + CLEAR, y + CLEAR],
        [x, y + CLEAR],
      ]),
    },
  };
}

function heightWords([x, y]: Point, millimetres: number, isForeshortened: boolean): string[] {
  const look = { fill: FAINT, anchor: 'end' } as const;
  const height = words(`${millimetres.toFixed(1)} mm`, {
    at: [x, y + (isForeshortened ? -3 : 4.5)],
    size: 13,
    ...look,
  });
  return isForeshortened ? [height, words('true height', { at: [x, y + 12], size: 11, ...look })] : [height];
}

/** Vertices as near to the highest as this share of the crystal's size are as high. */
const LEVEL = 1e-9;

/** The highest point along c (sense 1) or the lowest (−1); of a level face or edge, its middle. */
function extreme({ measures: { positions, low, high, circumscribedRadius } }: ClosedShape, sense: 1 | -1): Vector {
  const level = sense === 1 ? high[2] : low[2];
  const there = Array.from({ length: positions.length / 3 }, (_, i) => vectorAt(positions, i)).filter(
    ([, , z]) => Math.abs(z - level) < LEVEL * circumscribedRadius,
  );
  const [xs, ys] = [0, 1].map((axis) => there.map((point) => point[axis]!)) as [number[], number[]];
  const middle = (values: readonly number[]): number => (Math.min(...values) + Math.max(...values)) / 2;
  return [middle(xs), middle(ys), level];
}
