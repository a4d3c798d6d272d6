import { describe, expect, it } from 'vitest';
import { edges, faceCorners, measure, reach } from '../../src/polyhedron/measures.ts';
import { commensurateOffsets } from '../../src/polyhedron/offset.ts';
import { loosePlanes } from '../../src/polyhedron/planes.ts';
import { intersect } from '../../src/polyhedron/solid.ts';
import { checkSolid, count, presentFaces, UNIT_FRAME, vertexDegrees } from './check-solid.ts';
import { crystalPlanes, withoutSymmetry } from './crystal-planes.ts';
import { cube, type HalfSpace, octahedron, planesFrom } from './hand-planes.ts';

const unitSolid = (halfSpaces: readonly HalfSpace[]) => {
  const solid = intersect(planesFrom(halfSpaces));
  checkSolid(solid);
  return { solid, measures: measure(solid, UNIT_FRAME) };
};

// Counts and sizes here are school geometry, worked out on paper.
describe('solids known on paper', () => {
  it('cube of edge 2', () => {
    const { solid, measures } = unitSolid(cube());
    expect(count(solid)).toEqual({ F: 6, E: 12, V: 8 });
    expect(measures).toMatchObject({ volume: 8, surface: 24, inscribedRadius: 1, low: [-1, -1, -1], high: [1, 1, 1] });
    expect(measures.circumscribedRadius).toBeCloseTo(Math.sqrt(3), 14);
    for (const edge of edges(solid, measures)) expect([edge.length, edge.dihedral]).toEqual([2, 90]);
    expect(reach(measures.positions, [1, 1, 1])).toBe(3);
  });

  it('octahedron', () => {
    const { solid, measures } = unitSolid(octahedron(1));
    expect(count(solid)).toEqual({ F: 8, E: 12, V: 6 });
    expect(vertexDegrees(solid)).toEqual({ 4: 6 });
    expect(measures.volume).toBeCloseTo(4 / 3, 14);
    for (const edge of edges(solid, measures)) expect(edge.dihedral).toBeCloseTo(109.4712206344907, 10);
  });

  it('corner of a cube cut by (111): the missing pyramid has a sixth of the cut lengths’ product', () => {
    const { solid, measures } = unitSolid([...cube(), [1, 1, 1, 2]]);
    expect(count(solid)).toEqual({ F: 7, E: 15, V: 10 });
    expect(measures.volume).toBeCloseTo(8 - 1 / 6, 14);
    expect(faceCorners(solid, 6)).toHaveLength(3);
  });

  it('cuboctahedron from distances typed as decimals', () => {
    const D = [1, 1.1547005383792517 * Math.sqrt(3)];
    const symmetric = intersect(
      crystalPlanes('m-3m', [
        { hkl: [1, 0, 0], D: D[0]! },
        { hkl: [1, 1, 1], D: D[1]! },
      ]),
    );
    const all = [...cube(1), ...octahedron(0)];
    const loose = intersect(
      loosePlanes(
        Float64Array.from(all.flatMap((plane) => plane.slice(0, 3))),
        commensurateOffsets(all.map((_, i) => D[i < 6 ? 0 : 1]!)),
      ),
    );
    for (const solid of [symmetric, loose]) {
      checkSolid(solid);
      expect(count(solid)).toEqual({ F: 14, E: 24, V: 12 });
      expect(measure(solid, UNIT_FRAME).volume).toBeCloseTo(20 / 3, 13);
    }
  });

  it('a solid that does not hold the origin', () => {
    const { measures } = unitSolid(cube().map(([h, k, l, d]): HalfSpace => [h, k, l, d + 10 * h - 7 * k + 5 * l]));
    expect(measures.volume).toBeCloseTo(8, 12);
    expect(measures.centroid.map(Math.round)).toEqual([10, -7, 5]);
  });
});

describe('one call and the next', () => {
  it('share no arrays: an earlier solid stays as it is', () => {
    const forms = [{ hkl: [1, 0, 0], D: 1 }];
    for (const planes of [planesFrom(cube()), crystalPlanes('m-3m', forms)]) {
      const first = intersect(planes);
      const before = structuredClone([first.start, first.neighbour, first.corner, first.vertices]);
      intersect(planesFrom(octahedron(3)));
      intersect(crystalPlanes('m-3m', [{ hkl: [3, 2, 1], D: 1 }]));
      expect([first.start, first.neighbour, first.corner, first.vertices]).toEqual(before);
      checkSolid(first);
    }
  });

  it('a refused set leaves nothing behind', () => {
    expect(() => intersect(planesFrom([...cube(), [Number.NaN, 0, 0, 1]]))).toThrow(RangeError);
    expect(() => intersect(planesFrom([...cube(), [1, 0, 0, Number.POSITIVE_INFINITY]]))).toThrow(RangeError);
    expect(() => intersect(planesFrom([...cube(), [0, 0, 0, 1]]))).toThrow(/normal/);
    checkSolid(intersect(planesFrom(cube())));
  });
});

describe('what is not a bounded solid', () => {
  it.each<[string, 'open' | 'empty', HalfSpace[]]>([
    ['no plane', 'open', []],
    ['one plane', 'open', [[1, 0, 0, 1]]],
    [
      'two parallel planes',
      'open',
      [
        [1, 0, 0, 1],
        [-1, 0, 0, 1],
      ],
    ],
    ['a prism', 'open', cube().slice(0, 4)],
    ['a cube without its lid', 'open', cube().slice(0, 5)],
    [
      'two planes that leave nothing between them',
      'empty',
      [
        [1, 0, 0, -1],
        [-1, 0, 0, -1],
      ],
    ],
    [
      'a slab of no thickness',
      'empty',
      [
        [1, 0, 0, 0],
        [-1, 0, 0, 0],
      ],
    ],
    ['a cube pressed flat', 'empty', [...cube(), [1, 0, 0, -1]]],
    ['a cube pressed flat between oblique planes', 'empty', [...cube(), [1, 2, 3, 0], [-2, -4, -6, 0]]],
    ['a cube pressed to an edge', 'empty', [...cube(), [1, 1, 0, -2]]],
    ['a cube pressed to a point', 'empty', [...cube(), [-1, -1, -1, -3]]],
    ['an octahedron of no size', 'empty', octahedron(0)],
  ])('%s is %s', (_, state, halfSpaces) => {
    for (const planes of [halfSpaces, [...halfSpaces].reverse()])
      expect(intersect(planesFrom(planes)).state).toBe(state);
  });

  it('an open solid still tells its faces, though they do not hang together', () => {
    const slab = crystalPlanes('1', [
      { hkl: [1, 0, 0], D: 1 },
      { hkl: [-1, 0, 0], D: 2 },
      { hkl: [2, 0, 0], D: 3 },
    ]);
    for (const planes of [slab, withoutSymmetry(slab)]) {
      const solid = intersect(planes);
      expect(solid.state).toBe('open');
      expect(presentFaces(solid)).toEqual([0, 1]);
    }
  });

  it('measures refuse it', () => {
    expect(() => measure(intersect(planesFrom(cube().slice(1))), UNIT_FRAME)).toThrow(/open/);
  });
});
