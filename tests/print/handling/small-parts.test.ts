import { describe, expect, it } from 'vitest';
import { leastMeeting } from '../../../src/print/handling/disc-meet.ts';
import { type Lie, type SmallPartVerdict, smallPart } from '../../../src/print/handling/small-parts.ts';

/** 16 CFR 1501.4: 1.25 in across, sloping bottom 1.00 to 2.25 in deep. */
const [ACROSS, LEAST] = [31.7, 25.4];

let state = 11;
const random = (): number => {
  state = (state * 48271) % 2147483647;
  return state / 2147483647;
};

type Vector = readonly [number, number, number];
const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/** A random rotation (Shoemake 1992) and shift, so that nothing lies along an axis by chance. */
function anywhere(points: readonly Vector[]): Float64Array {
  const [u, v, w] = [random(), 2 * Math.PI * random(), 2 * Math.PI * random()];
  const [a, b] = [Math.sqrt(1 - u), Math.sqrt(u)];
  const [x, y, z, s] = [a * Math.sin(v), a * Math.cos(v), b * Math.sin(w), b * Math.cos(w)];
  const rows: Vector[] = [
    [1 - 2 * (y * y + z * z), 2 * (x * y - z * s), 2 * (x * z + y * s)],
    [2 * (x * y + z * s), 1 - 2 * (x * x + z * z), 2 * (y * z - x * s)],
    [2 * (x * z - y * s), 2 * (y * z + x * s), 1 - 2 * (x * x + y * y)],
  ];
  const shift = [100 * random(), 100 * random(), 100 * random()];
  return Float64Array.from(points.flatMap((point) => rows.map((row, i) => dot(row, point) + shift[i]!)));
}

/**
 * Whether points lie in the gauge as the verdict says they can, for some place of the axis (tried on a grid and
 * refined).
 */
function liesInGauge(points: Float64Array, { out, deep }: Lie): boolean {
  const side: Vector = [
    out[1] * deep[2] - out[2] * deep[1],
    out[2] * deep[0] - out[0] * deep[2],
    out[0] * deep[1] - out[1] * deep[0],
  ];
  const seen = Array.from({ length: points.length / 3 }, (_, i) => {
    const point: Vector = [points[3 * i]!, points[3 * i + 1]!, points[3 * i + 2]!];
    return [dot(deep, point), dot(side, point), dot(out, point)] as const;
  });
  const top = Math.max(...seen.map(([, , z]) => z));
  const excess = (cx: number, cy: number): number =>
    Math.max(
      ...seen.map(([x, y]) => Math.hypot(x - cx, y - cy) - ACROSS / 2),
      ...seen.map(([x, , z]) => top - z - (LEAST + (x - cx) + ACROSS / 2)),
    );
  let [cx, cy] = [seen[0]![0], seen[0]![1]];
  for (let step = 16; step > 1e-10; step /= 2)
    for (let again = true; again; ) {
      again = false;
      for (let turn = 0; turn < 32; turn++) {
        const [x, y] = [cx + step * Math.cos((turn * Math.PI) / 16), cy + step * Math.sin((turn * Math.PI) / 16)];
        if (excess(x, y) >= excess(cx, cy) - 1e-14) continue;
        [cx, cy, again] = [x, y, true];
      }
    }
  return excess(cx, cy) < 1e-4;
}

function verdictOf(points: readonly Vector[]): SmallPartVerdict['verdict'] {
  const placed = anywhere(points);
  const verdict = smallPart(placed);
  if (verdict.verdict === 'fits') expect(liesInGauge(placed, verdict.lie)).toBe(true);
  return verdict.verdict;
}

const box = (a: number, b: number, c: number): Vector[] =>
  [0, a].flatMap((x) => [0, b].flatMap((y) => [0, c].map((z): Vector => [x, y, z])));
const rod = (length: number, diameter: number, sides = 12): Vector[] =>
  [0, length].flatMap((z) =>
    Array.from({ length: sides }, (_, i): Vector => {
      const angle = (2 * Math.PI * i) / sides;
      return [(diameter / 2) * Math.cos(angle), (diameter / 2) * Math.sin(angle), z];
    }),
  );
const octahedron = (edge: number): Vector[] => {
  const a = edge / Math.SQRT2;
  return [1, -1].flatMap((s): Vector[] => [
    [s * a, 0, 0],
    [0, s * a, 0],
    [0, 0, s * a],
  ]);
};
const tetrahedron = (edge: number): Vector[] => {
  const a = edge / (2 * Math.SQRT2);
  return [
    [a, a, a],
    [a, -a, -a],
    [-a, a, -a],
    [-a, -a, a],
  ];
};
const ball = (diameter: number): Vector[] =>
  Array.from({ length: 400 }, (_, i): Vector => {
    const z = 1 - (2 * i + 1) / 400;
    const [r, angle] = [Math.sqrt(1 - z * z), i * Math.PI * (3 - Math.sqrt(5))];
    return [(diameter / 2) * r * Math.cos(angle), (diameter / 2) * r * Math.sin(angle), (diameter / 2) * z];
  });

