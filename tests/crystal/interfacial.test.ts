// Outside source: angles on paper (cubic), and the formula of a tetragonal and a hexagonal cell (common practice).
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { metric } from '../../src/crystal/cell.ts';
import { completeCell } from '../../src/crystal/complete-cell.ts';
import { interfacialAngle, zoneAngle } from '../../src/crystal/interfacial.ts';
import { miller, zone } from '../../src/crystal/spaces.ts';
import { cellOnAxes } from './cells.ts';

const degrees = (radians: number): number => (radians * 180) / Math.PI;
const cubic = metric(completeCell({ a: 5.43 }, 'cubic'), 'cubic');

it.each<[string, readonly [number, number, number], readonly [number, number, number], number]>([
  ['cube to cube', [1, 0, 0], [0, 1, 0], 90],
  ['cube to octahedron', [1, 0, 0], [1, 1, 1], degrees(Math.acos(1 / Math.sqrt(3)))],
  ['octahedron to octahedron', [1, 1, 1], [1, 1, -1], degrees(Math.acos(1 / 3))],
  ['cube to dodecahedron', [1, 0, 0], [1, 1, 0], 45],
  ['dodecahedron to dodecahedron', [1, 1, 0], [1, 0, 1], 60],
  ['a face and itself', [1, 2, 3], [2, 4, 6], 0],
  ['a face and its opposite', [1, 2, 3], [-1, -2, -3], 180],
])('%s of a cubic crystal', (_, first, second, angle) => {
  expect(interfacialAngle(cubic, miller(...first), miller(...second))).toBeCloseTo(angle, 12);
});

it('measures the rhombohedron of a hexagonal cell against the base as its axial ratio says', () => {
  // tan ρ = (2/√3) (c/a) for (10-11): on paper, with c/a = 1.1.
  const cell = metric(completeCell({ a: 1, c: 1.1 }, 'hexagonal'), 'hexagonal');
  const rho = degrees(Math.atan((2 / Math.sqrt(3)) * 1.1));
  expect(interfacialAngle(cell, miller(0, 0, 1), miller(1, 0, 1))).toBeCloseTo(rho, 12);
  expect(interfacialAngle(cell, miller(1, 0, 0), miller(0, 1, 0))).toBeCloseTo(60, 12);
  expect(zoneAngle(cell, zone(1, 0, 0), zone(0, 1, 0))).toBeCloseTo(120, 12);
});

it('loses nothing between nearly parallel faces', () => {
  // (999 998 0) and (998 997 0): sine 1/(|h₁||h₂|), on paper.
  const sine = 1 / (Math.hypot(999, 998) * Math.hypot(998, 997));
  const found = interfacialAngle(cubic, miller(999, 998, 0), miller(998, 997, 0));
  expect(Math.abs(found / degrees(Math.asin(sine)) - 1)).toBeLessThan(1e-12);
});

describe('in any cell', () => {
  const index = fc.integer({ min: -9, max: 9 });
  const triple = fc.tuple(index, index, index).filter((values) => values.some((value) => value !== 0));

  it('a face and its opposite make supplementary angles with a third', () => {
    fc.assert(
      fc.property(cellOnAxes, triple, triple, ({ cell, axes }, p, q) => {
        const own = metric(cell, axes);
        const angle = interfacialAngle(own, miller(...p), miller(...q));
        const other = interfacialAngle(own, miller(0 - p[0], 0 - p[1], 0 - p[2]), miller(...q));
        expect(Math.abs(angle + other - 180)).toBeLessThan(1e-10);
      }),
    );
  });

  it('the axes make the angles of the cell', () => {
    fc.assert(
      fc.property(cellOnAxes, ({ cell, axes }) => {
        const own = metric(cell, axes);
        expect(Math.abs(zoneAngle(own, zone(0, 1, 0), zone(0, 0, 1)) - cell.alpha)).toBeLessThan(1e-10);
        expect(Math.abs(zoneAngle(own, zone(0, 0, 1), zone(1, 0, 0)) - cell.beta)).toBeLessThan(1e-10);
        expect(Math.abs(zoneAngle(own, zone(1, 0, 0), zone(0, 1, 0)) - cell.gamma)).toBeLessThan(1e-10);
      }),
    );
  });
});
