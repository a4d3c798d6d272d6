import { describe, expect, it } from 'vitest';
import { crystalMesh } from '../../../src/print/body.ts';
import { clearDepth } from '../../../src/print/bores/clear-depth.ts';
import { type BoreEnd, boreRadius, type MetalPlan } from '../../../src/print/bores/metal-plan.ts';
import { boreForMetal } from '../../../src/print/bores/metal-rods.ts';
import { mouthOf } from '../../../src/print/bores/mouth.ts';
import { type Workbench, withSolids } from '../../../src/print/kit.ts';
import { mirrorLines } from '../../../src/print/planes/mirror-lines.ts';
import { boreOutline, rodOutline, toEnd } from '../../../src/print/rods/solid.ts';
import { axisLines } from '../../../src/rods/axis-ends.ts';
import { facePlanes } from '../../../src/shape/face-planes.ts';
import { ObjectError } from '../../../src/shape/object-error.ts';
import { clean, cube, minerals, randomSamples, type Sample, sample } from '../bodies/samples.ts';

type Asked = Partial<MetalPlan> & { readonly orders?: readonly number[] };

const planFor = ({ shape }: Sample, { orders, ...asked }: Asked): MetalPlan => ({
  lines: axisLines(shape.crystal, { orders: orders ?? null, directions: null }),
  diameter: 3,
  fit: 'slide',
  clearance: { press: 0.1, slide: 0.3 },
  depth: 'through',
  wall: 1.2,
  reach: 12,
  ...asked,
});

const bored = <T>(one: Sample, asked: Asked, look: (done: ReturnType<typeof boreForMetal>, bench: Workbench) => T) =>
  withSolids((bench) =>
    look(
      boreForMetal(bench, bench.solid(crystalMesh(one.shape, one.scale)), one.shape, one.scale, planFor(one, asked)),
      bench,
    ),
  );

/** The result, or null where the rods do not fit and this is said in the right words. */
async function boredOrNull<T>(one: Sample, asked: Asked, look: Parameters<typeof bored<T>>[2]): Promise<T | null> {
  try {
    return await bored(one, asked, look);
  } catch (error) {
    if (!(error instanceof ObjectError)) throw error;
    expect(['rod-too-wide', 'rods-crowded']).toContain(error.code);
    return null;
  }
}

/** Bores as solids by themselves, `to` far out. */
function tools(bench: Workbench, bores: readonly BoreEnd[], plan: MetalPlan) {
  const outline = boreOutline(plan.diameter, plan.clearance[plan.fit]);
  return bores.map((bore) => ({
    bore,
    solid: bench.place(bench.prism([outline], bore.from, bore.mouth.exit), toEnd(bore.end)),
  }));
}

