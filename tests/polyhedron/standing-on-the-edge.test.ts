import { describe, expect, it } from 'vitest';
import { measure } from '../../src/polyhedron/measures.ts';
import { exactOffsets } from '../../src/polyhedron/offset.ts';
import { intersect } from '../../src/polyhedron/solid.ts';
import { checkSolid, count, presentFaces, UNIT_FRAME, vertexDegrees } from './check-solid.ts';
import { crystalPlanes } from './crystal-planes.ts';
import { cube, type HalfSpace, nextDown, nextUp, octahedron, planesFrom, turned } from './hand-planes.ts';

const counts = (halfSpaces: readonly HalfSpace[]) => {
  const solid = intersect(planesFrom(halfSpaces));
  checkSolid(solid);
  return count(solid);
};
const CUBE = { F: 6, E: 12, V: 8 };

/** A fixed shuffle: multiplication by a number prime to the length. */
const shuffled = <T>(list: readonly T[]): T[] => {
  const step = [7, 11, 13].find((prime) => list.length % prime !== 0)!;
  return list.map((_, i) => list[(i * step + 3) % list.length]!);
};

// Planes that touch: what must come out is the solid without them.
describe('planes that just touch', () => {
  it.each<[string, HalfSpace]>([
    ['a vertex', [1, 1, 1, 3]],
    ['a vertex, obliquely', [3, 2, 1, 6]],
    ['an edge', [1, 1, 0, 2]],
    ['an edge, obliquely', [5, 2, 0, 7]],
    ['a face', [2, 0, 0, 2]],
    ['a face, by a fraction', [0.125, 0, 0, 0.125]],
    ['a vertex, with fractions', [0.5, 0.25, 0.125, 0.875]],
    ['a vertex, with high indices', [4001, 3001, 2001, 9003]],
  ])('%s', (_, plane) => {
    expect(counts([...cube(), plane])).toEqual(CUBE);
    expect(counts([plane, ...cube()])).toEqual(CUBE);
    expect(counts(shuffled([...cube(), plane, plane]))).toEqual(CUBE);
  });

  it('all of them together', () => {
    const touching: HalfSpace[] = [
      [1, 1, 1, 3],
      [3, 2, 1, 6],
      [1, 1, 0, 2],
      [5, 2, 0, 7],
      [2, 0, 0, 2],
      [1, 2, 3, 6],
    ];
    expect(counts([...touching, ...cube(), ...touching])).toEqual(CUBE);
  });

  it('of coincident planes the first counts', () => {
    const solid = intersect(planesFrom([[2, 0, 0, 2], ...cube(), [3, 0, 0, 3], [0, 0.5, 0, 0.5]]));
    expect(presentFaces(solid)).toEqual([0, 2, 3, 4, 5, 6]);
  });

  it('a plane through two edges of a prism replaces nothing', () => {
    const roof: HalfSpace[] = [...cube(), [1, 0, 1, 1], [-1, 0, 1, 1]];
    expect(counts([...roof, [0, 0, 1, 1], [0, 0, 2, 2]])).toEqual(counts(roof));
  });
});

// The smallest step: a face appears or it does not, and the solid is sound both times.
describe('one unit in the last place either side of touching', () => {
  it.each<[string, HalfSpace]>([
    ['whole normals', [1, 1, 1, 3]],
    ['fractions', [0.5, 0.25, 0.125, 0.875]],
    ['high indices', [4001, 3001, 2001, 9003]],
  ])('%s at a vertex', (_, [h, k, l, d]) => {
    expect(counts([...cube(), [h, k, l, nextUp(d)]])).toEqual(CUBE);
    expect(counts([...cube(), [h, k, l, nextDown(d)]])).toEqual({ F: 7, E: 15, V: 10 });
  });

  it('at an edge', () => {
    expect(counts([...cube(), [1, 1, 0, nextUp(2)]])).toEqual(CUBE);
    expect(counts([...cube(), [1, 1, 0, nextDown(2)]])).toEqual({ F: 7, E: 15, V: 10 });
  });

  it('at a face', () => {
    expect(presentFaces(intersect(planesFrom([...cube(), [2, 0, 0, nextUp(2)]])))).not.toContain(6);
    const nearer = intersect(planesFrom([...cube(), [2, 0, 0, nextDown(2)]]));
    checkSolid(nearer);
    expect(presentFaces(nearer)).toEqual([1, 2, 3, 4, 5, 6]);
  });

  it('all eight corners of a cube at once, by symmetry', () => {
    const forms = (D: number) => [
      { hkl: [1, 0, 0], D: 1 },
      { hkl: [1, 1, 1], D },
    ];
    // 1e-12 is the tolerance of commensurate offsets: within it the octahedron touches, beyond it it cuts.
    const touching = intersect(crystalPlanes('m-3m', forms(3 * (1 - 4e-13))));
    const cutting = intersect(crystalPlanes('m-3m', forms(3 * (1 - 4e-12))));
    checkSolid(touching);
    checkSolid(cutting);
    expect([count(touching), count(cutting)]).toEqual([CUBE, { F: 14, E: 36, V: 24 }]);
  });
});

