type Vector = readonly [number, number, number];

/**
 * Directions in which half-spaces with these normals leave their intersection open: the extreme rays of the cone
 * `h·x ≤ 0`; where the cone holds whole lines or planes, both senses of a basis of them. Empty for a bounded solid.
 * Normals must be whole numbers; the rays are whole numbers in lowest terms.
 * @param normals h1, h2, h3 of each plane, one after the other
 */
export function openDirections(normals: ArrayLike<number>): Vector[] {
  const rows = distinct(normals);
  const lines = freeLines(rows);
  if (lines.length === 3) return lines.flatMap(bothWays);
  const rays = new Map<string, Vector>();
  const consider = (ray: Vector): void => {
    if (ray.some((value) => value !== 0) && rows.every((h) => dot(h, ray) <= 0)) rays.set(ray.join(), ray);
  };
  if (lines.length === 2) for (const h of rows) bothWays(h).forEach(consider);
  for (const [i, a] of rows.entries())
    for (const b of lines.length === 1 ? lines : rows.slice(i + 1))
      for (const ray of bothWays(lowest(cross(a, b)))) consider(ray);
  for (const line of lines) for (const way of bothWays(line)) rays.set(way.join(), way);
  return [...rays.values()];
}

/** A basis of the lines that lie in every plane: none, one (a prism), two (parallel faces) or three (no face). */
function freeLines(rows: readonly Vector[]): Vector[] {
  const [first] = rows;
  if (!first)
    return [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ];
  const second = rows.find((h) => !isZero(cross(first, h)));
  if (!second) return planeBasis(first);
  const along = lowest(cross(first, second));
  return rows.every((h) => dot(h, along) === 0) ? [along] : [];
}

function planeBasis([h, k, l]: Vector): Vector[] {
  const inPlane = (
    [
      [k, -h, 0],
      [l, 0, -h],
      [0, l, -k],
    ] as const
  )
    .filter((v) => !isZero(v))
    .map(lowest);
  const [first] = inPlane;
  return [first!, inPlane.find((v) => !isZero(cross(first!, v)))!];
}

function distinct(normals: ArrayLike<number>): Vector[] {
  const rows = new Map<string, Vector>();
  for (let at = 0; at < normals.length; at += 3) {
    const row = lowest([normals[at]!, normals[at + 1]!, normals[at + 2]!]);
    rows.set(row.join(), row);
  }
  return [...rows.values()];
}

const bothWays = (v: Vector): Vector[] => [v, [0 - v[0], 0 - v[1], 0 - v[2]]];
const isZero = (v: Vector): boolean => v.every((value) => value === 0);
const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const cross = (a: Vector, b: Vector): Vector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
const divisor = (a: number, b: number): number => (b === 0 ? Math.abs(a) : divisor(b, a % b));

function lowest(v: Vector): Vector {
  const common = divisor(divisor(v[0], v[1]), v[2]) || 1;
  return [v[0] / common + 0, v[1] / common + 0, v[2] / common + 0];
}
