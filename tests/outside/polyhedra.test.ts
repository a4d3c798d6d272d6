import { describe, expect, it } from 'vitest';
import { edges, measure } from '../../src/polyhedron/measures.ts';
import { intersect, type Solid } from '../../src/polyhedron/solid.ts';
import { checkSolid, count, presentFaces, vertexDegrees } from '../polyhedron/check-solid.ts';
import { crystalPlanes, withoutSymmetry } from '../polyhedron/crystal-planes.ts';
import { polyhedraCases as cases, decimal, type FormResult, type PolyhedronCase } from './reference/polyhedra.ts';

/**
 * 60 combinations of forms. The expected values were computed by exact rational clipping and confirmed by scipy 1.10.1
 * and the qhull 2020.2 programs; the group matrices come from spglib 2.0.2 and gemmi 0.5.7.
 */
const CLOSE = 1e-9;

const planesOf = ({ group, forms }: PolyhedronCase) =>
  crystalPlanes(
    group,
    forms.map(({ hkl, D }) => ({ hkl, D: decimal(D) })),
  );

/** a along x, b in the xy plane, c* along z: no expected number depends on the choice. */
function frameOf([a, b, c, alpha, beta, gamma]: PolyhedronCase['cell']): number[] {
  const [ca, cb, cg] = [alpha, beta, gamma].map((angle) => Math.cos((angle * Math.PI) / 180));
  const sg = Math.sin((gamma * Math.PI) / 180);
  const cy = (ca! - cb! * cg!) / sg;
  return [a, b * cg!, c * cb!, 0, b * sg, c * cy, 0, 0, c * Math.sqrt(1 - cb! * cb! - cy * cy)];
}

const within = (found: number, wanted: number, what: string): void =>
  expect(Math.abs(found - wanted) / Math.abs(wanted), `${what}: ${found} instead of ${wanted}`).toBeLessThan(CLOSE);

describe.each(cases.map((one) => [one.id, one] as const))('case %s', (_, one) => {
  const expected = one.expect;
  const state = { bounded: 'bounded', unbounded: 'open', empty: 'empty', flat: 'empty' }[expected.result];

  it.each([
    ['with its point group', planesOf(one)],
    ['plane by plane', withoutSymmetry(planesOf(one))],
  ])('%s', (_way, planes) => {
    const solid = intersect(planes);
    expect(solid.state).toBe(state);
    if (state !== 'bounded') return;
    checkSolid(solid);
    expect(count(solid)).toEqual({ F: expected.F, E: expected.E, V: expected.V });
    expect(vertexDegrees(solid)).toEqual(expected.vertex_degrees);
    checkSizes(solid, one);
    for (const [f, form] of expected.forms!.entries()) checkForm(solid, one, form, f);
    checkVertices(solid, one);
  });
});

function checkSizes(solid: Solid, one: PolyhedronCase): void {
  const found = measure(solid, frameOf(one.cell));
  within(found.volume, one.expect.volume, 'volume');
  within(found.surface, one.expect.area, 'area');
  within(found.circumscribedRadius, one.expect.r_max, 'farthest vertex');
  const length = edges(solid, found).reduce((sum, edge) => sum + edge.length, 0);
  within(length, one.expect.edge_length, 'length of all edges');
}

function checkForm(solid: Solid, one: PolyhedronCase, form: FormResult, f: number): void {
  const { area, positions, normals } = measure(solid, frameOf(one.cell));
  const ofForm = planesOf(one).form;
  const faces = presentFaces(solid).filter((p) => ofForm[p] === f);
  if (form.state === 'present') {
    expect(faces).toHaveLength(ofForm.filter((g) => g === f).length);
    for (const p of faces) {
      expect(solid.start[p + 1]! - solid.start[p]!).toBe(form.sides);
      within(area[p]!, form.face_area!, `area of a face of form ${f}`);
    }
    return;
  }
  expect(faces).toEqual([]);
  const normal = normals.subarray(3 * ofForm.indexOf(f));
  const heights = Array.from({ length: positions.length / 3 }, (_, v) =>
    [0, 1, 2].reduce((sum, axis) => sum + normal[axis]! * positions[3 * v + axis]!, 0),
  );
  const gaps = heights.map((height) => one.forms[f]!.d - height);
  const touching = gaps.filter((gap) => Math.abs(gap) < CLOSE * one.expect.r_max).length;
  if (form.state === 'absent') within(Math.min(...gaps), form.gap!, `gap of form ${f}`);
  if (form.state === 'touches-vertex') expect(touching).toBe(1);
  if (form.state === 'touches-edge') expect(touching).toBe(2);
  if (form.state === 'coincident') expect(touching).toBeGreaterThan(2);
}

/** The group takes one vertex of each orbit to all vertices of the orbit, and to nothing else. */
function checkVertices(solid: Solid, one: PolyhedronCase): void {
  const matrices = planesOf(one).symmetry!.matrices;
  const size = Math.max(...solid.vertices.map(Math.abs));
  const left = new Set(Array.from({ length: solid.vertices.length / 3 }, (_, v) => v));
  for (const [start, multiplicity] of one.expect.vertex_orbits) {
    const found = new Set<number>();
    for (let w = 0; w < matrices.length; w += 9) {
      const image = [0, 3, 6].map((row) =>
        start.reduce<number>((sum, value, j) => sum + matrices[w + row + j]! * decimal(value), 0),
      );
      const vertex = [...Array(solid.vertices.length / 3).keys()].find((v) =>
        image.every((value, axis) => Math.abs(value - solid.vertices[3 * v + axis]!) < CLOSE * size),
      );
      expect(vertex, `vertex at ${image}`).toBeDefined();
      found.add(vertex!);
    }
    expect(found.size).toBe(multiplicity);
    for (const v of found) left.delete(v);
  }
  expect(left.size).toBe(0);
}
