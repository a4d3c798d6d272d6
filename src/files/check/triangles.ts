import type { Mesh } from '../../print/mesh.ts';
import { numberRows } from '../mesh/number-rows.ts';
import { Findings, placeOfTriangle } from './findings.ts';

/**
 * A triangle counts as having no area when its height over its longest edge is at most this part of that edge. Rounding
 * alone leaves less than 1e-15 of it on three points in line (two products and a difference of exact differences), so
 * the bound is a thousand times that; a height which matters in print is many orders of magnitude above it.
 */
const ZERO_HEIGHT = 1e-12;

/** What the triangles are, each taken by itself. */
export interface TriangleFacts {
  /** 1 for triangles with a repeated vertex: they have no place in the net of edges. */
  readonly collapsed: Uint8Array;
  /** 1 for triangles with no area, the collapsed ones among them. */
  readonly flat: Uint8Array;
  readonly degenerate: Findings;
  readonly duplicate: Findings;
}

/** @param same for each vertex, the first vertex at its place. */
export function examineTriangles(mesh: Mesh, same: Uint32Array): TriangleFacts {
  const count = mesh.triangles.length / 3;
  const collapsed = new Uint8Array(count);
  const flat = new Uint8Array(count);
  const degenerate = new Findings();
  for (let t = 0; t < count; t++) {
    const [a, b, c] = mesh.triangles.subarray(3 * t, 3 * t + 3);
    if (a === b || b === c || c === a) collapsed[t] = 1;
    if (collapsed[t] === 0 && hasArea(mesh.positions, 3 * a!, 3 * b!, 3 * c!)) continue;
    flat[t] = 1;
    degenerate.add(() => placeOfTriangle(mesh, t));
  }
  return { collapsed, flat, degenerate, duplicate: findDuplicates(mesh, same, flat) };
}

function hasArea(p: Float64Array, a: number, b: number, c: number): boolean {
  const [ux, uy, uz] = [p[b]! - p[a]!, p[b + 1]! - p[a + 1]!, p[b + 2]! - p[a + 2]!];
  const [vx, vy, vz] = [p[c]! - p[a]!, p[c + 1]! - p[a + 1]!, p[c + 2]! - p[a + 2]!];
  const longest = Math.max(Math.hypot(ux, uy, uz), Math.hypot(vx, vy, vz), Math.hypot(vx - ux, vy - uy, vz - uz));
  const twiceArea = Math.hypot(uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx);
  return twiceArea > ZERO_HEIGHT * longest * longest;
}

/** Later triangles on the same three points. Flat ones are left out: they are reported already. */
function findDuplicates(mesh: Mesh, same: Uint32Array, flat: Uint8Array): Findings {
  const found = new Findings();
  const { numbers, firsts } = numberRows(sortedCorners(mesh, same), 3);
  for (let t = 0; t < numbers.length; t++) {
    const twin = firsts[numbers[t]!]!;
    if (twin !== t && flat[t] === 0) found.add(() => ({ ...placeOfTriangle(mesh, t), triangles: [twin, t] }));
  }
  return found;
}

/** The corners of each triangle as points, least number first. */
function sortedCorners({ triangles }: Mesh, same: Uint32Array): Int32Array {
  const sorted = new Int32Array(triangles.length);
  for (let i = 0; i < triangles.length; i += 3) {
    const a = same[triangles[i]!]!;
    const b = same[triangles[i + 1]!]!;
    const c = same[triangles[i + 2]!]!;
    sorted[i] = Math.min(a, b, c);
    sorted[i + 2] = Math.max(a, b, c);
    sorted[i + 1] = a + b + c - sorted[i]! - sorted[i + 2]!;
  }
  return sorted;
}
