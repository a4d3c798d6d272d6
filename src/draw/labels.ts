import { printFace } from '../crystal/indices.ts';
import { miller } from '../crystal/spaces.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { type LabelBox, placeLabelTurned, type TurnedPlace, turned } from './fit-label.ts';
import { element, num } from './svg.ts';
import { layOutSymbol, symbolText, words } from './symbol-text.ts';
import { textWidth } from './text-width.ts';
import { type Point, vectorAt } from './vector.ts';

/** What is written on the faces: the mineral's letters (indices where it has none for a form), or indices. */
export type LabelKind = 'letters' | 'indices';

export interface FaceLabel extends TurnedPlace {
  /** Plane number of the face. */
  readonly face: number;
  readonly text: string;
  readonly kind: LabelKind;
  /** Room it was given, in type sizes, margins included. */
  readonly box: LabelBox;
}

/** A face in front as it lies on the page. */
export interface PageFace {
  readonly face: number;
  readonly outline: readonly Point[];
}

/** Type sizes in pixels. A label that would have to be smaller than the smallest is left out. */
const TYPE = { smallest: 8, letters: 22, indices: 15 };
/** Free margin on each side of a label, in type sizes. */
const MARGIN = 0.3;

/** Finds a place for the label of every face that has room for one. */
export function faceLabels(
  shape: ClosedShape,
  kind: LabelKind,
  faces: readonly PageFace[],
  obstacles: readonly (readonly Point[])[],
): FaceLabel[] {
  return faces.flatMap(({ face, outline }) => {
    const label = labelOf(shape, kind, face);
    const spot = placeLabelTurned(outline, label.box, obstacles, TYPE[label.kind]);
    return spot.size < TYPE.smallest ? [] : [{ face, ...label, ...spot }];
  });
}

function labelOf({ crystal, solid }: ClosedShape, kind: LabelKind, face: number) {
  const letter = crystal.forms[solid.planes.form[face]!]!.letter;
  if (kind === 'letters' && letter !== null) {
    const width = textWidth(letter) + 2 * MARGIN;
    return { kind, text: letter, box: { width, height: 0.8 + 2 * MARGIN } } as const;
  }
  const [h, k, l] = vectorAt(solid.planes.normals, face);
  const text = printFace(miller(h, k, l), crystal.group.axes, { overbar: true });
  const { width, height } = layOutSymbol(text);
  return { kind: 'indices', text, box: { width: width + 2 * MARGIN, height: height + 2 * MARGIN } } as const;
}

/** Corners of the room that a label was given, on the page. */
export function labelCorners({ centre: [x, y], size, box, turn }: FaceLabel): Point[] {
  const [right, down] = [(size * box.width) / 2, (size * box.height) / 2];
  return [
    [-right, -down],
    [right, -down],
    [right, down],
    [-right, down],
  ].map(([dx, dy]) => {
    const [ax, ay] = turned(turn)([dx!, dy!]);
    return [x + ax, y + ay];
  });
}

export function labelText(label: FaceLabel): string {
  const { centre, turn } = label;
  const level = levelText(label);
  if (turn === 0) return level;
  return element('g', { transform: `rotate(${turn} ${num(centre[0])} ${num(centre[1])})` }, level);
}

function levelText({ text, kind, centre: [x, y], size }: FaceLabel): string {
  if (kind === 'letters') {
    // Small letters stand half a type size high, capitals nearly three quarters.
    const middle = /^\p{Lu}/u.test(text) ? 0.36 : 0.27;
    return words(text, { at: [x, y + middle * size], size, anchor: 'middle', italic: true });
  }
  const symbol = layOutSymbol(text);
  return symbolText(symbol, { start: [x - (symbol.width * size) / 2, y + (symbol.height * size) / 2], size });
}
