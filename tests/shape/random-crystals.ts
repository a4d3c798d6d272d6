import fc from 'fast-check';
import type { Axes } from '../../src/crystal/setting.ts';
import { SETTINGS } from '../../src/crystal/setting.ts';
import type { RecipeInput } from '../../src/recipe/schema.ts';

/** Cases a property runs through; a longer run: GONIOLITH_RUNS=20000 npm test. */
export const runs = (usual: number): number => Number(process.env.GONIOLITH_RUNS ?? usual);

const edge = fc.integer({ min: 300, max: 1500 }).map((n) => n / 100);
const angle = fc.integer({ min: 75, max: 115 });

/** Free parameters of a cell on these axes; the rest follows. */
function cellOn(axes: Axes): fc.Arbitrary<NonNullable<RecipeInput['cell']>> {
  switch (axes) {
    case 'triclinic':
      return fc.record({ a: edge, b: edge, c: edge, alpha: angle, beta: angle, gamma: angle });
    case 'monoclinic-b':
      return fc.record({ a: edge, b: edge, c: edge, beta: angle });
    case 'monoclinic-c':
      return fc.record({ a: edge, b: edge, c: edge, gamma: angle });
    case 'orthorhombic':
      return fc.record({ a: edge, b: edge, c: edge });
    case 'tetragonal':
    case 'hexagonal':
      return fc.record({ a: edge, c: edge });
    case 'rhombohedral':
      return fc.record({ a: edge, alpha: fc.integer({ min: 50, max: 110 }) });
    case 'cubic':
      return fc.record({ a: edge });
  }
}

const index = fc.integer({ min: -4, max: 4 });
const face = fc.tuple(index, index, index).filter((h) => h.some((value) => value !== 0));
const distance = fc.integer({ min: 800, max: 1600 }).map((n) => n / 1000);

/** Any of the 47 settings, a cell that fits it, one to four forms, and pinacoids that close whatever stays open. */
export const crystals: fc.Arbitrary<RecipeInput> = fc.constantFrom(...SETTINGS).chain(({ key, axes }) =>
  fc
    .record({
      cell: cellOn(axes),
      forms: fc.array(fc.record({ face: face.map((h) => [...h]), distance }), { minLength: 1, maxLength: 4 }),
      box: fc.array(distance, { minLength: 6, maxLength: 6 }),
    })
    .map(({ cell, forms, box }) => ({
      pointGroup: key,
      cell,
      forms: [...forms, ...BOX.map((h, i) => ({ face: [...h], distance: box[i]! * 1.3 }))],
    })),
);

const BOX = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
  [-1, 0, 0],
  [0, -1, 0],
  [0, 0, -1],
];
