import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Corners, trianglesMeet } from '../../../src/files/mesh/triangle-meet.ts';

type Point = readonly [number, number, number];
const S: readonly Point[] = [
  [0, 0, 0],
  [4, 0, 0],
  [0, 4, 0],
];

/** Whether S and the other triangle meet, asked in all orders of their corners; equal points get equal numbers. */
function meets(other: readonly Point[]): boolean {
  const points = [...S];
  const t = other.map((point) => {
    const known = points.findIndex((q) => String(q) === String(point));
    return known >= 0 ? known : points.push(point) - 1;
  }) as [number, number, number];
  const p = Float64Array.from(points.flat());
  const orders: ((c: Corners) => Corners)[] = [
    (c) => c,
    ([a, b, c]) => [b, c, a],
    ([a, b, c]) => [c, b, a],
    ([a, b, c]) => [b, a, c],
  ];
  const answers = orders.flatMap((one) =>
    orders.flatMap((two) => [trianglesMeet(p, one([0, 1, 2]), two(t)), trianglesMeet(p, two(t), one([0, 1, 2]))]),
  );
  expect(new Set(answers).size, 'the answer does not depend on the order').toBe(1);
  return answers[0]!;
}

/** Reads `0 0 0, 4 0 0, 0 4 0`. */
function pointsOf(text: string): Point[] {
  return text.split(', ').map((point) => {
    const [x = 0, y = 0, z = 0] = point.split(' ').map(Number);
    return [x, y, z];
  });
}

// Each answer can be seen on a sketch of S, the right triangle with legs of 4 in the plane z = 0.
describe('trianglesMeet', () => {
  const cases: [string, string, boolean][] = [
    ['pierced by an edge', '1 1 -1, 1 1 1, 9 9 0', true],
    ['an edge crosses the other triangle', '1 -1 -1, 1 -1 1, 1 9 0', true],
    ['above', '0 0 1, 4 0 1, 0 4 1', false],
    ['crosses the plane beside it', '9 9 -1, 9 9 1, 8 8 0', false],
    ['one float32 step above', '1 1 1.4e-45, 2 1 1, 1 2 1', false],
    ['a corner stands on its inside', '1 1 0, 2 1 1, 1 2 1', true],
    ['a corner stands on its edge', '2 0 0, 2 -1 1, 3 -1 1', true],
    ['edges cross', '2 -1 -1, 2 1 1, 2 -5 0', true],
    ['in one plane, apart', '5 0 0, 9 0 0, 5 4 0', false],
    ['in one plane, overlapping', '1 1 0, 9 1 0, 1 9 0', true],
    ['in one plane, one in the other', '1 1 0, 2 1 0, 1 2 0', true],
    ['in one plane, around it', '-9 -9 0, 30 -9 0, -9 30 0', true],
    ['in one plane, touching in a point of an edge', '2 2 0, 9 2 0, 9 9 0', true],
    ['in one plane, along part of an edge', '1 0 0, 3 0 0, 2 -3 0', true],
    ['common corner, otherwise apart', '0 0 0, -1 0 1, 0 -1 1', false],
    ['common corner, through the inside', '0 0 0, 2 2 -1, 2 2 1', true],
    ['common corner, through the opposite edge', '0 0 0, 9 9 -1, 9 9 1', true],
    ['common corner, an edge along part of an edge', '0 0 0, 2 0 0, 1 -1 1', true],
    ['common corner, an edge along more than an edge', '0 0 0, 9 0 0, 1 -1 1', true],
    ['common corner, in one plane, apart', '0 0 0, -4 1 0, 1 -4 0', false],
    ['common corner, in one plane, overlapping', '0 0 0, 4 4 0, 1 4 0', true],
    ['common corner, in one plane, around it', '0 0 0, -1 9 0, 9 -1 0', true],
    ['common corner, in one plane, within it', '0 0 0, 1 0.5 0, 0.5 1 0', true],
    ['common edge, folded up', '0 0 0, 4 0 0, 0 0 4', false],
    ['common edge, flat, on the other side', '0 0 0, 4 0 0, 1 -4 0', false],
    ['common edge, folded together', '0 0 0, 4 0 0, 1 1 0', true],
    ['common edge, nearly folded together', '0 0 0, 4 0 0, 1 1 1.4e-45', false],
    ['all corners in common', '0 0 0, 4 0 0, 0 4 0', false],
  ];
  it.each(cases)('%s', (_, other, expected) => {
    expect(meets(pointsOf(other))).toBe(expected);
  });

  // A slow second way for triangles without common corners: they meet unless a plane keeps them apart, and for small
  // whole numbers the separating directions that need trying are the normals and the products of two edges, exactly
  // (S. Gottschalk, M. C. Lin, D. Manocha, OBBTree, SIGGRAPH 1996: the separating axis theorem for polytopes).
  it('agrees with the separating axis theorem on whole numbers', () => {
    const whole = fc.integer({ min: -2, max: 2 });
    const point = fc.tuple(whole, whole, whole);
    const triangle = fc.tuple(point, point, point).filter((t) => normal(t).some((value) => value !== 0));
    fc.assert(
      fc.property(triangle, triangle, (s, t) => {
        fc.pre(!s.some((a) => t.some((b) => String(a) === String(b))));
        const p = Float64Array.from([...s, ...t].flat());
        expect(trianglesMeet(p, [0, 1, 2], [3, 4, 5])).toBe(!separated(s, t));
      }),
      { numRuns: 3000 },
    );
  });
});

type Triangle = readonly [Point, Point, Point];
const minus = (a: Point, b: Point): Point => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
const cross = (a: Point, b: Point): Point => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
const normal = ([a, b, c]: Triangle): Point => cross(minus(b, a), minus(c, a));
const edges = ([a, b, c]: Triangle): Point[] => [minus(b, a), minus(c, b), minus(a, c)];

function separated(s: Triangle, t: Triangle): boolean {
  const directions = [normal(s), normal(t)];
  for (const u of edges(s)) for (const v of edges(t)) directions.push(cross(u, v));
  for (const n of [normal(s), normal(t)]) for (const u of [...edges(s), ...edges(t)]) directions.push(cross(n, u));
  return directions.some((n) => {
    const along = (q: Point): number => n[0] * q[0] + n[1] * q[1] + n[2] * q[2];
    const [a, b] = [s.map(along), t.map(along)];
    return Math.max(...a) < Math.min(...b) || Math.max(...b) < Math.min(...a);
  });
}
