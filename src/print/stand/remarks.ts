import type { Arrangement } from './arrange.ts';
import type { CodePlan } from './code.ts';
import type { Cradle } from './cradle.ts';
import type { StandOptions, StandSizes } from './options.ts';
import type { BrailleText, RaisedText } from './plaque-text.ts';

interface Built {
  readonly options: StandOptions;
  readonly sizes: StandSizes;
  readonly layout: Arrangement;
  readonly cradle: Cradle;
  readonly text: RaisedText | null;
  readonly braille: BrailleText | null;
  readonly code: CodePlan | null;
}

/** ADA 2010 Standards 703.2.5: letters from 16 mm, or from 13 mm where the same words can also be seen. */
const TACTILE = { height: 16, alsoSeen: 13 };

/** What was decided, with the figures it was decided by. */
export function standRemarks({ options, sizes, layout, cradle, text, braille, code }: Built): string[] {
  const round = (value: number): string => String(Math.round(value * 10) / 10);
  const remarks = [
    `The stand is ${round(layout.width)} × ${round(layout.depth)} mm; the crystal sits ${round(cradle.hold)} mm deep with ${options.clearance} mm clearance and lifts out upwards.`,
  ];
  if (text) {
    const { letterHeight: height, raise, letterGap } = sizes;
    const figures = `Raised letters: capitals ${height} mm high, ${raise} mm raised, at least ${letterGap} mm apart`;
    const standard = 'tactile signs by ADA 2010, 703.2, have 16 to 51 mm, 0.8 mm and 3.2 mm';
    remarks.push(`${figures}; ${standard}.`);
    if (height < TACTILE.height)
      remarks.push(
        height >= TACTILE.alsoSeen
          ? 'Letters under 16 mm are meant by that standard for text that can also be seen somewhere else.'
          : 'Letters under 13 mm are for the eye; for the fingers there should be braille.',
      );
  }
  if (braille) {
    const { base, height, dot, cell, line } = sizes.braille;
    remarks.push(
      `Braille: uncontracted English (UEB), dots ${base} mm wide and ${height} mm high, ${dot} mm apart, cells ${cell} mm, lines ${line} mm; filament printers come out lower, so test with a finger.`,
    );
  }
  if (code && !options.contrast)
    remarks.push('The QR code has the colour of the stand: a camera reads it only when it is inked or printed darker.');
  return remarks;
}
