import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { openDirections } from '../../src/polyhedron/open.ts';
import { intersect, type Solid } from '../../src/polyhedron/solid.ts';
import { checkSolid, count, presentFaces } from './check-solid.ts';
import { crystalPlanes, withoutSymmetry } from './crystal-planes.ts';
import { cube, type HalfSpace, planesFrom, turned } from './hand-planes.ts';
import { cornerOf, type Row, rowsOf, sideOf } from './rational.ts';

/** fast-check prints the seed and the path of a failure; put them here to repeat it. More runs with GONIOLITH_RUNS. */
const RUNS = { numRuns: Number(process.env.GONIOLITH_RUNS ?? 700) };

const normal = (largest: number) =>
  fc
    .tuple(...[0, 1, 2].map(() => fc.integer({ min: -largest, max: largest })))
    .filter((h) => h.some((value) => value !== 0));

/** Few different numbers, so that planes often meet in a point, share an edge or coincide. */
const halfSpaces = (offset: fc.Arbitrary<number>, maxLength: number) =>
  fc.array(
    fc.tuple(normal(3), offset).map(([[h, k, l], d]): HalfSpace => [h!, k!, l!, d]),
    { minLength: 4, maxLength },
  );

/** All meetings of three planes that lie in every half-space: the slow, obvious way to the vertices. */
function bruteVertices(rows: readonly Row[]): Set<string> {
  const found = new Set<string>();
  for (const [i, a] of rows.entries())
    for (const [j, b] of rows.entries())
      for (const c of j > i ? rows.slice(j + 1) : []) {
        const point = cornerOf(a, b, c);
        if (point && rows.every((row) => sideOf(row, point) <= 0))
          found.add(
            point
              .slice(0, 3)
              .map((value) => Number((value * 1_000_000_000n) / point[3]) / 1e9)
              .join(),
          );
      }
  return found;
}

const outline = (solid: Solid): string =>
  presentFaces(solid)
    .map((f) => `${f}: ${[...solid.neighbour.subarray(solid.start[f], solid.start[f + 1])].sort((a, b) => a - b)}`)
    .join('\n');

describe('random half-spaces', () => {
  it('around the origin: bounded and sound, or open exactly where the cone of their normals is', () => {
    fc.assert(
      fc.property(halfSpaces(fc.integer({ min: 1, max: 4 }), 14), (list) => {
        const planes = planesFrom(list);
        const solid = intersect(planes);
        expect(solid.state).toBe(openDirections(planes.normals).length > 0 ? 'open' : 'bounded');
        if (solid.state === 'bounded') checkSolid(solid);
      }),
      RUNS,
    );
  });

  it('anywhere, boxed in: the same vertices as all triples of planes', () => {
    fc.assert(
      fc.property(halfSpaces(fc.integer({ min: -3, max: 4 }), 8), (list) => {
        const planes = planesFrom([...cube(3), ...list]);
        const solid = intersect(planes);
        const wanted = bruteVertices(rowsOf(planes));
        if (solid.state === 'bounded') {
          checkSolid(solid);
          expect(count(solid).V).toBe(wanted.size);
        } else {
          expect(solid.state).toBe('empty');
          expect(isFlat([...wanted].map((text) => text.split(',').map(Number)))).toBe(true);
        }
      }),
      RUNS,
    );
  });

  it('with normals that are not whole: turned by any angle, sound at their exact double values', () => {
    fc.assert(
      fc.property(
        halfSpaces(fc.integer({ min: 1, max: 4 }), 10),
        fc.double({ min: -3, max: 3, noNaN: true }),
        normal(5),
        (list, angle, axis) => {
          const solid = intersect(planesFrom(turned([...cube(3), ...list], axis, angle)));
          checkSolid(solid);
        },
      ),
      RUNS,
    );
  });

  it('of a wide range of sizes', () => {
    const offset = fc.double({ min: 2 ** -20, max: 2 ** 20, noNaN: true });
    fc.assert(
      fc.property(halfSpaces(offset, 14), (list) => {
        const solid = intersect(planesFrom([...cube(2 ** 10), ...list]));
        checkSolid(solid);
      }),
      RUNS,
    );
  });
});

/** Whether points lie in one plane (decimals of small fractions: a determinant this small is zero). */
function isFlat(points: readonly (readonly number[])[]): boolean {
  const [origin, ...rest] = points;
  if (!origin) return true;
  const from = rest.map((p) => p.map((value, axis) => value - origin[axis]!));
  return from.every((a) =>
    from.every((b) =>
      from.every((c) => {
        const cross = [a[1]! * b[2]! - a[2]! * b[1]!, a[2]! * b[0]! - a[0]! * b[2]!, a[0]! * b[1]! - a[1]! * b[0]!];
        return Math.abs(cross[0]! * c[0]! + cross[1]! * c[1]! + cross[2]! * c[2]!) < 1e-6;
      }),
    ),
  );
}

describe('random crystals', () => {
  const groups = ['m-3m', '432', '-43m', 'm-3', '23', '6/mmm', '-3m1', '32:R', '4/m', '-42m', 'mmm', '2/m', '-1', '1'];
  const forms = fc.array(fc.record({ hkl: normal(3), D: fc.constantFrom(1, 1.5, 2, 2.5, 3, Math.SQRT2, Math.PI) }), {
    minLength: 1,
    maxLength: 5,
  });

  it('symmetry is a shortcut and changes nothing', () => {
    fc.assert(
      fc.property(fc.constantFrom(...groups), forms, (group, list) => {
        const planes = crystalPlanes(group, list);
        const [symmetric, loose] = [intersect(planes), intersect(withoutSymmetry(planes))];
        expect(symmetric.state).toBe(loose.state);
        expect(symmetric.state).toBe(openDirections(planes.normals).length > 0 ? 'open' : 'bounded');
        if (symmetric.state === 'open') expect(presentFaces(symmetric)).toEqual(presentFaces(loose));
        if (symmetric.state !== 'bounded') return;
        checkSolid(symmetric);
        expect(outline(symmetric)).toBe(outline(loose));
        expect(count(symmetric)).toEqual(count(loose));
      }),
      RUNS,
    );
  });

  it('nor does it where the centre is left out or on a face', () => {
    const anywhere = fc.array(fc.record({ hkl: normal(2), D: fc.constantFrom(-1, 0, 0.5, 1, 2) }), {
      minLength: 1,
      maxLength: 6,
    });
    fc.assert(
      fc.property(
        fc.constantFrom('1', 'm', '2mm', '4mm', '3m1', '6mm', '-1', '222', 'm-3m'),
        anywhere,
        (group, list) => {
          const planes = crystalPlanes(group, list);
          const [symmetric, loose] = [intersect(planes), intersect(withoutSymmetry(planes))];
          expect(symmetric.state).toBe(loose.state);
          expect(presentFaces(symmetric)).toEqual(presentFaces(loose));
          if (symmetric.state !== 'bounded') return;
          checkSolid(symmetric);
          expect(outline(symmetric)).toBe(outline(loose));
        },
      ),
      RUNS,
    );
  });
});
