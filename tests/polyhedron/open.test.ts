import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { openDirections } from '../../src/polyhedron/open.ts';

const sorted = (rays: readonly (readonly number[])[]): string[] =>
  rays.map((ray) => ray.map((v) => v + 0).join(' ')).sort();

// Open forms and the way they are open: worked out on paper.
describe('open directions of simple forms', () => {
  it.each<[string, number[][], number[][]]>([
    [
      'no face',
      [],
      [
        [1, 0, 0],
        [-1, 0, 0],
        [0, 1, 0],
        [0, -1, 0],
        [0, 0, 1],
        [0, 0, -1],
      ],
    ],
    [
      'tetragonal prism, both ways along c',
      [
        [1, 0, 0],
        [-1, 0, 0],
        [0, 1, 0],
        [0, -1, 0],
      ],
      [
        [0, 0, 1],
        [0, 0, -1],
      ],
    ],
    [
      'prism with one end closed',
      [
        [1, 0, 0],
        [-1, 0, 0],
        [0, 1, 0],
        [0, -1, 0],
        [0, 0, 2],
      ],
      [[0, 0, -1]],
    ],
    [
      'tetragonal pyramid, its four edges downwards',
      [
        [1, 0, 1],
        [-1, 0, 1],
        [0, 1, 1],
        [0, -1, 1],
      ],
      [
        [1, 1, -1],
        [1, -1, -1],
        [-1, 1, -1],
        [-1, -1, -1],
      ],
    ],
    [
      'cube, closed',
      [
        [1, 0, 0],
        [-1, 0, 0],
        [0, 1, 0],
        [0, -1, 0],
        [0, 0, 1],
        [0, 0, -1],
      ],
      [],
    ],
    [
      'octant of three faces',
      [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ],
      [
        [-1, 0, 0],
        [0, -1, 0],
        [0, 0, -1],
      ],
    ],
    [
      'wedge of two faces',
      [
        [1, 0, 0],
        [0, 1, 0],
      ],
      [
        [-1, 0, 0],
        [0, -1, 0],
        [0, 0, 1],
        [0, 0, -1],
      ],
    ],
    [
      'non-primitive indices of a prism',
      [
        [2, 0, 0],
        [-3, 0, 0],
        [0, 4, 0],
        [0, -6, 0],
      ],
      [
        [0, 0, 1],
        [0, 0, -1],
      ],
    ],
  ])('%s', (_, faces, rays) => {
    expect(sorted(openDirections(faces.flat()))).toEqual(sorted(rays));
  });

  it('pedion: a half-space, down and all ways in its plane', () => {
    const rays = openDirections([0, 0, 1]);
    expect(sorted(rays)).toContain('0 0 -1');
    expect(rays.filter((ray) => ray[2] === 0)).toHaveLength(4);
    expect(rays.every((ray) => ray[2] <= 0)).toBe(true);
  });

  it('pinacoid: all ways in its plane', () => {
    const rays = openDirections([1, 1, 0, -1, -1, 0]);
    expect(rays).toHaveLength(4);
    expect(rays.every(([x, y]) => x + y === 0)).toBe(true);
  });
});

describe('open directions of random faces', () => {
  const small = fc.integer({ min: -3, max: 3 });
  const faces = fc.array(
    fc.tuple(small, small, small).filter((h) => h.some((value) => value !== 0)),
    { minLength: 1, maxLength: 9 },
  );
  const along = (h: readonly number[], r: readonly number[]): number => h[0]! * r[0]! + h[1]! * r[1]! + h[2]! * r[2]!;

  it('no face stands against them, and none is missing among small directions', () => {
    fc.assert(
      fc.property(faces, fc.tuple(small, small, small), (list, probe) => {
        const rays = openDirections(list.flat());
        for (const ray of rays) for (const h of list) expect(along(h, ray)).toBeLessThanOrEqual(0);
        const free = probe.some((value) => value !== 0) && list.every((h) => along(h, probe) <= 0);
        // A free direction must be a sum of the rays found, so some ray points its way.
        if (free) expect(rays.some((ray) => along(ray, probe) > 0)).toBe(true);
      }),
      { numRuns: 700 },
    );
  });
});
