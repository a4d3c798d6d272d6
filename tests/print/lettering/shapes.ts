import { readdirSync } from 'node:fs';
import { crystal } from '../../../src/index.ts';
import type { LetterStyle } from '../../../src/print/lettering/style.ts';
import { mm } from '../../../src/recipe/quantity.ts';
import { closedOrThrow } from '../../../src/shape/closing.ts';
import { millimetresPerUnit } from '../../../src/shape/scale.ts';
import { type ClosedShape, polyhedron } from '../../../src/shape/shape.ts';
import { bold } from './fonts.ts';

/** Every fourth mineral of the shelf, across all systems. */
export const SOME_MINERALS: readonly string[] = readdirSync(new URL('../../../presets/minerals', import.meta.url))
  .map((name) => name.replace('.yaml', ''))
  .filter((_, i) => i % 4 === 0);

export interface Sized {
  readonly shape: ClosedShape;
  readonly scale: number;
}

/** A crystal with its longest extent in millimetres. */
export function sized(recipe: string, length: number): Sized {
  const shape = closedOrThrow(polyhedron(crystal(recipe)));
  return { shape, scale: millimetresPerUnit(shape, { kind: 'longest', length: mm(length) }) };
}

/** Start values for a 0.4 mm nozzle from published guides: strokes and depth 0.6 mm, walls 0.8 mm. */
export const STYLE: LetterStyle = {
  typeface: bold,
  relief: 'engraved',
  depth: 0.6,
  stroke: 0.6,
  height: { smallest: 3, largest: 9 },
  margin: 1,
  wall: 0.8,
};
