import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { meet } from '../../src/polyhedron/exact/meet.ts';
import { PlaneTable } from '../../src/polyhedron/exact/plane-table.ts';
import { exactSide } from '../../src/polyhedron/exact/side.ts';
import { commensurateOffsets, exactOffsets, type Offset } from '../../src/polyhedron/offset.ts';
import { loosePlanes } from '../../src/polyhedron/planes.ts';
import { nextDown, nextUp } from './hand-planes.ts';
import { cornerOf, rowOf, sideOf } from './rational.ts';

type Normal = readonly [number, number, number];
const RUNS = { numRuns: 1500 };

/** Plain rationals on four planes: the side of the last at the corner of the first three; null without a corner. */
function slowSide(normals: readonly Normal[], offsets: readonly Offset[]): -1 | 0 | 1 | null {
  const [a, b, c, p] = normals.map((normal, i) => rowOf(normal, offsets[i]!));
  const corner = cornerOf(a!, b!, c!);
  return corner && sideOf(p!, corner);
}

const tableOf = (normals: readonly Normal[], offsets: readonly Offset[]): PlaneTable =>
  new PlaneTable().load(loosePlanes(Float64Array.from(normals.flat()), offsets));

function compare(normals: readonly Normal[], offsets: readonly Offset[]): void {
  const wanted = slowSide(normals, offsets);
  if (wanted === null) return;
  expect(exactSide(tableOf(normals, offsets), 0, 1, 2, 3)).toBe(wanted);
}

const entry = (largest: number) => fc.integer({ min: -largest, max: largest });
const normals = (largest: number) =>
  fc.array(
    fc.tuple(entry(largest), entry(largest), entry(largest)).filter((h) => h.some((value) => value !== 0)),
    { minLength: 4, maxLength: 4 },
  );

const fraction = fc.double({ min: -1, max: 1, noNaN: true });

describe('the side of a plane at a corner, against plain rationals', () => {
  it('whole normals, commensurate offsets: meetings are common', () => {
    const offsets = fc.array(entry(6), { minLength: 4, maxLength: 4 });
    fc.assert(
      fc.property(normals(3), offsets, (h, d) => {
        compare(h, commensurateOffsets(d));
        compare(h, exactOffsets(d));
      }),
      RUNS,
    );
  });

  it('large whole normals, through a common point or a hair beside it', () => {
    const nudge = fc.constantFrom(nextUp, nextDown, (value: number) => value);
    fc.assert(
      fc.property(normals(3000), fc.tuple(entry(50), entry(50), entry(50)), nudge, (h, point, move) => {
        const values = h.map((row) => row[0] * point[0] + row[1] * point[1] + row[2] * point[2]);
        compare(h, exactOffsets([...values.slice(0, 3), move(values[3]!)]));
      }),
      RUNS,
    );
  });

  it('whole normals within the integer shortcut, offsets of several families that all but cancel', () => {
    const nudge = fc.constantFrom(nextUp, nextDown, (value: number) => value);
    fc.assert(
      fc.property(normals(99), fc.tuple(fraction, fraction, fraction), nudge, (h, point, move) => {
        const values = h.map((row) => row[0] * point[0] + row[1] * point[1] + row[2] * point[2]);
        compare(h, exactOffsets([...values.slice(0, 3), move(values[3]!)]));
      }),
      RUNS,
    );
  });

  it('fractions, through a common point or a hair beside it', () => {
    const rows = fc.array(
      fc.tuple(fraction, fraction, fraction).filter((h) => h.some((value) => value !== 0)),
      { minLength: 4, maxLength: 4 },
    );
    const nudge = fc.constantFrom(nextUp, nextDown, (value: number) => value);
    fc.assert(
      fc.property(rows, fc.tuple(entry(9), entry(9), entry(9)), nudge, (h, point, move) => {
        const values = h.map((row) => row[0] * point[0] + row[1] * point[1] + row[2] * point[2]);
        compare(h, exactOffsets([...values.slice(0, 3), move(values[3]!)]));
      }),
      RUNS,
    );
  });
});

describe('the meeting of three planes', () => {
  it('is within its own error bound of the exact point', () => {
    const offsets = fc.array(fc.double({ min: -100, max: 100, noNaN: true }), { minLength: 3, maxLength: 3 });
    fc.assert(
      fc.property(normals(40), offsets, (h, d) => {
        const three = exactOffsets(d);
        const exact = cornerOf(rowOf(h[0]!, three[0]!), rowOf(h[1]!, three[1]!), rowOf(h[2]!, three[2]!));
        if (!exact) return;
        const out = new Float64Array(4);
        meet(tableOf(h.slice(0, 3), three).rows, 0, 1, 2, out, 0);
        for (let axis = 0; axis < 3; axis++) {
          if (!Number.isFinite(out[3]!)) continue;
          const scale = 1n << 120n;
          const found = rowOf([out[axis]!, 1, 0], exactOffsets([0])[0]!);
          // |out − X/W| in units of 2^-120, by whole numbers: out = found[0]/found[1].
          const gap = (found[0] * exact[3] - exact[axis]! * found[1]) * scale;
          const off = gap / (found[1] * exact[3]);
          expect(Number(off < 0n ? -off : off) / 2 ** 120).toBeLessThanOrEqual(out[3]!);
        }
      }),
      RUNS,
    );
  });
});
