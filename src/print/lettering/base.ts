import type { Manifold } from 'manifold-3d';
import type { FacePlane } from '../../shape/face-planes.ts';
import { ObjectError } from '../../shape/object-error.ts';
import type { Workbench } from '../kit.ts';
import { betweenLines, type SurfaceLine } from './between-lines.ts';
import { type RodExit, roomOn } from './face-room.ts';
import { type Field, fieldOf, quarterTurn, toField } from './field.ts';
import { fitBox, type Spot } from './fit-box.ts';
import { flatOutline } from './flat-outline.ts';
import { layOutText, stackLines } from './lay-out.ts';
import { textOutlines } from './outlines.ts';
import { applyLetters, type Lettered, OVERSHOOT, ROOT } from './solids.ts';
import { gapOf, type LetterStyle, wantedSizes } from './style.ts';

export interface BaseLettering extends Lettered {
  /** Height of capitals and figures, millimetres. */
  readonly height: number;
  readonly letters: Manifold;
}

/** From baseline to baseline, in heights of capitals. */
const PITCH = 1.6;

/**
 * Writes lines, such as the accession number and the scale, on the flat on which the body rests, to be read when one
 * turns it over and looks at it.
 * @param rest the plane of the flat, its normal out of the body
 * @param planes all planes that the letters' ground must keep away from
 * @throws ObjectError `text` when the flat has no room for them, or the typeface lacks a character
 */
export function letterBase(
  bench: Workbench,
  body: Manifold,
  rest: FacePlane,
  options: {
    readonly lines: readonly string[];
    readonly style: LetterStyle;
    readonly planes?: readonly FacePlane[];
    readonly avoid?: readonly RodExit[];
    readonly strips?: readonly SurfaceLine[];
  },
): BaseLettering {
  const { style, planes = [], avoid = [], strips = [] } = options;
  const { typeface, relief, depth } = style;
  const lines = options.lines.filter((line) => line.trim() !== '');
  if (lines.length === 0) throw new ObjectError('text', 'there is no text for the resting face', 'give a line of text');
  const layout = stackLines(
    lines.map((line) => layOutText(typeface, line.trim(), gapOf(typeface))),
    PITCH * typeface.capital,
    'middle',
  );
  const { left, right, top, bottom } = layout.box;
  const box = { width: right - left, height: top - bottom };
  const { least, enough } = wantedSizes(style, layout);
  const level = fieldOf(rest.normal, rest.distance);
  const spot = [level, quarterTurn(level)]
    .flatMap((field) => betweenLines(flatOutline(body, rest, field), field, strips).map((piece) => ({ field, piece })))
    .flatMap(({ field, piece }) => {
      const room = roomOn(piece, field, planes, avoid, style);
      return room ? [{ field, ...fitBox(room.polygon, room.sides, room.discs, box, { least, enough }) }] : [];
    })
    .reduce<(Spot & { field: Field }) | null>((best, one) => (best && one.size <= 1.01 * best.size ? best : one), null);
  if (!spot || spot.size < least) throw tooSmall(lines, spot?.size ?? 0, least, style);
  const size = Math.min(spot.size, enough);
  const shift = [spot.centre[0] - (size * (left + right)) / 2, spot.centre[1] - (size * (bottom + top)) / 2] as const;
  const [from, to] = relief === 'engraved' ? [-depth, OVERSHOOT] : [-ROOT, depth];
  const upright = bench.prism(textOutlines(typeface, layout, size, shift), from, to);
  const letters = bench.place(upright, toField(spot.field));
  return { ...applyLetters(bench, body, [letters], relief), height: size * typeface.capital, letters };
}

function tooSmall(lines: readonly string[], size: number, least: number, { typeface }: LetterStyle): ObjectError {
  const [has, needs] = [size, least].map((value) => (Math.max(0, value) * typeface.capital).toFixed(1));
  return new ObjectError(
    'text',
    `the resting face has room for "${lines.join(' / ')}" in letters of ${has} mm only; ${needs} mm are needed to print`,
    'shorten the text, break it into more lines, or make the crystal larger',
  );
}
