import { addMatrices, column, compareTriples, IDENTITY, isZero, keyOf, lineTerms, multiply } from './integers.ts';
import { type Operation, type OperationType, operationOf } from './operation.ts';
import type { Axes, CrystalSystem, Setting } from './setting.ts';
import { type IntegerMatrix, type Zone, zone } from './spaces.ts';
import { readSymbol } from './symbol.ts';

/** A crystallographic point group on stated axes. */
export interface PointGroup {
  /** Oriented symbol, for instance `-4m2`, `321` or `32:R`. */
  readonly key: string;
  /** One of the 32 Hermann–Mauguin symbols, without orientation. */
  readonly hermannMauguin: string;
  readonly schoenflies: string;
  readonly system: CrystalSystem;
  readonly axes: Axes;
  readonly order: number;
  /** The identity first; then by type (proper before improper), axis and sense. */
  readonly operations: readonly Operation[];
  /** product[i·order + j] is the number of the operation Wᵢ Wⱼ (first j, then i). */
  readonly product: Uint8Array;
  /** inverseOf[i] is the number of the operation Wᵢ⁻¹. */
  readonly inverseOf: Uint8Array;
  readonly centrosymmetric: boolean;
  /** Whether some direction is left as it is by every operation: 10 of the 32. */
  readonly polar: boolean;
  /** The only such direction; null when there is none, and in 1 and m, which have many. */
  readonly polarAxis: Zone | null;
  /** Rotations only: crystals come left and right. */
  readonly chiral: boolean;
  /** Key of the Laue group in the same axes. */
  readonly laueKey: string;
}

const TYPE_ORDER: readonly OperationType[] = ['1', '2', '3', '4', '6', '-1', 'm', '-3', '-4', '-6'];

const built = new Map<string, PointGroup>();

/**
 * The point group of a symbol in any spelling `readSymbol` knows; built once and then remembered.
 * @throws CrystalError `unknown-group`
 */
export function pointGroup(symbol: string): PointGroup {
  const setting = readSymbol(symbol);
  const known = built.get(setting.key);
  if (known) return known;
  const group = build(setting);
  built.set(setting.key, group);
  return group;
}

function build(setting: Setting): PointGroup {
  const operations = closure(setting.generators).map(operationOf).sort(compareOperations);
  const order = operations.length;
  const number = new Map(operations.map(({ matrix }, i) => [keyOf(matrix), i]));
  const numberOf = (matrix: IntegerMatrix) => number.get(keyOf(matrix))!;
  return {
    key: setting.key,
    hermannMauguin: setting.pointGroup,
    schoenflies: setting.schoenflies,
    system: setting.system,
    axes: setting.axes,
    order,
    operations,
    product: Uint8Array.from(operations.flatMap((a) => operations.map((b) => numberOf(multiply(a.matrix, b.matrix))))),
    inverseOf: Uint8Array.from(operations, (operation) => numberOf(operation.inverse)),
    centrosymmetric: operations.some(({ type }) => type === '-1'),
    ...polarity(operations),
    chiral: operations.every(({ improper }) => !improper),
    laueKey: setting.laueKey,
  };
}

/** All products of the generators. */
function closure(generators: readonly IntegerMatrix[]): IntegerMatrix[] {
  const found = new Map([[keyOf(IDENTITY), IDENTITY]]);
  for (const matrix of found.values()) {
    for (const generator of generators) {
      const next = multiply(generator, matrix);
      found.set(keyOf(next), next); // a Map's iteration reaches what is added on the way
    }
  }
  return [...found.values()];
}

const compareOperations = (a: Operation, b: Operation): number =>
  TYPE_ORDER.indexOf(a.type) - TYPE_ORDER.indexOf(b.type) ||
  (a.axis && b.axis ? compareTriples(b.axis, a.axis) : 0) ||
  b.sense - a.sense;

/** The sum of all operations projects onto the directions that every one of them leaves alone. */
function polarity(operations: readonly Operation[]): { polar: boolean; polarAxis: Zone | null } {
  const projection = operations.map(({ matrix }) => matrix).reduce(addMatrices);
  const fixed = ([0, 1, 2] as const).map((j) => column(projection, j)).filter((u) => !isZero(u));
  const lines = new Map(fixed.map((u) => [keyOf(lineTerms(u)), lineTerms(u)]));
  const [only] = lines.values();
  return { polar: fixed.length > 0, polarAxis: only && lines.size === 1 ? zone(...only) : null };
}
