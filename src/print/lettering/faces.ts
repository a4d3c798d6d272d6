import type { Manifold } from 'manifold-3d';
import { printFace } from '../../crystal/indices.ts';
import { miller } from '../../crystal/spaces.ts';
import { facePlanes } from '../../shape/face-planes.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { faceName } from '../face-name.ts';
import type { Workbench } from '../kit.ts';
import { betweenLines, type SurfaceLine } from './between-lines.ts';
import { facePolygon, type RodExit, roomOn } from './face-room.ts';
import { type Field, fieldOf, quarterTurn, toField } from './field.ts';
import { fitBox } from './fit-box.ts';
import { layOutText, type TextLayout } from './lay-out.ts';
import { textOutlines } from './outlines.ts';
import { applyLetters, type Lettered, OVERSHOOT, ROOT } from './solids.ts';
import { gapOf, type LetterStyle, wantedSizes } from './style.ts';

/** What is written: the mineral's letters (indices where a form has none), or indices with overbars. */
export type FaceText = 'letters' | 'indices';

/** The letters of one face. */
export interface LetteredFace {
  /** Plane number. */
  readonly face: number;
  readonly text: string;
  /** Height of capitals and figures, millimetres. */
  readonly height: number;
  /** Whether the line runs upwards because it is too small across. */
  readonly turned: boolean;
  readonly field: Field;
  /** What was cut or added. */
  readonly letters: Manifold;
}

export interface FaceLettering extends Lettered {
  /** How many faces got their letters. */
  readonly lettered: number;
  readonly faces: readonly LetteredFace[];
  /** Faces without letters, for instance `(10-11) r`, in the planes' order. */
  readonly tooSmall: readonly string[];
  /** What a person should know: smallest and largest letters, faces left out, lines that run upwards. */
  readonly remarks: readonly string[];
}

interface Chosen {
  readonly field: Field;
  readonly turned: boolean;
  readonly size: number;
  readonly centre: readonly [number, number];
}

/**
 * Letters every face that has room: sized to the largest box of the text's proportions within the face less a margin,
 * upright when the crystal stands with c up, else running upwards where only that is large enough.
 * @param body the crystal in its own frame, whatever was added to or bored into it
 * @param scale millimetres for each unit of distance
 * @throws ObjectError `text` for characters that the typeface lacks
 */
export function letterFaces(
  bench: Workbench,
  body: Manifold,
  shape: ClosedShape,
  scale: number,
  options: {
    readonly text: FaceText;
    readonly style: LetterStyle;
    readonly avoid?: readonly RodExit[];
    readonly lines?: readonly SurfaceLine[];
    /** Plane number of a face that is to stay as it is. */
    readonly leave?: number;
  },
): FaceLettering {
  const { text: kind, style, avoid = [], lines = [], leave } = options;
  const planes = facePlanes(shape, scale);
  const faces: LetteredFace[] = [];
  const tooSmall: string[] = [];
  shape.measures.faces.forEach((face, i) => {
    if (face === leave) return;
    const { normal, distance } = planes[i]!;
    const text = faceText(shape, kind, face);
    const layout = layOutText(style.typeface, text, gapOf(style.typeface));
    const level = fieldOf(normal, distance);
    const chosen = [level, quarterTurn(level)]
      .flatMap((field, turn) =>
        betweenLines(facePolygon(shape, scale, face, field), field, lines).map((piece) => ({ field, turn, piece })),
      )
      .map(({ field, turn, piece }): Chosen | null => {
        const room = roomOn(piece, field, planes, avoid, style);
        if (!room) return null;
        const { left, right, top, bottom } = layout.box;
        const box = { width: right - left, height: top - bottom };
        return {
          field,
          turned: turn === 1,
          ...fitBox(room.polygon, room.sides, room.discs, box, wantedSizes(style, layout)),
        };
      })
      .filter((one) => one !== null && one.size >= wantedSizes(style, layout).least)
      .reduce<Chosen | null>((best, one) => (best && !isBetter(one!, best) ? best : one), null);
    if (!chosen) tooSmall.push(nameAndLetter(shape, face));
    else faces.push(lettersAt(bench, style, layout, face, chosen));
  });
  const solids = faces.map(({ letters }) => letters);
  return {
    ...applyLetters(bench, body, solids, style.relief),
    lettered: faces.length,
    faces,
    tooSmall,
    remarks: tell(faces, tooSmall, style),
  };
}

/** Level before upwards, then the larger by more than a hundredth, then the first. */
const isBetter = (one: Chosen, other: Chosen): boolean => one.turned === other.turned && one.size > 1.01 * other.size;

function lettersAt(
  bench: Workbench,
  style: LetterStyle,
  layout: TextLayout,
  face: number,
  { field, turned, size: fitted, centre }: Chosen,
): LetteredFace {
  const { typeface, relief, depth } = style;
  const size = Math.min(fitted, wantedSizes(style, layout).enough);
  const { left, right, top, bottom } = layout.box;
  const shift = [centre[0] - (size * (left + right)) / 2, centre[1] - (size * (bottom + top)) / 2] as const;
  const outlines = textOutlines(typeface, layout, size, shift);
  const [from, to] = relief === 'engraved' ? [-depth, OVERSHOOT] : [-ROOT, depth];
  const letters = bench.place(bench.prism(outlines, from, to), toField(field));
  return { face, text: layout.text, height: size * typeface.capital, turned, field, letters };
}

function faceText({ crystal, solid }: ClosedShape, kind: FaceText, face: number): string {
  const { letter } = crystal.forms[solid.planes.form[face]!]!;
  if (kind === 'letters' && letter !== null) return letter;
  return printFace(indicesOf(solid.planes.normals, face), crystal.group.axes, { overbar: true });
}

function nameAndLetter(shape: ClosedShape, face: number): string {
  const { letter } = shape.crystal.forms[shape.solid.planes.form[face]!]!;
  const symbol = faceName(shape, face);
  return letter === null ? symbol : `${symbol} ${letter}`;
}

const indicesOf = (normals: Float64Array, face: number) =>
  miller(normals[3 * face]!, normals[3 * face + 1]!, normals[3 * face + 2]!);

function tell(faces: readonly LetteredFace[], tooSmall: readonly string[], style: LetterStyle): string[] {
  const remarks: string[] = [];
  const heights = faces.map(({ height }) => height);
  const [least, most] = [Math.min(...heights), Math.max(...heights)].map((value) => value.toFixed(1));
  if (faces.length > 0)
    remarks.push(
      `Letters on ${faces.length} ${faces.length === 1 ? 'face' : 'faces'}, capitals ${least === most ? least : `${least} to ${most}`} mm high.`,
    );
  const turned = faces.filter((face) => face.turned).length;
  if (turned > 0) remarks.push(`On ${turned} narrow ${turned === 1 ? 'face' : 'faces'} the letters run upwards.`);
  if (tooSmall.length > 0)
    remarks.push(
      `Too small for letters of ${style.height.smallest} mm with strokes of ${style.stroke} mm, and left plain: ${tooSmall.join(', ')}. A larger model has room for them.`,
    );
  return remarks;
}
