import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { visitOverlaps } from '../../../src/files/mesh/box-pairs.ts';

/** The pairs in rising order. */
function pairsOf(boxes: Float64Array): string[] {
  const pairs: string[] = [];
  visitOverlaps(boxes, (i, j) => pairs.push(`${Math.min(i, j)},${Math.max(i, j)}`) > 0);
  return pairs.sort();
}

/** By comparing each box with each. */
function slowPairs(boxes: Float64Array): string[] {
  const pairs: string[] = [];
  const apart = (i: number, j: number): boolean =>
    [0, 1, 2].some((axis) => boxes[6 * i + axis]! > boxes[6 * j + axis + 3]!);
  for (let i = 0; i < boxes.length / 6; i++)
    for (let j = i + 1; j < boxes.length / 6; j++) if (!apart(i, j) && !apart(j, i)) pairs.push(`${i},${j}`);
  return pairs.sort();
}

describe('visitOverlaps', () => {
  const size = fc.integer({ min: 0, max: 6 });
  const place = fc.integer({ min: 0, max: 20 });
  const box = fc
    .tuple(place, place, place, size, size, size)
    .map(([x, y, z, a, b, c]): number[] => [x, y, z, x + a, y + b, z + c]);

  it('finds each pair once, as comparing each with each does', () => {
    fc.assert(
      fc.property(fc.array(box, { maxLength: 60 }), (boxes) => {
        const numbers = Float64Array.from(boxes.flat());
        expect(pairsOf(numbers)).toEqual(slowPairs(numbers));
      }),
    );
  });

  it('stops when told to', () => {
    const all = Float64Array.from(Array.from({ length: 50 }, () => [0, 0, 0, 1, 1, 1]).flat());
    let calls = 0;
    visitOverlaps(all, () => ++calls < 7);
    expect(calls).toBe(7);
  });

  it('takes no boxes for no pairs', () => {
    expect(pairsOf(new Float64Array())).toEqual([]);
  });
});
