import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { roundLength, scaleBar } from '../../src/draw/scale-bar.ts';
import { pathPoints, readXml } from './xml.ts';

describe('lengths of scale bars', () => {
  it.each([
    [1, 1],
    [1.99, 1],
    [2, 2],
    [4.99, 2],
    [5, 5],
    [9.99, 5],
    [37, 20],
    [1000, 1000],
    [0.7, 0.5],
    [0.1, 0.1],
    [0.0049, 0.002],
  ])('at most %d mm: %d mm', (most, length) => {
    expect(roundLength(most)).toBe(length);
  });

  it('take 1, 2 or 5 times a power of ten, and at least two fifths of the room', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 1e5, noNaN: true }), (most) => {
        const length = roundLength(most);
        expect(length).toBeLessThanOrEqual(most);
        expect(length).toBeGreaterThan(0.4 * most * (1 - 1e-12));
        expect(String(length)).toMatch(/^0?\.?0*[125]0*$/);
      }),
    );
  });

  it.each([0, -1, Number.NaN, Number.POSITIVE_INFINITY])('refuse %d', (most) => {
    expect(() => roundLength(most)).toThrow('scale bar');
  });
});

describe('the drawn bar', () => {
  it('is as long as it says, to the hundredth of a pixel', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.5, max: 60, noNaN: true }), (pixelsPerMillimetre) => {
        const [, path, text] = readXml(`<svg>${scaleBar([600, 500], pixelsPerMillimetre, 180)}</svg>`);
        const [start, end] = pathPoints(path!.attributes.d!);
        const millimetres = Number(/^([\d.]+) mm$/.exec(text!.text)![1]);
        expect(Math.abs(end![0] - start![0] - millimetres * pixelsPerMillimetre)).toBeLessThanOrEqual(0.01);
        expect(end![0] - start![0]).toBeLessThanOrEqual(180.01);
      }),
    );
  });
});
