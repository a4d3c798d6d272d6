import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { layOut } from '../../../src/print/before/layout.ts';
import { extentsOf, meshVolume } from '../../../src/print/mesh.ts';
import { box } from '../solids.ts';

const BED = [200, 150, 100] as const;
const side = fc.integer({ min: 5, max: 150 });
const long = fc.integer({ min: 5, max: 200 });
const GAP = 5;

describe('parts on beds', () => {
  it('lie inside the bed, apart by the gap, every part once, with their own shape', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(side, long, fc.boolean()), { maxLength: 25 }), (sizes) => {
        const items = sizes.map(([a, b, other], i) => ({
          name: `part-${i}`,
          mesh: other ? box(a, b, 40) : box(b, a, 100),
        }));
        const beds = layOut(items, BED);
        expect(
          beds
            .flat()
            .map(({ item }) => item.name)
            .sort(),
        ).toEqual(items.map(({ name }) => name).sort());
        for (const bed of beds) {
          const rects = bed.map(({ x, y, mesh, item, turned }) => {
            const [w, d] = extentsOf(mesh);
            const own = extentsOf(item.mesh);
            expect(turned ? [d, w] : [w, d]).toEqual([own[0], own[1]]);
            expect(meshVolume(mesh)).toBeCloseTo(meshVolume(item.mesh), 6);
            expect(mesh.positions.filter((_, i) => i % 3 === 0).reduce((a, b) => Math.min(a, b))).toBeCloseTo(x, 9);
            expect(mesh.positions.filter((_, i) => i % 3 === 1).reduce((a, b) => Math.min(a, b))).toBeCloseTo(y, 9);
            expect(Math.min(x, y)).toBeGreaterThanOrEqual(0);
            expect(x + w).toBeLessThanOrEqual(BED[0]);
            expect(y + d).toBeLessThanOrEqual(BED[1]);
            return { x, y, w, d };
          });
          rects.forEach((a, i) => {
            for (const b of rects.slice(i + 1)) {
              const apart = Math.max(a.x - b.x - b.w, b.x - a.x - a.w, a.y - b.y - b.d, b.y - a.y - a.d);
              expect(apart).toBeGreaterThanOrEqual(GAP);
            }
          });
        }
      }),
      { numRuns: 150 },
    );
  });

  it('share a bed where there is room, turned if need be', () => {
    const one = layOut([{ name: 'a', mesh: box(140, 190, 5) }], BED);
    expect(one).toHaveLength(1);
    expect(one[0]![0]!.turned).toBe(true);
    const four = Array.from({ length: 4 }, (_, i) => ({ name: `${i}`, mesh: box(97, 72, 5) }));
    expect(layOut(four, BED)).toHaveLength(1);
    expect(layOut([...four, four[0]!], BED)).toHaveLength(2);
  });

  it('are always laid out in the same way', () => {
    const items = Array.from({ length: 9 }, (_, i) => ({ name: `${i}`, mesh: box(30 + i, 60 - 3 * i, 5) }));
    expect(layOut(items, BED)).toEqual(layOut(items, BED));
  });

  it('are refused when larger than the bed, by name', () => {
    expect(() => layOut([{ name: 'body', mesh: box(201, 20, 5) }], BED)).toThrow(
      /"body", 201.0 × 20.0 × 5.0 mm, is larger/,
    );
    expect(() => layOut([{ name: 'body', mesh: box(20, 20, 101) }], BED)).toThrow(/larger than the bed/);
    expect(layOut([], BED)).toEqual([]);
  });
});
