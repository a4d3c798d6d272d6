// Outside source: International Tables A, coordinate triplets and their operations (from memory).
import { expect, it } from 'vitest';
import { classify } from '../../src/crystal/operation.ts';
import type { IntegerMatrix } from '../../src/crystal/spaces.ts';
import { thrown } from './thrown.ts';

it.each<[string, IntegerMatrix, string, readonly number[] | null, number]>([
  [
    'x,y,z',
    [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ],
    '1',
    null,
    0,
  ],
  [
    '-x,-y,-z',
    [
      [-1, 0, 0],
      [0, -1, 0],
      [0, 0, -1],
    ],
    '-1',
    null,
    0,
  ],
  [
    '-x,y,-z',
    [
      [-1, 0, 0],
      [0, 1, 0],
      [0, 0, -1],
    ],
    '2',
    [0, 1, 0],
    0,
  ],
  [
    'y,x,z (square)',
    [
      [0, 1, 0],
      [1, 0, 0],
      [0, 0, 1],
    ],
    'm',
    [1, -1, 0],
    0,
  ],
  [
    'x-y,-y,z (hexagonal)',
    [
      [1, -1, 0],
      [0, -1, 0],
      [0, 0, 1],
    ],
    'm',
    [1, 2, 0],
    0,
  ],
  [
    '-y,x,z: 4+',
    [
      [0, -1, 0],
      [1, 0, 0],
      [0, 0, 1],
    ],
    '4',
    [0, 0, 1],
    1,
  ],
  [
    'y,-x,z: 4-',
    [
      [0, 1, 0],
      [-1, 0, 0],
      [0, 0, 1],
    ],
    '4',
    [0, 0, 1],
    -1,
  ],
  [
    '-y,x-y,z: 3+',
    [
      [0, -1, 0],
      [1, -1, 0],
      [0, 0, 1],
    ],
    '3',
    [0, 0, 1],
    1,
  ],
  [
    'z,x,y: 3+ [111]',
    [
      [0, 0, 1],
      [1, 0, 0],
      [0, 1, 0],
    ],
    '3',
    [1, 1, 1],
    1,
  ],
  [
    'x-y,x,z: 6+',
    [
      [1, -1, 0],
      [1, 0, 0],
      [0, 0, 1],
    ],
    '6',
    [0, 0, 1],
    1,
  ],
  [
    'y,-x,-z: -4+',
    [
      [0, 1, 0],
      [-1, 0, 0],
      [0, 0, -1],
    ],
    '-4',
    [0, 0, 1],
    1,
  ],
  [
    'y,-x+y,-z: -3+',
    [
      [0, 1, 0],
      [-1, 1, 0],
      [0, 0, -1],
    ],
    '-3',
    [0, 0, 1],
    1,
  ],
])('classifies %s', (_, matrix, type, axis, sense) => {
  expect(classify(matrix)).toEqual({ type, axis, sense });
});

it.each<[string, IntegerMatrix]>([
  [
    'a shear',
    [
      [1, 1, 0],
      [0, 1, 0],
      [0, 0, 1],
    ],
  ],
  [
    'a stretch',
    [
      [2, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ],
  ],
  [
    'an endless turn',
    [
      [2, 1, 0],
      [1, 1, 0],
      [0, 0, 1],
    ],
  ],
])('refuses %s', (_, matrix) => {
  expect(thrown(() => classify(matrix)).code).toBe('not-crystallographic');
});
