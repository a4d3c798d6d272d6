import { fromAxialRatios } from '../crystal/axial-ratios.ts';
import type { Cell } from '../crystal/cell.ts';
import { completeCell } from '../crystal/complete-cell.ts';
import { CrystalError } from '../crystal/errors.ts';
import { type PointGroup, pointGroup } from '../crystal/point-group.ts';
import type { CellInput } from './schema.ts';

/**
 * The group that a symbol means with this cell: a trigonal group is read on rhombohedral axes when the cell states an
 * angle alpha other than 90°.
 * @throws CrystalError
 */
export function readGroup(symbol: string | number, cell: CellInput | undefined): PointGroup {
  const group = pointGroup(String(symbol));
  const rhombohedral =
    typeof cell?.alpha === 'number' && cell.alpha !== 90 && (cell.gamma === undefined || cell.gamma === cell.alpha);
  return rhombohedral && group.system === 'trigonal' && group.axes === 'hexagonal'
    ? pointGroup(`${group.hermannMauguin}:R`)
    : group;
}

/** @throws CrystalError */
export function readCell(given: CellInput | undefined, group: PointGroup): Cell {
  if (given === undefined || Object.values(given).every((value) => value === undefined)) return defaultCell(group);
  const { ratios, a, b, c, ...angles } = given;
  if (ratios === undefined) return completeCell(defined({ a, b, c, ...angles }), group.axes);
  if (a !== undefined || b !== undefined || c !== undefined)
    throw new CrystalError('axial-ratio', 'the cell has both edges and axial ratios', 'give one or the other');
  return fromAxialRatios(ratios, group.axes, defined(angles));
}

/** Cubic crystals have one shape of cell; all others must state theirs. */
function defaultCell(group: PointGroup): Cell {
  if (group.axes === 'cubic') return completeCell({ a: 1 }, group.axes);
  throw new CrystalError(
    'cell-incomplete',
    `point group ${group.key} needs a cell, and none is given`,
    'add cell: with a, b, c in ångström and the angles that the system leaves free',
  );
}

function defined<T extends object>(values: T): { [K in keyof T]?: Exclude<T[K], undefined> } {
  return Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined)) as {
    [K in keyof T]?: Exclude<T[K], undefined>;
  };
}
