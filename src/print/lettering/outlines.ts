import type { PathCommand } from 'opentype.js';
import type { Outline } from '../../rods/axis-symbol.ts';
import type { InkBox, PlacedGlyph, TextLayout } from './lay-out.ts';
import type { Typeface } from './typeface.ts';

type Point = readonly [number, number];

/** Straight pieces may lie this far from the curve, millimetres. */
export const CHORD_ERROR = 0.02;

/**
 * The outlines of a laid-out text, outer ones counter-clockwise and holes clockwise; y upwards, millimetres. Bars are
 * rectangles. What overlaps is merged when the outlines are made solid (`Workbench.prism` fills what is turned
 * positively).
 * @param size millimetres of a type size; `shift` where the layout's origin goes
 */
export function textOutlines(
  typeface: Typeface,
  { glyphs, bars }: TextLayout,
  size: number,
  shift: Point = [0, 0],
): Outline[] {
  const place = ([x, y]: Point): Point => [shift[0] + size * x, shift[1] + size * y];
  return [...glyphs.flatMap((glyph) => glyphOutlines(typeface, glyph, size)), ...bars.map(rectangle)].map((outline) =>
    outline.map(place),
  );
}

const rectangle = ({ left, bottom, right, top }: InkBox): Outline => [
  [left, bottom],
  [right, bottom],
  [right, top],
  [left, top],
];

/** In type sizes. TrueType turns outer contours clockwise, the other kind of outline counter-clockwise. */
function glyphOutlines({ font }: Typeface, { character, x, y, scale }: PlacedGlyph, size: number): Outline[] {
  const unit = scale / font.unitsPerEm;
  const contours = flatten(font.charToGlyph(character).path.commands, CHORD_ERROR / (size * unit));
  return contours.map((points) => {
    const outline = points.map(([px, py]): Point => [x + px * unit, y + py * unit]);
    return font.outlinesFormat === 'truetype' ? outline.reverse() : outline;
  });
}

function flatten(commands: readonly PathCommand[], tolerance: number): Point[][] {
  const contours: Point[][] = [];
  let contour: Point[] = [];
  for (const command of commands) {
    if (command.type === 'Z') continue;
    if (command.type === 'M') {
      contour = [];
      contours.push(contour);
    }
    const from = contour.at(-1) ?? [command.x, command.y];
    for (const point of pieces(from, command, tolerance)) add(contour, point);
  }
  return contours.map(closed).filter((points) => points.length > 2);
}

/** End points of the straight pieces of one command. A curve of degree two bends away from its chord by |a − 2b + c|/4. */
function pieces(from: Point, command: Exclude<PathCommand, { type: 'Z' }>, tolerance: number): Point[] {
  const to: Point = [command.x, command.y];
  if (command.type === 'Q') {
    const by: Point = [command.x1, command.y1];
    const count = Math.ceil(Math.sqrt(bend(from, by, to) / 4 / tolerance));
    return along(count, (t) => mix(mix(from, by, t), mix(by, to, t), t));
  }
  if (command.type === 'C') {
    const [b, c]: [Point, Point] = [
      [command.x1, command.y1],
      [command.x2, command.y2],
    ];
    // The second derivative is at most six times the larger bend, and a chord's error an eighth of it.
    const count = Math.ceil(Math.sqrt((0.75 * Math.max(bend(from, b, c), bend(b, c, to))) / tolerance));
    return along(count, (t) => {
      const [p, q, r] = [mix(from, b, t), mix(b, c, t), mix(c, to, t)];
      return mix(mix(p, q, t), mix(q, r, t), t);
    });
  }
  return [to];
}

const along = (count: number, curve: (t: number) => Point): Point[] =>
  Array.from({ length: Math.max(1, count) }, (_, i) => curve((i + 1) / Math.max(1, count)));

const mix = (a: Point, b: Point, t: number): Point => [a[0] + (b[0] - a[0]) * t, a[1] + (b[1] - a[1]) * t];
const bend = (a: Point, b: Point, c: Point): number => Math.hypot(a[0] - 2 * b[0] + c[0], a[1] - 2 * b[1] + c[1]);

function add(contour: Point[], point: Point): void {
  const last = contour.at(-1);
  if (!last || last[0] !== point[0] || last[1] !== point[1]) contour.push(point);
}

function closed(contour: Point[]): Point[] {
  const [first, last] = [contour[0], contour.at(-1)];
  const repeated = contour.length > 1 && first && last && first[0] === last[0] && first[1] === last[1];
  return repeated ? contour.slice(0, -1) : contour;
}
