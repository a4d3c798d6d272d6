// Outside source: the rules of arithmetic and linear algebra; answers on paper.
import fc from 'fast-check';
import { expect, it } from 'vitest';
import {
  cross,
  determinant,
  gcd,
  IDENTITY,
  inverse,
  lineTerms,
  matrixTimesColumn,
  multiply,
  primitive,
  rowTimesMatrix,
} from '../../src/crystal/integers.ts';
import { SETTINGS } from '../../src/crystal/setting.ts';

const integer = fc.integer({ min: -999, max: 999 });
const triple = fc.tuple(integer, integer, integer);

const generators = SETTINGS.flatMap((setting) => setting.generators);
/** Matrices of determinant ±1: products of generators of unlike groups. */
const unimodular = fc
  .tuple(fc.constantFrom(...generators), fc.constantFrom(...generators), fc.constantFrom(...generators))
  .map(([a, b, c]) => multiply(multiply(a, b), c));

it('finds greatest common divisors', () => {
  expect([gcd(12, -18), gcd(0, 7), gcd(0, 0), gcd(1, 999)]).toEqual([6, 7, 0, 1]);
});

it('puts indices in lowest terms, in their own sense or in that of the line', () => {
  expect(primitive([0, -4, 6])).toEqual([0, -2, 3]);
  expect(lineTerms([0, -4, 6])).toEqual([0, 2, -3]);
  expect(lineTerms([-2, 0, 0])).toEqual([1, 0, 0]);
});

it('inverts every matrix of determinant 1 or -1', () => {
  fc.assert(
    fc.property(unimodular, (m) => {
      expect(multiply(m, inverse(m))).toEqual(IDENTITY);
      expect(multiply(inverse(m), m)).toEqual(IDENTITY);
      expect(determinant(inverse(m))).toBe(determinant(m));
    }),
  );
});

it('refuses to invert any other matrix', () => {
  expect(() =>
    inverse([
      [2, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ]),
  ).toThrow('determinant must be 1 or -1, not 2');
});

it('keeps h·x when the face goes with the inverse and the point with the matrix', () => {
  fc.assert(
    fc.property(unimodular, triple, triple, (m, h, x) => {
      const [p, q, r] = rowTimesMatrix(h, inverse(m));
      const [u, v, w] = matrixTimesColumn(m, x);
      expect(p * u + q * v + r * w).toBe(h[0] * x[0] + h[1] * x[1] + h[2] * x[2]);
    }),
  );
});

it('finds the zone of two faces, which lies in both', () => {
  expect(cross([1, 0, 0], [0, 1, 0])).toEqual([0, 0, 1]);
  fc.assert(
    fc.property(triple, triple, (p, q) => {
      const zone = cross(p, q);
      for (const face of [p, q]) expect(face[0] * zone[0] + face[1] * zone[1] + face[2] * zone[2] + 0).toBe(0);
    }),
  );
});
