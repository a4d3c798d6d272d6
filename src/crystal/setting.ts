import { scaleMatrix } from './integers.ts';
import type { IntegerMatrix } from './spaces.ts';

export type CrystalSystem =
  | 'triclinic'
  | 'monoclinic'
  | 'orthorhombic'
  | 'tetragonal'
  | 'trigonal'
  | 'hexagonal'
  | 'cubic';

/** The kinds of axes that indices refer to; the letter of a monoclinic setting is its unique axis. */
export type Axes =
  | 'triclinic'
  | 'monoclinic-b'
  | 'monoclinic-c'
  | 'orthorhombic'
  | 'tetragonal'
  | 'hexagonal'
  | 'rhombohedral'
  | 'cubic';

/** One of the 32 point groups on stated axes. */
export interface Setting {
  /** Oriented Hermann–Mauguin symbol in ASCII, with `:R` for rhombohedral axes. */
  readonly key: string;
  /** One of the 32 Hermann–Mauguin symbols, without orientation. */
  readonly pointGroup: string;
  readonly schoenflies: string;
  readonly system: CrystalSystem;
  readonly axes: Axes;
  /** Key of the Laue group in the same axes. */
  readonly laueKey: string;
  readonly generators: readonly IntegerMatrix[];
}

const rows = (...m: IntegerMatrix): IntegerMatrix => m;
const inverted = (m: IntegerMatrix): IntegerMatrix => scaleMatrix(m, -1);

const CENTRE = rows([-1, 0, 0], [0, -1, 0], [0, 0, -1]);
const TWO_X = rows([1, 0, 0], [0, -1, 0], [0, 0, -1]);
const TWO_Y = rows([-1, 0, 0], [0, 1, 0], [0, 0, -1]);
const TWO_Z = rows([-1, 0, 0], [0, -1, 0], [0, 0, 1]);
const MIRROR_X = inverted(TWO_X);
const MIRROR_Y = inverted(TWO_Y);
const MIRROR_Z = inverted(TWO_Z);
const FOUR_Z = rows([0, -1, 0], [1, 0, 0], [0, 0, 1]);
const FOUR_BAR_Z = inverted(FOUR_Z);
/** On hexagonal axes: a turns into b. */
const THREE_Z = rows([0, -1, 0], [1, -1, 0], [0, 0, 1]);
const SIX_Z = rows([1, -1, 0], [1, 0, 0], [0, 0, 1]);
const SIX_BAR_Z = inverted(SIX_Z);
/** Along a of hexagonal axes, the second place of the symbol (321, 3m1). */
const TWO_A = rows([1, -1, 0], [0, -1, 0], [0, 0, -1]);
const MIRROR_A = inverted(TWO_A);
/** Along [1-10], the third place of the symbol (312, 31m); the same matrix on hexagonal and rhombohedral axes. */
const TWO_DIAGONAL = rows([0, -1, 0], [-1, 0, 0], [0, 0, -1]);
const MIRROR_DIAGONAL = inverted(TWO_DIAGONAL);
/** Along [111] of cubic or rhombohedral axes: a turns into b, b into c. */
const THREE_111 = rows([0, 0, 1], [1, 0, 0], [0, 1, 0]);

type Row = readonly [key: string, pointGroup: string, schoenflies: string, laueKey: string, ...IntegerMatrix[]];

const on = (system: CrystalSystem, axes: Axes, table: readonly Row[]): Setting[] =>
  table.map(([key, pointGroup, schoenflies, laueKey, ...generators]) => ({
    key,
    pointGroup,
    schoenflies,
    system,
    axes,
    laueKey,
    generators,
  }));

/**
 * The 32 point groups in their standard settings and 15 other settings in use. The first setting of a point group is
 * the standard one. Symbols and orientation after International Tables for Crystallography, volume A.
 */
