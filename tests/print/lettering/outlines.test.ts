import type { PathCommand } from 'opentype.js';
import { describe, expect, it } from 'vitest';
import { withSolids } from '../../../src/print/kit.ts';
import { layOutText } from '../../../src/print/lettering/lay-out.ts';
import { formulaText } from '../../../src/print/lettering/marks.ts';
import { textOutlines } from '../../../src/print/lettering/outlines.ts';
import { readTypeface } from '../../../src/print/lettering/typeface.ts';
import { bold, fontBytes, regular } from './fonts.ts';

type Outline = ReturnType<typeof textOutlines>[number];

const signedArea = (outline: Outline): number =>
  outline.reduce((sum, [x, y], i) => {
    const [nx, ny] = outline[(i + 1) % outline.length]!;
    return sum + (x * ny - nx * y) / 2;
  }, 0);

const perimeter = (outline: Outline): number =>
  outline.reduce((sum, [x, y], i) => {
    const [nx, ny] = outline[(i + 1) % outline.length]!;
    return sum + Math.hypot(nx - x, ny - y);
  }, 0);

/** Area under opentype's own path, curves exactly, by Green's theorem: three parts of a parabola's Bézier integral. */
function pathArea(commands: readonly PathCommand[]): number {
  let [area, x, y, startX, startY] = [0, 0, 0, 0, 0];
  const cross = (ax: number, ay: number, bx: number, by: number): number => ax * by - bx * ay;
  const line = (tx: number, ty: number): void => {
    area += cross(x, y, tx, ty) / 2;
    [x, y] = [tx, ty];
  };
  for (const command of commands) {
    if (command.type === 'M') {
      line(startX, startY);
      [x, y, startX, startY] = [command.x, command.y, command.x, command.y];
    } else if (command.type === 'L') line(command.x, command.y);
    else if (command.type === 'Q') {
      const { x1, y1, x: tx, y: ty } = command;
      area += (2 * cross(x, y, x1, y1) + 2 * cross(x1, y1, tx, ty) + cross(x, y, tx, ty)) / 6;
      [x, y] = [tx, ty];
    } else if (command.type === 'C') throw new Error('the typeface has no curves of degree three');
  }
  line(startX, startY);
  return area;
}

/** A text of one glyph each: kerning and gaps play no part. */
const GLYPHS = [...'abgmrzoOQ08&@{}()/×·−'];

describe('outlines of letters', () => {
  it.each(GLYPHS)('%s: area, sense and closeness to the curves', async (glyph) => {
    for (const typeface of [regular, bold])
      for (const size of [3, 24]) {
        const outlines = textOutlines(typeface, layOutText(typeface, glyph, 0), size);
        const own = Math.abs(pathArea(typeface.font.getPath(glyph, 0, 0, size).commands));
        const area = outlines.reduce((sum, outline) => sum + signedArea(outline), 0);
        const allowed = 0.02 * outlines.reduce((sum, outline) => sum + perimeter(outline), 0);
        expect(Math.abs(area - own), `${glyph} at ${size} mm: ${area} beside ${own}`).toBeLessThan(allowed);
        expect(area).toBeGreaterThan(0);
        const outermost = outlines.reduce((a, b) => (Math.abs(signedArea(a)) > Math.abs(signedArea(b)) ? a : b));
        expect(signedArea(outermost)).toBeGreaterThan(0);
        const volume = await withSolids((bench) => bench.prism(outlines, 0, 2).volume());
        expect(volume / 2 / area).toBeCloseTo(1, 4);
      }
  });

  it('turn holes the other way round: the O and both of the 8', () => {
    const holes = (text: string): number =>
      textOutlines(regular, layOutText(regular, text, 0), 10).filter((outline) => signedArea(outline) < 0).length;
    expect([holes('O'), holes('8'), holes('m'), holes('B')]).toEqual([1, 2, 0, 2]);
  });

  it('keep the gap that is asked for between all neighbours', () => {
    const { glyphs } = layOutText(regular, 'AVATAR11', 0.2);
    const ink = glyphs.map(({ character, x }) => {
      const { x1, x2 } = regular.font.charToGlyph(character).getBoundingBox();
      return [x + x1 / 1000, x + x2 / 1000] as const;
    });
    for (let i = 1; i < ink.length; i++) expect(ink[i]![0] - ink[i - 1]![1]).toBeGreaterThan(0.2 - 1e-9);
  });
});

describe('marks', () => {
  it('draws a bar over the digits that have one, clear of them, and over no other', () => {
    const { bars, glyphs } = layOutText(bold, '101\u03051', 0.1);
    expect(bars).toHaveLength(1);
    const [bar] = bars;
    const digit = bold.font.charToGlyph('1').getBoundingBox();
    const middle = glyphs[2]!.x + (digit.x1 + digit.x2) / 2000;
    expect((bar!.left + bar!.right) / 2).toBeCloseTo(middle, 9);
    expect(bar!.bottom).toBeGreaterThan(digit.y2 / 1000 + 0.09);
    expect(bar!.top - bar!.bottom).toBeCloseTo(bold.stroke, 9);
    const outlines = textOutlines(bold, layOutText(bold, '101\u03051', 0.1), 10);
    expect(outlines.filter((outline) => outline.every(([, y]) => y > 7))).toHaveLength(1);
  });

  it('parts bars of one-digit indices and joins those of one number', () => {
    expect(layOutText(bold, '(1\u03051\u030501)', 0.1).bars).toHaveLength(2);
    expect(layOutText(bold, '{1 0 1\u03051\u0305 1}', 0.1).bars).toHaveLength(1);
    expect(layOutText(bold, '1 0 1\u03051\u0305 1', 0.1).bars).toHaveLength(1);
    expect(layOutText(bold, '3\u0305m {1\u03051\u030501}', 0.1).bars).toHaveLength(3);
  });

  it('sets the figures of a formula below the line, and no others', () => {
    expect(formulaText('CaSO4·2H2O')).toBe('CaSO₄·2H₂O');
    expect(formulaText('(Mg,Fe)7Si8O22(OH)2')).toBe('(Mg,Fe)₇Si₈O₂₂(OH)₂');
    const { glyphs } = layOutText(regular, 'H₂O', 0);
    expect(glyphs.map(({ character, y }) => [character, Math.sign(y)])).toEqual([
      ['H', 0],
      ['2', -1],
      ['O', 0],
    ]);
    expect(glyphs[1]!.scale).toBeLessThan(1);
  });
});

describe('a typeface', () => {
  it("states the figures of Atkinson Hyperlegible's own tables", () => {
    // OS/2 sCapHeight 668 of 1000; contours of the O: 680 − 601 and 550 − 680 (read from the file with another tool).
    expect(regular.capital).toBeCloseTo(0.668, 9);
    expect(regular.stroke).toBeCloseTo(0.079, 9);
    expect(bold.stroke).toBeCloseTo(0.13, 9);
  });

  it('lists all characters that it lacks', () => {
    expect(() => layOutText(regular, 'Кварц α', 0)).toThrow(
      /no sign for К \(U\+041A\), в \(U\+0432\), а \(U\+0430\), р \(U\+0440\), ц \(U\+0446\), α \(U\+03B1\)/,
    );
  });

  it('is not read from other bytes', () => {
    expect(() => readTypeface(new Uint8Array([1, 2, 3, 4]))).toThrow(/typeface cannot be read/);
    const cut = fontBytes(400).slice(0, 2000);
    expect(() => readTypeface(cut)).toThrow(/typeface cannot be read/);
  });
});
