import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  commensurateOffsets,
  exactOffsets,
  fractionOf,
  LARGEST_MULTIPLE,
  smallRatio,
} from '../../src/polyhedron/offset.ts';
import { decode } from './rational.ts';

describe('the fraction of a double', () => {
  it('is its exact value, for any double', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        const { numerator, denominator } = fractionOf(value);
        const { mantissa, exponent } = decode(value);
        const [up, down] = exponent < 0 ? [1n << BigInt(-exponent), 1n] : [1n, 1n << BigInt(exponent)];
        expect(denominator).toBeGreaterThan(0n);
        expect(numerator * up).toBe(mantissa * down * denominator);
      }),
      { numRuns: 700 },
    );
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY])('%d is refused', (value) => {
    expect(() => fractionOf(value)).toThrow(RangeError);
  });
});

describe('ratios of small whole numbers', () => {
  it.each<[number, readonly [number, number] | null]>([
    [1, [1, 1]],
    [0.5, [1, 2]],
    [1.5 * (1 + 5e-13), [3, 2]],
    [1.5 * (1 + 5e-12), null],
    [1.1547005383792517 * Math.sqrt(3), [2, 1]],
    [9999 / 10000, [9999, 10000]],
    [Math.SQRT2, null],
    [Math.PI, null],
    [-1.5, null],
    [1e-9, null],
  ])('%d', (ratio, found) => {
    expect(smallRatio(ratio)).toEqual(found);
  });
});

describe('commensurate offsets', () => {
  it('put related values into one family, exactly in proportion', () => {
    const [one, two, half, alone, zero] = commensurateOffsets([1.1, 2.2, 0.55, Math.PI, 0]);
    expect([one, two, half].map((offset) => offset!.family)).toEqual([1, 1, 1]);
    expect([one!.multiple / half!.multiple, two!.multiple / half!.multiple]).toEqual([2, 4]);
    expect(two!.exact.numerator * one!.exact.denominator).toBe(2n * one!.exact.numerator * two!.exact.denominator);
    expect(alone!.family).not.toBe(1);
    expect([zero!.approximate, zero!.multiple, zero!.exact.numerator]).toEqual([0, 0, 0n]);
  });

  it('keep multiples small, and the exact value is multiple × unit within rounding', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 1, max: 400 }), { minLength: 1, maxLength: 12 }), (whole) => {
        for (const offset of commensurateOffsets(whole.map((value) => value / 7))) {
          expect(Number.isInteger(offset.multiple)).toBe(true);
          expect(offset.multiple).toBeLessThan(LARGEST_MULTIPLE);
          const value = Number(offset.exact.numerator) / Number(offset.exact.denominator);
          expect(Math.abs(offset.multiple * offset.unit - value)).toBeLessThanOrEqual(1e-15 * value);
          expect(Math.abs(offset.approximate - value)).toBeLessThanOrEqual(3e-16 * value);
        }
      }),
    );
  });

  it('exact offsets join equal values only', () => {
    const offsets = exactOffsets([1, 2, 1, 0]);
    expect(offsets[0]!.family).toBe(offsets[2]!.family);
    expect(offsets[0]!.family).not.toBe(offsets[1]!.family);
    expect(offsets.map((offset) => offset.multiple)).toEqual([1, 1, 1, 0]);
  });
});
