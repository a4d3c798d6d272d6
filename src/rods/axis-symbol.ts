import type { LineSymbol } from '../crystal/elements.ts';

/**
 * The graphical symbols of symmetry axes seen along the axis, after International Tables for Crystallography A,
 * tables 2.1.2.5 to 2.1.2.7 (shapes from memory, the tables are images): filled lens, triangle, square, hexagon;
 * an open circle marks a centre on the axis; −4 is an open square with a filled lens, −6 an open hexagon with a filled
 * triangle. What is "open" there is hollowed out here.
 */
export interface AxisSymbol {
  /** Outline of the symbol, counter-clockwise, in units in which a rod's diameter is 1. */
  readonly outline: Outline;
  /** Hollow in the symbol's face; null for a plain rotation axis. */
  readonly hollow: Outline | null;
  /** What stays standing in the hollow. */
  readonly island: Outline | null;
  /** Distance from the middle to the farthest corner. */
  readonly radius: number;
  /** Thickness of what stands around the hollow; infinite without one. */
  readonly rim: number;
}

export type Outline = readonly (readonly [number, number])[];

/** Symbols of lines that carry a rotation or a rotoinversion; a line that is only normal to a mirror has none. */
export type RodSymbol = Exclude<LineSymbol, 'm'>;

const TAU = 2 * Math.PI;

const polygon = (corners: number, radius: number, turn = 0): Outline =>
  Array.from({ length: corners }, (_, i) => {
    const angle = turn + (TAU * i) / corners;
    return [radius * Math.cos(angle), radius * Math.sin(angle)] as const;
  });

/** Two circular arcs that meet in points at (±length, 0) and reach ±width. */
function lens(length: number, width: number): Outline {
  const arcRadius = (length ** 2 + width ** 2) / (2 * width);
  const half = Math.asin(length / arcRadius);
  const steps = 16;
  const upper = Array.from({ length: steps }, (_, i) => {
    const angle = half - (2 * half * i) / steps;
    return [arcRadius * Math.sin(angle), arcRadius * Math.cos(angle) - (arcRadius - width)] as const;
  });
  return [...upper, ...upper.map(([x, y]) => [-x, -y] as const)];
}

const circle = (radius: number): Outline => polygon(24, radius);

// Sizes: a shape is told apart by touch when its sides are near 13 mm (APH guidance on tactile signs), which the
// usual rod of 3 mm gives.
const LENS = lens(2.6, 1.2);
const TRIANGLE = polygon(3, 2.5);
const SQUARE = polygon(4, 2.5, TAU / 8);
const HEXAGON = polygon(6, 2.3);

const symbol = (outline: Outline, hollow: Outline | null = null, island: Outline | null = null): AxisSymbol => ({
  outline,
  hollow,
  island,
  radius: Math.max(...outline.map(([x, y]) => Math.hypot(x, y))),
  rim: hollow ? Math.min(...hollow.map((point) => inset(point, outline))) : Number.POSITIVE_INFINITY,
});

/** How far a point lies inside a counter-clockwise outline. */
const inset = ([x, y]: Outline[number], outline: Outline): number =>
  Math.min(
    ...outline.map(([px, py], i) => {
      const [qx, qy] = outline[(i + 1) % outline.length]!;
      return ((qx - px) * (y - py) - (qy - py) * (x - px)) / Math.hypot(qx - px, qy - py);
    }),
  );

/** The first reference direction of each symbol is its x axis: a corner of lens, triangle and hexagon, a side of the square. */
export const AXIS_SYMBOLS: Readonly<Record<RodSymbol, AxisSymbol>> = {
  '2': symbol(LENS),
  '3': symbol(TRIANGLE),
  '4': symbol(SQUARE),
  '6': symbol(HEXAGON),
  '2/m': symbol(LENS, circle(0.65)),
  '4/m': symbol(SQUARE, circle(0.95)),
  '6/m': symbol(HEXAGON, circle(0.95)),
  '-3': symbol(TRIANGLE, circle(0.75)),
  '-4': symbol(SQUARE, polygon(4, 1.93, TAU / 8), lens(1.2, 0.6)),
  '-6': symbol(HEXAGON, polygon(6, 1.85), polygon(3, 1.15)),
};

/** Order of the axis as it is chosen by: 3 for −3, 4 for −4 and 4/m. */
export const orderOf = (symbol: RodSymbol): 2 | 3 | 4 | 6 => Number(symbol.replace(/[-/m]/g, '')) as 2 | 3 | 4 | 6;
export const isRotoinversion = (symbol: RodSymbol): boolean => symbol.startsWith('-');
