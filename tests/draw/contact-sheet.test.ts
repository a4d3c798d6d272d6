import { describe, expect, it } from 'vitest';
import { contactSheet } from '../../src/draw/contact-sheet.ts';
import { sheetColumns } from '../../src/draw/sheet-columns.ts';
import { textWidth } from '../../src/draw/text-width.ts';
import { CRYSTALS, cube, hexaoctahedron, monoclinic, tetrahedron } from './crystals.ts';
import { pathPoints, readXml } from './xml.ts';

const entries = Array.from({ length: 100 }, (_, i) => {
  const [caption, shape] = CRYSTALS[i % CRYSTALS.length]!;
  return { shape, caption: `${caption} no. ${i}`, ...(i % 3 === 0 && { subcaption: '{101\u03051}' }) };
});

/** Bounds of every crystal, from the closed line around it. */
const pictures = (svg: string) =>
  readXml(svg).flatMap(({ name, attributes: { d, fill } }) => {
    if (name !== 'path' || fill !== 'none' || !d!.endsWith('Z')) return [];
    const points = pathPoints(d!);
    const [xs, ys] = [points.map(([x]) => x), points.map(([, y]) => y)];
    return [{ left: Math.min(...xs), right: Math.max(...xs), top: Math.min(...ys), bottom: Math.max(...ys) }];
  });

const texts = (svg: string) => readXml(svg).filter(({ name, text }) => name === 'text' && text !== '');

/** Words of captions with the place and size that they have. */
const captionsOf = (svg: string) =>
  texts(svg)
    .filter(({ attributes }) => attributes['font-size'] === '16')
    .map(({ text, attributes }) => ({ text, x: Number(attributes.x), y: Number(attributes.y) }));

const viewBox = (svg: string): number[] => readXml(svg)[0]!.attributes.viewBox!.split(' ').map(Number);

describe('a sheet of 100 crystals', () => {
  const svg = contactSheet(entries, { title: 'All & sundry' });

  it('is well-formed, the same every time, and holds every caption', () => {
    const all = texts(svg)
      .map(({ text }) => text)
      .join(' ');
    for (const { caption } of entries) expect(all).toContain(caption);
    expect(all).toContain('All & sundry 100 crystals · general view');
    expect(contactSheet(entries, { title: 'All & sundry' })).toBe(svg);
    expect(svg).not.toMatch(/NaN|Infinity|undefined|-0[^.\d]|[\u0300-\u036f]/);
  });

  it('draws every crystal as large as the same box allows', () => {
    const boxes = pictures(svg);
    expect(boxes).toHaveLength(100);
    for (const { left, right, top, bottom } of boxes) expect(Math.max(right - left, bottom - top)).toBeCloseTo(126, 1);
  });

  it('lets none touch another or leave the page', () => {
    const [, , width, height] = viewBox(svg);
    const boxes = pictures(svg);
    for (const [i, a] of boxes.entries()) {
      expect(a.left > 0 && a.right < width! && a.top > 0 && a.bottom < height!).toBe(true);
      for (const b of boxes.slice(i + 1))
        expect(a.right < b.left || b.right < a.left || a.bottom < b.top || b.bottom < a.top).toBe(true);
    }
  });
});

