import { describe, expect, it } from 'vitest';
import { type HalvesPlan, halves } from '../../../src/print/bodies/halves.ts';
import { type Mesh, meshVolume } from '../../../src/print/mesh.ts';
import { clean, cube, cutNormal, kit, lowest, made, minerals, randomSamples, type Sample, sample } from './samples.ts';

const dowel = { diameter: 4, length: 10, count: 2, clearance: 0.2 };
const cut = ({ shape, scale }: Sample, plan: Partial<HalvesPlan> = {}) =>
  made((bench) =>
    halves(bench, shape, scale, { plane: { normal: cutNormal(shape), offset: 0 }, dowel, wall: 1.2, ...plan }),
  );

/** Area of what lies on the bed. */
function footprint({ positions: p, triangles }: Mesh): number {
  let sum = 0;
  for (let t = 0; t < triangles.length; t += 3) {
    const [a, b, c] = [0, 1, 2].map((k) => 3 * triangles[t + k]!) as [number, number, number];
    if (Math.max(p[a + 2]!, p[b + 2]!, p[c + 2]!) > 1e-4) continue;
    sum += ((p[c]! - p[a]!) * (p[b + 1]! - p[a + 1]!) - (p[b]! - p[a]!) * (p[c + 1]! - p[a + 1]!)) / 2;
  }
  return sum;
}

describe('halves', () => {
  it('of presets add up to the crystal, fit together and are sound', async () => {
    const { solid } = await kit();
    for (const name of minerals()) {
      const one = sample(name);
      const bare = await cut(one, { dowel: null });
      expectWhole(
        one,
        bare.parts.map(({ placed }) => placed[0]!),
      );
      const touching = bare.parts.map(({ placed }) => solid(placed[0]!));
      // Single precision lets cuts askew to the axes sink into each other by less than a millionth of a millimetre.
      expect(touching[0]!.intersect(touching[1]!).volume(), name).toBeLessThan(2e-3);
      const { parts } = await cut(one, { gap: 0.1 });
      expect(parts.map((part) => [part.name, part.placed.length])).toEqual([
        ['half-1', 1],
        ['half-2', 1],
        ['dowel', 2],
      ]);
      for (const part of parts) clean(part.mesh, `${name} ${part.name}`);
      const [first, second, ...dowels] = parts.flatMap(({ placed }) => placed).map(solid);
      expect(first!.intersect(second!).volume(), name).toBe(0);
      expect(first!.minGap(second!, 2), name).toBeCloseTo(0.1, 4);
      for (const half of [first!, second!])
        for (const pin of dowels) {
          expect(half.intersect(pin).volume(), name).toBe(0);
          const gap = half.minGap(pin, 2);
          expect(gap, name).toBeGreaterThan(dowel.clearance / 2 - 1e-4);
          // What a dowel's sides lie inside its circle comes on top.
          expect(gap, name).toBeLessThan(dowel.clearance / 2 + 0.03);
        }
    }
  });

  it('of random crystals add up, wherever the cut lies', async () => {
    for (const one of randomSamples(100)) {
      const { normals, faces } = one.shape.measures;
      const [x, y, z] = normals.subarray(3 * faces[0]!, 3 * faces[0]! + 3);
      const plane = { normal: [x!, y!, z!] as const, offset: 0.3 * one.shape.measures.inscribedRadius * one.scale };
      const { parts } = await cut(one, { plane, dowel: null });
      expectWhole(
        one,
        parts.map(({ placed }) => placed[0]!),
      );
      for (const part of parts) clean(part.mesh, `${one.name} ${part.name}`);
    }
  });

  function expectWhole({ name, shape, scale }: Sample, pieces: readonly Mesh[]): void {
    const sum = pieces.reduce((all, mesh) => all + meshVolume(mesh), 0);
    expect(Math.abs(sum / (shape.measures.volume * scale ** 3) - 1), name).toBeLessThan(1e-6);
  }

  it('lie on their cut, less the holes (by hand)', async () => {
    const { parts } = await cut(cube(), { plane: { normal: [0, 0, 1], offset: 10 } });
    const hole = 24 * 2.1 ** 2 * Math.tan(Math.PI / 24);
    for (const { mesh } of parts.slice(0, 2)) {
      expect(lowest(mesh, 2)).toBe(0);
      expect(footprint(mesh)).toBeCloseTo(60 ** 2 - 2 * hole, 1);
    }
    const bare = await cut(cube(), { plane: { normal: [0, 0, 1], offset: 10 }, dowel: null, gap: 1 });
    expect(bare.parts.map(({ placed }) => meshVolume(placed[0]!))).toEqual([
      expect.closeTo(3600 * 39.5, 1),
      expect.closeTo(3600 * 19.5, 1),
    ]);
  });

  it('that would also match after half a turn are keyed by a dowel off its place', async () => {
    // A monoclinic pinacoid box is centred, and its (010) cut turns into itself about b; so do the halves: no key.
    const harmless = await cut(cube());
    expect(harmless.remarks).toEqual([]);
    // A plane askew cuts a cube in a centred outline, but its halves are not the same after half a turn.
    const keyed = await cut(cube(), { plane: { normal: [0.48, 0.6, 0.64], offset: 0 } });
    expect(keyed.remarks.join()).toMatch(/match in one way only/);
    const centres = keyed.parts[2]!.placed.map(({ positions }) =>
      [0, 1, 2].map(
        (axis) => positions.filter((_, i) => i % 3 === axis).reduce((a, b) => a + b) / (positions.length / 3),
      ),
    );
    const middle = [0, 1, 2].map((axis) => (centres[0]![axis]! + centres[1]![axis]!) / 2);
    expect(Math.hypot(...middle), 'distance of the middle from the centre').toBeGreaterThan(0.5);
  });
});

