import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { placeLabel, placeLabelTurned } from '../../src/draw/fit-label.ts';
import { faceLabels, labelCorners, type PageFace } from '../../src/draw/labels.ts';
import { projectAll } from '../../src/draw/project.ts';
import type { Point } from '../../src/draw/vector.ts';
import { viewFrame } from '../../src/draw/view.ts';
import { look } from '../../src/draw/visible.ts';
import { faceCorners } from '../../src/polyhedron/measures.ts';
import type { ClosedShape } from '../../src/shape/shape.ts';
import { anyCrystal, anyView, cube, quartz } from './crystals.ts';
import { contains } from './ray.ts';

const square: Point[] = [
  [0, 0],
  [100, 0],
  [100, 100],
  [0, 100],
];
const corners = ({ centre: [x, y], size }: { centre: Point; size: number }, width: number, height: number): Point[] => [
  [x - (size * width) / 2, y - (size * height) / 2],
  [x + (size * width) / 2, y - (size * height) / 2],
  [x + (size * width) / 2, y + (size * height) / 2],
  [x - (size * width) / 2, y + (size * height) / 2],
];

describe('placing a label', () => {
  it('fills a square with a square label', () => {
    const spot = placeLabel(square, { width: 1, height: 1 }, [], 1000);
    expect(spot.size).toBeCloseTo(100, 0);
    expect(spot.centre[0]).toBeCloseTo(50, 0);
  });

  it('stays in the middle where it needs little room', () => {
    expect(placeLabel(square, { width: 2, height: 1 }, [], 10)).toEqual({ centre: [50, 50], size: 10 });
  });

  it('fills a right triangle with a square of half its legs (the inscribed square at the right angle)', () => {
    const triangle: Point[] = [
      [0, 0],
      [100, 0],
      [0, 100],
    ];
    const { size } = placeLabel(triangle, { width: 1, height: 1 }, [], 1000);
    expect(size).toBeGreaterThan(47);
    expect(size).toBeLessThanOrEqual(50 + 1e-9);
  });

  it('makes room for what stands before the face', () => {
    const rod: Point[] = [
      [30, 30],
      [70, 30],
      [70, 70],
      [30, 70],
    ];
    const { centre, size } = placeLabel(square, { width: 2, height: 1 }, [rod], 20);
    expect(size).toBeGreaterThan(15);
    const [[left, top], , [right, bottom]] = corners({ centre, size }, 2, 1) as [Point, Point, Point];
    expect(right <= 30 || left >= 70 || bottom <= 30 || top >= 70).toBe(true);
  });

  it('finds no room in a face that is covered', () => {
    expect(placeLabel(square, { width: 1, height: 1 }, [square], 20).size).toBe(0);
  });
});

describe('a label that may be turned', () => {
  const sliver = (angle: number): Point[] => {
    const [cos, sin] = [Math.cos((angle * Math.PI) / 180), Math.sin((angle * Math.PI) / 180)];
    const outline: Point[] = [
      [-60, -8],
      [60, -8],
      [60, 8],
      [-60, 8],
    ];
    return outline.map(([x, y]) => [x * cos - y * sin, x * sin + y * cos]);
  };

  it.each([
    [50, 50],
    [-70, -70],
    [130, -50],
  ])('lies along a narrow face at %d°, never upside down', (angle, turn) => {
    const spot = placeLabelTurned(sliver(angle), { width: 3, height: 1 }, [], 15);
    expect(spot.turn).toBe(turn);
    expect(spot.size).toBeGreaterThan(14);
  });

  it('stands level where that serves as well', () => {
    expect(placeLabelTurned(square, { width: 3, height: 1 }, [], 15).turn).toBe(0);
  });
});

function pageFaces(shape: ClosedShape, view: Parameters<typeof viewFrame>[0], scale: number): PageFace[] {
  const frame = viewFrame(view, shape.crystal.metric);
  const points = projectAll(frame, shape.measures.positions).map(([x, y]): Point => [300 + scale * x, 300 - scale * y]);
  return look(shape, frame.toward).front.map((face) => ({
    face,
    outline: faceCorners(shape.solid, face).map((vertex) => points[vertex]!),
  }));
}

describe('labels of faces', () => {
  it('lie wholly inside their faces', () => {
    fc.assert(
      fc.property(anyCrystal, anyView, fc.constantFrom('letters', 'indices'), (shape, view, kind) => {
        const faces = pageFaces(shape, view, 240 / shape.measures.circumscribedRadius);
        for (const label of faceLabels(shape, kind, faces, [])) {
          const { outline } = faces.find(({ face }) => face === label.face)!;
          // Shrunk a little, because corners of a label that fits exactly lie on the face's edges.
          for (const corner of labelCorners({ ...label, size: label.size * 0.999 }))
            expect(contains(outline, corner), `${label.text} at ${corner}`).toBe(true);
        }
      }),
      { numRuns: 150 },
    );
  });

  it('are the letters of the mineral, or indices with overbars', () => {
    const faces = pageFaces(quartz, 'general', 150);
    const texts = (kind: 'letters' | 'indices') => faceLabels(quartz, kind, faces, []).map(({ text }) => text);
    expect(new Set(texts('letters'))).toEqual(new Set(['m', 'r', 'z']));
    expect(texts('indices')).toContain('101\u03050');
    expect(texts('indices')).toContain('101\u03051');
  });

  it('are indices where a form has no letter', () => {
    const texts = faceLabels(cube, 'letters', pageFaces(cube, 'general', 150), []).map(({ text }) => text);
    expect(texts.sort()).toEqual(['001', '010', '100']);
  });

  it('are left out of faces too small to read them', () => {
    expect(faceLabels(cube, 'indices', pageFaces(cube, 'general', 4), [])).toEqual([]);
  });
});
