import { describe, expect, it } from 'vitest';
import { symmetryElements } from '../../../src/crystal/elements.ts';
import { crystalMesh } from '../../../src/print/body.ts';
import { withSolids } from '../../../src/print/kit.ts';
import { meshVolume } from '../../../src/print/mesh.ts';
import { type MirrorLinesPlan, mirrorLines } from '../../../src/print/planes/mirror-lines.ts';
import { rodOutline, toEnd } from '../../../src/print/rods/solid.ts';
import { axisLines } from '../../../src/rods/axis-ends.ts';
import { facePlanes } from '../../../src/shape/face-planes.ts';
import { clean, cube, kit, minerals, randomSamples, type Sample, sample } from '../bodies/samples.ts';

const USUAL: MirrorLinesPlan = { relief: 'inlaid', width: 1.2, depth: 0.6 };

/** Meshes of the body and the strips, and what was said. */
const lined = ({ shape, scale }: Sample, plan: MirrorLinesPlan = USUAL) =>
  withSolids((bench) => {
    const { solid, inlay, lines, remarks } = mirrorLines(
      bench,
      bench.solid(crystalMesh(shape, scale)),
      shape,
      scale,
      plan,
    );
    const volumes = { body: solid.volume(), strips: inlay?.volume() ?? 0 };
    return {
      body: bench.mesh(solid, shape.crystal.forms.length),
      strips: inlay && { mesh: bench.mesh(inlay, 0) },
      genus: inlay?.genus(),
      volumes,
      lines,
      remarks,
    };
  });

const volumeOf = ({ shape, scale }: Sample): number => shape.measures.volume * scale ** 3;
const mirrorsOf = ({ shape }: Sample) => symmetryElements(shape.crystal.group).mirrorPlanes;