describe('one unit in the last place, with a point group', () => {
  it.each<[string, number[], number, { F: number; E: number; V: number }]>([
    ['octahedron outside the corners of the cube', [1, 1, 1], nextUp(3), CUBE],
    ['octahedron that touches them', [1, 1, 1], 3, CUBE],
    ['octahedron that cuts them', [1, 1, 1], nextDown(3), { F: 14, E: 36, V: 24 }],
    ['dodecahedron that touches the edges', [1, 1, 0], 2, CUBE],
    ['dodecahedron that cuts them', [1, 1, 0], nextDown(2), { F: 18, E: 48, V: 32 }],
    ['hexoctahedron that cuts the corners', [3, 2, 1], nextDown(6), { F: 54, E: 108, V: 56 }],
  ])('%s', (_, hkl, D, wanted) => {
    const planes = crystalPlanes('m-3m', [
      { hkl: [1, 0, 0], D: 1 },
      { hkl, D },
    ]);
    const solid = intersect({ ...planes, offsets: exactOffsets([1, D]) });
    checkSolid(solid);
    expect(count(solid)).toEqual(wanted);
  });
});

it('planes that are all but parallel: corners are where they should be', () => {
  const nearly: HalfSpace[] = [
    [1e-12, 0, 1, 1 + 5e-13],
    [0, 3e-13, 1, 1 + 1e-13],
  ];
  checkSolid(intersect(planesFrom([...cube(), ...nearly])));
  checkSolid(intersect(planesFrom(turned([...cube(), ...nearly], [1, 2, 3], 1))));
});

describe('sizes, order and axes', () => {
  const solid: HalfSpace[] = [...cube(), ...octahedron(2), [2, 1, 0, 2.5], [1, 1, 2, 3], [3, 1, 1, 4]];
  const reference = counts(solid);

  it.each([1e9, 1e-9, 2 ** 300, 2 ** -300])('offsets times %d', (factor) => {
    const scaled = solid.map(([h, k, l, d]): HalfSpace => [h, k, l, d * 2 ** Math.round(Math.log2(factor))]);
    expect(counts(scaled)).toEqual(reference);
  });

  it.each([1e9, 1e-9])('commensurate forms times %d', (factor) => {
    const forms = [
      { hkl: [1, 0, 0], D: factor },
      { hkl: [1, 1, 1], D: 2 * factor },
      { hkl: [1, 1, 0], D: 1.7 * factor },
    ];
    const found = intersect(crystalPlanes('m-3m', forms));
    checkSolid(found);
    const same = intersect(
      crystalPlanes(
        'm-3m',
        forms.map(({ hkl, D }) => ({ hkl, D: D / factor })),
      ),
    );
    expect(count(found)).toEqual(count(same));
    expect(vertexDegrees(found)).toEqual(vertexDegrees(same));
  });

  it('planes in another order', () => {
    expect(counts(shuffled(solid))).toEqual(reference);
    expect(counts([...solid].reverse())).toEqual(reference);
  });

  it('normals times a number that is not whole', () => {
    const half = solid.map(
      ([h, k, l, d], i): HalfSpace => [h / 2 ** (i % 4), k / 2 ** (i % 4), l / 2 ** (i % 4), d / 2 ** (i % 4)],
    );
    expect(counts(half)).toEqual(reference);
  });

  it.each([0.1, 1, 2.5])('axes turned by %d rad: meetings are off by rounding, the solid is sound', (angle) => {
    const found = intersect(planesFrom(turned(solid, [1, 2, 3], angle)));
    checkSolid(found);
    const upright = measure(intersect(planesFrom(solid)), UNIT_FRAME);
    expect(measure(found, UNIT_FRAME).volume).toBeCloseTo(upright.volume, 12);
    expect(count(found).V).toBeGreaterThanOrEqual(reference.V);
  });

  // Found by a long run of the property test: a search for the highest vertex went round and round between two others.
  it('axes turned by next to nothing, with a corner whose double coordinates are worthless', () => {
    const list: HalfSpace[] = [
      [3, -3, -2, 1],
      [-2, -1, 0, 1],
      [-1, -1, 3, 1],
      [1, 0, 1, 2],
      [3, -2, 2, 1],
      [2, 3, -2, 3],
      [-3, 0, -2, 3],
      [2, 2, -1, 1],
      [2, 0, -3, 3],
      [-3, -3, 3, 4],
    ];
    checkSolid(intersect(planesFrom(turned([...cube(3), ...list], [-3, 4, 2], -2.5819832554463385e-54))));
  });

  // Found by the property test of sizes: with corners known to 1e-10 of its length, a needle's areas were off by 1%.
  it('a needle three hundred million times as long as wide', () => {
    const thin = 2 ** -20;
    const sides: HalfSpace[] = [
      [-1, 1, 1, thin],
      [0, 0, 1, thin],
      [0, -1, 0, thin],
      [1, 0, -1, thin],
    ];
    checkSolid(intersect(planesFrom([...cube(1024), ...sides, [0, 0, -1, 300.00000000000705]])));
  });

  it('forty-eight planes through one point', () => {
    const cone = Array.from({ length: 48 }, (_, i): HalfSpace => {
      // (1 − t², 2t, 1 + t²) are Pythagorean: whole normals, all of planes through (0, 0, 1).
      const t = i - 24;
      return [625 - t * t, 50 * t, 625 + t * t, 625 + t * t];
    });
    const found = intersect(planesFrom([...cone, [-1, 0, 0, 1], [0, 0, -1, 0]]));
    checkSolid(found);
    expect(Math.max(...Object.keys(vertexDegrees(found)).map(Number))).toBeGreaterThan(40);
  });
});
