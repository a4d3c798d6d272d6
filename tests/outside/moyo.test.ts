// Outside source: @spglib/moyo-wasm 0.15.0, which has its own tables (Hall symbols) and its own symmetry search.
// Space-group numbers of the symmorphic groups: International Tables for Crystallography A (from memory).
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import {
  analyze_cell,
  hall_symbol_entries_from_number,
  initSync,
  type MoyoCell,
  type MoyoOperation,
  operations_from_number,
} from '@spglib/moyo-wasm';
import { beforeAll, describe, expect, it } from 'vitest';
import { type Cell, metric } from '../../src/crystal/cell.ts';
import { completeCell } from '../../src/crystal/complete-cell.ts';
import { type PointGroup, pointGroup } from '../../src/crystal/point-group.ts';
import { type Axes, SETTINGS } from '../../src/crystal/setting.ts';

/** Number of the symmorphic space group and, where it has several settings, moyo's word for the one meant. */
const SPACE_GROUPS: Readonly<Record<string, readonly [number: number, setting?: string]>> = {
  '1': [1],
  '-1': [2],
  '2': [3, 'b'],
  m: [6, 'b'],
  '2/m': [10, 'b'],
  '112': [3, 'c'],
  '11m': [6, 'c'],
  '112/m': [10, 'c'],
  '222': [16],
  mm2: [25, ''],
  '2mm': [25, 'cab'],
  m2m: [25, 'bca'],
  mmm: [47],
  '4': [75],
  '-4': [81],
  '4/m': [83],
  '422': [89],
  '4mm': [99],
  '-42m': [111],
  '-4m2': [115],
  '4/mmm': [123],
  '3': [143],
  '-3': [147],
  '321': [150],
  '312': [149],
  '3m1': [156],
  '31m': [157],
  '-3m1': [164],
  '-31m': [162],
  '3:R': [146, 'R'],
  '-3:R': [148, 'R'],
  '32:R': [155, 'R'],
  '3m:R': [160, 'R'],
  '-3m:R': [166, 'R'],
  '6': [168],
  '-6': [174],
  '6/m': [175],
  '622': [177],
  '6mm': [183],
  '-62m': [189],
  '-6m2': [187],
  '6/mmm': [191],
  '23': [195],
  'm-3': [200],
  '432': [207],
  '-43m': [215],
  'm-3m': [221],
};

const GIVEN: Readonly<Record<Axes, Partial<Cell>>> = {
  triclinic: { a: 7.1, b: 8.3, c: 9.7, alpha: 83, beta: 98, gamma: 107 },
  'monoclinic-b': { a: 7.1, b: 8.3, c: 9.7, beta: 104 },
  'monoclinic-c': { a: 7.1, b: 8.3, c: 9.7, gamma: 104 },
  orthorhombic: { a: 7.1, b: 8.3, c: 9.7 },
  tetragonal: { a: 7.1, c: 9.7 },
  hexagonal: { a: 7.1, c: 9.7 },
  rhombohedral: { a: 7.1, alpha: 77 },
  cubic: { a: 9.7 },
};

/** Four unlike atoms in general positions: together they have no symmetry but that of the group. */
const ATOMS = [
  [0.113, 0.247, 0.391],
  [0.071, 0.153, 0.427],
  [0.219, 0.341, 0.083],
  [0.307, 0.179, 0.261],
] as const;

function structure(group: PointGroup): MoyoCell {
  const { frame } = metric(completeCell(GIVEN[group.axes], group.axes), group.axes);
  const vector = (j: 0 | 1 | 2) => [frame[0][j], frame[1][j], frame[2][j]] as const;
  const images = ATOMS.flatMap((atom, species) =>
    group.operations.map(({ matrix }) => {
      const at = (i: 0 | 1 | 2) => matrix[i][0] * atom[0] + matrix[i][1] * atom[1] + matrix[i][2] * atom[2];
      return { species: species + 1, position: [at(0), at(1), at(2)] as [number, number, number] };
    }),
  );
  return {
    lattice: { basis: [...vector(0), ...vector(1), ...vector(2)] },
    positions: images.map(({ position }) => position),
    numbers: images.map(({ species }) => species),
  };
}

/** moyo lists a rotation column after column; the first test holds it to that. */
const rowsFirst = ({ rotation }: MoyoOperation): number[] => [0, 3, 6, 1, 4, 7, 2, 5, 8].map((i) => rotation[i]!);

const rotations = (operations: readonly MoyoOperation[]): string[] => operations.map(rowsFirst).map(String).sort();

const ours = (group: PointGroup): string[] => group.operations.map(({ matrix }) => String(matrix.flat())).sort();

beforeAll(() => {
  const wasm = createRequire(import.meta.url).resolve('@spglib/moyo-wasm/moyo_wasm_bg.wasm');
  initSync({ module: readFileSync(wasm) });
});

it('is read in the order of International Tables: the screw of P 3₁ takes x, y, z to −y, x − y, z + 1/3', () => {
  const screw = operations_from_number(144, { type: 'Standard' }, false).find(
    ({ translation }) => Math.abs(translation[2] - 1 / 3) < 1e-9,
  )!;
  expect(rowsFirst(screw)).toEqual([0, -1, 0, 1, -1, 0, 0, 0, 1]);
});

describe.each(SETTINGS.map(({ key }) => key))('%s', (key) => {
  const group = pointGroup(key);
  const [number, setting] = SPACE_GROUPS[key]!;

  it('has the rotations of its symmorphic space group in moyo’s tables', () => {
    const entries = hall_symbol_entries_from_number(number);
    const entry = entries.find((candidate) => setting === undefined || candidate.setting === setting)!;
    if (setting === undefined) expect(entries.filter(({ centering }) => centering === 'P')).toEqual([entry]);
    expect(entry.centering).toBe('P');
    const operations = operations_from_number(number, { type: 'HallNumber', value: entry.hall_number }, false);
    expect(operations.every(({ translation }) => translation.every((part) => part === 0))).toBe(true);
    expect(ours(group)).toEqual(rotations(operations));
  });

  it('gives a structure in which moyo finds this space group and these rotations', () => {
    const found = analyze_cell(JSON.stringify(structure(group)), 1e-4, 'Standard');
    expect(found.number).toBe(number);
    expect(rotations(found.operations)).toEqual(ours(group));
  });
});