describe('mirror planes on the surface', () => {
  it('inlaid in every crystal are clean and fill their grooves exactly, a line a plane', async () => {
    for (const one of [
      ...minerals()
        .slice(0, 50)
        .map((name) => sample(name)),
      ...randomSamples(12),
    ]) {
      const { body, strips, volumes, lines, remarks } = await lined(one);
      expect(lines, one.name).toHaveLength(mirrorsOf(one).length);
      clean(body, one.name);
      expect(Math.abs((volumes.body + volumes.strips) / volumeOf(one) - 1), one.name).toBeLessThan(1e-6);
      if (lines.length === 0) {
        expect(remarks.join()).toMatch(/no mirror planes/);
        expect(strips).toBeNull();
        continue;
      }
      clean(strips!.mesh, `strips of ${one.name}`);
      expect(volumes.strips, one.name).toBeGreaterThan(0);
      expect((meshVolume(body) + meshVolume(strips!.mesh)) / volumeOf(one), one.name).toBeCloseTo(1, 4);
    }
  }, 60_000);

  it('each close round the crystal: a strip of one plane is one ring', async () => {
    for (const name of ['quartz', 'fluorite', 'calcite', 'orthoclase', 'beryl', 'zircon', 'barite']) {
      const one = sample(name);
      for (const plane of mirrorsOf(one)) {
        const { strips, genus } = await lined(one, { ...USUAL, planes: [plane] });
        expect(genus, name).toBe(1);
        expect(clean(strips!.mesh, name).bodies, name).toHaveLength(1);
      }
    }
  });

  it('lie within half their width of a plane and within their depth of the surface', async () => {
    for (const name of ['fluorite', 'orthoclase', 'beryl']) {
      const one = sample(name);
      const { strips, lines } = await lined(one);
      const { positions } = strips!.mesh;
      const planes = facePlanes(one.shape, one.scale);
      for (let v = 0; v < positions.length; v += 3) {
        const point = positions.subarray(v, v + 3);
        const along = (n: readonly number[]): number => n[0]! * point[0]! + n[1]! * point[1]! + n[2]! * point[2]!;
        expect(Math.min(...lines.map(({ normal }) => Math.abs(along(normal))))).toBeLessThan(0.6 + 1e-4);
        const depth = Math.min(...planes.map(({ normal, distance }) => distance - along(normal)));
        expect(depth).toBeGreaterThan(-1e-4);
        expect(depth).toBeLessThan(0.6 + 1e-4);
      }
    }
  });

  it('of a cube have the volume of nine strips less what they share', async () => {
    // One plane x = 0 of a 60 mm cube, 1.2 mm wide and 0.6 deep: a square ring between 60 and 58.8 mm (by hand).
    const one = cube(60);
    const plane = mirrorsOf(one).find(({ plane: h }) => h.join() === '1,0,0')!;
    const ring = (60 ** 2 - 58.8 ** 2) * 1.2;
    expect((await lined(one, { ...USUAL, planes: [plane] })).volumes.strips / ring).toBeCloseTo(1, 5);
    const proud = await lined(one, { relief: 'raised', width: 1.2, depth: 0.6, planes: [plane] });
    expect((proud.volumes.body - 60 ** 3) / ((61.2 ** 2 - 60 ** 2) * 1.2)).toBeCloseTo(1, 4);
    const sunk = await lined(one, { relief: 'engraved', width: 1.2, depth: 0.6, planes: [plane] });
    expect((60 ** 3 - sunk.volumes.body) / ring).toBeCloseTo(1, 4);
    expect(sunk.strips).toBeNull();
  });

  it.each(['raised', 'engraved'] as const)('%s are clean', async (relief) => {
    for (const one of [
      ...minerals()
        .filter((_, i) => i % 3 === 0)
        .map((name) => sample(name)),
      ...randomSamples(15),
    ])
      clean((await lined(one, { relief, width: 1.2, depth: 0.6 })).body, `${relief} ${one.name}`);
  });

  it('and their body do not overlap', async () => {
    const { solid } = await kit();
    for (const name of ['fluorite', 'orthoclase', 'beryl']) {
      const { body, strips } = await lined(sample(name));
      expect(Math.abs(solid(body).intersect(solid(strips!.mesh)).volume()), name).toBeLessThan(0.01);
    }
  });

  it('make way for rods that are joined to the body', async () => {
    const { solid } = await kit();
    for (const name of ['fluorite', 'calcite', 'beryl']) {
      const { shape, scale } = sample(name);
      const { body, strips } = await withSolids((bench) => {
        const lines = mirrorLines(bench, bench.solid(crystalMesh(shape, scale)), shape, scale, USUAL);
        const ends = axisLines(shape.crystal, { orders: null, directions: null }).flatMap((line) => line.ends);
        const rods = ends.map((end) => bench.place(bench.prism([rodOutline(3)], 1, 50), toEnd(end)));
        const whole = bench.union([lines.solid, ...rods]);
        return { body: bench.mesh(whole, 9), strips: { mesh: bench.mesh(bench.subtract(lines.inlay!, rods), 0) } };
      });
      clean(body, name);
      clean(strips.mesh, `strips of ${name}`);
      expect(Math.abs(solid(body).intersect(solid(strips.mesh)).volume()), name).toBeLessThan(0.01);
    }
  });

  it('that would leave nothing are refused, and faces that they cover are told', async () => {
    await expect(lined(cube(2), { ...USUAL, width: 3 })).rejects.toMatchObject({ code: 'plane' });
    await expect(lined(cube(2), { ...USUAL, depth: 1.5 })).rejects.toMatchObject({ code: 'wall' });
    await expect(lined(cube(60), { ...USUAL, width: 0 })).rejects.toMatchObject({ code: 'plane' });
    const truncated = sample({
      pointGroup: 'm-3m',
      forms: [
        { face: '100', distance: 1 },
        { face: '111', distance: 1.72 },
      ],
    });
    expect((await lined(truncated, { ...USUAL, width: 4 })).remarks.join()).toMatch(/cover .*wholly/);
  });
});
