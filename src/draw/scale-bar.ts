import { FAINT } from './palette.ts';
import { element, linePath } from './svg.ts';
import { words } from './symbol-text.ts';
import type { Point } from './vector.ts';

/** The longest of 1, 2, 5, 10, 20, 50 … (and 0.5, 0.2, 0.1 …) that is at most `most`. @throws RangeError when `most` is not positive */
export function roundLength(most: number): number {
  if (!(most > 0 && most < Number.POSITIVE_INFINITY))
    throw new RangeError(`A scale bar cannot be ${most} millimetres long.`);
  const decade = Math.floor(Math.log10(most));
  // Ten to a negative power is not exact; dividing by the positive power is as near as a number gets.
  const times = (step: number, power: number): number => (power < 0 ? step / 10 ** -power : step * 10 ** power);
  const steps = [-1, 0, 1].flatMap((shift) => [1, 2, 5].map((step) => times(step, decade + shift)));
  return Math.max(...steps.filter((length) => length <= most));
}

const TICK = 4;

/** A bar of a round number of millimetres, true in the picture plane. @param end its right end */
export function scaleBar(end: Point, pixelsPerMillimetre: number, mostPixels: number): string {
  const millimetres = roundLength(mostPixels / pixelsPerMillimetre);
  const [x, y] = end;
  const start = x - millimetres * pixelsPerMillimetre;
  const bar = linePath([
    [[start, y], end],
    [
      [start, y - TICK],
      [start, y + TICK],
    ],
    [
      [x, y - TICK],
      [x, y + TICK],
    ],
  ]);
  return (
    element('path', { d: bar, stroke: FAINT, 'stroke-width': 1.2, fill: 'none' }) +
    words(`${millimetres} mm`, { at: [(start + x) / 2, y - 8], size: 13, fill: FAINT, anchor: 'middle' })
  );
}