describe('the small-parts cylinder', () => {
  it.each([
    // Smallest cylinder around a cube: along an edge, its base's diagonal across: a √2 ≤ 31.7 (by hand).
    ['cube', 'fits', box(22.3, 22.3, 22.3)],
    ['cube', 'does not fit', box(22.6, 22.6, 22.6)],
    // Around a regular tetrahedron: radius a/2, along a two-fold axis (Brandenberg and Theobald 2006).
    ['tetrahedron', 'fits', tetrahedron(31.5)],
    ['tetrahedron', 'does not fit', tetrahedron(32)],
    // Around a regular octahedron: radius a/√3, along a three-fold axis; its height is a √(2/3) (by hand).
    ['octahedron', 'fits', octahedron(27.2)],
    ['octahedron', 'does not fit', octahedron(27.8)],
    // A ball of many points: its diameter.
    ['ball', 'fits', ball(31.6)],
    ['ball', 'does not fit', ball(32.5)],
    // A needle: the gauge's longest straight line, from rim to bottom: √(31.7² + 57.1²) = 65.31 mm (by hand).
    ['needle', 'fits', rod(64.8, 0.1, 3)],
    ['needle', 'does not fit', rod(65.4, 0.1, 3)],
    ['coin', 'fits', rod(2, 31.4, 40)],
    ['coin', 'does not fit', rod(2, 32.5, 40)],
    ['plate', 'does not fit', box(50, 50, 2)],
  ] as const)('%s: %s', (_, verdict, points) => {
    expect(verdictOf(points)).toBe(verdict);
  });

  it('takes in a rod of 60 × 3 mm, longer than the gauge is deep, because it can lean', () => {
    // Leaning by 28.5° from the wall it is 60 sin + 3 cos = 31.3 mm across, of 31.56 mm at 1.5 mm beside the middle.
    // Its lowest corner, 3 cos = 2.6 mm before the deep wall, lies 60 cos + 3 sin = 54.2 mm down, where the bottom is
    // at 54.4 mm (by hand).
    expect(verdictOf(rod(60, 3))).toBe('fits');
    expect(verdictOf(rod(66, 3))).toBe('does not fit');
  });

  it('gives the same answer however the piece is turned', () => {
    for (let round = 0; round < 6; round++) {
      expect(verdictOf(rod(50, 6))).toBe('fits');
      expect(verdictOf(box(30, 30, 30))).toBe('does not fit');
      expect(verdictOf(box(10, 20, 40))).toBe('fits');
    }
  });

  it('never says that a random piece fits, or does not, against a search of random positions', () => {
    for (let round = 0; round < 25; round++) {
      const points = Array.from({ length: 8 }, (): Vector => [40 * random(), 30 * random(), 50 * random()]);
      const verdict = verdictOf(points);
      if (verdict !== 'does not fit') continue;
      for (let attempt = 0; attempt < 40; attempt++)
        expect(liesInGauge(anywhere(points), { out: [0, 0, 1], deep: [1, 0, 0] })).toBe(false);
    }
  });

  it('is honest about a piece at the limit', () => {
    const edge = 31.7 / Math.SQRT2;
    const verdict = smallPart(anywhere(box(edge + 0.001, edge + 0.001, edge + 0.001)));
    expect(verdict.verdict).toBe('undecided');
    if (verdict.verdict === 'undecided') expect(verdict.within).toBeLessThan(3);
  });
});

const spots = (xs: number[], ys: number[]) => xs.map((x, i) => ({ x, y: ys[i]! }));

describe('discs of one radius', () => {
  it('meet where a fine search finds the leftmost common point', () => {
    for (let round = 0; round < 50; round++) {
      const xs = Array.from({ length: 6 }, () => 2 * random());
      const ys = Array.from({ length: 6 }, () => 2 * random());
      const radius = 1 + random();
      let leftmost = Number.POSITIVE_INFINITY;
      for (let y = -1; y < 3; y += 0.001) {
        const left = Math.max(...xs.map((x, i) => x - Math.sqrt(radius ** 2 - (y - ys[i]!) ** 2)));
        const right = Math.min(...xs.map((x, i) => x + Math.sqrt(radius ** 2 - (y - ys[i]!) ** 2)));
        if (left <= right) leftmost = Math.min(leftmost, left);
      }
      const least = leastMeeting(spots(xs, ys), radius);
      if (leftmost === Number.POSITIVE_INFINITY) continue;
      expect(least).toBeLessThanOrEqual(leftmost + 1e-9);
      expect(least).toBeGreaterThan(leftmost - 0.05);
    }
  });

  it('that have no point in common have none', () => {
    expect(leastMeeting(spots([0, 3], [0, 0]), 1)).toBe(Number.POSITIVE_INFINITY);
    // Three centres on a unit circle: any two discs of 0.9 meet, all three do not (radius needed: 1).
    expect(leastMeeting(spots([1, -0.5, -0.5], [0, 0.866, -0.866]), 0.9)).toBe(Number.POSITIVE_INFINITY);
    expect(leastMeeting(spots([1, -0.5, -0.5], [0, 0.866, -0.866]), 1.001)).toBeLessThan(Number.POSITIVE_INFINITY);
  });
});
