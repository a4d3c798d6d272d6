import { describe, expect, it } from 'vitest';
import { zone } from '../../../src/crystal/spaces.ts';
import { edges } from '../../../src/polyhedron/measures.ts';
import { type FramePlan, frameBody } from '../../../src/print/bodies/frame.ts';
import { extentsOf, meshVolume } from '../../../src/print/mesh.ts';
import type { AxesPlan } from '../../../src/recipe/crystal.ts';
import { mm } from '../../../src/recipe/quantity.ts';
import { planRods } from '../../../src/rods/plan.ts';
import { clean, cube, isSound, made, minerals, randomSamples, type Sample, sample } from './samples.ts';

const frame = ({ shape, scale }: Sample, plan: FramePlan) =>
  made((bench) => frameBody(bench, shape, scale, plan, isSound));

const usual = { strut: 2.5, joint: 4 };

describe('a frame', () => {
  it('of a cube has the volume of its struts and balls', async () => {
    const { parts } = await frame(cube(), { strut: 3, joint: 5 });
    const [mesh] = parts[0]!.placed;
    // Each bar less what its ends sink into the balls, which is a little less than a cap (solid geometry, by hand).
    const sunk = Math.sqrt(2.5 ** 2 - 1.5 ** 2);
    const expected = 8 * (4 / 3) * Math.PI * 2.5 ** 3 + 12 * Math.PI * 1.5 ** 2 * (60 - 2 * sunk);
    expect(meshVolume(mesh!) / expected).toBeGreaterThan(0.96);
    expect(meshVolume(mesh!) / expected).toBeLessThan(1.0);
    for (const extent of extentsOf(mesh!)) expect(extent).toBeGreaterThan(64.8);
    for (const extent of extentsOf(mesh!)) expect(extent).toBeLessThan(65.001);
  });

  it('of presets is one sound body, whose struts follow all edges', { timeout: 120_000 }, async () => {
    const simplest = minerals()
      .map((name) => sample(name))
      .sort((a, b) => a.shape.solid.neighbour.length - b.shape.solid.neighbour.length)
      .slice(0, 60);
    expect(new Set(simplest.map(({ shape }) => shape.crystal.group.system)).size, 'all systems').toBeGreaterThan(5);
    for (const one of simplest) {
      const { name } = one;
      const { group } = one.shape.crystal;
      const { parts } = await frame(one, { ...usual, bead: group.centrosymmetric ? 8 : null });
      const report = clean(parts[0]!.placed[0]!, name);
      expect(
        report.bodies.filter(({ kind }) => kind === 'solid'),
        name,
      ).toHaveLength(1);
    }
  });

  it('of random crystals is one sound body', { timeout: 120_000 }, async () => {
    for (const one of randomSamples(100).filter((_, i) => i % 10 === 0)) {
      if (edges(one.shape.solid, one.shape.measures).length > 60) continue;
      const { parts } = await frame(one, { strut: 1.6, joint: 3 });
      expect(clean(parts[0]!.placed[0]!, one.name).bodies.filter(({ kind }) => kind === 'solid')).toHaveLength(1);
    }
  });

  it('holds its bead by three stays', async () => {
    const bare = await frame(cube(), usual);
    const { parts, remarks } = await frame(cube(), { ...usual, bead: 10, stay: 1.5 });
    const added = meshVolume(parts[0]!.placed[0]!) - meshVolume(bare.parts[0]!.placed[0]!);
    // A ball of 10 mm and three bars of 1.5 mm from it to a ball of 4 mm at a corner of the cube (by hand).
    const expected = (4 / 3) * Math.PI * 125 + 3 * Math.PI * 0.75 ** 2 * (30 * Math.sqrt(3) - 5 - 2);
    expect(added / expected).toBeGreaterThan(0.95);
    expect(added / expected).toBeLessThan(1.01);
    expect(remarks.join()).toMatch(/Three stays/);
  });

  it.each([
    ['[111]', [1, 1, 1], false],
    ['[110]', [1, 1, 0], false],
    ['[100]', [1, 0, 0], true],
  ] as const)('holds rods along %s where they meet struts, else by stays', async (_, [u, v, w], stays) => {
    const { shape, scale } = cube();
    const axes: AxesPlan = {
      orders: null,
      directions: [zone(u, v, w)],
      fit: 'fused',
      diameter: mm(3),
      reach: mm(12),
    };
    const rods = planRods(shape, scale, axes);
    const { parts, remarks } = await frame(cube(), { ...usual, rods });
    expect(/Three stays/.test(remarks.join())).toBe(stays);
    expect(clean(parts[0]!.placed[0]!, 'rods').bodies).toHaveLength(1);
    expect(new Set(parts[0]!.placed[0]!.surface)).toEqual(new Set([0, 1]));
  });

  it('tells which small faces its struts close', async () => {
    const truncated = sample({
      pointGroup: 'm-3m',
      forms: [
        { face: '100', distance: 1 },
        { face: '111', distance: 1.68 },
      ],
    });
    const { remarks } = await frame(truncated, { strut: 4, joint: 5 });
    expect(remarks.join()).toMatch(/close 8 small faces: \(111\)/);
  });
});

describe('an impossible frame', () => {
  it('says how thick its struts may be', async () => {
    await expect(frame(cube(), { strut: 60, joint: 61 })).rejects.toMatchObject({
      code: 'struts',
      message: expect.stringMatching(/60 mm fill the crystal; there is room for less than 60 mm/),
    });
    await expect(frame(cube(), { strut: 4, joint: 3 })).rejects.toMatchObject({ code: 'struts' });
    await expect(frame(cube(), { strut: 0, joint: 3 })).rejects.toMatchObject({ code: 'struts' });
  });

  it('has no bead without a centre of inversion', async () => {
    await expect(frame(sample('quartz'), { ...usual, bead: 8 })).rejects.toMatchObject({
      code: 'no-centre',
      message: expect.stringContaining('point group 32'),
    });
  });
});
