import type { Manifold } from 'manifold-3d';
import type { LettersPlan } from '../recipe/crystal.ts';
import type { PrinterProfile } from '../recipe/schema.ts';
import type { RodPlan } from '../rods/plan.ts';
import type { ClosedShape } from '../shape/shape.ts';
import type { Workbench } from './kit.ts';
import { letterFaces } from './lettering/faces.ts';
import type { Typeface } from './lettering/typeface.ts';

/** Heights of letters on faces, millimetres: legible at arm's length, and no larger than a key letter needs to be. */
const HEIGHT = { smallest: 3, largest: 12 };
/** From letters to the edges of their face. */
const MARGIN = 1;

/** Letters on the faces of a body, by the printer's figures, clear of the rods. */
export function lettered(
  bench: Workbench,
  body: Manifold,
  shape: ClosedShape,
  scale: number,
  plan: LettersPlan,
  {
    printer,
    typeface,
    rods,
  }: { readonly printer: PrinterProfile; readonly typeface: Typeface; readonly rods: RodPlan | null },
): { readonly solid: Manifold; readonly remarks: readonly string[] } {
  const { stroke, depth } = plan.relief === 'engraved' ? printer.engraved : printer.raised;
  const style = {
    typeface,
    relief: plan.relief,
    depth,
    stroke,
    height: HEIGHT,
    margin: MARGIN,
    wall: printer.usualWall,
  };
  const avoid = (rods?.ends.flat() ?? []).map(({ end }) => ({ along: end.along, radius: rods!.diameter / 2 + MARGIN }));
  const { solid, remarks } = letterFaces(bench, body, shape, scale, { text: plan.text, style, avoid });
  return { solid, remarks };
}
