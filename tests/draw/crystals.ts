import fc from 'fast-check';
import { PRESET_FOLDER } from '../../src/disk/preset-folder.ts';
import { mm } from '../../src/recipe/quantity.ts';
import { read } from '../../src/recipe/read.ts';
import { planRods, type RodPlan } from '../../src/rods/plan.ts';
import { type ClosedShape, isClosed, polyhedron } from '../../src/shape/shape.ts';

export function shapeOf(recipe: unknown): ClosedShape {
  const shape = polyhedron(read(recipe, PRESET_FOLDER).crystal);
  if (!isClosed(shape)) throw new Error('the crystal is open');
  return shape;
}

const cubic = (pointGroup: string, ...forms: [face: string, distance: number][]): ClosedShape =>
  shapeOf({ pointGroup, cell: { a: 5 }, forms: forms.map(([face, distance]) => ({ face, distance })) });

/** Edge 2. */
export const cube = cubic('m-3m', ['100', 1]);
export const octahedron = cubic('m-3m', ['111', 1]);
export const cuboctahedron = cubic('m-3m', ['100', 1], ['111', 2 / Math.sqrt(3)]);
export const tetrahedron = cubic('-43m', ['111', 1]);
export const hexaoctahedron = cubic('m-3m', ['123', 1]);
export const scalenohedron = shapeOf({
  title: 'Calcite <dogtooth> & "spar"',
  pointGroup: '-3m1',
  cell: { a: 4.99, c: 17.06 },
  forms: [{ face: '21-34', distance: 1 }],
});
export const monoclinic = shapeOf({
  pointGroup: '2/m',
  cell: { a: 5.68, b: 15.18, c: 6.52, beta: 118.4 },
  forms: [
    { face: '010', distance: 0.6 },
    { face: '120', distance: 1 },
    { face: '111', distance: 1.6 },
  ],
});
export const triclinic = shapeOf({
  pointGroup: '-1',
  cell: { a: 7, b: 9, c: 6, alpha: 95, beta: 105, gamma: 88 },
  forms: ['100', '010', '001', '1-10', '111', '-111', '101'].map((face, i) => ({ face, distance: 1 + 0.06 * i })),
});
/** Point group 321: polar two-fold axes; letters m, r and z. */
export const quartz = shapeOf({
  mineral: 'quartz',
  forms: [
    { face: 'm', distance: 1 },
    { face: 'r', distance: 1.62 },
    { face: 'z', distance: 1.78 },
  ],
});

export const CRYSTALS: readonly (readonly [name: string, shape: ClosedShape])[] = [
  ['cube', cube],
  ['octahedron', octahedron],
  ['cuboctahedron', cuboctahedron],
  ['tetrahedron', tetrahedron],
  ['hexaoctahedron', hexaoctahedron],
  ['scalenohedron', scalenohedron],
  ['monoclinic', monoclinic],
  ['triclinic', triclinic],
  ['quartz', quartz],
];

/** All axes of a crystal as rods, or those of some orders. Lengths in millimetres. */
export const rodsOf = (
  shape: ClosedShape,
  millimetresPerUnit: number,
  { diameter, reach, orders = null }: { diameter: number; reach: number; orders?: number[] | null },
): RodPlan =>
  planRods(shape, millimetresPerUnit, {
    orders,
    directions: null,
    fit: 'fused',
    diameter: mm(diameter),
    reach: mm(reach),
  });

export const anyCrystal = fc.constantFrom(...CRYSTALS.map(([, shape]) => shape));
/** Anywhere on the sphere; fast-check alone would mostly choose angles next to 0, 90 and 180. */
const spread = fc.record({ turn: fc.nat(359_999), tilt: fc.nat(179_999) }).map(({ turn, tilt }) => ({
  turn: ((turn * 7919) % 360_000) / 1000 - 180,
  tilt: ((tilt * 7907) % 180_000) / 1000 - 90,
}));
const special = fc.record({
  turn: fc.double({ min: -180, max: 180, noNaN: true }),
  tilt: fc.double({ min: -90, max: 90, noNaN: true }),
});
export const anyView = fc.oneof({ arbitrary: spread, weight: 3 }, { arbitrary: special, weight: 1 });
