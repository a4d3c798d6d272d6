import { cosDegrees, sinDegrees } from './exact-angle.ts';
import type { Axes } from './setting.ts';
import { type Cartesian, type CellVector, cartesian, type Miller, type Zone } from './spaces.ts';

/** Unit cell: edges in ångström, angles in degrees (alpha between b and c, beta between c and a, gamma a and b). */
export interface Cell {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly alpha: number;
  readonly beta: number;
  readonly gamma: number;
}

export type Vector3 = readonly [number, number, number];

/** Rows first. */
export type RealMatrix = readonly [Vector3, Vector3, Vector3];

/** Lengths and directions of a cell. Direct lengths in ångström, reciprocal ones in 1/ångström (no factor 2π). */
export interface Metric {
  /** G, Gᵢⱼ = aᵢ·aⱼ. */
  readonly direct: RealMatrix;
  /** G* = G⁻¹. */
  readonly reciprocal: RealMatrix;
  /** Å³. */
  readonly volume: number;
  /** Cell coordinates to Cartesian: its columns are a, b and c. */
  readonly frame: RealMatrix;
  /** Face indices to their Cartesian normal: its columns are a*, b* and c*. */
  readonly reciprocalFrame: RealMatrix;
}

/**
 * The metric of a cell. The Cartesian frame is right-handed with z ∥ c and y ∥ b*, so that x points at the viewer and
 * y to the right. On rhombohedral axes the three-fold axis is upright instead: z ∥ [111] and x ∥ a − b, the a axis of
 * the hexagonal cell in obverse relation, which makes it the same frame as that of the hexagonal axes.
 * @param cell complete and closed, see `completeCell`
 */
export function metric(cell: Cell, axes: Axes): Metric {
  const [a, b, c] = axes === 'rhombohedral' ? rhombohedralEdges(cell) : standardEdges(cell);
  const volume = cell.a * cell.b * cell.c * unitVolume(cell);
  const reciprocal = [cross(b, c), cross(c, a), cross(a, b)].map(
    ([x, y, z]): Vector3 => [x / volume, y / volume, z / volume],
  );
  const [aStar, bStar, cStar] = reciprocal as [Vector3, Vector3, Vector3];
  return {
    direct: gram(a, b, c),
    reciprocal: gram(aStar, bStar, cStar),
    volume,
    frame: columns(a, b, c),
    reciprocalFrame: columns(aStar, bStar, cStar),
  };
}

/** Volume of the cell with these angles and unit edges, by the product formula, which does not cancel. */
export function unitVolume({ alpha, beta, gamma }: Cell): number {
  if (alpha === 90 && beta === 90) return sinDegrees(gamma);
  if (alpha === 90 && gamma === 90) return sinDegrees(beta);
  if (beta === 90 && gamma === 90) return sinDegrees(alpha);
  const half = (alpha + beta + gamma) / 2;
  const sines = sinDegrees(half) * sinDegrees(half - alpha) * sinDegrees(half - beta) * sinDegrees(half - gamma);
  return 2 * Math.sqrt(sines);
}

function standardEdges(cell: Cell): [Vector3, Vector3, Vector3] {
  const [cosAlpha, cosBeta, cosGamma] = [cosDegrees(cell.alpha), cosDegrees(cell.beta), cosDegrees(cell.gamma)];
  const sinBeta = sinDegrees(cell.beta);
  return [
    [cell.a * sinBeta, 0, cell.a * cosBeta],
    [(cell.b * (cosGamma - cosAlpha * cosBeta)) / sinBeta, (cell.b * unitVolume(cell)) / sinBeta, cell.b * cosAlpha],
    [0, 0, cell.c],
  ];
}

/** Edges leaning equally on [111], whose projections lie at 120° to each other. */
function rhombohedralEdges({ a, alpha }: Cell): [Vector3, Vector3, Vector3] {
  const height = a * Math.sqrt((1 + 2 * cosDegrees(alpha)) / 3);
  const half = a * sinDegrees(alpha / 2);
  const third = half / Math.sqrt(3);
  return [
    [half, third, height],
    [-half, third, height],
    [0, -2 * third, height],
  ];
}

const cross = (p: Vector3, q: Vector3): Vector3 => [
  p[1] * q[2] - p[2] * q[1],
  p[2] * q[0] - p[0] * q[2],
  p[0] * q[1] - p[1] * q[0],
];

export const dot = (p: Vector3, q: Vector3): number => p[0] * q[0] + p[1] * q[1] + p[2] * q[2];

const columns = (a: Vector3, b: Vector3, c: Vector3): RealMatrix => [
  [a[0], b[0], c[0]],
  [a[1], b[1], c[1]],
  [a[2], b[2], c[2]],
];

function gram(a: Vector3, b: Vector3, c: Vector3): RealMatrix {
  const [ab, ac, bc] = [dot(a, b), dot(a, c), dot(b, c)];
  return [
    [dot(a, a), ab, ac],
    [ab, dot(b, b), bc],
    [ac, bc, dot(c, c)],
  ];
}

const apply = (m: RealMatrix, v: Vector3): Cartesian => cartesian(dot(m[0], v), dot(m[1], v), dot(m[2], v));

/** v G v, the squared length. */
const squaredLength = (m: RealMatrix, v: Vector3): number => dot(apply(m, v), v);

/** Position or direction in the Cartesian frame, ångström. */
export const toCartesian = ({ frame }: Metric, vector: CellVector | Zone): Cartesian => apply(frame, vector);

/** |h|* in 1/Å, the length of the reciprocal vector; its inverse is the spacing of the lattice planes (hkl). */
export const reciprocalLength = ({ reciprocal }: Metric, face: Miller): number =>
  Math.sqrt(squaredLength(reciprocal, face));

/** |uvw| in Å. */
export const directLength = ({ direct }: Metric, axis: CellVector | Zone): number =>
  Math.sqrt(squaredLength(direct, axis));

/** Outward unit normal of a face. */
export function normal({ reciprocalFrame }: Metric, face: Miller): Cartesian {
  const [x, y, z] = apply(reciprocalFrame, face);
  const length = Math.hypot(x, y, z);
  return cartesian(x / length, y / length, z / length);
}