export const SETTINGS: readonly Setting[] = [
  ...on('triclinic', 'triclinic', [
    ['1', '1', 'C1', '-1'],
    ['-1', '-1', 'Ci', '-1', CENTRE],
  ]),
  ...on('monoclinic', 'monoclinic-b', [
    ['2', '2', 'C2', '2/m', TWO_Y],
    ['m', 'm', 'Cs', '2/m', MIRROR_Y],
    ['2/m', '2/m', 'C2h', '2/m', TWO_Y, CENTRE],
  ]),
  ...on('monoclinic', 'monoclinic-c', [
    ['112', '2', 'C2', '112/m', TWO_Z],
    ['11m', 'm', 'Cs', '112/m', MIRROR_Z],
    ['112/m', '2/m', 'C2h', '112/m', TWO_Z, CENTRE],
  ]),
  ...on('orthorhombic', 'orthorhombic', [
    ['222', '222', 'D2', 'mmm', TWO_Z, TWO_X],
    ['mm2', 'mm2', 'C2v', 'mmm', TWO_Z, MIRROR_X],
    ['2mm', 'mm2', 'C2v', 'mmm', TWO_X, MIRROR_Y],
    ['m2m', 'mm2', 'C2v', 'mmm', TWO_Y, MIRROR_X],
    ['mmm', 'mmm', 'D2h', 'mmm', TWO_Z, TWO_X, CENTRE],
  ]),
  ...on('tetragonal', 'tetragonal', [
    ['4', '4', 'C4', '4/m', FOUR_Z],
    ['-4', '-4', 'S4', '4/m', FOUR_BAR_Z],
    ['4/m', '4/m', 'C4h', '4/m', FOUR_Z, CENTRE],
    ['422', '422', 'D4', '4/mmm', FOUR_Z, TWO_X],
    ['4mm', '4mm', 'C4v', '4/mmm', FOUR_Z, MIRROR_X],
    ['-42m', '-42m', 'D2d', '4/mmm', FOUR_BAR_Z, TWO_X],
    ['-4m2', '-42m', 'D2d', '4/mmm', FOUR_BAR_Z, MIRROR_X],
    ['4/mmm', '4/mmm', 'D4h', '4/mmm', FOUR_Z, TWO_X, CENTRE],
  ]),
  ...on('trigonal', 'hexagonal', [
    ['3', '3', 'C3', '-3', THREE_Z],
    ['-3', '-3', 'C3i', '-3', THREE_Z, CENTRE],
    ['321', '32', 'D3', '-3m1', THREE_Z, TWO_A],
    ['312', '32', 'D3', '-31m', THREE_Z, TWO_DIAGONAL],
    ['3m1', '3m', 'C3v', '-3m1', THREE_Z, MIRROR_A],
    ['31m', '3m', 'C3v', '-31m', THREE_Z, MIRROR_DIAGONAL],
    ['-3m1', '-3m', 'D3d', '-3m1', THREE_Z, TWO_A, CENTRE],
    ['-31m', '-3m', 'D3d', '-31m', THREE_Z, TWO_DIAGONAL, CENTRE],
  ]),
  ...on('trigonal', 'rhombohedral', [
    ['3:R', '3', 'C3', '-3:R', THREE_111],
    ['-3:R', '-3', 'C3i', '-3:R', THREE_111, CENTRE],
    ['32:R', '32', 'D3', '-3m:R', THREE_111, TWO_DIAGONAL],
    ['3m:R', '3m', 'C3v', '-3m:R', THREE_111, MIRROR_DIAGONAL],
    ['-3m:R', '-3m', 'D3d', '-3m:R', THREE_111, TWO_DIAGONAL, CENTRE],
  ]),
  ...on('hexagonal', 'hexagonal', [
    ['6', '6', 'C6', '6/m', SIX_Z],
    ['-6', '-6', 'C3h', '6/m', SIX_BAR_Z],
    ['6/m', '6/m', 'C6h', '6/m', SIX_Z, CENTRE],
    ['622', '622', 'D6', '6/mmm', SIX_Z, TWO_A],
    ['6mm', '6mm', 'C6v', '6/mmm', SIX_Z, MIRROR_A],
    ['-62m', '-62m', 'D3h', '6/mmm', SIX_BAR_Z, TWO_A],
    ['-6m2', '-62m', 'D3h', '6/mmm', SIX_BAR_Z, MIRROR_A],
    ['6/mmm', '6/mmm', 'D6h', '6/mmm', SIX_Z, TWO_A, CENTRE],
  ]),
  ...on('cubic', 'cubic', [
    ['23', '23', 'T', 'm-3', THREE_111, TWO_Z],
    ['m-3', 'm-3', 'Th', 'm-3', THREE_111, TWO_Z, CENTRE],
    ['432', '432', 'O', 'm-3m', THREE_111, FOUR_Z],
    ['-43m', '-43m', 'Td', 'm-3m', THREE_111, FOUR_BAR_Z],
    ['m-3m', 'm-3m', 'Oh', 'm-3m', THREE_111, FOUR_Z, CENTRE],
  ]),
];
