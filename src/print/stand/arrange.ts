import type { Point } from '../lettering/field.ts';
import type { CodePlan } from './code.ts';
import type { Cradle } from './cradle.ts';
import type { StandSizes } from './options.ts';
import type { BrailleText, RaisedText } from './plaque-text.ts';

/** Where everything stands on the plaque; from its front left corner, x to the right and y away from the reader. */
export interface Arrangement {
  readonly width: number;
  readonly depth: number;
  /** Where the crystal's centre comes to stand. */
  readonly centre: Point;
  /** Lower left corners. */
  readonly text: Point;
  readonly braille: Point;
  readonly code: Point;
}

interface Contents {
  readonly cradle: Cradle;
  readonly text: RaisedText | null;
  readonly braille: BrailleText | null;
  readonly code: CodePlan | null;
}

/**
 * From front to back: braille below the raised lines, the raised lines, and the crystal with the code at its right. A
 * border is free around all of them, and nothing to be read lies under the crystal.
 */
export function arrange({ cradle, text, braille, code }: Contents, { border }: StandSizes): Arrangement {
  const { low, high } = boundsOf([...cradle.outline, ...cradle.shadow]);
  const [bodyWidth, bodyDepth] = [high[0] - low[0], high[1] - low[1]];
  const backWidth = bodyWidth + (code ? border + code.side : 0);
  const width = 2 * border + Math.max(backWidth, text?.width ?? 0, braille?.width ?? 0);
  const textY = border + (braille ? braille.height + border : 0);
  const backY = textY + (text ? text.height + border : 0);
  const backDepth = Math.max(bodyDepth, code?.side ?? 0);
  const bodyRoom = width - 2 * border - (code ? border + code.side : 0);
  const left = border + (bodyRoom - bodyWidth) / 2;
  return {
    width,
    depth: backY + backDepth + border,
    centre: [left - low[0], backY + (backDepth - bodyDepth) / 2 - low[1]],
    text: [border, textY],
    braille: [border, border],
    code: [width - border - (code?.side ?? 0), backY],
  };
}

function boundsOf(points: readonly Point[]): { low: Point; high: Point } {
  const [xs, ys] = [points.map(([x]) => x), points.map(([, y]) => y)];
  return { low: [Math.min(...xs), Math.min(...ys)], high: [Math.max(...xs), Math.max(...ys)] };
}
