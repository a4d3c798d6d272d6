import { evenLines } from './break-lines.ts';
import { textWidth } from './text-width.ts';

/** Type sizes of titles in pixels. */
const LARGEST = 27;
/** Below this a title goes into two lines. */
const SMALLEST_OF_ONE = 20;
const LARGEST_OF_TWO = 23;
/** Below this it takes as many lines as it needs. */
const SMALLEST = 15;

export interface TitleLines {
  readonly lines: readonly string[];
  /** Type size, pixels. */
  readonly size: number;
}

/** A title within a width in pixels: in one line, if need be smaller; else in two; on narrow pages in more. */
export function titleLines(title: string, width: number): TitleLines {
  const whole = Math.floor(width / textWidth(title));
  if (whole >= SMALLEST_OF_ONE) return { lines: [title], size: Math.min(LARGEST, whole) };
  for (let size = LARGEST_OF_TWO; ; size--) {
    const lines = evenLines(title, width / size);
    if (lines.length <= 2 || size <= SMALLEST) return { lines, size };
  }
}
