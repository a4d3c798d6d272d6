// Outside source: metric conditions of the crystal systems (International Tables A, from memory).
import { describe, expect, it } from 'vitest';
import type { Cell } from '../../src/crystal/cell.ts';
import { completeCell } from '../../src/crystal/complete-cell.ts';
import type { Axes } from '../../src/crystal/setting.ts';
import { thrown } from './thrown.ts';

it.each<[Axes, Partial<Cell>, readonly number[]]>([
  ['triclinic', { a: 1, b: 2, c: 3, alpha: 80, beta: 95, gamma: 110 }, [1, 2, 3, 80, 95, 110]],
  ['monoclinic-b', { a: 1, b: 2, c: 3, beta: 95 }, [1, 2, 3, 90, 95, 90]],
  ['monoclinic-c', { a: 1, b: 2, c: 3, gamma: 95 }, [1, 2, 3, 90, 90, 95]],
  ['orthorhombic', { a: 1, b: 2, c: 3 }, [1, 2, 3, 90, 90, 90]],
  ['tetragonal', { a: 1, c: 3 }, [1, 1, 3, 90, 90, 90]],
  ['tetragonal', { b: 1, c: 3 }, [1, 1, 3, 90, 90, 90]],
  ['hexagonal', { a: 1, c: 3 }, [1, 1, 3, 90, 90, 120]],
  ['rhombohedral', { a: 1, beta: 75 }, [1, 1, 1, 75, 75, 75]],
  ['cubic', { c: 3 }, [3, 3, 3, 90, 90, 90]],
  ['cubic', { a: 3, b: 3 + 1e-7, alpha: 90 - 1e-6 }, [3, 3, 3, 90, 90, 90]],
])('completes a %s cell from %j', (axes, given, [a, b, c, alpha, beta, gamma]) => {
  expect(completeCell(given, axes)).toEqual({ a, b, c, alpha, beta, gamma });
});

describe('cells that are refused', () => {
  it.each<[Axes, Partial<Cell>, string, string]>([
    [
      'tetragonal',
      { a: 4.59, b: 4.6, c: 2.96 },
      'cell-mismatch',
      'a tetragonal cell needs a = b, but here a = 4.59 Å and b = 4.6 Å',
    ],
    [
      'hexagonal',
      { a: 1, c: 1, gamma: 90 },
      'cell-mismatch',
      'a cell on hexagonal axes needs γ = 120°, but here γ = 90°',
    ],
    ['rhombohedral', { a: 1, alpha: 80, gamma: 81 }, 'cell-mismatch', 'a cell on rhombohedral axes needs α = β = γ'],
    ['cubic', { a: 1, c: 1.00001 }, 'cell-mismatch', 'a cubic cell needs a = b = c'],
    ['monoclinic-b', { a: 1, b: 2, c: 3 }, 'cell-incomplete', 'also needs β'],
    ['monoclinic-b', { a: 1, b: 2, c: 3, beta: 95, gamma: 95 }, 'cell-mismatch', 'needs γ = 90°'],
    ['triclinic', { a: 1, alpha: 90 }, 'cell-incomplete', 'a triclinic cell also needs b, c, β, γ'],
    ['cubic', {}, 'cell-incomplete', 'also needs a, b, c'],
    ['cubic', { a: 0 }, 'cell-length', 'a must be a length between 0.001 and 100000 Å, not 0'],
    ['cubic', { a: Number.POSITIVE_INFINITY }, 'cell-length', 'not Infinity'],
    ['cubic', { a: Number.NaN }, 'cell-length', 'not NaN'],
    ['monoclinic-b', { a: 1, b: 1, c: 1, beta: 180 }, 'cell-angle', 'β must lie between 0° and 180°'],
    ['triclinic', { a: 1, b: 1, c: 1, alpha: 150, beta: 60, gamma: 60 }, 'cell-open', 'no cell has the angles'],
    ['rhombohedral', { a: 1, alpha: 120 }, 'cell-open', 'no cell has the angles'],
  ])('%s %j: %s', (axes, given, code, words) => {
    const error = thrown(() => completeCell(given, axes));
    expect(error.code).toBe(code);
    expect(error.message).toContain(words);
  });
});
