// Outside source: the definition of a group, and the rules of rotoinversions (International Tables A; textbook common
// practice): −1 is the centre, −2 a mirror, −6 is 3/m, odd orders bring a centre, even ones a turn of half the order.
import { describe, expect, it } from 'vitest';
import { symmetryElements } from '../../src/crystal/elements.ts';
import { form } from '../../src/crystal/form.ts';
import { IDENTITY, inverse, keyOf, multiply, scaleMatrix } from '../../src/crystal/integers.ts';
import { pointGroup } from '../../src/crystal/point-group.ts';
import { SETTINGS } from '../../src/crystal/setting.ts';
import { type IntegerMatrix, miller } from '../../src/crystal/spaces.ts';

const keys = SETTINGS.map(({ key }) => key);
const matricesOf = (key: string): Set<string> => new Set(pointGroup(key).operations.map(({ matrix }) => keyOf(matrix)));

function power(matrix: IntegerMatrix, exponent: number): IntegerMatrix {
  return Array.from({ length: exponent }).reduce<IntegerMatrix>((product) => multiply(product, matrix), IDENTITY);
}

const rotoinversions = keys.flatMap((key) =>
  pointGroup(key)
    .operations.filter(({ improper }) => improper)
    .map((operation) => ({ key, operation, order: operation.type === 'm' ? 2 : -Number(operation.type) })),
);

it('remembers a group and gives the same one for every spelling', () => {
  expect(pointGroup('m3m')).toBe(pointGroup('Oh'));
});

describe.each(keys)('%s', (key) => {
  const group = pointGroup(key);
  const { operations, order, product, inverseOf } = group;

  it('starts with the identity and has no operation twice', () => {
    expect(operations[0]!.type).toBe('1');
    expect(matricesOf(key).size).toBe(order);
  });

  it('has a true multiplication table', () => {
    for (const [i, a] of operations.entries()) {
      for (const [j, b] of operations.entries()) {
        expect(operations[product[i * order + j]!]!.matrix).toEqual(multiply(a.matrix, b.matrix));
      }
      expect(product[i * order + inverseOf[i]!]).toBe(0);
      expect(a.inverse).toEqual(inverse(a.matrix));
    }
  });

  it('becomes its Laue group with a centre', () => {
    const withCentre = operations.flatMap(({ matrix }) => [keyOf(matrix), keyOf(scaleMatrix(matrix, -1))]);
    expect(matricesOf(group.laueKey)).toEqual(new Set(withCentre));
    expect(pointGroup(group.laueKey).axes).toBe(group.axes);
  });

  it('has exactly one of each kind of turn opposite in sense to another', () => {
    const turns = operations.filter(({ sense }) => sense !== 0);
    const names = turns.map(({ type, axis, sense }) => `${type} ${axis} ${sense}`);
    expect(new Set(names).size).toBe(turns.length);
    for (const { type, axis, sense } of turns) expect(names).toContain(`${type} ${axis} ${-sense}`);
  });
});

it('counts 11 centrosymmetric, 11 chiral and 10 polar among the 32', () => {
  const standard = [
    ...new Map(keys.toReversed().map((key) => [pointGroup(key).hermannMauguin, pointGroup(key)])).values(),
  ];
  const count = (of: 'centrosymmetric' | 'chiral' | 'polar') => standard.filter((group) => group[of]).length;
  expect([standard.length, count('centrosymmetric'), count('chiral'), count('polar')]).toEqual([32, 11, 11, 10]);
  expect(new Set(standard.map(({ laueKey }) => pointGroup(laueKey).hermannMauguin)).size).toBe(11);
});

describe('rotoinversions, in all groups', () => {
  it.each(['-1', 'm', '-3', '-4', '-6'])('%s occurs', (type) => {
    expect(rotoinversions.some(({ operation }) => operation.type === type)).toBe(true);
  });

  it('of odd order bring a centre', () => {
    for (const { key, operation, order } of rotoinversions.filter((item) => item.order % 2 === 1)) {
      expect([key, keyOf(power(operation.matrix, order))]).toEqual([key, keyOf(scaleMatrix(IDENTITY, -1))]);
      expect([key, pointGroup(key).centrosymmetric]).toEqual([key, true]);
    }
  });

  it('of even order contain a rotation of half their order about the same line', () => {
    for (const { key, operation, order } of rotoinversions.filter((item) => item.order === 4 || item.order === 6)) {
      const square = keyOf(power(operation.matrix, 2));
      const found = pointGroup(key).operations.find(({ matrix }) => keyOf(matrix) === square);
      expect([key, found?.type, found?.axis]).toEqual([key, `${order / 2}`, operation.axis]);
    }
  });

  it('-2 is a mirror: a two-fold turn about the normal, then inversion', () => {
    for (const { key, operation } of rotoinversions.filter(({ operation }) => operation.type === 'm')) {
      const turn = scaleMatrix(operation.matrix, -1);
      expect([key, keyOf(multiply(turn, turn))]).toEqual([key, keyOf(IDENTITY)]);
      expect([key, turn[0][0] + turn[1][1] + turn[2][2]]).toEqual([key, -1]);
    }
  });

  it('-6 is 3/m: it has a mirror plane across it', () => {
    for (const { key, operation } of rotoinversions.filter(({ operation }) => operation.type === '-6')) {
      const across = pointGroup(key).operations.find(
        ({ type, axis }) => type === 'm' && `${axis}` === `${operation.axis}`,
      );
      expect([key, keyOf(power(operation.matrix, 3))]).toEqual([key, keyOf(across!.matrix)]);
    }
    expect(pointGroup('3/m').operations.map(({ type }) => type)).toEqual(['1', '3', '3', 'm', '-6', '-6']);
  });
});

it('gives -43m three -4 axes and no centre, and its tetrahedron no opposite faces', () => {
  const { axes, centre } = symmetryElements(pointGroup('-43m'));
  const fourBars = axes.filter(({ order, rotoinversion }) => order === 4 && rotoinversion);
  expect(fourBars.map(({ direction }) => direction)).toEqual([
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ]);
  expect(centre).toBe(false);
  const oppositeIn = (key: string, h: number, k: number, l: number) =>
    form(key, miller(h, k, l)).faces.some((face) => `${face}` === `${[-h + 0, -k + 0, -l + 0]}`);
  expect(oppositeIn('-43m', 1, 1, 1)).toBe(false);
  expect([oppositeIn('-43m', 1, 0, 0), oppositeIn('m-3m', 1, 0, 0), oppositeIn('m-3m', 1, 1, 1)]).toEqual([
    true,
    true,
    true,
  ]);
});
