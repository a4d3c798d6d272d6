import type { MeshReport } from '../files/check/report.ts';

/** What was found in a file, in words. */
export function checkText(path: string, format: string, found: MeshReport): string {
  const { low, high } = { low: found.extents.min, high: found.extents.max };
  const size = [0, 1, 2].map((axis) => short(high[axis]! - low[axis]!)).join(' × ');
  const bodies = found.bodies.length === 1 ? 'one body' : `${found.bodies.length} bodies`;
  const lines = [
    `${path}: ${found.ok ? 'sound' : 'NOT sound'} (${format}, ${found.triangles} triangles, ${bodies})`,
    `  watertight ${found.watertight ? 'yes' : 'no'}; volume ${short(found.volume)} mm³, surface ${short(found.area)} mm², extents ${size} mm`,
    ...found.problems.map(({ message }) => `  ${message}`),
    ...moreOpenEdges(found),
  ];
  return lines.join('\n');
}

const short = (value: number): string => String(Number(value.toFixed(3)));

/** The first open edges by the coordinates of their ends, beyond the one that the message names. */
function moreOpenEdges({ openEdges }: MeshReport): string[] {
  if (openEdges.first.length < 2) return [];
  const places = openEdges.first.map(({ points }) =>
    points.map((point) => `(${point.map(short).join(', ')})`).join(' to '),
  );
  return [`  open edges: ${places.join('; ')}${openEdges.count > places.length ? '; …' : ''}`];
}
