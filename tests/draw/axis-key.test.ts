import { describe, expect, it } from 'vitest';
import { axisKey } from '../../src/draw/axis-key.ts';
import { pathPoints, readXml } from './xml.ts';

/** Names with the place of their first character. */
const names = () =>
  readXml(axisKey()).reduce<{ text: string; x: number }[]>((all, { name, text, attributes }) => {
    if (name === 'text' && text === '') all.push({ text: '', x: Number.NaN });
    const last = all.at(-1);
    if (name === 'tspan' && last) {
      last.x = Number.isNaN(last.x) ? Number(attributes.x) : last.x;
      last.text += text;
    }
    return all;
  }, []);

const outlines = () =>
  readXml(axisKey()).flatMap(({ name, attributes: { d, fill } }) =>
    name === 'path' && fill === '#1d2333' ? [pathPoints(d!)] : [],
  );

describe('the key to the axes', () => {
  it('has a column for each order', () => {
    const columns = new Map<number, string[]>();
    for (const { text, x } of names()) {
      const column = Math.floor((x - 20) / 170);
      columns.set(column, [...(columns.get(column) ?? []), text]);
    }
    expect([...columns.entries()].sort(([a], [b]) => a - b).map(([, texts]) => texts)).toEqual([
      ['2', '2/m'],
      ['3', '3'],
      ['4', '4', '4/m'],
      ['6', '6', '6/m'],
    ]);
  });

  it('draws triangles that stand on a side and point up', () => {
    const triangles = outlines().filter((points) => points.length === 3);
    expect(triangles).toHaveLength(3); // of 3, −3 and the one in −6
    for (const points of triangles) {
      const [top, left, right] = [...points].sort((a, b) => a[1] - b[1]) as [number, number][];
      expect(left![1]).toBeCloseTo(right![1], 1);
      expect(top![0]).toBeCloseTo((left![0] + right![0]) / 2, 1);
    }
  });
});
