import type { Manifold } from 'manifold-3d';
import type { RodPlan } from '../../rods/plan.ts';
import { ObjectError } from '../../shape/object-error.ts';
import type { Workbench } from '../kit.ts';
import { textOutlines } from '../lettering/outlines.ts';
import { ROOT } from '../lettering/solids.ts';
import type { Mesh } from '../mesh.ts';
import type { Part } from '../part.ts';
import { terminal } from '../rods/solid.ts';
import { dotMesh } from '../stand/dots.ts';
import { ROD_COLOUR } from '../surfaces.ts';
import { type KeyLayout, type KeyRow, layOutKey } from './key-layout.ts';
import { KEY_SIZES, type KeyOptions, type KeySizes } from './options.ts';
import { inOrder, symbolWords } from './words.ts';

export interface PrintedKey {
  readonly part: Part;
  /** Of the plaque, millimetres. */
  readonly width: number;
  readonly depth: number;
  readonly remarks: readonly string[];
}

const PLAQUE_COLOUR = '#DDDAD2';

/**
 * A plaque that tells what the symbols at the rods' ends mean: each as it is there, beside it its Hermann–Mauguin symbol
 * in raised letters and, on wish, its name in braille. It lies on its back.
 * @throws ObjectError `text` without symbols, or for characters that the typeface lacks
 */
export function printedKey(bench: Workbench, options: KeyOptions): PrintedKey {
  const sizes: KeySizes = { ...KEY_SIZES, ...options.sizes };
  const symbols = inOrder(options.symbols);
  if (symbols.length === 0)
    throw new ObjectError('text', 'a key without symbols has nothing to tell', 'choose axes, or leave the key away');
  const layout = layOutKey(symbols, options, sizes);
  const symbolSolids = layout.rows.map((row) => symbolSolid(bench, row, options, sizes));
  const labels = layout.rows.map((row) => labelSolid(bench, row, layout.size, options, sizes));
  const coloured = (solid: Manifold, surface: number): Manifold => bench.solid(bench.mesh(solid, surface));
  const solid = bench.union([
    plaque(bench, layout, sizes),
    ...symbolSolids.map((one) => coloured(one, 1)),
    ...labels.map((one) => coloured(one, 2)),
    ...dotSolids(bench, layout, sizes),
  ]);
  const mesh = bench.mesh(solid, 0);
  const part: Part = {
    name: 'key',
    purpose: 'a key of what the symbols at the ends of the rods mean',
    surfaces: [
      { name: 'key', colour: PLAQUE_COLOUR },
      { name: 'symbols', colour: ROD_COLOUR, curved: true },
      { name: 'letters', colour: ROD_COLOUR },
    ],
    mesh,
    placed: [shifted(mesh, options.at ?? [0, 0, 0])],
  };
  const { width, height } = layout;
  return { part, width, depth: height, remarks: [told(layout, symbols.map(symbolWords), options, sizes)] };
}

/** The terminal of a rod, its foot in the plaque, its x direction upwards. */
function symbolSolid(
  bench: Workbench,
  { symbol, middle: [x, y] }: KeyRow,
  { symbolUnit, thickness }: KeyOptions,
  { plaque: ground }: KeySizes,
): Manifold {
  const rod: RodPlan = { ends: [], diameter: thickness, symbolUnit, thickness, remarks: [] };
  const solid = terminal(bench, symbol, rod, ground - ROOT, ground + thickness);
  return bench.place(solid, [0, 1, 0, 0, -1, 0, 0, 0, 0, 0, 1, 0, x, y, 0, 1]);
}

const labelSolid = (
  bench: Workbench,
  { label, labelAt }: KeyRow,
  size: number,
  { typeface }: KeyOptions,
  { plaque: ground, raise }: KeySizes,
): Manifold => bench.prism(textOutlines(typeface, label, size, labelAt), ground - ROOT, ground + raise);

function dotSolids(bench: Workbench, { rows }: KeyLayout, { braille, plaque: ground }: KeySizes): Manifold[] {
  const at = rows.flatMap(({ dots }) => dots);
  if (at.length === 0) return [];
  const mesh = dotMesh(at, braille, ground, ground - ROOT);
  return [bench.solid({ ...mesh, surface: new Uint16Array(mesh.triangles.length / 3).fill(2) })];
}

/** A plate with rounded corners, from z = 0 up. */
function plaque(bench: Workbench, { width, height }: KeyLayout, { plaque: thick, corner }: KeySizes): Manifold {
  const middles = [
    [width - corner, height - corner],
    [corner, height - corner],
    [corner, corner],
    [width - corner, corner],
  ] as const;
  const outline = middles.flatMap(([x, y], quarter) =>
    Array.from({ length: 9 }, (_, i) => {
      const angle = ((quarter + i / 8) * Math.PI) / 2;
      return [x + corner * Math.cos(angle), y + corner * Math.sin(angle)] as const;
    }),
  );
  return bench.prism([outline], 0, thick);
}

const shifted = (mesh: Mesh, by: readonly [number, number, number]): Mesh => ({
  ...mesh,
  positions: mesh.positions.map((value, i) => value + by[i % 3]!),
});

function told(
  { width, height }: KeyLayout,
  names: readonly string[],
  { braille }: KeyOptions,
  { letterHeight, raise, braille: dots }: KeySizes,
): string {
  const round = (value: number): string => String(Math.round(value * 10) / 10);
  const inBraille = braille
    ? `; braille: uncontracted English (UEB), dots ${dots.base} mm wide and ${dots.height} mm high`
    : '';
  return `The key is ${round(width)} × ${round(height)} mm and explains ${names.join(', ')}; letters ${letterHeight} mm high and ${raise} mm raised (tactile signs by ADA 2010, 703.2: 16 to 51 mm, 13 at least where the same can be read otherwise, and 0.8 mm)${inBraille}.`;
}
