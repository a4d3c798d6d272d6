import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { checkMesh } from '../../../src/files/check/check.ts';
import { weldFloat32 } from '../../../src/files/mesh/weld.ts';
import { bevelPlanes } from '../../../src/print/handling/bevel-planes.ts';
import { bevelledBody } from '../../../src/print/handling/bevelled.ts';
import { roundedBody } from '../../../src/print/handling/rounded.ts';
import { type Mesh, meshVolume } from '../../../src/print/mesh.ts';
import { facePlanes } from '../../../src/shape/face-planes.ts';
import type { ClosedShape } from '../../../src/shape/shape.ts';
import { CRYSTALS, cube, octahedron, shapeOf } from '../../draw/crystals.ts';
import { crystals, runs } from '../../shape/random-crystals.ts';

type Vector = readonly [number, number, number];
const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const point = ({ positions }: Mesh, vertex: number): Vector => [
  positions[3 * vertex]!,
  positions[3 * vertex + 1]!,
  positions[3 * vertex + 2]!,
];
const scaleFor = (shape: ClosedShape, size: number): number => size / (2 * shape.measures.circumscribedRadius);
const outerVolume = (shape: ClosedShape, scale: number): number => shape.measures.volume * scale ** 3;

/** How far the corners of the triangles of a surface lie outside each other's plane and the plane of the crystal. */
function offPlane(shape: ClosedShape, scale: number, mesh: Mesh): number {
  const planes = facePlanes(shape, scale);
  let worst = 0;
  mesh.surface!.forEach((surface, t) => {
    if (surface === shape.crystal.forms.length) return;
    const corners = [0, 1, 2].map((i) => point(mesh, mesh.triangles[3 * t + i]!));
    const off = planes.map(({ normal, distance }) =>
      Math.max(...corners.map((corner) => Math.abs(dot(normal, corner) - distance))),
    );
    worst = Math.max(worst, Math.min(...off));
  });
  return worst;
}

const expectClean = (mesh: Mesh): void => {
  const report = checkMesh(weldFloat32(mesh));
  expect(report.problems).toEqual([]);
  expect(report.bodies).toHaveLength(1);
};

describe('bevels', () => {
  it('of a cube lie where the hand formula puts them', () => {
    // Edge 2, width 0.2: the strip of a right-angled edge cuts √2 − 0.1 from the centre (by hand).
    const planes = bevelPlanes(cube, 1, { width: 0.2 });
    const strips = planes.filter(({ cuts }) => cuts === 'edge');
    expect(strips).toHaveLength(12);
    for (const { distance } of strips) expect(distance).toBeCloseTo(Math.SQRT2 - 0.1, 12);
    expect(planes.filter(({ cuts }) => cuts === 'corner')).toHaveLength(8);
  });

  it.each(CRYSTALS)('of the %s give a clean body inside the crystal, faces in their planes', (_, shape) => {
    const scale = scaleFor(shape, 60);
    const width = 0.8;
    const { mesh, surfaces } = bevelledBody(shape, scale, { width });
    expectClean(mesh);
    expect(offPlane(shape, scale, mesh)).toBeLessThan(1e-9);
    expect(surfaces.at(-1)!.name).toBe('blunted, no crystal face');
    expect(meshVolume(mesh)).toBeLessThan(outerVolume(shape, scale));
    expect(meshVolume(mesh)).toBeGreaterThan(0.9 * outerVolume(shape, scale));
  });

  it.each([
    ['cube', cube],
    ['octahedron', octahedron],
  ])('of the %s are as wide as asked, measured between the long edges of each strip', (_, shape) => {
    const scale = scaleFor(shape, 60);
    const width = 0.8;
    const { solid, measures } = bevelledBody(shape, scale, { width });
    const faces = shape.measures.faces.length;
    const strips = bevelPlanes(shape, scale, { width }).filter(({ cuts }) => cuts === 'edge').length;
    for (let strip = faces; strip < faces + strips; strip++) {
      const corners = Array.from(solid.corner.subarray(solid.start[strip], solid.start[strip + 1]), (vertex) =>
        point({ positions: measures.positions, triangles: new Uint32Array(0) }, vertex),
      );
      const lines = corners.map((corner, i) => ({ corner, next: corners[(i + 1) % corners.length]! }));
      const length = ({ corner, next }: (typeof lines)[number]): number =>
        Math.hypot(next[0] - corner[0], next[1] - corner[1], next[2] - corner[2]);
      const [one, other] = lines.sort((a, b) => length(b) - length(a));
      const along = one!.next.map((value, i) => (value - one!.corner[i]!) / length(one!));
      const gap = other!.corner.map((value, i) => value - one!.corner[i]!);
      const shift = gap.reduce((sum, value, i) => sum + value * along[i]!, 0);
      expect(Math.hypot(...gap.map((value, i) => value - shift * along[i]!))).toBeCloseTo(width, 9);
    }
  });

  it('hold on random crystals', () => {
    fc.assert(
      fc.property(crystals, fc.double({ min: 0.1, max: 1.5, noNaN: true }), (recipe, width) => {
        const shape = shapeOf(recipe);
        const scale = scaleFor(shape, 60);
        const { mesh } = bevelledBody(shape, scale, { width });
        expectClean(mesh);
        expect(meshVolume(mesh)).toBeLessThan(outerVolume(shape, scale));
      }),
      { numRuns: runs(120) },
    );
  });

  it('that would leave nothing are refused', () => {
    expect(() => bevelledBody(cube, 1, { width: 30 })).toThrow(/leave no face/);
    expect(() => bevelledBody(cube, 1, { width: 0 })).toThrow(/no width/);
  });
});

