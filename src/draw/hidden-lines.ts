import { inwardLines } from './fit-label.ts';
import type { Point } from './vector.ts';

export type Line = readonly [Point, Point];

/** Pieces shorter than this, pixels, are not worth a dash. */
const SHORTEST = 1.5;

/** What is left of straight lines where convex polygons are cut out of them. */
export function interrupt(lines: readonly Line[], gaps: readonly (readonly Point[])[]): Line[] {
  const sides = gaps.map(inwardLines);
  return lines.flatMap((line) =>
    sides.reduce<Line[]>((left, gap) => left.flatMap((part) => without(part, gap)), [line]),
  );
}

/** The parts of a line before and after a convex polygon that it crosses (Cyrus and Beck's clipping, 1978). */
function without(line: Line, sides: ReturnType<typeof inwardLines>): Line[] {
  const [[px, py], [qx, qy]] = line;
  let [enter, leave] = [0, 1];
  for (const [nx, ny, shift] of sides) {
    const [atStart, atEnd] = [nx * px + ny * py + shift, nx * qx + ny * qy + shift];
    if (atStart <= 0 && atEnd <= 0) return [line];
    const crossing = atStart / (atStart - atEnd);
    if (atStart < 0) enter = Math.max(enter, crossing);
    else if (atEnd < 0) leave = Math.min(leave, crossing);
  }
  if (enter >= leave) return [line];
  const point = (t: number): Point => [px + (qx - px) * t, py + (qy - py) * t];
  const length = Math.hypot(qx - px, qy - py);
  return [
    ...(enter * length > SHORTEST ? [[line[0], point(enter)] as const] : []),
    ...((1 - leave) * length > SHORTEST ? [[point(leave), line[1]] as const] : []),
  ];
}
