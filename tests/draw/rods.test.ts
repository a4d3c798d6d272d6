import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { zone } from '../../src/crystal/spaces.ts';
import { boundsOf, projectAll, signedArea } from '../../src/draw/project.ts';
import { type DrawnRods, type RodPiece, rodPieces } from '../../src/draw/rods.ts';
import { cross, dot, type Point } from '../../src/draw/vector.ts';
import { type View, viewFrame } from '../../src/draw/view.ts';
import { look } from '../../src/draw/visible.ts';
import { AXIS_SYMBOLS } from '../../src/rods/axis-symbol.ts';
import type { RodEnd, RodPlan } from '../../src/rods/plan.ts';
import { facePlanes } from '../../src/shape/face-planes.ts';
import type { ClosedShape } from '../../src/shape/shape.ts';
import { anyCrystal, anyView, cube, cuboctahedron, octahedron, quartz, rodsOf, tetrahedron } from './crystals.ts';
import { contains, distanceFrom, frontDepth, prism } from './ray.ts';

/** Millimetres for each unit: the cube measures 20 mm. */
const SCALE = 10;

const laidRods = (shape: ClosedShape): RodPlan => rodsOf(shape, SCALE, { reach: 10, diameter: 2 });

const pieces = (shape: ClosedShape, laid: DrawnRods, view: View): RodPiece[] =>
  rodPieces(laid, facePlanes(shape, SCALE), viewFrame(view, shape.crystal.metric));

/** Only the end of the axis that points in a direction. */
function onlyEnd(laid: DrawnRods, [u, v, w]: readonly [number, number, number]): DrawnRods {
  const found = laid.ends.flat().filter(({ end: { direction: d } }) => d[0] === u && d[1] === v && d[2] === w);
  expect(found).toHaveLength(1);
  return { ...laid, ends: [found] };
}

const cubeRods = laidRods(cube);

describe('rods on a cube of 20 mm, seen from the front and 30° from above', () => {
  const view = { turn: 0, tilt: 30 };
  const of = (u: number, v: number, w: number) => pieces(cube, onlyEnd(cubeRods, [u, v, w]), view);
  const cos = Math.cos(Math.PI / 6);

  it('start at the face and end where they are to', () => {
    const [end] = onlyEnd(cubeRods, [0, 0, 1]).ends.flat();
    expect([end!.base, end!.tip]).toEqual([18, 20]);
  });

  it('are painted before the body behind it, after the body before it', () => {
    expect(of(-1, 0, 0).every(({ layer }) => layer === 'behind')).toBe(true);
    expect(of(0, 0, -1).every(({ layer }) => layer === 'behind')).toBe(true);
    for (const front of [of(1, 0, 0), of(0, 0, 1), of(0, 1, 0)])
      expect(front.every(({ layer }) => layer === 'before')).toBe(true);
  });

  it('are foreshortened by the cosine of the tilt: 8 mm of shaft along c', () => {
    const shaft = of(0, 0, 1).find(({ kind }) => kind === 'rod')!;
    const { low, high } = boundsOf(shaft.outline);
    expect(high[0] - low[0]).toBeCloseTo(2, 12);
    expect(low[1]).toBeCloseTo(10 * cos - Math.sin(Math.PI / 6), 12); // the foot's near side
    expect(high[1]).toBeCloseTo(18 * cos, 12);
  });

  it('show the round hollow of 4/m as an ellipse of half the height', () => {
    const { low, high } = boundsOf(of(0, 0, 1).find(({ kind }) => kind === 'hollow')!.outline);
    expect((high[1] - low[1]) / (high[0] - low[0])).toBeCloseTo(0.5, 12);
    expect(high[0] - low[0]).toBeCloseTo(2 * 0.95 * cubeRods.symbolUnit, 12);
  });

  it('show the plain back of a terminal that points away, and paint it under its rod', () => {
    expect(of(-1, 0, 0).map(({ kind }) => kind)).toEqual(['side', 'symbol', 'rod']);
    expect(of(1, 0, 0).map(({ kind }) => kind)).toEqual(['rod', 'side', 'symbol', 'hollow']);
  });

  it('show only the side of a terminal seen edge-on', () => {
    expect(
      of(0, 1, 0)
        .map(({ kind }) => kind)
        .sort(),
    ).toEqual(['rod', 'side']);
  });
});

