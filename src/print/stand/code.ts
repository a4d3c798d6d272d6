import qrcode from 'qrcode';
import type { Outline } from '../../rods/axis-symbol.ts';
import { ObjectError } from '../../shape/object-error.ts';

/** A QR code (ISO/IEC 18004) as squares to be raised. */
export interface CodePlan {
  /** Side with the quiet zone of four modules around it, millimetres. */
  readonly side: number;
  /** Dark modules, one outline a run in a row, from the lower left corner of the quiet zone. */
  readonly outlines: readonly Outline[];
}

const QUIET = 4;
/** Modules that touch at a corner are let overlap by this much on each side, millimetres, so that the solid is sound. */
const OVERLAP = 0.02;

/** @throws ObjectError `text` when the text is too long for a code, or the code wider than `widest` */
export function planCode(text: string, module: number, widest: number): CodePlan {
  const { size, data } = modulesOf(text);
  const side = (size + 2 * QUIET) * module;
  if (side > widest) throw tooWide(text, size, module, side, widest);
  const outlines: Outline[] = [];
  for (let row = 0; row < size; row++)
    for (let column = 0; column < size; column++) {
      if (!data[row * size + column]) continue;
      const from = column;
      while (column + 1 < size && data[row * size + column + 1]) column++;
      outlines.push(run(QUIET + from, QUIET + column + 1, QUIET + size - row, module));
    }
  return { side, outlines };
}

function run(from: number, to: number, top: number, module: number): Outline {
  const [left, right] = [from * module - OVERLAP, to * module + OVERLAP];
  const [low, high] = [(top - 1) * module - OVERLAP, top * module + OVERLAP];
  return [
    [left, low],
    [right, low],
    [right, high],
    [left, high],
  ];
}

function modulesOf(text: string): { size: number; data: Uint8Array } {
  try {
    const { size, data } = qrcode.create(text, { errorCorrectionLevel: 'M' }).modules;
    return { size, data };
  } catch {
    throw new ObjectError(
      'text',
      `a QR code of medium correction holds at most 2331 bytes, and this text has ${new TextEncoder().encode(text).length}`,
      'give a short address instead',
    );
  }
}

const tooWide = (text: string, size: number, module: number, side: number, widest: number): ObjectError =>
  new ObjectError(
    'text',
    `the QR code for ${text.length} characters has ${size} × ${size} modules of ${module} mm, ${Math.ceil(side)} mm with its quiet zone, and the plaque may be ${widest} mm wide`,
    'give a shorter address, a wider plaque or smaller modules',
  );