describe('rounding', () => {
  it('of a cube has the volume of Steiner’s formula for its inner cube', () => {
    // V = a³ + 6a²r + 3π a r² + 4/3 π r³ (Steiner 1840), a = 40 − 2 r.
    for (const radius of [0.75, 3]) {
      const { mesh } = roundedBody(cube, 20, { radius });
      const a = 40 - 2 * radius;
      const exact = a ** 3 + 6 * a * a * radius + 3 * Math.PI * a * radius ** 2 + (4 / 3) * Math.PI * radius ** 3;
      expect(meshVolume(mesh)).toBeLessThan(exact);
      const rounded = 3 * Math.PI * a * radius + 4 * Math.PI * radius ** 2;
      expect(exact - meshVolume(mesh)).toBeLessThan(0.02 * rounded);
    }
  });

  it.each(CRYSTALS)(
    'of the %s is a clean body, flat faces in their planes, triangles within the chord error',
    (_, shape) => {
      const scale = scaleFor(shape, 60);
      for (const radius of [0.75, 2]) {
        const body = roundedBody(shape, scale, { radius });
        const { mesh, chordError } = body;
        expectClean(mesh);
        expect(offPlane(shape, scale, mesh)).toBeLessThan(1e-9);
        expect(mesh.triangles.length / 3).toBeLessThan(20_000);
        expect(meshVolume(mesh)).toBeLessThan(outerVolume(shape, scale));
        expect(deepest(shape, scale, mesh, radius)).toBeLessThanOrEqual(chordError + 1e-9);
      }
    },
  );

  it('hold on random crystals', () => {
    fc.assert(
      fc.property(crystals, fc.double({ min: 0.05, max: 0.9, noNaN: true }), (recipe, share) => {
        const shape = shapeOf(recipe);
        const scale = scaleFor(shape, 60);
        const radius = share * Math.min(3, shape.measures.inscribedRadius * scale);
        const { mesh } = roundedBody(shape, scale, { radius });
        expectClean(mesh);
        expect(meshVolume(mesh)).toBeLessThan(outerVolume(shape, scale));
        const inner = 1 - radius / (shape.measures.inscribedRadius * scale);
        expect(meshVolume(mesh)).toBeGreaterThan(inner ** 3 * outerVolume(shape, scale));
      }),
      { numRuns: runs(120) },
    );
  });

  it('wider than the crystal is refused with the room there is', () => {
    expect(() => roundedBody(cube, 10, { radius: 10 })).toThrow(/room for less than 10.00 mm/);
    expect(() => roundedBody(cube, 10, { radius: Number.NaN })).toThrow(/does not fit/);
  });
});

/**
 * How deep middles of blunted triangles and of their sides lie below the true rounding, which stands one radius from
 * the inner polyhedron: their distance to it by projection onto its faces' planes, Dykstra's method (Boyle and
 * Dykstra 1986).
 */
function deepest(shape: ClosedShape, scale: number, mesh: Mesh, radius: number): number {
  const planes = facePlanes(shape, scale).map(({ normal, distance }) => ({ normal, distance: distance - radius }));
  let worst = 0;
  const blunted = Array.from(mesh.surface!.keys()).filter((t) => mesh.surface![t] === shape.crystal.forms.length);
  const every = Math.max(1, Math.floor(blunted.length / 150));
  for (let i = 0; i < blunted.length; i += every) {
    const corners = [0, 1, 2].map((k) => point(mesh, mesh.triangles[3 * blunted[i]! + k]!));
    const shares = [
      [1 / 3, 1 / 3, 1 / 3],
      [0.5, 0.5, 0],
      [0, 0.5, 0.5],
      [0.5, 0, 0.5],
    ];
    for (const share of shares) {
      const sample = [0, 1, 2].map((axis) => share.reduce((sum, s, k) => sum + s * corners[k]![axis]!, 0));
      worst = Math.max(worst, radius - distanceTo(planes, [sample[0]!, sample[1]!, sample[2]!]));
    }
  }
  return worst;
}

function distanceTo(planes: { normal: Vector; distance: number }[], from: Vector): number {
  let x: Vector = from;
  const near = planes.filter(({ normal, distance }) => dot(normal, from) > distance - 3);
  const corrections = near.map(() => 0);
  for (let round = 0; round < 400; round++)
    near.forEach(({ normal, distance }, i) => {
      const before = dot(normal, x) + corrections[i]!;
      const step = Math.max(0, before - distance);
      const shift = corrections[i]! - step;
      x = [x[0] + shift * normal[0], x[1] + shift * normal[1], x[2] + shift * normal[2]];
      corrections[i] = step;
    });
  return Math.hypot(x[0] - from[0], x[1] - from[1], x[2] - from[2]);
}
