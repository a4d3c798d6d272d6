import load from 'manifold-3d';
import { beforeAll, describe, expect, it } from 'vitest';
import { make } from '../../src/index.ts';
import type { Mesh } from '../../src/print/mesh.ts';
import type { RecipeInput } from '../../src/recipe/schema.ts';
import { millimetresPerUnit } from '../../src/shape/scale.ts';
import { type ClosedShape, isClosed, polyhedron } from '../../src/shape/shape.ts';

const cuboctahedron: RecipeInput = {
  pointGroup: 'm-3m',
  forms: [
    { face: '100', distance: 1 },
    { face: '111', distance: 1.1547005383792517 },
  ],
};
const quartz: RecipeInput = { mineral: 'quartz' };
const printed = (recipe: RecipeInput, print: RecipeInput['print']): RecipeInput => ({
  ...recipe,
  print: { ...recipe.print, ...print },
});

type Kit = Awaited<ReturnType<typeof load>>;
let kit: Kit;
beforeAll(async () => {
  kit = await load();
  kit.setup();
});

const solid = ({ positions, triangles }: Mesh) =>
  new kit.Manifold(new kit.Mesh({ numProp: 3, vertProperties: Float32Array.from(positions), triVerts: triangles }));

const extents = (mesh: Mesh): number[] =>
  [0, 1, 2].map((axis) => {
    const values = mesh.positions.filter((_, i) => i % 3 === axis);
    return values.reduce((a, b) => Math.max(a, b)) - values.reduce((a, b) => Math.min(a, b));
  });

describe('fused rods', () => {
  it('make one body that reaches as far out as asked', async () => {
    const { parts, files } = await make(printed(cuboctahedron, { size: 60, axes: { orders: [4], reach: 15 } }));
    expect(parts).toHaveLength(1);
    expect(files[0]!.checks[0]!.bodies).toHaveLength(1);
    for (const extent of extents(parts[0]!.mesh)) expect(extent).toBeCloseTo(60 + 2 * 15, 3);
  });

  it('add to the crystal what stands out of it', async () => {
    const size = 60;
    const bare = await make(printed(cuboctahedron, { size }));
    const rodded = await make(printed(cuboctahedron, { size, axes: { orders: [4], diameter: 4, reach: 20 } }));
    const added = rodded.files[0]!.checks[0]!.volume - bare.files[0]!.checks[0]!.volume;
    // Six shafts of 16 mm with 24 sides, inscribed in 4 mm circles, and six square plates 4 mm thick with the hollow of 4/m.
    const ring = (sides: number, radius: number): number => (sides / 2) * radius ** 2 * Math.sin((2 * Math.PI) / sides);
    const plate = 2 * (2.5 * 4) ** 2 * 4 - ring(24, 0.95 * 4) * 0.4 * 4;
    expect(added / (6 * (ring(24, 2) * 16 + plate))).toBeCloseTo(1, 4);
  });

  it('that would miss a face’s slope stand farther out, and the report says so', async () => {
    const { remarks } = await make(printed(quartz, { axes: { orders: [2] } }));
    expect(remarks.join(' ')).not.toMatch(/stand out up to/);
    const flat: RecipeInput = {
      pointGroup: 'm-3m',
      forms: [{ face: '111', distance: 1 }],
      print: { axes: { orders: [3], reach: 3.2 } },
    };
    expect((await make(flat)).remarks.join(' ')).toMatch(/instead of 3.2 mm/);
  });
});

