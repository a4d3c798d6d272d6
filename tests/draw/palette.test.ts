import { describe, expect, it } from 'vitest';
import { FAINT, FORM_TINTS, HELPER_TINT, INK, mix, PAPER, shaded, tintOf } from '../../src/draw/palette.ts';

/** Relative luminance of an sRGB colour (WCAG 2, from memory). */
function luminance(colour: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const value = Number.parseInt(colour.slice(at, at + 2), 16) / 255;
    return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

/** CIE L*. */
const lightness = (colour: string): number => 116 * Math.cbrt(luminance(colour)) - 16;

function contrast(a: string, b: string): number {
  const [dark, light] = [luminance(a), luminance(b)].sort((p, q) => p - q) as [number, number];
  return (light + 0.05) / (dark + 0.05);
}

describe('tints of the forms', () => {
  it('each have a lightness of their own, and neighbours differ clearly', () => {
    const sorted = FORM_TINTS.map(lightness).sort((a, b) => a - b);
    for (let i = 1; i < sorted.length; i++) expect(sorted[i]! - sorted[i - 1]!).toBeGreaterThan(2);
    for (let i = 1; i < FORM_TINTS.length; i++) {
      const step = Math.abs(lightness(FORM_TINTS[i]!) - lightness(FORM_TINTS[i - 1]!));
      expect(step, `${FORM_TINTS[i - 1]} and ${FORM_TINTS[i]}`).toBeGreaterThan(9);
    }
  });

  it('start again after the last', () => {
    expect(tintOf(FORM_TINTS.length + 2)).toBe(FORM_TINTS[2]);
  });

  it('are not for helpers', () => {
    expect([tintOf(0, [1, 2]), tintOf(1, [1, 2]), tintOf(2, [1, 2])]).toEqual([
      FORM_TINTS[0],
      HELPER_TINT,
      HELPER_TINT,
    ]);
  });

  it('leave ink the contrast that WCAG 2 asks of text (4.5), in light and in shade', () => {
    for (const tint of [...FORM_TINTS, HELPER_TINT])
      for (const cosine of [-1, -0.2, 0.3, 0.55, 0.8, 1])
        expect(contrast(shaded(tint, cosine), INK), `${tint} at ${cosine}`).toBeGreaterThanOrEqual(4.5);
    expect(contrast(PAPER, INK)).toBeGreaterThanOrEqual(7);
    expect(contrast(PAPER, FAINT)).toBeGreaterThanOrEqual(4.5);
  });

  it('grow lighter towards the light', () => {
    const steps = [-0.5, 0, 0.4, 0.7, 1].map((cosine) => luminance(shaded('#84a3cb', cosine)));
    expect(steps).toEqual([...steps].sort((a, b) => a - b));
  });
});

describe('mixing', () => {
  it('goes from one colour to the other', () => {
    expect([mix('#204060', '#a0a0a0', 0), mix('#204060', '#a0a0a0', 1)]).toEqual(['#204060', '#a0a0a0']);
    expect(mix('#000000', '#ffffff', 0.5)).toBe('#808080');
  });
});
