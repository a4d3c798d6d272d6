import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { breakLines, evenLines, firstLines } from '../../src/draw/break-lines.ts';
import { interrupt, type Line } from '../../src/draw/hidden-lines.ts';
import { legend } from '../../src/draw/legend.ts';
import { splitRemark } from '../../src/draw/mineral-name.ts';
import { withOverbars } from '../../src/draw/overbars.ts';
import { textWidth } from '../../src/draw/text-width.ts';
import type { Point } from '../../src/draw/vector.ts';
import { shapeOf } from './crystals.ts';
import { contains } from './ray.ts';
import { readXml } from './xml.ts';

describe('widths of words', () => {
  // Advance widths in the table hmtx of DejaVu Serif 2.37, in 2048ths.
  it.each([
    ['M', 2097],
    ['m', 1942],
    ['i', 655],
    ['1', 1303],
    [' ', 651],
    ['W', 2106],
    ['·', 651],
    ['Ü', 1727],
  ])('%s is no narrower than in the font, and hardly wider', (character, units) => {
    expect(textWidth(character)).toBeGreaterThanOrEqual(units / 2048);
    expect(textWidth(character)).toBeLessThan(units / 2048 + 0.03);
  });

  it('overbars take no room', () => {
    expect(textWidth('1\u03051')).toBe(textWidth('11'));
  });
});

describe('lines', () => {
  const anyText = fc.string({ unit: fc.constantFrom('a', 'W', ' ', '-', '1\u0305', 'i'), minLength: 1, maxLength: 80 });

  it('stay within the room, and lose nothing but blanks', () => {
    fc.assert(
      fc.property(anyText, fc.double({ min: 2, max: 30, noNaN: true }), (text, room) => {
        for (const lines of [breakLines(text, room), evenLines(text, room)]) {
          for (const line of lines) expect(textWidth(line)).toBeLessThanOrEqual(room);
          expect(lines.join('').replace(/\s/g, '')).toBe(text.replace(/\s/g, ''));
        }
        expect(evenLines(text, room).length).toBe(breakLines(text, room).length);
        expect(firstLines(text, room, 2).length).toBeLessThanOrEqual(2);
      }),
    );
  });

  it('break at blanks and after hyphens of compounds', () => {
    expect(breakLines('Pentagon-tritetrahedron of 23', 9)).toEqual(['Pentagon-', 'tritetrahedron of', '23']);
    expect(breakLines('a quick brown fox jumps', 11)).toEqual(['a quick brown fox', 'jumps']);
    expect(evenLines('a quick brown fox jumps', 11)).toEqual(['a quick brown', 'fox jumps']);
  });
});

describe('overbars in titles', () => {
  it.each([
    ['Pinacoid {123}, general form of -1', 'Pinacoid {123}, general form of 1\u0305'],
    ['Rhombohedron {10-11} in -3m', 'Rhombohedron {101\u03051} in 3\u0305m'],
    ['Cube {100} in m-3m', 'Cube {100} in m3\u0305m'],
    ['Calcite, twin on (01-12)', 'Calcite, twin on (011\u03052)'],
    ['Axes [1-10] of -43m, -6m2', 'Axes [11\u03050] of 4\u03053m, 6\u0305m2'],
  ])('%s', (title, expected) => {
    expect(withOverbars(title, 'hexagonal')).toBe(expected);
  });

  it.each(['Vein 3-4', 'Lot -1', 'Found 2010-11-03 (2010-11)', 'Shelf -3 and Monazite-(Ce)', 'pit (10-20)'])(
    'not where a minus means something else: %s',
    (title) => {
      expect(withOverbars(title, 'hexagonal')).toBe(title);
    },
  );
});

describe("remarks in a mineral's name", () => {
  it.each([
    ['Urea (laboratory crystal)', 'Urea', 'laboratory crystal'],
    ['Monazite-(Ce)', 'Monazite-(Ce)', null],
    ['Quartz', 'Quartz', null],
  ])('%s', (whole, name, remark) => {
    expect(splitRemark(whole)).toEqual({ name, remark });
  });
});

describe('the legend', () => {
  const shape = shapeOf({
    pointGroup: '6/mmm',
    cell: { a: 5, c: 6 },
    forms: ['10-10', '10-11', '0001', '11-22', '11-20', '12 13 -25 14'].map((face, i) => ({
      face,
      distance: [1, 1.2, 1.3, 1.29, 1.1, 1.27][i]!,
    })),
  });
  const placed = (width: number) =>
    readXml(`<svg>${legend(shape, width, { style: 'tinted', helpers: [] }).paint(0, 0)}</svg>`);

  it.each([250, 560, 900])('on %d pixels keeps names off the next column and the edge', (width) => {
    const elements = placed(width);
    const swatches = elements.filter(({ name }) => name === 'rect').map(({ attributes }) => Number(attributes.x));
    const second = Math.max(...swatches);
    for (const { name, text, attributes } of elements) {
      if (name !== 'text' || text === '') continue;
      const right = Number(attributes.x) + textWidth(text) * Number(attributes['font-size']);
      expect(right).toBeLessThanOrEqual(Number(attributes.x) < second ? second - 8 : width + 0.5);
    }
  });

  it('leaves no hole where no form has a letter', () => {
    const [swatch] = placed(560).filter(({ name }) => name === 'rect');
    const [first] = placed(560).filter(({ name }) => name === 'tspan');
    expect(Number(first!.attributes.x) - Number(swatch!.attributes.x)).toBeLessThan(36);
  });
});

describe('interrupted lines', () => {
  const box: Point[] = [
    [10, 10],
    [30, 12],
    [28, 30],
    [8, 26],
  ];

  it('have nothing left inside, and all of the rest', () => {
    const coordinate = fc.double({ min: 0, max: 40, noNaN: true });
    fc.assert(
      fc.property(fc.tuple(coordinate, coordinate), fc.tuple(coordinate, coordinate), (p, q) => {
        const left = interrupt([[p, q]], [box]);
        const at = ([a, b]: Line, t: number): Point => [a[0] + (b[0] - a[0]) * t, a[1] + (b[1] - a[1]) * t];
        const isLeft = (point: Point): boolean =>
          left.some(([a, b]) => {
            const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
            const t = ((point[0] - a[0]) * dx + (point[1] - a[1]) * dy) / (dx * dx + dy * dy);
            return t > -0.01 && t < 1.01;
          });
        const length = Math.hypot(q[0] - p[0], q[1] - p[1]);
        for (let t = 0.0005; t < 1; t += 0.01) {
          const point = at([p, q], t);
          for (const line of left) expect(contains(box, at(line, 0.002 + t * 0.995))).toBe(false);
          const near = [-2 / length, 2 / length].some((step) => contains(box, at([p, q], t + step)));
          if (length > 4 && !contains(box, point) && !near && t * length > 2 && (1 - t) * length > 2)
            expect(isLeft(point), `${point} of ${p} to ${q}`).toBe(true);
        }
      }),
    );
  });
});
