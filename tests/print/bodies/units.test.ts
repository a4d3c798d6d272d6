import { describe, expect, it } from 'vitest';
import { asymmetricUnits, type UnitsPlan } from '../../../src/print/bodies/units.ts';
import { meshVolume } from '../../../src/print/mesh.ts';
import { clean, cube, kit, made, minerals, randomSamples, type Sample, sample } from './samples.ts';

const units = ({ shape, scale }: Sample, plan: UnitsPlan) =>
  made((bench) => asymmetricUnits(bench, shape, scale, plan));
const pins = { diameter: 3, length: 8, clearance: 0.2, wall: 1.2 };

describe('asymmetric units', () => {
  it('are as many as the group has operations, congruent, and fill the crystal', async () => {
    for (const one of [...minerals().map((name) => sample(name)), ...randomSamples(100)]) {
      const { group } = one.shape.crystal;
      const { parts } = await units(one, { gap: 0, pins: null });
      const placed = parts.flatMap((part) => part.placed);
      expect(placed).toHaveLength(group.order);
      // Definition of the asymmetric unit: its images fill space once.
      const share = (one.shape.measures.volume * one.scale ** 3) / group.order;
      for (const mesh of placed) expect(Math.abs(meshVolume(mesh) / share - 1), one.name).toBeLessThan(1e-6);
      expect(parts.map(({ name }) => name)).toEqual(group.chiral ? ['unit'] : ['unit-right', 'unit-left']);
      for (const part of parts) {
        clean(part.mesh, `${one.name} ${part.name}`);
        clean(part.placed.at(-1)!, `${one.name} ${part.name}`);
      }
    }
  });

  it('with pins are sound, for every preset', async () => {
    for (const name of minerals())
      for (const part of (await units(sample(name), { gap: 0.2, pins })).parts)
        clean(part.mesh, `${name} ${part.name}`);
  });

  it.each(['quartz', 'orthoclase', 'calcite', 'axinite-fe', 'fluorite'])(
    'of %s keep their gap, and their pins fit with the clearance',
    async (name) => {
      const { solid } = await kit();
      const { parts, remarks } = await units(sample(name), { gap: 0.3, pins });
      const pieces = parts.filter((part) => part.name !== 'pin').flatMap(({ placed }) => placed.map(solid));
      const placedPins = parts.filter((part) => part.name === 'pin').flatMap(({ placed }) => placed.map(solid));
      const first = pieces[0]!;
      const gaps = pieces.slice(1).map((other) => first.minGap(other, 2));
      expect(Math.min(...gaps)).toBeCloseTo(0.3, 3);
      expect(placedPins.length).toBeGreaterThan(0);
      expect(remarks.join()).toContain(`${placedPins.length} pin`);
      for (const pin of placedPins) {
        const around = pieces.map((piece) => piece.minGap(pin, 2));
        expect(Math.min(...around)).toBeGreaterThan(pins.clearance / 2 - 1e-4);
        expect(
          around.filter((gap) => gap < pins.clearance / 2 + 0.03),
          'a pin is held by two pieces',
        ).toHaveLength(2);
        for (const piece of pieces) expect(piece.intersect(pin).volume()).toBe(0);
      }
    },
  );

  it('of a cube are the 48 pieces between its mirror planes (by hand: corner, edge, face and body centre)', async () => {
    const { parts } = await units(cube(), { gap: 0, pins: null });
    expect(parts.map(({ placed }) => placed.length)).toEqual([24, 24]);
    const [mesh] = parts[0]!.placed;
    const corners = Array.from({ length: mesh!.positions.length / 3 }, (_, v) =>
      Math.hypot(...mesh!.positions.subarray(3 * v, 3 * v + 3)),
    ).sort((a, b) => a - b);
    const expected = [0, 30, 30 * Math.SQRT2, 30 * Math.sqrt(3)];
    expect(corners).toEqual(expected.map((length) => expect.closeTo(length, 5)));
  });

  it('follow the direction that is asked for', async () => {
    const direction = [0.2, 0.5, 0.8] as const;
    const { parts } = await units(sample('quartz'), { direction, gap: 0, pins: null });
    const { positions } = parts[0]!.placed[0]!;
    const middle = [0, 1, 2].map((axis) => positions.filter((_, i) => i % 3 === axis).reduce((a, b) => a + b, 0));
    expect(middle.reduce((sum, value, i) => sum + value * direction[i]!, 0)).toBeGreaterThan(0);
  });

  it('are refused for a special direction, and for a gap that leaves nothing', async () => {
    await expect(units(cube(), { direction: [1, 1, 0], gap: 0, pins: null })).rejects.toMatchObject({
      code: 'direction',
    });
    await expect(units(cube(), { gap: 50, pins: null })).rejects.toMatchObject({ code: 'gap' });
    await expect(units(cube(), { gap: -1, pins: null })).rejects.toMatchObject({ code: 'gap' });
  });

  it('of small crystals go without pins, and say so', async () => {
    const { remarks, parts } = await units(cube(10), { gap: 0, pins });
    expect(remarks.join()).toMatch(/no room for pins/);
    expect(parts).toHaveLength(2);
  });
});