describe('closed magnet pockets', () => {
  const magnets = { diameter: 6, thickness: 2, clearance: 0.2 };

  it('are cavities under at least 0.6 mm of plastic, with the warning and its figure', async () => {
    for (const name of ['fluorite', 'orthoclase', 'calcite']) {
      const { parts, warnings, remarks } = await cut(sample(name), { magnets });
      for (const half of parts.slice(0, 2)) {
        const cavities = clean(half.mesh, name).bodies.filter(({ kind }) => kind === 'cavity');
        expect(cavities).toHaveLength(2);
        for (const { extents } of cavities) {
          expect(extents.min[2]).toBeGreaterThanOrEqual(0.6 - 1e-4);
          expect(extents.max[2]).toBeCloseTo(0.6 + 2.2, 3);
        }
      }
      // Limit: 16 CFR 1262; index of the example magnet: 9 kG² times the area of 6 mm.
      expect(warnings.join()).toMatch(/4 magnets.*254 kG²mm².*50 kG²mm² \(16 CFR 1262/);
      expect(remarks.join()).toMatch(/pause it at 2\.8 mm/);
    }
  });

  it('are refused with a thinner cover', async () => {
    await expect(cut(cube(), { magnets: { ...magnets, cover: 0.4 } })).rejects.toMatchObject({ code: 'magnet' });
    await expect(cut(cube(20), { magnets: { ...magnets, diameter: 14 } })).rejects.toMatchObject({ code: 'magnet' });
  });
});

describe('impossible halves', () => {
  it('of a plane that misses the crystal say how far it reaches', async () => {
    for (const offset of [30, 31, -500])
      await expect(cut(cube(), { plane: { normal: [1, 0, 0], offset } })).rejects.toMatchObject({
        code: 'plane',
        message: expect.stringMatching(/misses the crystal, which reaches from -30 mm to 30 mm/),
      });
  });

  it('of dowels that are too long say which length fits', async () => {
    const plane = { normal: [0, 0, 1] as const, offset: 0 };
    await expect(cut(cube(), { plane, dowel: { ...dowel, length: 70 } })).rejects.toMatchObject({
      code: 'dowel',
      hint: expect.stringMatching(/dowels of 57\.\d+ mm/),
    });
    await expect(cut(cube(6))).rejects.toMatchObject({ code: 'dowel' });
  });
});