describe('separate rods', () => {
  const cases: [string, RecipeInput][] = [
    ['quartz', printed(quartz, { axes: { fit: 'separate' } })],
    ['a cuboctahedron with all 13 axes', printed(cuboctahedron, { axes: { fit: 'separate' } })],
    ['one axis only', printed(cuboctahedron, { axes: { fit: 'separate', directions: ['[111]'] } })],
    [
      'a resin print',
      printed(cuboctahedron, { printer: 'sla', axes: { fit: 'separate', orders: [4, 3], diameter: 2 } }),
    ],
  ];

  it.each(cases)(
    'of %s touch neither the body nor each other, with the profile’s clearance around each',
    async (_, recipe) => {
      const { parts } = await make(recipe);
      const clearance = recipe.print?.printer === 'sla' ? 0.1 : 0.2;
      const placed = parts.flatMap((part) => part.placed.map((mesh) => ({ name: part.name, solid: solid(mesh) })));
      const [body, ...rods] = placed;
      expect(body!.name).toBe('body');
      for (const rod of rods) {
        expect(body!.solid.intersect(rod.solid).volume(), `${rod.name} in the body`).toBe(0);
        if (rod.name.startsWith('cap')) continue;
        const gap = body!.solid.minGap(rod.solid, 2);
        // Sides of rod and bore are parallel: their gap is half the clearance plus what the rod's sides lie inside its circle.
        expect(gap, rod.name).toBeGreaterThanOrEqual(clearance / 2 - 1e-4);
        expect(gap, rod.name).toBeLessThan(clearance / 2 + 0.03);
      }
      for (const [i, a] of rods.entries())
        for (const b of rods.slice(i + 1))
          expect(a.solid.intersect(b.solid).volume(), `${a.name} in ${b.name}`).toBe(0);
    },
  );

  it('say which rod passes through and which are split', async () => {
    const { remarks, parts } = await make(printed(quartz, { axes: { fit: 'separate' } }));
    expect(remarks.join('\n')).toMatch(/The 3-fold rod along \[001\] passes through the centre/);
    expect(remarks.join('\n')).toMatch(/Split at the centre.*2-fold along \[110\].*\[100\].*\[010\]/);
    expect(parts.map(({ name, placed }) => [name, placed.length])).toEqual([
      ['body', 1],
      ['rod-3-through', 1],
      ['cap-3', 1],
      ['rod-2', 6],
    ]);
  });
});

describe('a crystal too small for its rods', () => {
  it('is refused with the room there is', async () => {
    await expect(make(printed(cuboctahedron, { size: 3, axes: true }))).rejects.toThrow(
      /wider than the crystal, which leaves room for 2 mm/,
    );
  });

  it('is refused when separate rods leave nothing to hold them', async () => {
    await expect(make(printed(cuboctahedron, { size: 16, axes: { fit: 'separate' } }))).rejects.toThrow(
      /too little to hold/,
    );
  });
});

describe('the size', () => {
  const shapeOf = async (recipe: RecipeInput): Promise<ClosedShape> => (await make(recipe)).shape;

  /** The cube of distance 1 is 2 wide; its body diagonal 2√3, its face diagonal 2√2 (by hand). */
  it.each([
    [{ longest: 50 }, 25],
    [60, 30],
    ['6 cm', 30],
    [{ along: 'c', length: 50 }, 25],
    [{ along: '[111]', length: '100 mm' }, 100 / (2 * Math.sqrt(3))],
    ['100 mm along [110]', 100 / (2 * Math.SQRT2)],
    [{ between: '100', length: '2 in' }, 25.4],
    ['20 mm between 100', 10],
    [{ volume: 8000 }, 10],
    ['64 cm3', 20],
    [{ scale: 7 }, 7],
    ['scale 7', 7],
  ] as [NonNullable<RecipeInput['print']>['size'], number][])('%j gives %f mm a unit', async (size, scale) => {
    const cube: RecipeInput = { pointGroup: 'm-3m', forms: [{ face: '100', distance: 1 }], print: { size } };
    const made = await make(cube);
    expect(made.millimetresPerUnit).toBeCloseTo(scale, 10);
    expect(made.files[0]!.checks[0]!.volume).toBeCloseTo((2 * scale) ** 3, 1);
  });

  it('of rhombohedral and hexagonal axes is the same crystal', async () => {
    // Obverse relation: a_h = a_r − b_r, c_h = a_r + b_r + c_r; (100) of the one is (101) of the other (textbook).
    const alpha = 75;
    const cos = Math.cos((alpha * Math.PI) / 180);
    const a = Math.sqrt(2 - 2 * cos);
    const c = Math.sqrt(3 + 6 * cos);
    const one = await shapeOf({ pointGroup: '-3m', cell: { a: 1, alpha }, forms: [{ face: '100', distance: 1 }] });
    const two = await shapeOf({ pointGroup: '-3m', cell: { a, c }, forms: [{ face: '10-11', distance: 1 }] });
    expect(one.measures.volume).toBeCloseTo(two.measures.volume, 10);
    const size = { kind: 'scale', millimetresPerUnit: 1 } as const;
    expect([one, two].map((shape) => isClosed(shape) && millimetresPerUnit(shape, size))).toEqual([1, 1]);
    for (let i = 0; i < 3; i++) expect(one.measures.high[i]).toBeCloseTo(two.measures.high[i]!, 10);
    expect(polyhedron(one.crystal).openAlong).toEqual([]);
  });
});
