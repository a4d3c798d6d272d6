// Outside source: the Miller–Bravais rule h + k + i = 0 and the relation of [UVTW] to [uvw] (International Tables;
// common practice, from memory). Reading and printing are held against each other.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { MAX_INDEX, parseFace, parseZone, printFace, printZone, readOptions } from '../../src/crystal/indices.ts';
import { primitive } from '../../src/crystal/integers.ts';
import { miller, zone } from '../../src/crystal/spaces.ts';
import { thrown } from './thrown.ts';

const FOUR = { fourIndex: 'allowed' } as const;
const THREE = { fourIndex: 'refused' } as const;

it.each<[string | readonly number[], readonly number[]]>([
  ['111', [1, 1, 1]],
  ['10-11', [1, 0, 1]],
  ['1 0 -1 12', [1, 0, 12]],
  ['(1,0,-1,1)', [1, 0, 1]],
  ['{10-11}', [1, 0, 1]],
  ['( 1 , -2 , 1 , 0 )', [1, -2, 0]],
  [
    [1, 0, -1, 1],
    [1, 0, 1],
  ],
  [
    [-0, 0, 2],
    [0, 0, 2],
  ],
  ['101\u03051', [1, 0, 1]],
  ['101\u03041', [1, 0, 1]],
  ['1 0 1\u0305 1\u03052\u0305', [1, 0, -12]],
  ['1\u22121\u20131', [1, -1, -1]],
  ['222', [2, 2, 2]],
  ['+1 0 -10', [1, 0, -10]],
])('reads the face %j', (text, face) => {
  expect(parseFace(text, FOUR)).toEqual(face);
});

describe('faces that are refused', () => {
  it.each<[string | readonly number[], string, string]>([
    ['', 'index-text', 'cannot be read as a face symbol'],
    ['hkl', 'index-text', 'cannot be read'],
    ['(111', 'index-text', 'cannot be read'],
    ['1--11', 'index-text', 'cannot be read'],
    ['1 1\u03052 0', 'index-text', 'cannot be read'],
    ['11', 'index-count', 'has 2 indices'],
    ['5', 'index-count', 'has one index'],
    [[1, 0, -1, 1, 0], 'index-count', 'has 5 indices'],
    ['000', 'index-zero', 'all zeros'],
    ['0 0 0 0', 'index-zero', 'all zeros'],
    ['1.5 0 1', 'index-not-integer', 'has the index 1.5'],
    [[1, 0, Number.NaN], 'index-not-integer', 'has the index NaN'],
    ['1 0 1000', 'index-too-large', `beyond ±${MAX_INDEX}`],
    ['1011', 'index-redundant', 'h + k + i = 0'],
  ])('%j: %s', (text, code, words) => {
    const error = thrown(() => parseFace(text, FOUR));
    expect(error.code).toBe(code);
    expect(error.message).toContain(words);
  });

  it('names the third index that would fit', () => {
    expect(thrown(() => parseFace('21-11', FOUR)).hint).toContain('the third is -3');
  });

  it('has four indices on axes that are not hexagonal', () => {
    expect(thrown(() => parseFace('10-11', THREE)).code).toBe('four-index-refused');
    expect([readOptions('hexagonal'), readOptions('rhombohedral')]).toEqual([FOUR, THREE]);
  });
});

it.each<[string, readonly number[]]>([
  ['[001]', [0, 0, 1]],
  ['[2-1-10]', [1, 0, 0]],
  ['[11-20]', [1, 1, 0]],
  ['[10-10]', [2, 1, 0]],
  ['[0001]', [0, 0, 1]],
  ['[2 2 -4]', [1, 1, -2]],
  ['<1-10>', [1, -1, 0]],
])('reads the zone %s', (text, axis) => {
  expect(parseZone(text, FOUR)).toEqual(axis);
});

it('refuses the zone whose first three indices do not add up to zero', () => {
  const error = thrown(() => parseZone('[1111]', FOUR));
  expect([error.code, error.message]).toEqual(['index-redundant', expect.stringContaining('U + V + T = 0')]);
});

it('prints faces and zones as the trade does', () => {
  expect(printFace(miller(1, 0, 1), 'hexagonal')).toBe('10-11');
  expect(printFace(miller(1, 0, 1), 'hexagonal', { brackets: '{', overbar: true })).toBe('{101\u03051}');
  expect(printFace(miller(1, 0, -12), 'cubic', { brackets: '(' })).toBe('(1 0 -12)');
  expect(printFace(miller(1, 0, -12), 'cubic', { overbar: true })).toBe('1 0 1\u03052\u0305');
  expect(printZone(zone(1, -1, 0))).toBe('[1-10]');
  expect(printZone(zone(1, 0, 0), { fourIndex: true, brackets: '<' })).toBe('<2-1-10>');
});

const index = fc.oneof(fc.integer({ min: -9, max: 9 }), fc.integer({ min: -MAX_INDEX, max: MAX_INDEX }));
const indices = fc.tuple(index, index, index).filter((triple) => triple.some((value) => value !== 0));
const axes = fc.constantFrom('hexagonal' as const, 'cubic' as const, 'rhombohedral' as const);
const brackets = fc.constantFrom('(' as const, '{' as const, '' as const);

it('reads back every face it prints', () => {
  fc.assert(
    fc.property(indices, axes, brackets, fc.boolean(), (face, on, bracket, overbar) => {
      const printed = printFace(miller(...face), on, { brackets: bracket, overbar });
      expect(parseFace(printed, readOptions(on))).toEqual(face);
    }),
  );
});

it('reads back every zone it prints, with three or four indices', () => {
  const small = fc.integer({ min: -200, max: 200 });
  const axis = fc.tuple(small, small, small).filter((triple) => triple.some((value) => value !== 0));
  fc.assert(
    fc.property(axis, fc.boolean(), fc.boolean(), (triple, overbar, fourIndex) => {
      const lowest = primitive(triple);
      expect(parseZone(printZone(zone(...lowest), { overbar, fourIndex }), FOUR)).toEqual(lowest);
    }),
  );
});