describe('bores for metal rod', () => {
  it('in every crystal are clean and keep the wall from each other', async () => {
    let fitting = 0;
    for (const one of [
      ...minerals()
        .slice(0, 46)
        .map((name) => sample(name)),
      ...randomSamples(20),
    ])
      await boredOrNull(one, {}, ({ body, bores }, bench) => {
        if (bores.length === 0) return;
        fitting++;
        clean(bench.mesh(body, one.shape.crystal.forms.length), one.name);
        expect(body.decompose(), one.name).toHaveLength(1);
        const all = tools(bench, bores, planFor(one, {}));
        for (const [i, a] of all.entries())
          for (const b of all.slice(i + 1))
            if (a.bore.line !== b.bore.line)
              expect(a.solid.minGap(b.solid, 3), `${one.name}`).toBeGreaterThan(1.2 - 1e-4);
      });
    expect(fitting).toBeGreaterThan(40);
  }, 60_000);

  it.each(['press', 'slide'] as const)('for a %s fit leave the clearance round the rod', async (fit) => {
    for (const name of ['quartz', 'fluorite', 'almandine']) {
      const one = sample(name);
      const plan = planFor(one, { fit });
      await bored(one, { fit }, ({ body, bores }, bench) => {
        for (const { from, end, mouth, through } of bores) {
          const start = through ? -mouth.exit : from + 0.5;
          const rod = bench.place(bench.prism([rodOutline(3)], start, mouth.exit + 12), toEnd(end));
          const gap = body.minGap(rod, 2);
          // Bore and rod are polygons with sides that face each other; the rod's lie up to 0.03 mm inside its circle.
          expect(gap, name).toBeGreaterThan(plan.clearance[fit] / 2 - 1e-4);
          expect(gap, name).toBeLessThan(plan.clearance[fit] / 2 + 0.03);
        }
      });
    }
  });

  it('take away a prism each, where they leave through faces', async () => {
    // A 60 mm cube, one 4-fold axis: a straight bore of 60 mm; blind from both ends: two of 15 mm (by hand).
    const one = cube(60);
    const lines = planFor(one, { orders: [4] }).lines.slice(0, 1);
    const section = (() => {
      const outline = boreOutline(3, 0.3);
      return (outline.length / 2) * boreRadius(planFor(one, {})) ** 2 * Math.sin((2 * Math.PI) / outline.length);
    })();
    const through = await bored(one, { lines }, ({ body, rods }) => ({ left: body.volume(), rods }));
    expect((60 ** 3 - through.left) / (section * 60)).toBeCloseTo(1, 4);
    expect(through.rods).toEqual([{ symbol: '4/m', diameter: 3, length: 84, count: 1 }]);
    const blind = await bored(one, { lines, depth: { blind: 15 } }, ({ body, rods }) => ({
      left: body.volume(),
      rods,
    }));
    expect((60 ** 3 - blind.left) / (section * 30)).toBeCloseTo(1, 4);
    expect(blind.rods).toEqual([{ symbol: '4/m', diameter: 3, length: 27, count: 2 }]);
  });

  it('of one axis, asked to be deeper than the middle, leave a wall there and say so', async () => {
    const one = cube(60);
    const lines = planFor(one, { orders: [4] }).lines.slice(0, 1);
    await bored(one, { lines, depth: { blind: 45 } }, ({ bores, remarks }) => {
      expect(bores.map(({ from }) => from)).toEqual([expect.closeTo(0.6, 9), expect.closeTo(0.6, 9)]);
      expect(remarks.join()).toMatch(/end before the 45 mm asked for/);
    });
  });

  it('tell where rods stand in corners and edges, and what to cut', async () => {
    await bored(cube(60), {}, ({ bores, remarks, rods }) => {
      const all = remarks.join('\n');
      expect(bores.map(({ mouth }) => mouth.through).filter((place) => place === 'corner')).toHaveLength(8);
      expect(bores.map(({ mouth }) => mouth.through).filter((place) => place === 'edge')).toHaveLength(12);
      expect(all).toMatch(/Bores at 12 ends of 2-fold axes leave through an edge/);
      expect(all).toMatch(/leave through a corner/);
      expect(all).toMatch(/passes through the centre; those of the other 12 axes are blind/);
      expect(all).toMatch(/to cut: 1 of 84 mm \(4-fold\)/);
      expect(rods.map(({ count }) => count)).toEqual([1, 4, 8, 12]);
    });
  });

  it('tell when a mouth breaks out over an edge of its face, and when its rim is thin', async () => {
    const corner = (distance: number): Sample =>
      sample({
        pointGroup: 'm-3m',
        forms: [
          { face: '100', distance: 1 },
          { face: '111', distance },
        ],
      });
    // The triangle {111} at d cuts its corner (√3 − d) deep; its inscribed radius is (√3 − d)/√2 (by hand).
    const inscribed = (distance: number): number => ((Math.sqrt(3) - distance) / Math.SQRT2) * 30;
    for (const [distance, words] of [
      [1.68, /break out over its edges/],
      [1.62, /the rim there is thin/],
    ] as const) {
      await bored(corner(distance), { orders: [3] }, ({ bores, remarks }) => {
        expect(bores[0]!.mouth.room).toBeCloseTo(inscribed(distance), 6);
        expect(remarks.join()).toMatch(words);
      });
    }
    await bored(corner(1.5), { orders: [3] }, ({ remarks }) => {
      expect(remarks.join()).not.toMatch(/edge/);
    });
  });

  it('have a mouth whose room is what a ring about the axis can have before it meets a second face', () => {
    for (const one of [
      ...minerals()
        .slice(0, 20)
        .map((name) => sample(name)),
      ...randomSamples(20),
    ]) {
      const planes = facePlanes(one.shape, one.scale);
      for (const { ends } of planFor(one, {}).lines)
        for (const end of ends) {
          const { room, through, exit } = mouthOf(planes, end.along);
          if (through !== 'face' || room === Number.POSITIVE_INFINITY) continue;
          const [ax, ay, az] = end.along;
          const [bx, by, bz] = end.across;
          const side = [ay * bz - az * by, az * bx - ax * bz, ax * by - ay * bx];
          const firstAt = (angle: number, radius: number): number => {
            const [c, s] = [radius * Math.cos(angle), radius * Math.sin(angle)];
            const start = [c * bx + s * side[0]!, c * by + s * side[1]!, c * bz + s * side[2]!];
            const exits = planes.map(({ normal: [x, y, z], distance }) => {
              const cos = x * ax + y * ay + z * az;
              const at = distance - x * start[0]! - y * start[1]! - z * start[2]!;
              return cos > 1e-9 ? at / cos : Number.POSITIVE_INFINITY;
            });
            return exits.indexOf(Math.min(...exits));
          };
          const face = planes.findIndex(
            ({ normal: [x, y, z], distance }) => Math.abs(distance / (x * ax + y * ay + z * az) - exit) < 1e-9,
          );
          const ring = (radius: number): number[] =>
            Array.from({ length: 720 }, (_, i) => firstAt((i * Math.PI) / 360, radius));
          expect(ring(room * 0.999).every((first) => first === face)).toBe(true);
          expect(ring(room * 1.01).every((first) => first === face)).toBe(false);
        }
    }
  });

  it('pass through inlaid mirror planes and what fills them alike', async () => {
    const one = sample('fluorite');
    await withSolids((bench) => {
      const { shape, scale } = one;
      const plan = planFor(one, { orders: [4] });
      const body = bench.solid(crystalMesh(shape, scale));
      const lines = mirrorLines(bench, body, shape, scale, { relief: 'inlaid', width: 1.2, depth: 0.6 });
      const parts = [lines.solid, lines.inlay!].map((solid) => boreForMetal(bench, solid, shape, scale, plan).body);
      for (const part of parts) clean(bench.mesh(part, 9), 'bored');
      const whole = boreForMetal(bench, body, shape, scale, plan).body.volume();
      expect((parts[0]!.volume() + parts[1]!.volume()) / whole).toBeCloseTo(1, 6);
    });
  });

  it('that do not fit are refused with the room there is', async () => {
    const nothing = (): void => undefined;
    await expect(bored(cube(5), {}, nothing)).rejects.toThrow(/there is room for rod of 2\.3 mm/);
    await expect(bored(cube(9), {}, nothing)).rejects.toMatchObject({ code: 'rods-crowded' });
    await expect(bored(cube(), { diameter: 0 }, nothing)).rejects.toMatchObject({ code: 'rod-too-wide' });
    await expect(bored(cube(), { depth: { blind: -1 } }, nothing)).rejects.toThrow(/depth of bores of -1 mm/);
    await expect(bored(cube(), { depth: { blind: 5 } }, nothing)).rejects.toThrow(/5\.0 mm deep; 3 mm rod needs 6 mm/);
    const none = await bored(sample('axinite-fe'), {}, ({ remarks, rods }) => ({ remarks, rods }));
    expect(none.rods).toEqual([]);
    expect(none.remarks.join()).toMatch(/no symmetry axes/);
  });
});

describe('the depth at which blind bores are clear of others', () => {
  it('follows from the right-angled cases', () => {
    // At 90° two bores of radius 2 stop where (s − 2)/√2 is half the wall; beside a through bore at 2 + wall (by hand).
    const angle = Math.PI / 2;
    expect(clearDepth([{ angle, through: false }], 2, 1)).toBeCloseTo(2 + Math.SQRT2 / 2, 12);
    expect(clearDepth([{ angle, through: true }], 2, 1)).toBeCloseTo(3, 12);
    expect(clearDepth([{ angle: Math.PI, through: false }], 2, 1)).toBeCloseTo(0.5, 12);
    expect(clearDepth([], 2, 1)).toBe(0);
  });
});
