import { describe, expect, it } from 'vitest';
import { hollowBody, largestInset } from '../../../src/print/bodies/hollow.ts';
import { type Mesh, meshVolume } from '../../../src/print/mesh.ts';
import { isClosed, polyhedron } from '../../../src/shape/shape.ts';
import { clean, cube, lowest, made, minerals, randomSamples, type Sample, sample } from './samples.ts';

const sealed = async ({ shape, scale }: Sample, wall: number): Promise<Mesh> =>
  (await made((bench) => hollowBody(bench, shape, scale, { wall, drains: null }))).parts[0]!.placed[0]!;

/** Heights of a triangle's corners over a plane through the centre. */
const heights = ({ positions: p, triangles }: Mesh, t: number, n: readonly number[]): number[] =>
  [0, 1, 2].map((k) => {
    const at = 3 * triangles[3 * t + k]!;
    return n[0]! * p[at]! + n[1]! * p[at + 1]! + n[2]! * p[at + 2]!;
  });

/** By definition of a wall of even thickness: the cavity's faces lie on the crystal's planes moved in by the wall. */
function expectWalls({ name, shape, scale }: Sample, mesh: Mesh, wall: number): void {
  const { normals, distance, faces } = shape.measures;
  const cavity = shape.crystal.forms.length;
  const planes = faces.map((face) => ({
    n: [...normals.subarray(3 * face, 3 * face + 3)],
    d: distance[face]! * scale - wall,
  }));
  mesh.surface!.forEach((surface, t) => {
    if (surface !== cavity) return;
    const off = planes.map(({ n, d }) => heights(mesh, t, n).map((height) => height - d));
    expect(Math.max(...off.flat()), `${name}: wall nowhere thinner`).toBeLessThan(1e-6);
    const nearest = Math.min(...off.map((own) => Math.max(...own.map(Math.abs))));
    expect(nearest, `${name}: parallel to a face`).toBeLessThan(1e-6);
  });
}

describe('a sealed hollow crystal', () => {
  it.each([
    [2, 56 ** 3],
    [10, 40 ** 3],
    [29.9, 0.2 ** 3],
  ])('of a 60 mm cube with %f mm walls encloses what is left of the cube (by hand)', async (wall, inner) => {
    const mesh = await sealed(cube(), wall);
    expect(meshVolume(mesh)).toBeCloseTo(60 ** 3 - inner, 5);
    expect(clean(mesh, 'cube').bodies.map(({ kind }) => kind)).toEqual(['solid', 'cavity']);
  });

  it('has walls of the stated thickness, and the volume of the outer less the inner polyhedron: presets', async () => {
    for (const one of minerals().map((name) => sample(name))) await expectHollow(one, 0.35);
  });

  it('and random crystals', async () => {
    for (const one of randomSamples(100)) await expectHollow(one, 0.4);
  });

  async function expectHollow(one: Sample, share: number): Promise<void> {
    const { shape, scale, name } = one;
    const least = Math.min(...shape.crystal.forms.map(({ distance }) => distance)) * scale;
    const wall = share * Math.min(least, largestInset(shape, scale));
    const mesh = await sealed(one, wall);
    expectWalls(one, mesh, wall);
    clean(mesh, name);
    // The inner polyhedron by the kernel's other way, with the point group.
    const forms = shape.crystal.forms.map((form) => ({ ...form, distance: form.distance - wall / scale }));
    const inner = polyhedron({ ...shape.crystal, forms });
    if (!isClosed(inner)) throw new Error('moving faces in opens nothing');
    const expected = (shape.measures.volume - inner.measures.volume) * scale ** 3;
    expect(Math.abs(meshVolume(mesh) / expected - 1), name).toBeLessThan(1e-8);
  }
});

describe('a drained hollow crystal', () => {
  const drained = async ({ shape, scale }: Sample, wall: number, count: number) =>
    made((bench) => hollowBody(bench, shape, scale, { wall, drains: { diameter: 3.5, count } }));

  it('is one shell with a handle fewer than it has holes (Euler), and its resting face lies on the bed', async () => {
    for (const name of ['quartz', 'fluorite', 'orthoclase', 'calcite', 'gypsum', 'sulfur', 'axinite-fe', 'zircon'])
      for (const count of [1, 2, 3]) {
        const one = sample(name);
        const { parts, remarks } = await drained(one, 2.5, count);
        const report = clean(parts[0]!.mesh, name);
        expect(report.bodies).toHaveLength(1);
        expect(report.vertices - report.triangles / 2, `${name}, ${count} holes`).toBe(2 - 2 * (count - 1));
        expect(lowest(parts[0]!.mesh, 2)).toBe(0);
        expect(remarks.join()).toMatch(/lowest through \(/);
      }
  });

  it('of a cube loses the two holes of its walls (by hand)', async () => {
    const { parts } = await drained(cube(), 2.5, 2);
    // Bores are polygons of 24 sides around a circle of 3.5 mm.
    const hole = 24 * 1.75 ** 2 * Math.tan(Math.PI / 24) * 2.5;
    expect(meshVolume(parts[0]!.placed[0]!)).toBeCloseTo(60 ** 3 - 55 ** 3 - 2 * hole, 0);
  });

  it('takes the direction that is to lie below', async () => {
    const one = cube();
    const { parts } = await made((bench) =>
      hollowBody(bench, one.shape, one.scale, { wall: 3, drains: { diameter: 3.5, count: 1 }, resting: [0, 0, -2] }),
    );
    const [{ positions }] = parts[0]!.placed as [Mesh];
    const holed = [...positions.keys()].filter((i) => i % 3 === 2 && Math.abs(positions[i]! + 30) < 1e-4);
    expect(holed.length, 'the hole goes through z = −30').toBeGreaterThan(20);
  });
});

describe('an impossible hollow crystal', () => {
  const hollow = (wall: number, diameter = 3.5) =>
    made((bench) => hollowBody(bench, cube().shape, cube().scale, { wall, drains: { diameter, count: 2 } }));

  it('says which wall is the thickest', async () => {
    await expect(hollow(30)).rejects.toMatchObject({
      code: 'wall',
      message: expect.stringMatching(/30 mm leave nothing.*30 mm/),
    });
    await expect(hollow(0)).rejects.toMatchObject({ code: 'wall' });
    await expect(hollow(-1)).rejects.toMatchObject({ code: 'wall' });
    await expect(hollow(Number.NaN)).rejects.toMatchObject({ code: 'wall' });
  });

  it('says which drain hole is the widest', async () => {
    await expect(hollow(20, 21)).rejects.toMatchObject({ code: 'drain', hint: expect.stringContaining('20 mm') });
  });
});
