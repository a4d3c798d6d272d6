import { compareTriples, IDENTITY, isZero, keyOf, lineTerms, opposite, turnZone } from './integers.ts';
import type { Operation, OperationType } from './operation.ts';
import type { PointGroup } from './point-group.ts';
import { type Miller, miller, type Zone } from './spaces.ts';

/** A rotation axis, or a rotoinversion axis −3, −4 or −6, as a line through the centre. */
export interface SymmetryAxis {
  readonly order: 2 | 3 | 4 | 6;
  readonly rotoinversion: boolean;
  readonly direction: Zone;
}

export interface MirrorPlane {
  /** Indices of the plane, lowest terms, first non-zero index positive. */
  readonly plane: Miller;
  /** The line at right angles to it; first non-zero index positive too, so it can point to the plane's other side. */
  readonly normal: Zone;
}

export type LineSymbol = '2' | '3' | '4' | '6' | 'm' | '2/m' | '4/m' | '6/m' | '-3' | '-4' | '-6';

/** All that sits on one line, in one symbol; `m` is a line that is only normal to a mirror plane. */
export interface SymmetryLine {
  readonly direction: Zone;
  readonly symbol: LineSymbol;
  /** True when no operation of the group exchanges the two ends of the line. */
  readonly polar: boolean;
}

export interface SymmetryElements {
  readonly centre: boolean;
  /**
   * Each line of rotation once, under its highest order (so a −4 line also counts as a 2-fold one, and a −6 or −3
   * line as a 3-fold one); and one more entry for each of −3, −4, −6 that the line carries.
   */
  readonly axes: readonly SymmetryAxis[];
  readonly mirrorPlanes: readonly MirrorPlane[];
  readonly lines: readonly SymmetryLine[];
}

/** The symmetry elements of a point group, each list in the order of their directions. */
export function symmetryElements(group: PointGroup): SymmetryElements {
  const lines = linesOf(group);
  return {
    centre: group.centrosymmetric,
    axes: lines.flatMap(({ direction, types }) => axesOn(direction, types)),
    mirrorPlanes: group.operations
      .flatMap((operation) => (operation.type === 'm' ? [mirrorOf(operation)] : []))
      .sort((a, b) => compareTriples(b.normal, a.normal)),
    lines: lines.map(({ direction, types }) => ({
      direction,
      symbol: lineSymbol(types),
      polar: !group.operations.some(({ matrix }) => keyOf(turnZone(matrix, direction)) === keyOf(opposite(direction))),
    })),
  };
}

interface Line {
  readonly direction: Zone;
  readonly types: Set<OperationType>;
}

function linesOf(group: PointGroup): Line[] {
  const lines = new Map<string, Line>();
  for (const { axis, type } of group.operations) {
    if (axis === null) continue;
    const line = lines.get(keyOf(axis)) ?? { direction: axis, types: new Set() };
    lines.set(keyOf(axis), line);
    line.types.add(type);
  }
  return [...lines.values()].sort((a, b) => compareTriples(b.direction, a.direction));
}

function highestRotation(types: ReadonlySet<OperationType>): 6 | 4 | 3 | 2 | null {
  return ([6, 4, 3, 2] as const).find((order) => types.has(`${order}`)) ?? null;
}

function axesOn(direction: Zone, types: ReadonlySet<OperationType>): SymmetryAxis[] {
  const rotation = highestRotation(types);
  if (rotation === null) return [];
  const rotoinversions = ([3, 4, 6] as const).filter((order) => types.has(`-${order}`));
  return [
    { order: rotation, rotoinversion: false, direction },
    ...rotoinversions.map((order) => ({ order, rotoinversion: true, direction })),
  ];
}

function lineSymbol(types: ReadonlySet<OperationType>): LineSymbol {
  const rotation = highestRotation(types);
  if (rotation === null) return 'm';
  if (rotation === 3) return types.has('-6') ? '-6' : types.has('-3') ? '-3' : '3';
  if (types.has('m')) return `${rotation}/m`;
  return rotation === 2 && types.has('-4') ? '-4' : `${rotation}`;
}

/** Every row of 1 − W is a multiple of the mirror's indices, because W turns only the normal round. */
function mirrorOf({ matrix, axis }: Operation): MirrorPlane {
  const rows = IDENTITY.map((row, i) => [0, 1, 2].map((j) => row[j]! - matrix[i]![j]!) as [number, number, number]);
  return { plane: miller(...lineTerms(rows.find((row) => !isZero(row))!)), normal: axis! };
}
