import { describe, expect, it } from 'vitest';
import { growthSectors, type SectorsPlan } from '../../../src/print/bodies/sectors.ts';
import { meshVolume } from '../../../src/print/mesh.ts';
import { ObjectError } from '../../../src/shape/object-error.ts';
import { clean, cube, isSound, kit, made, minerals, randomSamples, type Sample, sample } from './samples.ts';

const sectors = ({ shape, scale }: Sample, plan: SectorsPlan) =>
  made((bench) => growthSectors(bench, shape, scale, plan, isSound));

describe('growth sectors', () => {
  it('of each face have the volume of its pyramid, a third of area times distance, and fill the crystal', async () => {
    for (const one of [...minerals().map((name) => sample(name)), ...randomSamples(100)]) {
      const { measures } = one.shape;
      const { parts } = await sectors(one, { by: 'face', gap: 0 });
      const volumes = parts.map(({ placed }) => meshVolume(placed[0]!) / one.scale ** 3);
      expect(Math.abs(volumes.reduce((a, b) => a + b) / measures.volume - 1), one.name).toBeLessThan(1e-8);
      if (parts.length === measures.faces.length)
        parts.forEach((_, i) => {
          const face = measures.faces[i]!;
          const pyramid = (measures.area[face]! * measures.distance[face]!) / 3;
          expect(Math.abs(volumes[i]! - pyramid), one.name).toBeLessThan(1e-6 * measures.volume);
        });
      for (const part of parts) clean(part.mesh, `${one.name} ${part.name}`);
    }
  });

  it('of each form fill the crystal too', async () => {
    for (const one of [...minerals().map((name) => sample(name)), ...randomSamples(60)]) {
      const { parts } = await sectors(one, { by: 'form', gap: 0 });
      const sum = parts.reduce((all, { placed }) => all + meshVolume(placed[0]!), 0);
      expect(Math.abs(sum / (one.shape.measures.volume * one.scale ** 3) - 1), one.name).toBeLessThan(1e-8);
      for (const part of parts) expect(clean(part.mesh, `${one.name} ${part.name}`).bodies).toHaveLength(1);
      expect(new Set(parts.map(({ name }) => name)).size).toBe(parts.length);
    }
  });

  it('with a gap are sound, for every preset', { timeout: 120_000 }, async () => {
    for (const name of minerals())
      for (const by of ['face', 'form'] as const)
        for (const { name: part, mesh } of await partsOrNone(sample(name), { by, gap: 0.4 }))
          clean(mesh, `${name} ${part}`);
  });

  it('of a form that would fold over themselves stay single, and this is told', async () => {
    const splinter = sample({
      pointGroup: '-42m',
      cell: { a: 13.88, c: 14.9 },
      forms: [
        { face: [4, -1, -1], distance: 1.314 },
        { face: [4, -3, 3], distance: 1.482 },
        { face: [3, 1, 4], distance: 0.945 },
        { face: [1, 0, 0], distance: 1.7238000000000002 },
        { face: [0, 1, 0], distance: 2.0709 },
        { face: [0, 0, 1], distance: 1.0439 },
        { face: [-1, 0, 0], distance: 1.0517 },
        { face: [0, -1, 0], distance: 1.3091 },
        { face: [0, 0, -1], distance: 1.3429 },
      ],
    });
    const { parts, remarks } = await sectors(splinter, { by: 'form', gap: 0.4 });
    for (const { name, mesh } of parts) clean(mesh, name);
    expect(remarks.join()).toMatch(/Some faces of \{4-33\} have a sector each: .* fold over/);
  });

  /** A tiny face may lose its sector to the gap, and is told. */
  async function partsOrNone(one: Sample, plan: SectorsPlan) {
    try {
      return (await sectors(one, plan)).parts;
    } catch (error) {
      if (!(error instanceof ObjectError)) throw error;
      expect(error.code).toBe('gap');
      return [];
    }
  }

  it.each(['quartz', 'fluorite', 'orthoclase', 'pyrite', 'axinite-fe'])(
    'of %s with a gap keep it everywhere',
    async (name) => {
      const { solid } = await kit();
      for (const by of ['face', 'form'] as const) {
        const { parts } = await sectors(sample(name), { by, gap: 0.6 });
        const solids = parts.map(({ placed }) => solid(placed[0]!));
        const gaps = solids.flatMap((a, i) => solids.slice(i + 1).map((b) => a.minGap(b, 2)));
        if (gaps.length === 0) continue;
        expect(Math.min(...gaps)).toBeGreaterThan(0.6 - 1e-4);
        // Tools of joined sectors grow by up to a fifth more than the gap.
        expect(Math.min(...gaps)).toBeLessThan(by === 'face' ? 0.6 + 1e-4 : 0.72);
      }
    },
  );

  it('are named by their faces, coloured by their form, and lie on the face', async () => {
    const { parts } = await sectors(sample('quartz'), { by: 'face', gap: 0 });
    expect(parts.map(({ name }) => name)).toContain('sector-10bar11');
    expect(parts[0]!.surfaces[0]!.name).toMatch(/\{10-10\}/);
    expect(parts[0]!.mesh.positions.filter((value, i) => i % 3 === 2 && value < 1e-9).length).toBeGreaterThan(3);
  });

  it('of a prism by form are split where its ends would meet in the centre, unless a gap opens it', async () => {
    const closed = await sectors(sample('quartz'), { by: 'form', gap: 0 });
    expect(closed.remarks.join()).toMatch(/\{10-10\} have a sector each/);
    const open = await sectors(sample('quartz'), { by: 'form', gap: 0.4 });
    const prism = open.parts.find(({ name }) => name === 'sector-10bar10')!;
    expect(prism.purpose.match(/\(/g)).toHaveLength(6);
    const { vertices, triangles } = clean(prism.mesh, 'prism');
    expect(vertices - triangles / 2, 'a ring (Euler)').toBe(0);
  });

  it('are refused with a gap that leaves nothing', async () => {
    await expect(sectors(cube(), { by: 'face', gap: 200 })).rejects.toMatchObject({ code: 'gap' });
    await expect(sectors(cube(), { by: 'face', gap: -1 })).rejects.toMatchObject({ code: 'gap' });
  });
});
