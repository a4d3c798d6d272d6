import type { Manifold } from 'manifold-3d';
import type { LettersPlan, ReliefPlan } from '../recipe/crystal.ts';
import type { PrinterProfile } from '../recipe/schema.ts';
import { facePlanes } from '../shape/face-planes.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { largestFace } from './bodies/resting.ts';
import { faceName } from './face-name.ts';
import type { Workbench } from './kit.ts';
import { letterBase } from './lettering/base.ts';
import type { SurfaceLine } from './lettering/between-lines.ts';
import type { RodExit } from './lettering/face-room.ts';
import { letterFaces } from './lettering/faces.ts';
import type { LetterStyle } from './lettering/style.ts';
import type { Typeface } from './lettering/typeface.ts';
import type { Step } from './solid-body.ts';

/** Heights of letters on faces, millimetres: legible at arm's length, and no larger than a key letter needs to be. */
const HEIGHT = { smallest: 3, largest: 12 };
/** From letters to the edges of their face, millimetres. */
const MARGIN = 1;

interface Lettering {
  readonly printer: PrinterProfile;
  readonly typeface: Typeface;
  /** What blunting took of the faces from their edges, millimetres. */
  readonly inset: number;
  readonly avoid: readonly RodExit[];
  /** Mirror planes as lines on the surface. */
  readonly strips: readonly SurfaceLine[];
}

/** Letters on the faces of a body, by the printer's figures, clear of the rods. @throws ObjectError */
export function lettered(
  bench: Workbench,
  body: Manifold,
  shape: ClosedShape,
  scale: number,
  { relief, text }: LettersPlan,
  leaveResting: boolean,
  { avoid, strips, ...lettering }: Lettering,
): Step {
  const style = styleOf(relief, lettering);
  const { solid, inlay, remarks } = letterFaces(bench, body, shape, scale, {
    text,
    style,
    avoid,
    lines: strips,
    ...(leaveResting && { leave: largestFace(shape) }),
  });
  const purpose = `the ${text} on the faces, in a second colour that lies in the body, printed with it in one job`;
  return {
    solid,
    word: `with ${relief} ${text}`,
    inlay: relief === 'inlaid' && inlay ? { name: 'face-letters', purpose, solid: inlay } : null,
    remarks,
  };
}

/** Lines under the largest face, on which the crystal can lie. @throws ObjectError */
export function baseLettered(
  bench: Workbench,
  body: Manifold,
  shape: ClosedShape,
  scale: number,
  lines: readonly string[],
  { avoid, strips, ...lettering }: Lettering,
): Step {
  const planes = facePlanes(shape, scale);
  const face = largestFace(shape);
  const rest = planes[shape.measures.faces.indexOf(face)]!;
  const style = styleOf('engraved', lettering);
  const { solid, height } = letterBase(bench, body, rest, { lines, style, planes, avoid, strips });
  const where = faceName(shape, face);
  const remark = `"${lines.join(' / ')}" stands under ${where}, in letters of ${height.toFixed(1)} mm; lay the crystal on this face.`;
  return { solid, word: 'with text under its resting face', inlay: null, remarks: [remark] };
}

function styleOf(relief: ReliefPlan, { printer, typeface, inset }: Omit<Lettering, 'avoid' | 'strips'>): LetterStyle {
  const { stroke, depth } = relief === 'raised' ? printer.raised : printer.engraved;
  const cut = relief === 'raised' ? 'raised' : 'engraved';
  return { typeface, relief: cut, depth, stroke, height: HEIGHT, margin: MARGIN + inset, wall: printer.usualWall };
}
