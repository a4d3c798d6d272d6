import { describe, expect, it } from 'vitest';
import { SETTINGS } from '../../src/crystal/setting.ts';
import type { IntegerMatrix } from '../../src/crystal/spaces.ts';
import { crystal } from '../../src/index.ts';
import type { Crystal } from '../../src/recipe/crystal.ts';
import { type AxisEnd, axisLines } from '../../src/rods/axis-ends.ts';
import { AXIS_SYMBOLS, type AxisSymbol, orderOf, type RodSymbol } from '../../src/rods/axis-symbol.ts';

const CELLS = {
  triclinic: { a: 5, b: 6, c: 7, alpha: 95, beta: 103, gamma: 88 },
  'monoclinic-b': { a: 5, b: 6, c: 7, beta: 107 },
  'monoclinic-c': { a: 5, b: 6, c: 7, gamma: 107 },
  orthorhombic: { a: 5, b: 6, c: 7 },
  tetragonal: { a: 5, c: 7 },
  hexagonal: { a: 5, c: 7 },
  rhombohedral: { a: 5, alpha: 70 },
  cubic: { a: 5 },
} as const;

const crystalOf = (key: string, axes: keyof typeof CELLS): Crystal =>
  crystal({ pointGroup: key, cell: CELLS[axes], forms: [{ face: [1, 2, 3], distance: 1 }] });

const ALL = { orders: null, directions: null };

describe.each(SETTINGS)('the axis ends of $key', ({ key, axes }) => {
  const own = crystalOf(key, axes);
  const ends = axisLines(own, ALL).flatMap((line) => line.ends.map((end) => ({ end, symbol: line.symbol })));

  /** By the meaning of a point group: every operation takes the marked crystal into itself. */
  it('carry symbols that every operation takes into one another', () => {
    for (const { matrix } of own.group.operations)
      for (const { end, symbol } of ends) {
        const images = corners(end, AXIS_SYMBOLS[symbol]).map((p) => applied(own, matrix, p));
        const goal = ends.find(
          (other) => other.symbol === symbol && same(other.end.along, applied(own, matrix, end.along)),
        );
        expect(goal, `image of the end ${end.direction}`).toBeDefined();
        const target = corners(goal!.end, AXIS_SYMBOLS[symbol]);
        for (const p of images)
          expect(
            target.some((q) => same(p, q)),
            `${key} ${symbol} ${end.direction}`,
          ).toBe(true);
      }
  });

  it('stand out along and across their axis by unit vectors', () => {
    for (const { end } of ends) {
      expect(Math.hypot(...end.along)).toBeCloseTo(1, 12);
      expect(Math.hypot(...end.across)).toBeCloseTo(1, 12);
      expect(dot(end.along, end.across)).toBeCloseTo(0, 12);
    }
  });
});

describe('the choice of axes', () => {
  const tetrahedral = crystalOf('-43m', 'cubic');
  const symbols = (orders: number[] | null): string[] =>
    axisLines(tetrahedral, { orders, directions: null }).map(({ symbol }) => symbol);

  it('takes −4 axes under 4 and under −4, and 3-fold ones not under −3', () => {
    expect(symbols([4])).toEqual(['-4', '-4', '-4']);
    expect(symbols([-4])).toEqual(['-4', '-4', '-4']);
    expect(symbols([3])).toEqual(['3', '3', '3', '3']);
    expect(symbols([-3])).toEqual([]);
  });

  it('lists the highest order first', () => {
    const orders = axisLines(crystalOf('m-3m', 'cubic'), ALL).map(({ symbol }) => orderOf(symbol));
    expect(orders).toEqual([...orders].sort((a, b) => b - a));
    expect(orders).toHaveLength(13); // 3 + 4 + 6, textbook count for the cube
  });
});

describe('the symbols', () => {
  it('are all different to the touch: outline, hollow or island', () => {
    const shapes = Object.values(AXIS_SYMBOLS).map((symbol) =>
      JSON.stringify([symbol.outline, symbol.hollow, symbol.island]),
    );
    expect(new Set(shapes).size).toBe(Object.keys(AXIS_SYMBOLS).length);
  });

  /** International Tables A, tables 2.1.2.5 to 2.1.2.7 (from memory): lens 2, triangle 3, square 4, hexagon 6. */
  it.each([
    ['2', 2],
    ['3', 3],
    ['4', 4],
    ['6', 6],
    ['2/m', 2],
    ['4/m', 4],
    ['6/m', 6],
    ['-3', 3],
    ['-4', 4],
    ['-6', 6],
  ] as [RodSymbol, number][])('%s has the symmetry of a figure with %i corners', (name, corners) => {
    const { outline } = AXIS_SYMBOLS[name];
    const turn = (2 * Math.PI) / corners;
    for (const [x, y] of outline) {
      const image = [x * Math.cos(turn) - y * Math.sin(turn), x * Math.sin(turn) + y * Math.cos(turn)];
      expect(outline.some(([p, q]) => Math.hypot(p - image[0]!, q - image[1]!) < 1e-12)).toBe(true);
    }
  });

  it.each(['2/m', '4/m', '6/m', '-3', '-4', '-6'] as RodSymbol[])(
    '%s keeps its hollow inside its outline, the island inside the hollow',
    (name) => {
      const { outline, hollow, island } = AXIS_SYMBOLS[name];
      for (const point of hollow!) expect(inside(point, outline)).toBe(true);
      for (const point of island ?? []) expect(inside(point, hollow!)).toBe(true);
    },
  );
});

type Point = readonly [number, number];

/** Counter-clockwise outlines: a point inside lies to the left of every side. */
const inside = ([x, y]: Point, outline: readonly Point[]): boolean =>
  outline.every(([px, py], i) => {
    const [qx, qy] = outline[(i + 1) % outline.length]!;
    return (qx - px) * (y - py) - (qy - py) * (x - px) > 0;
  });

function corners({ along, across }: AxisEnd, { outline, island }: AxisSymbol): number[][] {
  const up = [
    along[1] * across[2] - along[2] * across[1],
    along[2] * across[0] - along[0] * across[2],
    along[0] * across[1] - along[1] * across[0],
  ];
  return [...outline, ...(island ?? [])].map(([x, y]) =>
    along.map((value, i) => 10 * value + x * across[i]! + y * up[i]!),
  );
}

function applied(
  { metric: { frame, reciprocalFrame } }: Crystal,
  matrix: IntegerMatrix,
  v: readonly number[],
): number[] {
  const cell = [0, 1, 2].map((j) => reciprocalFrame.reduce((sum, row, i) => sum + row[j]! * v[i]!, 0));
  const moved = matrix.map((row) => dot(row, cell));
  return frame.map((row) => dot(row, moved));
}

const dot = (a: readonly number[], b: readonly number[]): number => a.reduce((sum, value, i) => sum + value * b[i]!, 0);
const same = (a: readonly number[], b: readonly number[]): boolean =>
  Math.hypot(...a.map((value, i) => value - b[i]!)) < 1e-9;
