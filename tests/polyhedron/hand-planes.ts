import { exactOffsets } from '../../src/polyhedron/offset.ts';
import { loosePlanes, type PlaneSet } from '../../src/polyhedron/planes.ts';

/** One half-space h·x ≤ D, as h1, h2, h3, D. */
export type HalfSpace = readonly [number, number, number, number];

/** Half-spaces taken at their exact double values. */
export function planesFrom(halfSpaces: readonly HalfSpace[]): PlaneSet {
  return loosePlanes(
    Float64Array.from(halfSpaces.flatMap((plane) => plane.slice(0, 3))),
    exactOffsets(halfSpaces.map(([, , , d]) => d)),
  );
}

/** The cube |x|, |y|, |z| ≤ half. */
export const cube = (half = 1): HalfSpace[] => [
  [1, 0, 0, half],
  [-1, 0, 0, half],
  [0, 1, 0, half],
  [0, -1, 0, half],
  [0, 0, 1, half],
  [0, 0, -1, half],
];

const signs = [1, -1];

/** The octahedron |x| + |y| + |z| ≤ reach. */
export const octahedron = (reach: number): HalfSpace[] =>
  signs.flatMap((h) => signs.flatMap((k) => signs.map((l): HalfSpace => [h, k, l, reach])));

/** The next double above. */
export function nextUp(value: number): number {
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, value);
  view.setBigInt64(0, view.getBigInt64(0) + (value >= 0 ? 1n : -1n));
  return view.getFloat64(0);
}

export const nextDown = (value: number): number => -nextUp(-value);

/** A turn about an axis by an angle, applied to the normals only (the offsets are distances, which a turn keeps). */
export function turned(halfSpaces: readonly HalfSpace[], axis: readonly number[], angle: number): HalfSpace[] {
  const length = Math.hypot(...axis);
  const [x, y, z] = axis.map((value) => value / length);
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return halfSpaces.map(([h, k, l, d]): HalfSpace => {
    const along = (h * x! + k * y! + l * z!) * (1 - c);
    return [
      h * c + (y! * l - z! * k) * s + x! * along,
      k * c + (z! * h - x! * l) * s + y! * along,
      l * c + (x! * k - y! * h) * s + z! * along,
      d,
    ];
  });
}
