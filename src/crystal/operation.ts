import { CrystalError } from './errors.ts';
import {
  addMatrices,
  column,
  cross,
  determinant,
  IDENTITY,
  type IntegerTriple,
  inverse,
  isZero,
  keyOf,
  lineTerms,
  matrixTimesColumn,
  multiply,
  scaleMatrix,
  trace,
} from './integers.ts';
import { type IntegerMatrix, type Zone, zone } from './spaces.ts';

export type OperationType = '1' | '2' | '3' | '4' | '6' | '-1' | 'm' | '-3' | '-4' | '-6';

/** What an integer matrix does. */
export interface OperationKind {
  readonly type: OperationType;
  /** Line of the rotation or rotoinversion, for `m` the normal; lowest terms, first non-zero index positive. */
  readonly axis: Zone | null;
  /**
   * For orders 3, 4 and 6: 1 when the turn by 360°/n is counter-clockwise seen with the stated end of the axis
   * pointing at the eye, −1 when clockwise; for a rotoinversion −n that of its rotation n. 0 for all others.
   */
  readonly sense: 1 | -1 | 0;
}

/** One symmetry operation x′ = W x of a point group. */
export interface Operation extends OperationKind {
  readonly matrix: IntegerMatrix;
  /** W⁻¹, which acts on faces: h′ = h W⁻¹. */
  readonly inverse: IntegerMatrix;
  /** True for operations that turn a left hand into a right one: −1, m, −3, −4, −6. */
  readonly improper: boolean;
}

/** Order of a rotation from its trace, 1 + 2 cos(360°/n). */
const ORDER_OF_TRACE = new Map<number, 1 | 2 | 3 | 4 | 6>([
  [3, 1],
  [-1, 2],
  [0, 3],
  [1, 4],
  [2, 6],
]);

const PROPER = { 1: '1', 2: '2', 3: '3', 4: '4', 6: '6' } as const;
const IMPROPER = { 1: '-1', 2: 'm', 3: '-3', 4: '-4', 6: '-6' } as const;

/**
 * Kind of operation, from trace and determinant (International Tables A, symmetry operations from their matrices).
 * @throws CrystalError `not-crystallographic` when no power up to the sixth is the identity or inversion
 */
export function classify(matrix: IntegerMatrix): OperationKind {
  const sign = determinant(matrix);
  const rotation = scaleMatrix(matrix, sign);
  const order = Math.abs(sign) === 1 ? ORDER_OF_TRACE.get(trace(rotation)) : undefined;
  const powers = order === undefined ? [] : powersOf(rotation, order);
  if (order === undefined || keyOf(multiply(rotation, powers.at(-1) ?? rotation)) !== keyOf(IDENTITY)) {
    throw new CrystalError('not-crystallographic', `no crystal has the operation (${matrix.join('; ')})`);
  }
  const axis = order === 1 ? null : axisOf(powers);
  return {
    type: (sign === 1 ? PROPER : IMPROPER)[order],
    axis,
    sense: axis === null || order === 2 ? 0 : senseOf(rotation, axis),
  };
}

export function operationOf(matrix: IntegerMatrix): Operation {
  const kind = classify(matrix);
  return { ...kind, matrix, inverse: inverse(matrix), improper: kind.type === 'm' || kind.type.startsWith('-') };
}

function powersOf(rotation: IntegerMatrix, order: number): IntegerMatrix[] {
  const powers = [IDENTITY];
  while (powers.length < order) powers.push(multiply(rotation, powers.at(-1) ?? IDENTITY));
  return powers;
}

/** The sum of all powers of a rotation projects every vector onto its axis. */
function axisOf(powers: readonly IntegerMatrix[]): Zone {
  const projection = powers.reduce(addMatrices);
  const along = ([0, 1, 2] as const).map((j) => column(projection, j)).find((u) => !isZero(u));
  const [u, v, w] = lineTerms(along ?? [0, 0, 0]);
  return zone(u, v, w);
}

/** Sign of the volume of axis, x and R x, for a basis vector x off the axis. */
function senseOf(rotation: IntegerMatrix, axis: Zone): 1 | -1 {
  const off = IDENTITY.find((x) => !isZero(cross(axis, x))) as IntegerTriple;
  return determinant([axis, off, matrixTimesColumn(rotation, off)]) > 0 ? 1 : -1;
}