describe('rods seen end-on', () => {
  it('show the symbol only, undistorted', () => {
    const front = pieces(cube, onlyEnd(cubeRods, [0, 0, 1]), { along: zone(0, 0, 1) });
    expect(front.map(({ kind }) => kind)).toEqual(['side', 'symbol', 'hollow']);
    const { outline } = AXIS_SYMBOLS['4/m'];
    expect(signedArea(front[1]!.outline)).toBeCloseTo(signedArea(outline) * cubeRods.symbolUnit ** 2, 9);
  });

  it('are hidden on the far side', () => {
    const back = pieces(cube, onlyEnd(cubeRods, [0, 0, -1]), { along: zone(0, 0, 1) });
    expect(back.map(({ layer }) => layer)).toEqual(['behind', 'behind']);
  });
});

describe('symbols', () => {
  it('have the area of their outline times the cosine between axis and line of sight', () => {
    fc.assert(
      fc.property(fc.constantFrom(cube, tetrahedron, quartz, octahedron), anyView, (shape, view) => {
        const laid = laidRods(shape);
        const { toward } = viewFrame(view, shape.crystal.metric);
        for (const end of laid.ends.flat()) {
          const symbol = pieces(shape, { ...laid, ends: [[end]] }, view).find(({ kind }) => kind === 'symbol');
          const cosine = dot(end.end.along, toward);
          if (Math.abs(cosine) < 1e-6) continue;
          const full = signedArea(AXIS_SYMBOLS[end.line.symbol].outline) * laid.symbolUnit ** 2;
          expect(signedArea(symbol!.outline) / full).toBeCloseTo(cosine, 9);
        }
      }),
      { numRuns: 30 },
    );
  });

  it('hold a hollow and an island for -4, and nothing for the polar 3 of the tetrahedron', () => {
    const laid = laidRods(tetrahedron);
    const kinds = (u: number, v: number, w: number) =>
      pieces(tetrahedron, onlyEnd(laid, [u, v, w]), { along: zone(u, v, w) }).map(({ kind }) => kind);
    expect(kinds(0, 0, 1)).toEqual(['side', 'symbol', 'hollow', 'symbol']);
    expect(kinds(1, 1, 1)).toEqual(['side', 'symbol']);
    expect(kinds(-1, -1, -1)).toEqual(['side', 'symbol']);
  });
});

describe('the nearest of all rods', () => {
  it('is painted last', () => {
    const view = { turn: 3, tilt: 2 };
    const all = pieces(cuboctahedron, laidRods(cuboctahedron), view);
    const nearest = pieces(cuboctahedron, onlyEnd(laidRods(cuboctahedron), [1, 0, 0]), view);
    expect(all.at(-1)).toEqual(nearest.at(-1));
    expect(all).toHaveLength(
      laidRods(cuboctahedron)
        .ends.flat()
        .flatMap((end) => pieces(cuboctahedron, { ...laidRods(cuboctahedron), ends: [[end]] }, view)).length,
    );
  });
});

type Thing = 'body' | 'shaft' | 'plate' | 'nothing';

/** What the finished picture shows at a point: the last thing painted there. */
function painted(drawn: readonly RodPiece[], silhouette: readonly Point[], at: Point): Thing {
  let thing: Thing = 'nothing';
  const paint = (layer: RodPiece['layer']): void => {
    for (const piece of drawn)
      if (piece.layer === layer && contains(piece.outline, at)) thing = piece.kind === 'rod' ? 'shaft' : 'plate';
  };
  paint('behind');
  if (contains(silhouette, at)) thing = 'body';
  paint('before');
  return thing;
}

