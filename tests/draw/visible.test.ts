import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { zone } from '../../src/crystal/spaces.ts';
import { projectAll, signedArea } from '../../src/draw/project.ts';
import { dot, type Point, vectorAt } from '../../src/draw/vector.ts';
import { type View, viewFrame } from '../../src/draw/view.ts';
import { type EdgeKind, look } from '../../src/draw/visible.ts';
import type { ClosedShape } from '../../src/shape/shape.ts';
import { anyCrystal, anyView, CRYSTALS, cube, octahedron } from './crystals.ts';

const seen = (shape: ClosedShape, view: View) => {
  const { front, edges, silhouette } = look(shape, viewFrame(view, shape.crystal.metric).toward);
  const of = (kind: EdgeKind): number => edges.filter((edge) => edge.kind === kind).length;
  return {
    faces: front.length,
    outline: of('outline'),
    inner: of('inner'),
    hidden: of('hidden'),
    endOn: of('end-on'),
    corners: silhouette.length,
  };
};

/** Counted by hand on models of cube and octahedron. */
describe('what is seen', () => {
  it.each([
    ['cube along [111]', cube, [1, 1, 1], { faces: 3, outline: 6, inner: 3, hidden: 3, endOn: 0, corners: 6 }],
    ['cube along [001]', cube, [0, 0, 1], { faces: 1, outline: 4, inner: 0, hidden: 4, endOn: 4, corners: 4 }],
    ['cube along [110]', cube, [1, 1, 0], { faces: 2, outline: 6, inner: 1, hidden: 5, endOn: 0, corners: 6 }],
    [
      'octahedron along [001]',
      octahedron,
      [0, 0, 1],
      { faces: 4, outline: 4, inner: 4, hidden: 4, endOn: 0, corners: 4 },
    ],
    [
      'octahedron along [111]',
      octahedron,
      [1, 1, 1],
      { faces: 4, outline: 6, inner: 3, hidden: 3, endOn: 0, corners: 6 },
    ],
    // (111) and (11-1) in front, four faces edge-on; these meet in pairs along [110], in two edges seen as points.
    [
      'octahedron along [110]',
      octahedron,
      [1, 1, 0],
      { faces: 2, outline: 4, inner: 1, hidden: 5, endOn: 2, corners: 4 },
    ],
  ] as const)('%s', (_, shape, [u, v, w], expected) => {
    expect(seen(shape, { along: zone(u, v, w) })).toEqual(expected);
  });

  const FROM_BEHIND: Readonly<Record<EdgeKind, readonly EdgeKind[]>> = {
    inner: ['hidden'],
    outline: ['outline', 'hidden'],
    hidden: ['inner', 'outline'],
    'end-on': ['end-on'],
  };

  it.each(CRYSTALS)('every edge of the %s is seen in one way, and in the opposite way from behind', (_, shape) => {
    fc.assert(
      fc.property(anyView, (view) => {
        const { toward } = viewFrame(view, shape.crystal.metric);
        const there = look(shape, toward);
        const behind = look(shape, [-toward[0], -toward[1], -toward[2]]);
        expect(there.edges).toHaveLength(shape.solid.neighbour.length / 2);
        there.edges.forEach(({ kind }, i) => {
          expect(FROM_BEHIND[kind]).toContain(behind.edges[i]!.kind);
        });
        const open = there.edges.filter(({ kind }) => kind === 'outline');
        expect(there.silhouette).toHaveLength(open.length);
      }),
      { numRuns: 60 },
    );
  });
});

const silhouetteOf = (shape: ClosedShape, view: View): { polygon: Point[]; toward: ReturnType<typeof vectorAt> } => {
  const frame = viewFrame(view, shape.crystal.metric);
  const points = projectAll(frame, shape.measures.positions);
  return { polygon: look(shape, frame.toward).silhouette.map((v) => points[v]!), toward: frame.toward };
};

describe('the silhouette', () => {
  it("has half the sum of |n·v| A as its area (Cauchy's projection formula for convex bodies)", () => {
    fc.assert(
      fc.property(anyCrystal, anyView, (shape, view) => {
        const { polygon, toward } = silhouetteOf(shape, view);
        const { faces, area, normals } = shape.measures;
        const shadow = faces.reduce((sum, f) => sum + Math.abs(dot(vectorAt(normals, f), toward)) * area[f]!, 0) / 2;
        expect(signedArea(polygon) / shadow).toBeCloseTo(1, 9);
      }),
      { numRuns: 400 },
    );
  });

  it('is convex and has every vertex inside', () => {
    fc.assert(
      fc.property(anyCrystal, anyView, (shape, view) => {
        const { polygon } = silhouetteOf(shape, view);
        const points = projectAll(viewFrame(view, shape.crystal.metric), shape.measures.positions);
        const slack = 1e-9 * shape.measures.circumscribedRadius ** 2;
        for (const [i, [x, y]] of polygon.entries()) {
          const [nextX, nextY] = polygon[(i + 1) % polygon.length]!;
          for (const [px, py] of points)
            expect((nextX - x) * (py - y) - (nextY - y) * (px - x)).toBeGreaterThanOrEqual(-slack);
        }
      }),
      { numRuns: 200 },
    );
  });

  it('of the cube of edge 2 measures 4√3 along [111], 4√2 along [110] and 4 along [001]', () => {
    const area = (u: number, v: number, w: number) => signedArea(silhouetteOf(cube, { along: zone(u, v, w) }).polygon);
    expect(area(1, 1, 1)).toBeCloseTo(4 * Math.sqrt(3), 12);
    expect(area(1, 1, 0)).toBeCloseTo(4 * Math.sqrt(2), 12);
    expect(area(0, 0, 1)).toBeCloseTo(4, 12);
  });
});
