import { describe, expect, it } from 'vitest';
import { insetPiece, pieceVolume } from '../../../src/print/bodies/cut-piece.ts';
import { largestInset } from '../../../src/print/bodies/hollow.ts';
import { type Mesh, meshVolume } from '../../../src/print/mesh.ts';
import type { Part } from '../../../src/print/part.ts';
import { colouredSkins } from '../../../src/print/skins/skins.ts';
import { crystalSurfaces } from '../../../src/print/surfaces.ts';
import { facePlanes } from '../../../src/shape/face-planes.ts';
import { clean, cube, kit, minerals, randomSamples, type Sample, sample } from '../bodies/samples.ts';

const skins = ({ shape, scale }: Sample, depth: number) => colouredSkins(shape, scale, { depth });
const volumeOf = ({ placed }: Part): number => meshVolume(placed[0]!);

/** Triangles by their corners' coordinates, least first, in both senses of going round. */
function triangleKeys({ positions, triangles }: Mesh): { key: string; back: string }[] {
  const corner = (v: number): string => positions.subarray(3 * v, 3 * v + 3).join(' ');
  const from = (all: readonly string[]): string => {
    const least = all.indexOf([...all].sort()[0]!);
    return [...all.slice(least), ...all.slice(0, least)].join('|');
  };
  return Array.from({ length: triangles.length / 3 }, (_, t) => {
    const corners = Array.from(triangles.subarray(3 * t, 3 * t + 3), corner);
    return { key: from(corners), back: from(corners.toReversed()) };
  });
}

/** How deep a point lies under the face that it is nearest to, and under all: how many are as near. */
function depthAt({ shape, scale }: Sample, point: readonly number[]): { depth: number; nearest: number } {
  const depths = facePlanes(shape, scale).map(
    ({ normal: [x, y, z], distance }) => distance - x * point[0]! - y * point[1]! - z * point[2]!,
  );
  const depth = Math.min(...depths);
  return { depth, nearest: depths.filter((one) => one - depth < 1e-3).length };
}

describe('form-coloured skins', () => {
  it('and their core are clean, share whole faces and fill every crystal', () => {
    for (const one of [...minerals().map((name) => sample(name)), ...randomSamples(30)])
      for (const depth of [0.8, 0.4 * largestInset(one.shape, one.scale)]) {
        const { parts } = skins(one, depth);
        for (const part of parts) clean(part.placed[0]!, `${one.name} ${part.name}`);
        const sum = parts.reduce((all, part) => all + volumeOf(part), 0);
        expect(Math.abs(sum / (one.shape.measures.volume * one.scale ** 3) - 1), one.name).toBeLessThan(1e-9);
        const core = pieceVolume(insetPiece(one.shape, one.scale, depth)!);
        expect(Math.abs(volumeOf(parts[0]!) / core - 1), one.name).toBeLessThan(1e-9);
        expect(new Set(parts.map(({ name }) => name)).size, one.name).toBe(parts.length);
      }
  });

  it('meet only in faces that both have, triangle by triangle, and elsewhere lie on the surface', () => {
    for (const one of ['quartz', 'fluorite', 'orthoclase', 'axinite-fe', 'pyrite'].map((name) => sample(name))) {
      const all = skins(one, 2).parts.flatMap(({ placed }) => triangleKeys(placed[0]!));
      const keys = new Set(all.map(({ key }) => key));
      expect(keys.size).toBe(all.length);
      for (const { key, back } of all) {
        if (keys.has(back)) continue;
        const corners = key.split('|').map((corner) => corner.split(' ').map(Number));
        for (const corner of corners) expect(Math.abs(depthAt(one, corner).depth)).toBeLessThan(1e-6);
      }
    }
  });

  it('are as deep as asked: corners within lie at the depth, or where at least four faces are as near', () => {
    for (const one of ['quartz', 'almandine', 'epidote', 'beryl'].map((name) => sample(name)))
      for (const { placed } of skins(one, 3).parts)
        for (let v = 0; v < placed[0]!.positions.length; v += 3) {
          const { depth, nearest } = depthAt(one, [...placed[0]!.positions.subarray(v, v + 3)]);
          const onSurface = Math.abs(depth) < 1e-6;
          const onCore = Math.abs(depth - 3) < 1e-6;
          expect(onSurface || onCore || (depth > 0 && depth < 3 && nearest >= 4)).toBe(true);
        }
  });

  it('of a cube are one closed shell about a smaller cube', () => {
    const { parts } = skins(cube(60), 2);
    expect(parts.map(({ name }) => name)).toEqual(['core', 'skin-100']);
    expect(parts.map(volumeOf).map((volume) => Number(volume.toFixed(6)))).toEqual([56 ** 3, 60 ** 3 - 56 ** 3]);
    expect(clean(parts[1]!.placed[0]!, 'shell').bodies.map(({ kind }) => kind)).toEqual(['solid', 'cavity']);
  });

  it('have the colours of their forms, lie in one place, and touch without overlap', async () => {
    const one = sample('quartz');
    const { parts } = skins(one, 1.2);
    const colours = crystalSurfaces(one.shape.crystal, '').map(({ colour }) => colour);
    for (const part of parts.slice(1)) expect(colours).toContain(part.surfaces[0]!.colour);
    const low = parts.map(({ mesh }) => mesh.positions.reduce((least, value) => Math.min(least, value), Infinity));
    expect(Math.min(...low)).toBeCloseTo(0, 9);
    const sum = parts.reduce((all, { mesh }) => all + meshVolume(mesh), 0);
    expect(sum / (one.shape.measures.volume * one.scale ** 3)).toBeCloseTo(1, 9);
    const { solid } = await kit();
    const solids = parts.map(({ placed }) => solid(placed[0]!));
    for (const [i, a] of solids.entries())
      for (const b of solids.slice(i + 1)) expect(Math.abs(a.intersect(b).volume())).toBeLessThan(1e-3);
  });

  it('that touch themselves in a point only come in several bodies, and this is told', () => {
    const cuboctahedron = sample({
      pointGroup: 'm-3m',
      forms: [
        { face: '100', distance: 1 },
        { face: '111', distance: 1.1547005383792517 },
      ],
    });
    const { parts, remarks } = skins(cuboctahedron, 1.2);
    // x = y = 1 − t meets x + y + z = 2 − √3·t at z = (2 − √3)·t: cube faces, moved in, meet in edges (by hand).
    expect(parts).toHaveLength(1 + 1 + 8);
    expect(remarks.join()).toMatch(/The skin of \{111\} comes in several bodies/);
  });

  it('run together under faces too small for the depth, and this is told', () => {
    const bevelled = sample({
      pointGroup: 'm-3m',
      forms: [
        { face: '100', distance: 1 },
        { face: '110', distance: 1.4 },
      ],
    });
    const { parts, remarks } = skins(bevelled, 6);
    expect(remarks.join()).toMatch(/run together under/);
    for (const part of parts) clean(part.placed[0]!, part.name);
  });

  it('that leave no core are refused with the largest depth', () => {
    expect(() => skins(cube(60), 31)).toThrow(/half the crystal's thinnest part is 30 mm/);
    expect(() => skins(cube(60), 0)).toThrow(/is none/);
    expect(() => skins(cube(60), Number.NaN)).toThrow(/is none/);
  });
});
