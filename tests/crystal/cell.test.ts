// Outside source: definitions of the metric tensor and the reciprocal cell (International Tables; answers on paper).
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  directLength,
  metric,
  normal,
  type RealMatrix,
  reciprocalLength,
  toCartesian,
} from '../../src/crystal/cell.ts';
import { completeCell } from '../../src/crystal/complete-cell.ts';
import { onHexagonalAxes } from '../../src/crystal/form-name.ts';
import { pointGroup } from '../../src/crystal/point-group.ts';
import { SETTINGS } from '../../src/crystal/setting.ts';
import { cellVector, miller, zone } from '../../src/crystal/spaces.ts';
import { cellOnAxes } from './cells.ts';

const times = (a: RealMatrix, b: RealMatrix): number[] =>
  a.flatMap((row) => [0, 1, 2].map((j) => row[0] * b[0][j]! + row[1] * b[1][j]! + row[2] * b[2][j]!));

const transposed = (m: RealMatrix): RealMatrix => [
  [m[0][0], m[1][0], m[2][0]],
  [m[0][1], m[1][1], m[2][1]],
  [m[0][2], m[1][2], m[2][2]],
];

function expectClose(found: readonly number[], wanted: readonly number[], tolerance: number): void {
  const worst = Math.max(...found.map((value, i) => Math.abs(value - wanted[i]!)));
  expect(worst, `${found} against ${wanted}`).toBeLessThanOrEqual(tolerance);
}

const UNIT = [1, 0, 0, 0, 1, 0, 0, 0, 1];

describe('the metric of any cell', () => {
  it('has G G* = 1, and a frame that reproduces G and V', () => {
    fc.assert(
      fc.property(cellOnAxes, ({ cell, axes }) => {
        const { direct, reciprocal, frame, reciprocalFrame, volume } = metric(cell, axes);
        expectClose(times(direct, reciprocal), UNIT, 1e-10);
        expectClose(times(transposed(frame), frame), direct.flat(), 1e-12 * 1600);
        expectClose(times(transposed(reciprocalFrame), frame), UNIT, 1e-12 * 40);
        const [a, b, c] = [cell.a, cell.b, cell.c];
        expectClose([Math.sqrt(direct[0][0]), Math.sqrt(direct[1][1]), Math.sqrt(direct[2][2])], [a, b, c], 1e-12 * 40);
        const [x, y, z] = frame;
        const triple =
          x[0] * (y[1] * z[2] - y[2] * z[1]) - x[1] * (y[0] * z[2] - y[2] * z[0]) + x[2] * (y[0] * z[1] - y[1] * z[0]);
        expectClose([triple / volume], [1], 1e-12);
      }),
    );
  });

  it('has z along c and y along b*, and on rhombohedral axes z along [111]', () => {
    fc.assert(
      fc.property(cellOnAxes, ({ cell, axes }) => {
        const own = metric(cell, axes);
        const upright = toCartesian(own, axes === 'rhombohedral' ? zone(1, 1, 1) : zone(0, 0, 1));
        const length = Math.hypot(...upright);
        expectClose(
          upright.map((part) => part / length),
          [0, 0, 1],
          1e-14,
        );
        if (axes !== 'rhombohedral') expectClose(normal(own, miller(0, 1, 0)), [0, 1, 0], 1e-14);
      }),
    );
  });

  it('keeps every operation of the groups on its axes an isometry', () => {
    fc.assert(
      fc.property(cellOnAxes, fc.nat(), ({ cell, axes }, pick) => {
        const settings = SETTINGS.filter((setting) => setting.axes === axes);
        const group = pointGroup(settings[pick % settings.length]!.key);
        const { direct } = metric(cell, axes);
        for (const { matrix } of group.operations) {
          const turned = times(transposed(matrix), times3(direct, matrix));
          expectClose(turned, direct.flat(), 1e-12 * 1600);
        }
      }),
    );
  });
});

function times3(a: RealMatrix, b: RealMatrix): RealMatrix {
  const [p, q, r, s, t, u, v, w, x] = times(a, b) as [
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  return [
    [p, q, r],
    [s, t, u],
    [v, w, x],
  ];
}

it('is exact for right angles and for 120°', () => {
  const square = metric(completeCell({ a: 3, b: 4, c: 5 }, 'orthorhombic'), 'orthorhombic');
  expect(square.direct).toEqual([
    [9, 0, 0],
    [0, 16, 0],
    [0, 0, 25],
  ]);
  expect(square.frame).toEqual([
    [3, 0, 0],
    [0, 4, 0],
    [0, 0, 5],
  ]);
  expect(square.volume).toBe(60);
  expect(metric(completeCell({ a: 2, c: 5 }, 'hexagonal'), 'hexagonal').frame[0]).toEqual([2, -1, 0]);
});

it('measures lattice planes and lattice rows', () => {
  const halite = metric(completeCell({ a: 5.64 }, 'cubic'), 'cubic');
  expect(1 / reciprocalLength(halite, miller(2, 0, 0))).toBeCloseTo(2.82, 12);
  expect(directLength(halite, zone(1, 1, 0))).toBeCloseTo(5.64 * Math.SQRT2, 12);
  expectClose(normal(halite, miller(1, 1, 1)), [Math.sqrt(1 / 3), Math.sqrt(1 / 3), Math.sqrt(1 / 3)], 1e-15);
});

it('puts a rhombohedral cell in the same frame as its hexagonal one, in obverse relation', () => {
  // a_h = 2 a sin(α/2), c_h = a √(3 + 6 cos α): on paper, from a_h = a − b and c_h = a + b + c.
  const [a, alpha] = [6.361, 46.1];
  const radians = (alpha * Math.PI) / 180;
  const rhombohedral = metric(completeCell({ a, alpha }, 'rhombohedral'), 'rhombohedral');
  const edges = { a: 2 * a * Math.sin(radians / 2), c: a * Math.sqrt(3 + 6 * Math.cos(radians)) };
  const hexagonal = metric(completeCell(edges, 'hexagonal'), 'hexagonal');
  for (const face of [miller(1, 0, 0), miller(1, 1, 1), miller(2, -1, 0), miller(3, 1, -2)]) {
    expectClose(normal(rhombohedral, face), normal(hexagonal, onHexagonalAxes(face)), 1e-14);
  }
  const fromHexagonal = toCartesian(hexagonal, cellVector(2 / 3, 1 / 3, 1 / 3));
  expectClose(toCartesian(rhombohedral, cellVector(1, 0, 0)), fromHexagonal, 1e-14 * 10);
});
