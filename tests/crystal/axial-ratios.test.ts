// Outside source: the axial ratios of older books, a : b : c with b = 1 and a : c with a = 1 (common practice).
import { expect, it } from 'vitest';
import { type AxialRatios, fromAxialRatios } from '../../src/crystal/axial-ratios.ts';
import type { Axes } from '../../src/crystal/setting.ts';
import { thrown } from './thrown.ts';

it.each<[string | AxialRatios, Axes, readonly number[]]>([
  ['0.5:1:0.7', 'orthorhombic', [0.5, 1, 0.7]],
  ['a : b : c = 0,8153 : 1 : 1,3136', 'orthorhombic', [0.8153, 1, 1.3136]],
  [{ a: 0.5, c: 0.7 }, 'orthorhombic', [0.5, 1, 0.7]],
  ['1 : 0.6439', 'tetragonal', [1, 1, 0.6439]],
  ['a:c = 1:1.0999', 'hexagonal', [1, 1, 1.0999]],
  ['1:1:1.0999', 'hexagonal', [1, 1, 1.0999]],
  [{ c: 1.0999 }, 'hexagonal', [1, 1, 1.0999]],
])('reads %j on %s axes', (ratios, axes, [a, b, c]) => {
  expect(fromAxialRatios(ratios, axes)).toMatchObject({ a, b, c });
});

it('takes the angles that the axes leave open', () => {
  expect(fromAxialRatios('0.69:1:0.41', 'monoclinic-b', { beta: 99 })).toEqual({
    a: 0.69,
    b: 1,
    c: 0.41,
    alpha: 90,
    beta: 99,
    gamma: 90,
  });
});

it.each<[string | AxialRatios, Axes, string]>([
  ['1:0.6', 'orthorhombic', 'axial-ratio'],
  ['1:x:2', 'orthorhombic', 'axial-ratio'],
  ['1::2', 'orthorhombic', 'axial-ratio'],
  ['0:1:2', 'orthorhombic', 'axial-ratio'],
  [{ c: 2 }, 'orthorhombic', 'axial-ratio'],
  ['1:1.2:2', 'tetragonal', 'cell-mismatch'],
  ['1:1:2', 'monoclinic-b', 'cell-incomplete'],
])('refuses %j on %s axes: %s', (ratios, axes, code) => {
  expect(thrown(() => fromAxialRatios(ratios, axes)).code).toBe(code);
});
