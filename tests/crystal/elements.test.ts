// Outside source: textbook symmetry formulae (common practice, from memory).
import { expect, it } from 'vitest';
import { metric, normal, toCartesian } from '../../src/crystal/cell.ts';
import { completeCell } from '../../src/crystal/complete-cell.ts';
import { symmetryElements } from '../../src/crystal/elements.ts';
import { pointGroup } from '../../src/crystal/point-group.ts';

const linesOf = (key: string) =>
  symmetryElements(pointGroup(key)).lines.map(
    ({ direction, symbol, polar }) => `${symbol} [${direction}]${polar ? ' polar' : ''}`,
  );

it('gives quartz one three-fold and three polar two-fold axes', () => {
  expect(linesOf('32').sort()).toEqual(['2 [0,1,0] polar', '2 [1,0,0] polar', '2 [1,1,0] polar', '3 [0,0,1]']);
});

it('gives tourmaline a polar three-fold axis in three mirror planes', () => {
  const elements = symmetryElements(pointGroup('3m'));
  expect(linesOf('3m').filter((line) => line.startsWith('3'))).toEqual(['3 [0,0,1] polar']);
  expect(elements.mirrorPlanes.map(({ plane }) => plane)).toHaveLength(3);
});

it('gives gypsum 2/m: a two-fold axis, a mirror plane across it, a centre', () => {
  expect(symmetryElements(pointGroup('2/m'))).toEqual({
    centre: true,
    axes: [{ order: 2, rotoinversion: false, direction: [0, 1, 0] }],
    mirrorPlanes: [{ plane: [0, 1, 0], normal: [0, 1, 0] }],
    lines: [{ direction: [0, 1, 0], symbol: '2/m', polar: false }],
  });
});

it('gives the cube 3 four-fold, 4 three-fold, 6 two-fold axes, 9 mirror planes and a centre', () => {
  const { axes, mirrorPlanes, centre } = symmetryElements(pointGroup('m-3m'));
  const count = (order: number) => axes.filter((axis) => !axis.rotoinversion && axis.order === order).length;
  expect([count(4), count(3), count(2), mirrorPlanes.length, centre]).toEqual([3, 4, 6, 9, true]);
});

it('gives every mirror plane the direction that is its normal in the cell', () => {
  const cells = [
    ['6/mmm', 'hexagonal', { a: 5, c: 7 }],
    ['-62m', 'hexagonal', { a: 5, c: 7 }],
    ['-3m:R', 'rhombohedral', { a: 5, alpha: 77 }],
    ['m-3m', 'cubic', { a: 5 }],
    ['11m', 'monoclinic-c', { a: 5, b: 6, c: 7, gamma: 101 }],
  ] as const;
  for (const [key, axes, given] of cells) {
    const own = metric(completeCell(given, axes), axes);
    const { mirrorPlanes } = symmetryElements(pointGroup(key));
    expect(mirrorPlanes.length).toBeGreaterThan(0);
    for (const { plane, normal: direction } of mirrorPlanes) {
      const [x, y, z] = normal(own, plane);
      const [u, v, w] = toCartesian(own, direction);
      const alignment = Math.abs(x * u + y * v + z * w) / Math.hypot(u, v, w);
      expect(alignment, `${key} (${plane}) [${direction}]`).toBeCloseTo(1, 12);
    }
  }
});
