import { toCartesian } from '../crystal/cell.ts';
import { symmetryElements } from '../crystal/elements.ts';
import { keyOf, opposite, turnZone } from '../crystal/integers.ts';
import type { PointGroup } from '../crystal/point-group.ts';
import { type IntegerMatrix, type Zone, zone } from '../crystal/spaces.ts';
import type { Crystal } from '../recipe/crystal.ts';
import { isRotoinversion, orderOf, type RodSymbol } from './axis-symbol.ts';

type Vector = readonly [number, number, number];

/** A symmetry axis as a line through the crystal with two ends. */
export interface AxisLine {
  readonly direction: Zone;
  readonly symbol: RodSymbol;
  readonly polar: boolean;
  readonly ends: readonly [AxisEnd, AxisEnd];
}

/**
 * One end of an axis, with the directions its symbol is drawn by. Ends that the group exchanges carry the same symbol
 * turned the same way, so that a crystal with rods keeps its symmetry.
 */
export interface AxisEnd {
  readonly direction: Zone;
  /** Unit vector outward along the axis, Cartesian. */
  readonly along: Vector;
  /** Unit vector across it: the x direction of the symbol. */
  readonly across: Vector;
}

/** Which lines to take: by order (negative for rotoinversion axes only), by direction, or all where both are null. */
export interface AxisChoice {
  readonly orders: readonly number[] | null;
  readonly directions: readonly Zone[] | null;
}

/** The chosen symmetry axes of a crystal, highest order first. */
export function axisLines(crystal: Crystal, { orders, directions }: AxisChoice): AxisLine[] {
  const { group } = crystal;
  const wanted = directions && new Set(directions.flatMap((d) => [keyOf(d), keyOf(opposite(d))]));
  const ends = endsOf(crystal);
  return symmetryElements(group)
    .lines.flatMap(({ direction, symbol, polar }) => (symbol === 'm' ? [] : [{ direction, symbol, polar }]))
    .filter(({ symbol, direction }) => {
      const byOrder = orders?.some((n) => orderOf(symbol) === Math.abs(n) && (n > 0 || isRotoinversion(symbol)));
      const byDirection = wanted?.has(keyOf(direction));
      return orders || directions ? byOrder || byDirection : true;
    })
    .map((line): AxisLine => {
      const back = zone(...opposite(line.direction));
      return { ...line, ends: [ends.get(keyOf(line.direction))!, ends.get(keyOf(back))!] };
    })
    .sort((a, b) => orderOf(b.symbol) - orderOf(a.symbol));
}

/** All axis ends by direction: one of each set of equivalent ends is laid out, the group carries it to the others. */
function endsOf(crystal: Crystal): Map<string, AxisEnd> {
  const { group, metric } = crystal;
  const ends = new Map<string, AxisEnd>();
  const directions = symmetryElements(group).lines.flatMap(({ direction }) => [
    direction,
    zone(...opposite(direction)),
  ]);
  for (const first of directions) {
    if (ends.has(keyOf(first))) continue;
    const sideways = acrossDirection(group, crystal, first);
    for (const { matrix } of group.operations) {
      const direction = turnZone(matrix, first);
      if (ends.has(keyOf(direction))) continue;
      const along = unit(toCartesian(metric, direction));
      ends.set(keyOf(direction), { direction, along, across: perpendicular(turn(crystal, matrix, sideways), along) });
    }
  }
  return ends;
}

/** A direction across the axis that its mirror planes keep: in one of them, else towards any other axis or edge. */
function acrossDirection(group: PointGroup, { metric }: Crystal, axis: Zone): Vector {
  const along = unit(toCartesian(metric, axis));
  const mirrors = group.operations.filter(
    ({ type, matrix }) => type === 'm' && keyOf(turnZone(matrix, axis)) === keyOf(axis),
  );
  const normal = mirrors[0]?.axis;
  if (normal) return cross(unit(toCartesian(metric, normal)), along);
  const others = group.operations.flatMap((operation) => (operation.axis ? [operation.axis] : []));
  const candidates = [...others, zone(1, 0, 0), zone(0, 0, 1)].map((direction) => unit(toCartesian(metric, direction)));
  return perpendicular(candidates.find((v) => Math.abs(dot(v, along)) < 0.99)!, along);
}

/** Image of a Cartesian vector under an operation given in the cell's basis. */
function turn({ metric: { frame, reciprocalFrame } }: Crystal, matrix: IntegerMatrix, v: Vector): Vector {
  const along = (j: 0 | 1 | 2): number => dot([reciprocalFrame[0][j], reciprocalFrame[1][j], reciprocalFrame[2][j]], v);
  const inCell: Vector = [along(0), along(1), along(2)];
  const moved: Vector = [dot(matrix[0], inCell), dot(matrix[1], inCell), dot(matrix[2], inCell)];
  return [dot(frame[0], moved), dot(frame[1], moved), dot(frame[2], moved)];
}

const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const cross = (a: Vector, b: Vector): Vector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
const unit = (v: Vector): Vector => {
  const length = Math.hypot(...v);
  return [v[0] / length, v[1] / length, v[2] / length];
};
function perpendicular(v: Vector, along: Vector): Vector {
  const part = dot(v, along);
  return unit([v[0] - part * along[0], v[1] - part * along[1], v[2] - part * along[2]]);
}