describe('captions', () => {
  const long = [
    'Potassium dihydrogen phosphate',
    'Fluorapophyllite-(K)',
    'Tetragon-tritetrahedron',
    'Wwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwww',
    'A recipe from the third drawer of the eastern cabinet, found again in the spring after the great flood of the town',
    'Ice',
  ];
  const names = Array.from({ length: 24 }, (_, i) => long[i % long.length]!);
  const svg = contactSheet(
    names.map((caption) => ({ shape: cube, caption, subcaption: 'prismatic, laboratory crystal' })),
    { columns: 6 },
  );
  const cell = (viewBox(svg)[2]! - 56) / 6;

  it('have one size, and stay in their cells, which stand in straight columns', () => {
    const lines = captionsOf(svg);
    const middles = [...new Set(lines.map(({ x }) => x))];
    expect(middles).toHaveLength(6);
    middles.forEach((x, i) => {
      expect(x).toBeCloseTo(28 + (i + 0.5) * cell, 2);
    });
    for (const { text } of lines) expect(16 * textWidth(text), text).toBeLessThan(cell - 4);
  });

  it('are told in full in two lines or three, and end in an ellipsis where that is not enough', () => {
    const all = captionsOf(svg).map(({ text }) => text);
    expect(all.join(' ')).toContain('Potassium dihydrogen phosphate');
    expect(all.join('')).toContain('Fluorapophyllite-(K)');
    expect(all.filter((text) => text.endsWith('…'))).toHaveLength(8); // two of the six, four times
  });

  it('come near no crystal and no further line of the row below', () => {
    const boxes = pictures(svg);
    for (const { x, y } of captionsOf(svg))
      for (const { left, right, top, bottom } of boxes)
        expect(x < left || x > right || y < top - 5 || y - 12 > bottom).toBe(true);
  });
});

describe('helper faces', () => {
  it('have no hue, the form in question has', () => {
    const fills = (helpers: number[]) =>
      readXml(contactSheet([{ shape: monoclinic, caption: 'x', helpers }])).flatMap(({ name, attributes: { fill } }) =>
        name === 'path' && fill?.startsWith('#') ? [fill] : [],
      );
    const isGrey = (colour: string): boolean => {
      const channels = [1, 3, 5].map((at) => Number.parseInt(colour.slice(at, at + 2), 16));
      return Math.max(...channels) - Math.min(...channels) < 14;
    };
    expect(fills([]).filter(isGrey)).toEqual([]);
    expect(fills([1, 2]).filter(isGrey).length).toBeGreaterThan(0);
    expect(fills([1, 2]).filter((colour) => !isGrey(colour)).length).toBeGreaterThan(0);
    expect(fills([0, 1, 2]).filter((colour) => !isGrey(colour))).toEqual([]);
  });
});

describe('hidden edges', () => {
  const dashed = (svg: string): number =>
    readXml(svg).filter(({ attributes }) => attributes['stroke-dasharray']).length;
  const sheet = (hidden?: 'thin' | 'none') =>
    contactSheet(
      [cube, tetrahedron, hexaoctahedron].map((shape) => ({ shape, caption: 'x' })),
      { ...(hidden && { hidden }) },
    );

  it('help solids of fewer than seven faces, unless all or none are wanted', () => {
    expect([dashed(sheet()), dashed(sheet('thin')), dashed(sheet('none'))]).toEqual([2, 3, 0]);
  });
});

describe('columns', () => {
  it('are as many as asked for', () => {
    const lefts = new Set(
      pictures(contactSheet(Array(6).fill({ shape: cube, caption: 'x' }), { columns: 3 })).map(({ left }) => left),
    );
    expect(lefts.size).toBe(3);
  });

  it.each([
    [1, 1],
    [2, 2],
    [3, 3],
    [5, 3],
    [6, 3],
    [12, 4],
    [32, 8],
    [48, 8],
    [60, 10],
    [146, 10],
    [220, 10],
  ])('of a sheet of %d are %d unless asked otherwise', (count, columns) => {
    expect(sheetColumns(count)).toBe(columns);
  });

  it('are never more than ten, and leave no last row with a single crystal where another number does better', () => {
    for (let count = 1; count < 360; count++) {
      const columns = sheetColumns(count);
      expect(columns).toBeLessThanOrEqual(10);
      if (count > 12) expect(count % columns, `${count} in ${columns}`).not.toBe(1);
    }
  });

  it.each([0, -1, 2.5])('refuses %d', (columns) => {
    expect(() => contactSheet([{ shape: cube, caption: 'x' }], { columns })).toThrow('whole number');
  });

  it('refuses an empty sheet', () => {
    expect(() => contactSheet([])).toThrow('at least one crystal');
  });
});