/** Shaft and plate of an end as solids. */
function solidsOf({ end, line, base, tip }: RodEnd, laid: DrawnRods) {
  const axes = [end.across, cross(end.along, end.across), end.along] as const;
  const round = Array.from({ length: 96 }, (_, i): Point => {
    const angle = (2 * Math.PI * i) / 96;
    return [(laid.diameter / 2) * Math.cos(angle), (laid.diameter / 2) * Math.sin(angle)];
  });
  const symbol = AXIS_SYMBOLS[line.symbol].outline.map(([x, y]): Point => [x * laid.symbolUnit, y * laid.symbolUnit]);
  return { shaft: prism(round, axes, [0, base]), plate: prism(symbol, axes, [base, tip]) };
}

/** Evenly spread numbers from 0 to 1 (a multiplicative congruential generator), repeatable from the seed. */
function* numbers(seed: number): Generator<number, never> {
  for (let state = (seed % 2147483646) + 1; ; ) {
    state = (state * 48271) % 2147483647;
    yield state / 2147483647;
  }
}

/** Draws rods, then looks at places all over them; gives those where picture and rays from the eye do not agree. */
function disagreements(shape: ClosedShape, laid: DrawnRods, view: View, seed: number, count: number): string[] {
  const frame = viewFrame(view, shape.crystal.metric);
  const planes = facePlanes(shape, SCALE);
  const drawn = rodPieces(laid, planes, frame);
  const vertices = projectAll(frame, shape.measures.positions).map(([x, y]): Point => [x * SCALE, y * SCALE]);
  const silhouette = look(shape, frame.toward).silhouette.map((v) => vertices[v]!);
  const edges = [silhouette, ...drawn.map(({ outline }) => outline)];
  const solids = laid.ends.flat().map((end) => solidsOf(end, laid));
  const random = numbers(seed);
  const found: string[] = [];
  for (let i = 0; i < count; i++) {
    const { low, high } = boundsOf(drawn[Math.floor(random.next().value * drawn.length)]!.outline);
    const [u, v] = [random.next().value, random.next().value];
    const at: Point = [low[0] + u * (high[0] - low[0]), low[1] + v * (high[1] - low[1])];
    // A round rod is drawn with few corners, so what lies within a hundredth of a millimetre of an outline is left out.
    if (edges.some((outline) => distanceFrom(outline, at) < 0.01)) continue;
    const depths: [Thing, number | null][] = [
      ['body', frontDepth(planes, frame, at)],
      ...solids.flatMap(({ shaft, plate }): [Thing, number | null][] => [
        ['shaft', frontDepth(shaft, frame, at)],
        ['plate', frontDepth(plate, frame, at)],
      ]),
    ];
    let [nearest, most]: [Thing, number] = ['nothing', Number.NEGATIVE_INFINITY];
    for (const [thing, depth] of depths) if (depth !== null && depth > most) [nearest, most] = [thing, depth];
    const shown = painted(drawn, silhouette, at);
    if (shown !== nearest) found.push(`${shown} instead of ${nearest} at ${at}`);
  }
  return found;
}

describe('painting in order', () => {
  it('shows at every point what a ray from the eye meets first', () => {
    fc.assert(
      fc.property(anyCrystal, anyView, fc.nat(), fc.nat(), (shape, view, pick, seed) => {
        const all = laidRods(shape);
        fc.pre(all.ends.length > 0);
        const laid = { ...all, ends: [all.ends[pick % all.ends.length]!] };
        expect(disagreements(shape, laid, view, seed, 40)).toEqual([]);
      }),
      { numRuns: 250 },
    );
  });

  it('holds for all rods of a crystal at once', () => {
    fc.assert(
      fc.property(anyCrystal, anyView, fc.nat(), (shape, view, seed) => {
        fc.pre(laidRods(shape).ends.length > 0);
        expect(disagreements(shape, laidRods(shape), view, seed, 40)).toEqual([]);
      }),
      { numRuns: 60 },
    );
  });
});
