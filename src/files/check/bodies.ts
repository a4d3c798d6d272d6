import type { Mesh } from '../../print/mesh.ts';
import type { Clusters } from '../mesh/clusters.ts';
import type { Body, BodyKind, Extents, Point } from './report.ts';
import { windingNumber } from './winding-number.ts';

/** How many of a body's triangles are tried for a point that lies on no other body. */
const TRIES = 16;
/** A sum of solid angles this near to a whole number, in turns, is that number. */
const WHOLE = 1e-3;

/**
 * The connected pieces of surface, in the order of their first triangle.
 * @param clusters which triangles belong together.
 * @param unpaired 1 for triangles at an edge that is not properly paired: their body is open.
 * @param collapsed 1 for triangles with a repeated vertex, which belong to no body.
 */
export function measureBodies(mesh: Mesh, clusters: Clusters, unpaired: Uint8Array, collapsed: Uint8Array): Body[] {
  const members = new Map<number, number[]>();
  for (let t = 0; t < collapsed.length; t++) {
    if (collapsed[t] === 1) continue;
    const list = members.get(clusters.root(t));
    if (list === undefined) members.set(clusters.root(t), [t]);
    else list.push(t);
  }
  const shells = [...members.values()].map((triangles) => ({
    triangles,
    ...measureShell(mesh, triangles),
    closed: triangles.every((t) => unpaired[t] === 0),
  }));
  return shells.map((shell) => ({
    kind: kindOf(mesh, shell, shells),
    triangles: shell.triangles.length,
    volume: shell.volume,
    area: shell.area,
    extents: shell.extents,
  }));
}

interface Shell {
  readonly triangles: readonly number[];
  readonly closed: boolean;
  readonly volume: number;
  readonly area: number;
  readonly extents: Extents;
}

function kindOf(mesh: Mesh, shell: Shell, shells: readonly Shell[]): BodyKind {
  if (!shell.closed) return 'open';
  const around = layersAround(mesh, shell, shells);
  if (shell.volume >= 0) return around === 0 ? 'solid' : 'nested';
  return around === 1 ? 'cavity' : around > 1 ? 'nested' : 'insideOut';
}

/** How many layers of material the other closed bodies put around this one; cavities take one away. */
function layersAround(mesh: Mesh, shell: Shell, shells: readonly Shell[]): number {
  const others = shells.filter((other) => other !== shell && other.closed && encloses(other.extents, shell.extents));
  if (others.length === 0) return 0;
  let layers = 0;
  for (const t of shell.triangles.slice(0, TRIES)) {
    const point = centroid(mesh, t);
    const turns = others.reduce((sum, other) => sum + windingNumber(mesh, other.triangles, point), 0);
    layers = Math.round(turns);
    if (Math.abs(turns - layers) < WHOLE) break;
  }
  return layers;
}

/** A body inside another has its box inside the other's. */
function encloses(outer: Extents, inner: Extents): boolean {
  return [0, 1, 2].every((i) => outer.min[i]! <= inner.min[i]! && outer.max[i]! >= inner.max[i]!);
}

function centroid({ positions: p, triangles }: Mesh, t: number): Point {
  const [a, b, c] = [3 * triangles[3 * t]!, 3 * triangles[3 * t + 1]!, 3 * triangles[3 * t + 2]!];
  return [
    (p[a]! + p[b]! + p[c]!) / 3,
    (p[a + 1]! + p[b + 1]! + p[c + 1]!) / 3,
    (p[a + 2]! + p[b + 2]! + p[c + 2]!) / 3,
  ];
}

/** Volume by the divergence theorem, from the shell's first corner so that its place costs no digits. */
function measureShell(
  { positions: p, triangles }: Mesh,
  members: readonly number[],
): Omit<Shell, 'triangles' | 'closed'> {
  const o = 3 * triangles[3 * members[0]!]!;
  const min: [number, number, number] = [Infinity, Infinity, Infinity];
  const max: [number, number, number] = [-Infinity, -Infinity, -Infinity];
  let sixVolumes = 0;
  let twoAreas = 0;
  for (const t of members) {
    const [a, b, c] = [3 * triangles[3 * t]!, 3 * triangles[3 * t + 1]!, 3 * triangles[3 * t + 2]!];
    const [ux, uy, uz] = [p[b]! - p[a]!, p[b + 1]! - p[a + 1]!, p[b + 2]! - p[a + 2]!];
    const [vx, vy, vz] = [p[c]! - p[a]!, p[c + 1]! - p[a + 1]!, p[c + 2]! - p[a + 2]!];
    const [nx, ny, nz] = [uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx];
    sixVolumes += (p[a]! - p[o]!) * nx + (p[a + 1]! - p[o + 1]!) * ny + (p[a + 2]! - p[o + 2]!) * nz;
    twoAreas += Math.sqrt(nx * nx + ny * ny + nz * nz);
    for (let axis = 0; axis < 3; axis++) {
      min[axis] = Math.min(min[axis]!, p[a + axis]!, p[b + axis]!, p[c + axis]!);
      max[axis] = Math.max(max[axis]!, p[a + axis]!, p[b + axis]!, p[c + axis]!);
    }
  }
  return { volume: sixVolumes / 6, area: twoAreas / 2, extents: { min, max } };
}
