import type { Cell } from './cell.ts';
import { CrystalError } from './errors.ts';
import type { Axes } from './setting.ts';

/** Given values may differ from what the axes need by this fraction: the rounding of a published cell. */
export const CELL_TOLERANCE = 1e-6;

type Edge = 'a' | 'b' | 'c';
type Angle = 'alpha' | 'beta' | 'gamma';

interface CellRule {
  /** The axes in the trade's words. */
  readonly name: string;
  readonly equalEdges: readonly Edge[];
  readonly equalAngles: readonly Angle[];
  readonly fixedAngles: Readonly<Partial<Record<Angle, number>>>;
}

const rule = (
  name: string,
  equalEdges: readonly Edge[],
  fixedAngles: CellRule['fixedAngles'],
  equalAngles: readonly Angle[] = [],
): CellRule => ({ name, equalEdges, equalAngles, fixedAngles });

const SQUARE = { alpha: 90, beta: 90, gamma: 90 } as const;

const RULES: Readonly<Record<Axes, CellRule>> = {
  triclinic: rule('a triclinic cell', [], {}),
  'monoclinic-b': rule('a monoclinic cell with b as its unique axis', [], { alpha: 90, gamma: 90 }),
  'monoclinic-c': rule('a monoclinic cell with c as its unique axis', [], { alpha: 90, beta: 90 }),
  orthorhombic: rule('an orthorhombic cell', [], SQUARE),
  tetragonal: rule('a tetragonal cell', ['a', 'b'], SQUARE),
  hexagonal: rule('a cell on hexagonal axes', ['a', 'b'], { alpha: 90, beta: 90, gamma: 120 }),
  rhombohedral: rule('a cell on rhombohedral axes', ['a', 'b', 'c'], {}, ['alpha', 'beta', 'gamma']),
  cubic: rule('a cubic cell', ['a', 'b', 'c'], SQUARE),
};

const GREEK: Readonly<Record<Edge | Angle, string>> = { a: 'a', b: 'b', c: 'c', alpha: 'α', beta: 'β', gamma: 'γ' };
/** Ångström; axial ratios, with one edge 1, lie within as well. */
const LENGTHS = { least: 0.001, most: 100_000 };
const EDGES: readonly Edge[] = ['a', 'b', 'c'];
const ANGLES: readonly Angle[] = ['alpha', 'beta', 'gamma'];

/**
 * The whole cell from the values that are given: what the axes fix is filled in, and given values are checked against
 * it and then set to it exactly, so that the cell has its full symmetry to the last bit.
 * @throws CrystalError `cell-length`, `cell-angle`, `cell-mismatch`, `cell-incomplete`, `cell-open`
 */
export function completeCell(given: Partial<Cell>, axes: Axes): Cell {
  const rules = RULES[axes];
  checkValues(given);
  const cell: { -readonly [key in keyof Cell]?: number } = { ...given };
  for (const [angle, needed] of Object.entries(rules.fixedAngles) as [Angle, number][]) {
    const value = given[angle] ?? needed;
    if (differ(value, needed)) throw mismatch(rules, `${GREEK[angle]} = ${needed}°`, `${GREEK[angle]} = ${value}°`);
    cell[angle] = needed;
  }
  equalise(cell, rules, rules.equalEdges, ' Å');
  equalise(cell, rules, rules.equalAngles, '°');
  return checkClosed(requireAll(cell, rules));
}

const differ = (p: number, q: number): boolean => Math.abs(p - q) > CELL_TOLERANCE * Math.max(Math.abs(p), Math.abs(q));

function checkValues(given: Partial<Cell>): void {
  for (const edge of EDGES) {
    const length = given[edge];
    if (length === undefined || (length >= LENGTHS.least && length <= LENGTHS.most)) continue;
    const range = `between ${LENGTHS.least} and ${LENGTHS.most} Å`;
    throw new CrystalError('cell-length', `the cell edge ${edge} must be a length ${range}, not ${length}`);
  }
  for (const angle of ANGLES) {
    const degrees = given[angle];
    if (degrees === undefined || (degrees > 0 && degrees < 180)) continue;
    throw new CrystalError('cell-angle', `the cell angle ${GREEK[angle]} must lie between 0° and 180°, not ${degrees}`);
  }
}

/** Sets all members to the first one given. */
function equalise(
  cell: { -readonly [key in keyof Cell]?: number },
  rules: CellRule,
  members: readonly (Edge | Angle)[],
  unit: string,
): void {
  const leader = members.find((member) => cell[member] !== undefined);
  const value = leader === undefined ? undefined : cell[leader];
  if (leader === undefined || value === undefined) return;
  for (const member of members) {
    const own = cell[member] ?? value;
    if (differ(own, value)) {
      const needed = members.map((name) => GREEK[name]).join(' = ');
      throw mismatch(rules, needed, `${GREEK[leader]} = ${value}${unit} and ${GREEK[member]} = ${own}${unit}`);
    }
    cell[member] = value;
  }
}

const mismatch = ({ name }: CellRule, needed: string, found: string): CrystalError =>
  new CrystalError(
    'cell-mismatch',
    `${name} needs ${needed}, but here ${found}`,
    'correct the cell, or choose a point group whose system allows it',
  );

function requireAll(cell: Partial<Cell>, { name }: CellRule): Cell {
  const { a, b, c, alpha, beta, gamma } = cell;
  if (
    a === undefined ||
    b === undefined ||
    c === undefined ||
    alpha === undefined ||
    beta === undefined ||
    gamma === undefined
  ) {
    const missing = [...EDGES, ...ANGLES].filter((key) => cell[key] === undefined).map((key) => GREEK[key]);
    throw new CrystalError('cell-incomplete', `${name} also needs ${missing.join(', ')}`);
  }
  return { a, b, c, alpha, beta, gamma };
}

/** Three edges close a cell when their angles make a spherical triangle: sum under 360°, each under the other two. */
function checkClosed(cell: Cell): Cell {
  const { alpha, beta, gamma } = cell;
  const sum = alpha + beta + gamma;
  if (sum < 360 && 2 * Math.max(alpha, beta, gamma) < sum) return cell;
  throw new CrystalError(
    'cell-open',
    `no cell has the angles α = ${alpha}°, β = ${beta}°, γ = ${gamma}°`,
    'their sum must be less than 360°, and each must be less than the other two together',
  );
}
