import { describe, expect, it } from 'vitest';
import { contactSheet } from '../../src/draw/contact-sheet.ts';
import { CRYSTALS, cube } from './crystals.ts';
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

describe('a sheet of 100 crystals', () => {
  const svg = contactSheet(entries, { title: 'All & sundry' });

  it('is well-formed, the same every time, and holds every caption', () => {
    const texts = new Set(readXml(svg).map(({ text }) => text));
    for (const { caption } of entries) expect(texts).toContain(caption);
    expect(texts).toContain('All & sundry');
    expect(contactSheet(entries, { title: 'All & sundry' })).toBe(svg);
    expect(svg).not.toMatch(/NaN|Infinity|undefined|-0[^.\d]|[\u0300-\u036f]/);
  });

  it('draws every crystal as large as the same box allows', () => {
    const boxes = pictures(svg);
    expect(boxes).toHaveLength(100);
    for (const { left, right, top, bottom } of boxes) expect(Math.max(right - left, bottom - top)).toBeCloseTo(118, 1);
  });

  it('lets none touch another or leave the page', () => {
    const [width, height] = readXml(svg)[0]!.attributes.viewBox!.split(' ').slice(2).map(Number);
    const boxes = pictures(svg);
    for (const [i, a] of boxes.entries()) {
      expect(a.left > 0 && a.right < width! && a.top > 0 && a.bottom < height!).toBe(true);
      for (const b of boxes.slice(i + 1))
        expect(a.right < b.left || b.right < a.left || a.bottom < b.top || b.bottom < a.top).toBe(true);
    }
  });
});

describe('columns', () => {
  it('are as many as asked for', () => {
    const lefts = new Set(
      pictures(contactSheet(Array(6).fill({ shape: cube, caption: 'x' }), { columns: 3 })).map(({ left }) => left),
    );
    expect(lefts.size).toBe(3);
  });

  it.each([0, -1, 2.5])('refuses %d', (columns) => {
    expect(() => contactSheet([{ shape: cube, caption: 'x' }], { columns })).toThrow('whole number');
  });

  it('refuses an empty sheet', () => {
    expect(() => contactSheet([])).toThrow('at least one crystal');
  });
});
