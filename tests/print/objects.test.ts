import fc from 'fast-check';
import { afterAll, describe, expect, it } from 'vitest';
import { crystal, type Made, make } from '../../src/index.ts';
import { meshVolume } from '../../src/print/mesh.ts';
import { jobs } from '../../src/print/part.ts';
import type { RecipeInput } from '../../src/recipe/schema.ts';
import { ObjectError } from '../../src/shape/object-error.ts';
import { crystals, runs } from '../shape/random-crystals.ts';
import { FILES, KIND_NAMES, KINDS, type KindName, type Print, spreadMinerals } from './object-options.ts';

/** GONIOLITH_RUNS makes all presets in all ways; a usual run sixty of them, each kind of object once. */
const long = process.env.GONIOLITH_RUNS !== undefined;
const MINERALS = spreadMinerals(long ? 1000 : 60);
const SIZES = [60, 65, 70, 75, 80];
/** Shares of objects that may be refused. Random crystals are often splinters; minerals are not. */
const REFUSED = { presets: 0.03, random: 0.4 };

/** Refusals as they were met, for the shares. */
const tally = () => ({ made: 0, refused: [] as string[] });
type Tally = ReturnType<typeof tally>;
const presets = tally();
const random = tally();

/** Null when the crystal cannot be this object for one of the reasons that its kind has. */
async function madeOrRefused(recipe: RecipeInput, kind: KindName, count: Tally): Promise<Made | null> {
  try {
    const made = await make(recipe);
    count.made++;
    return made;
  } catch (error) {
    if (!(error instanceof ObjectError)) throw error;
    expect(KINDS[kind].refusals, `${JSON.stringify(recipe)}: ${error.message}`).toContain(error.code);
    expect(error.message).toMatch(/\w+ \w+ .*\w$|\)$/);
    expect(error.hint).toMatch(/^[\w`"].*\w+ \w+/);
    count.refused.push(`${kind}: ${error.code}`);
    return null;
  }
}

const ideal = ({ shape, millimetresPerUnit }: Made): number => shape.measures.volume * millimetresPerUnit ** 3;

/** mm³ of all copies of the parts whose name the pattern fits. */
const volumeOf = ({ parts }: Made, name: RegExp): number =>
  parts
    .filter((part) => name.test(part.name))
    .reduce((sum, { mesh, placed }) => sum + placed.length * meshVolume(mesh), 0);

/** How much of the ideal crystal its own parts may fill: at least, and less than. From what each kind takes or adds. */
const SHARE: Readonly<Record<KindName, readonly [number, number]>> = {
  hollow: [0.1, 1],
  frame: [0.005, 1],
  // Holes for dowels, and pockets for magnets.
  halves: [0.9, 1 + 1e-6],
  // Gaps; a crystal of one form has one sector, of point group 1 one unit, whole.
  sectors: [0.7, 1 + 1e-6],
  units: [0.6, 1 + 1e-6],
  // Letters 0.6 mm deep or high; rods.
  letters: [0.9, 1.25],
  blunt: [0.9, 1.0001],
  stand: [0.9, 1.25],
  axes: [0.6, 1.25],
  bores: [0.6, 1],
  planes: [0.9, 1.25],
  skins: [1 - 1e-6, 1 + 1e-6],
  key: [0.6, 1.25],
  base: [0.9, 1],
};

const CRYSTAL = /^(body|half|sector|unit|core|skin|mirror-planes|face-letters)/;

function expectPlausible(made: Made, kind: KindName, { files = ['stl'] }: Print, strict: boolean): void {
  const [least, most] = SHARE[kind];
  const share = volumeOf(made, CRYSTAL) / ideal(made);
  if (strict) expect(share).toBeGreaterThan(least);
  if (strict || kind === 'hollow' || kind === 'sectors' || kind === 'units') expect(share).toBeLessThan(most);
  for (const { mesh, placed } of made.parts) {
    expect(meshVolume(mesh)).toBeGreaterThan(0);
    // Copies are the part elsewhere, perhaps turned.
    for (const copy of placed) expect(Math.abs(meshVolume(copy) / meshVolume(mesh) - 1)).toBeLessThan(1e-6);
  }
  // What is printed in one job with another part keeps its height there.
  for (const job of jobs(made.parts))
    expect(Math.abs(Math.min(...job.map(({ mesh }) => leastHeight(mesh.positions))))).toBeLessThan(1e-6);
  for (const { checks } of made.files) for (const check of checks) expect(check.problems).toEqual([]);
  const all = volumeOf(made, /./);
  const read = (ending: string): number =>
    made.files
      .filter(({ name }) => name.endsWith(ending))
      .reduce((sum, { checks, copies }) => sum + copies * checks.reduce((own, { volume }) => own + volume, 0), 0);
  // Where there is an STL of the whole, everything is there twice.
  if (files.includes('stl')) expect([1, 2].some((times) => Math.abs(read('.stl') / all / times - 1) < 1e-4)).toBe(true);
  for (const ending of ['3mf', 'glb'] as const)
    if (files.includes(ending)) expect(Math.abs(read(`.${ending}`) / all - 1)).toBeLessThan(1e-4);
}

function leastHeight(positions: Float64Array): number {
  let low = Number.POSITIVE_INFINITY;
  for (let at = 2; at < positions.length; at += 3) low = Math.min(low, positions[at]!);
  return low;
}

describe('objects of presets', () => {
  it('come from all seven crystal systems', () => {
    expect(new Set(MINERALS.map((mineral) => crystal(mineral).group.system)).size).toBe(7);
    expect(MINERALS.length).toBeGreaterThanOrEqual(60);
  });

  it.each(KIND_NAMES)(
    '%s: is made of every one, sound and of plausible volume, or refused with a reason',
    async (kind) => {
      const { variants } = KINDS[kind];
      for (const [i, mineral] of MINERALS.entries())
        for (const [v, variant] of variants.entries()) {
          if (!long && v !== i % variants.length) continue;
          const print: Print = { size: SIZES[i % SIZES.length]!, files: [...FILES[i % FILES.length]!], ...variant };
          const made = await madeOrRefused({ mineral, print }, kind, presets);
          if (made) expectPlausible(made, kind, print, true);
        }
    },
    long ? 1_200_000 : 120_000,
  );

  it('are refused seldom', () => {
    const { made, refused } = presets;
    expect(made + refused.length).toBeGreaterThanOrEqual(MINERALS.length * KIND_NAMES.length);
    expect(refused.length / (made + refused.length), refused.join('; ')).toBeLessThan(REFUSED.presets);
  });

  it.each(KIND_NAMES)('%s: has the same bytes each time', async (kind) => {
    for (const mineral of ['orthoclase', 'quartz']) {
      const recipe: RecipeInput = { mineral, print: { files: ['stl', '3mf', 'glb'], ...KINDS[kind].variants.at(-1) } };
      const [one, two] = [await make(recipe), await make(recipe)];
      expect(one.files.map(({ name }) => name)).toEqual(two.files.map(({ name }) => name));
      one.files.forEach(({ bytes }, i) => {
        expect(Buffer.compare(bytes, two.files[i]!.bytes)).toBe(0);
      });
    }
  });
});

describe('numbers of pieces', () => {
  it.each(['quartz', 'gypsum', 'albite', 'cassiterite', 'topaz', 'pyrite'])(
    '%s: as many congruent units as the group has operations, one sector a face',
    async (mineral) => {
      const units = await make({ mineral, print: { size: 80, body: 'units' } });
      const { order } = units.shape.crystal.group;
      const pieces = units.parts.filter(({ name }) => name.startsWith('unit'));
      expect(pieces.reduce((sum, { placed }) => sum + placed.length, 0)).toBe(order);
      const [first, ...others] = pieces.map(({ mesh }) => meshVolume(mesh));
      // Left- and right-handed pieces are mirror images, of one volume.
      for (const other of others) expect(Math.abs(other / first! - 1)).toBeLessThan(1e-6);
      const sectors = await make({ mineral, print: { size: 80, body: 'sectors' } });
      expect(sectors.parts).toHaveLength(sectors.shape.measures.faces.length);
    },
  );
});

describe('objects of random crystals', () => {
  const chosen = fc.constantFrom(
    ...KIND_NAMES.flatMap((kind) =>
      KINDS[kind].variants.map((variant): { kind: KindName; variant: Print } => ({ kind, variant })),
    ),
  );

  it('are made, sound, or refused with a reason', async () => {
    await fc.assert(
      fc.asyncProperty(
        crystals,
        chosen,
        fc.constantFrom(...SIZES),
        fc.constantFrom(...FILES),
        async (recipe, { kind, variant }, size, files) => {
          const print: Print = { size, files: [...files], ...variant };
          const made = await madeOrRefused({ ...recipe, print }, kind, random);
          if (made) expectPlausible(made, kind, print, false);
        },
      ),
      { numRuns: Math.min(runs(60), 300), endOnFailure: true },
    );
    const { made, refused } = random;
    expect(refused.length / (made + refused.length), refused.join('; ')).toBeLessThan(REFUSED.random);
  }, 600_000);

  afterAll(() => {
    if (long) console.log(`Refused of presets: ${counted(presets)}\nRefused of random crystals: ${counted(random)}`);
  });
});

/** "3 of 540 (halves: dowel 2, units: gap 1)". */
function counted({ made, refused }: Tally): string {
  const kinds = [...new Set(refused)].sort();
  const each = kinds.map((kind) => `${kind} ${refused.filter((other) => other === kind).length}`);
  return `${refused.length} of ${made + refused.length} (${each.join(', ')})`;
}
