import { expect } from 'vitest';
import { edges, measure } from '../../src/polyhedron/measures.ts';
import type { Solid } from '../../src/polyhedron/solid.ts';
import { cornerOf, decimals, type Row, rowsOf, sideOf } from './rational.ts';

export const UNIT_FRAME = [1, 0, 0, 0, 1, 0, 0, 0, 1];

/** Every law that a bounded solid obeys, checked exactly where it can be. */
export function checkSolid(solid: Solid): void {
  expect(solid.state).toBe('bounded');
  expect([...edgeFaults(solid), ...vertexFaults(solid), ...groupFaults(solid)]).toEqual([]);
  expect(count(solid).V - count(solid).E + count(solid).F, 'Euler: V − E + F').toBe(2);
  checkMeasures(solid);
}

/** Faces, edges and vertices. */
export function count(solid: Solid): { F: number; E: number; V: number } {
  return { F: presentFaces(solid).length, E: solid.neighbour.length / 2, V: solid.vertices.length / 3 };
}

export function presentFaces(solid: Solid): number[] {
  return Array.from(solid.planes.form, (_, f) => f).filter((f) => solid.start[f + 1]! > solid.start[f]!);
}

/** How many edges meet in each vertex: degree -> number of vertices. */
export function vertexDegrees(solid: Solid): Record<string, number> {
  const degree = new Array<number>(solid.vertices.length / 3).fill(0);
  for (const v of solid.corner) degree[v]! += 1;
  const found: Record<string, number> = {};
  for (const d of degree) found[d] = (found[d] ?? 0) + 1;
  return found;
}

/** Each edge belongs to exactly two faces, which run along it in opposite directions. */
function edgeFaults(solid: Solid): string[] {
  const ends = new Map<string, string>();
  const faults: string[] = [];
  for (const f of presentFaces(solid)) {
    const corners = [...solid.corner.subarray(solid.start[f], solid.start[f + 1])];
    if (corners.length < 3 || new Set(corners).size < corners.length) faults.push(`face ${f} has corners ${corners}`);
    corners.forEach((end, i) => {
      const name = `${f}/${solid.neighbour[solid.start[f]! + i]}`;
      if (ends.has(name)) faults.push(`edge ${name} occurs twice`);
      ends.set(name, `${corners.at(i - 1)}-${end}`);
    });
  }
  for (const [name, run] of ends) {
    const back = ends.get(name.split('/').reverse().join('/'));
    if (back?.split('-').reverse().join('-') !== run) faults.push(`edge ${name} runs ${run}, its partner ${back}`);
  }
  return faults;
}

/** A vertex is where it should be. Exactly: it lies on the planes of all its faces, on no other face's plane, and outside no half-space. */
function vertexFaults(solid: Solid): string[] {
  const rows = rowsOf(solid.planes);
  const size = solid.vertices.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  const faults: string[] = [];
  facesAround(solid).forEach((faces, v) => {
    const point = exactVertex(rows, faces);
    if (!point) {
      faults.push(`the faces ${faces} of vertex ${v} have no single point in common`);
      return;
    }
    const off = decimals(point).map((value, axis) => Math.abs(value - solid.vertices[3 * v + axis]!));
    if (!(Math.max(...off) <= 2 ** -33 * size)) faults.push(`vertex ${v} is ${Math.max(...off)} off its place`);
    rows.forEach((row, p) => {
      const side = sideOf(row, point);
      const appears = solid.start[p + 1]! > solid.start[p]!;
      if (side > 0) faults.push(`vertex ${v} is outside plane ${p}`);
      if (side !== 0 && faces.includes(p)) faults.push(`vertex ${v} is not on its face ${p}`);
      if (side === 0 && appears && !faces.includes(p))
        faults.push(`vertex ${v} is on face ${p}, which does not know it`);
    });
  });
  return faults;
}

export function facesAround(solid: Solid): number[][] {
  const around: number[][] = Array.from({ length: solid.vertices.length / 3 }, () => []);
  for (const f of presentFaces(solid))
    for (const v of solid.corner.subarray(solid.start[f], solid.start[f + 1])) around[v]!.push(f);
  return around;
}

/** The point that three of the faces have in common, if any three have one. */
export function exactVertex(rows: readonly Row[], faces: readonly number[]): Row | null {
  for (const [i, a] of faces.entries())
    for (const [j, b] of faces.entries())
      for (const c of faces.slice(j + 1)) {
        const point = i < j ? cornerOf(rows[a]!, rows[b]!, rows[c]!) : null;
        if (point) return point;
      }
  return null;
}

/** The group takes each face's cycle of neighbours to the cycle of the face's image. */
function groupFaults(solid: Solid): string[] {
  const { symmetry, form } = solid.planes;
  if (!symmetry) return [];
  const faults: string[] = [];
  const image = (operation: number, p: number): number =>
    symmetry.image[form[p]!]![symmetry.product[operation * symmetry.order + symmetry.carrier[p]!]!]!;
  const ring = (f: number): number[] => [...solid.neighbour.subarray(solid.start[f], solid.start[f + 1])];
  for (const f of presentFaces(solid))
    for (let operation = 0; operation < symmetry.order; operation++) {
      const carried = ring(f).map((p) => image(operation, p));
      if (symmetry.improper[operation]) carried.reverse();
      const found = ring(image(operation, f));
      const from = found.indexOf(carried[0]!);
      const turned = [...found.slice(from), ...found.slice(0, from)];
      if (turned.join() !== carried.join()) faults.push(`operation ${operation} does not take face ${f} to its image`);
    }
  return faults;
}

/** Areas along the outward normals close up, and the volume is that of all tetrahedra from the origin to the surface. */
function checkMeasures(solid: Solid): void {
  const found = measure(solid, UNIT_FRAME);
  expect(found.volume).toBeGreaterThan(0);
  const size = found.circumscribedRadius;
  const length = edges(solid, found).reduce((sum, edge) => sum + edge.length, 0);
  // 1e-9, and for needles what doubles cannot do better: each edge's ends are off by the rounding of its coordinates.
  const allowed = 1e-9 + (2 ** -48 * size * length) / found.surface;
  const closing = [0, 0, 0];
  for (const f of found.faces)
    for (let axis = 0; axis < 3; axis++) closing[axis]! += found.area[f]! * found.normals[3 * f + axis]!;
  for (const sum of closing) expect(Math.abs(sum) / found.surface).toBeLessThan(allowed);
  expect(Math.abs(found.volume - tetrahedra(solid)) / (found.surface * size)).toBeLessThan(allowed);
}

function tetrahedra(solid: Solid): number {
  const at = (v: number): number[] => [...solid.vertices.subarray(3 * v, 3 * v + 3)];
  let sum = 0;
  for (const f of presentFaces(solid)) {
    const [first, ...others] = [...solid.corner.subarray(solid.start[f], solid.start[f + 1])].map(at);
    others.slice(1).forEach((q, i) => {
      const p = others[i]!;
      const cross = [p[1]! * q[2]! - p[2]! * q[1]!, p[2]! * q[0]! - p[0]! * q[2]!, p[0]! * q[1]! - p[1]! * q[0]!];
      sum += first![0]! * cross[0]! + first![1]! * cross[1]! + first![2]! * cross[2]!;
    });
  }
  return sum / 6;
}
