import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { element, escapeText, num } from '../../src/draw/svg.ts';
import { readXml } from './xml.ts';

describe('numbers', () => {
  it.each([
    [0, '0'],
    [-0, '0'],
    [-0.004, '0'],
    [100, '100'],
    [1.5, '1.5'],
    [-1.005e2, '-100.5'],
    [0.126, '0.13'],
  ])('%d is written %s', (value, text) => {
    expect(num(value)).toBe(text);
  });

  it('keeps hundredths and never writes −0 or an exponent', () => {
    fc.assert(
      fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), (value) => {
        expect(num(value)).toMatch(/^(?!-0$)-?\d+(\.\d{0,1}[1-9])?$/);
        expect(Math.abs(Number(num(value)) - value)).toBeLessThanOrEqual(0.005 + 1e-9);
      }),
    );
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY])('refuses %d', (value) => {
    expect(() => num(value)).toThrow('cannot place anything');
  });
});

describe('text', () => {
  it('comes back from any reader as it was, less what XML cannot hold', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), (text) => {
        const [, read] = readXml(`<svg>${element('text', { title: text }, escapeText(text))}</svg>`);
        // biome-ignore lint/suspicious/noControlCharactersInRegex: the characters that are left out
        const kept = text.replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, '');
        expect(read!.text).toBe(kept);
        expect(read!.attributes.title).toBe(kept);
      }),
    );
  });

  it('replaces halves of surrogate pairs', () => {
    expect(escapeText('a\ud800b\u{1d400}')).toBe('a\ufffdb\u{1d400}');
  });
});
