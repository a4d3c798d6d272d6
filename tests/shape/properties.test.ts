import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { normal, toCartesian } from '../../src/crystal/cell.ts';
import { cellVector, miller } from '../../src/crystal/spaces.ts';
import { checkMesh } from '../../src/files/check/check.ts';
import { weldFloat32 } from '../../src/files/mesh/weld.ts';
import { readStl } from '../../src/files/stl/read.ts';
import { writeStl } from '../../src/files/stl/write.ts';
import { crystal } from '../../src/index.ts';
import { crystalMesh } from '../../src/print/body.ts';
import type { RecipeInput } from '../../src/recipe/schema.ts';
import { type ClosedShape, isClosed, polyhedron } from '../../src/shape/shape.ts';
import { crystals, runs } from './random-crystals.ts';

/**
 * What holds for every crystal, whatever its group, cell and forms (textbook geometry: Euler's relation, the divergence
 * theorem; and the definition of the point group itself). 2,900 cases in all; more with GONIOLITH_RUNS.
 */
const solve = (recipe: RecipeInput): ClosedShape => {
  const shape = polyhedron(crystal(recipe));
  if (!isClosed(shape)) throw new Error('the generator closes its crystals');
  return shape;
};

const holds = (usual: number, check: (shape: ClosedShape) => void): void =>
  fc.assert(
    fc.property(crystals, (recipe) => check(solve(recipe))),
    { numRuns: runs(usual) },
  );

describe('every crystal', () => {
  it('keeps Euler’s relation, and each edge is shared by two faces', () => {
    holds(700, ({ solid, measures }) => {
      const [faces, edges, vertices] = [measures.faces.length, solid.neighbour.length / 2, solid.vertices.length / 3];
      expect(vertices - edges + faces).toBe(2);
      expect(Number.isInteger(edges)).toBe(true);
    });
  });

  it('has its faces at the asked distance, with the normal of their indices, and no vertex outside any face', () => {
    holds(700, ({ crystal: { metric, forms }, solid, measures }) => {
      const size = measures.circumscribedRadius;
      solid.planes.form.forEach((form, plane) => {
        const [h, k, l] = solid.planes.normals.subarray(3 * plane, 3 * plane + 3);
        const [x, y, z] = normal(metric, miller(h!, k!, l!));
        const { distance } = forms[form]!;
        const heights = Array.from({ length: solid.vertices.length / 3 }, (_, v) => {
          const [u, w, t] = solid.vertices.subarray(3 * v, 3 * v + 3);
          const [p, q, r] = toCartesian(metric, cellVector(u!, w!, t!));
          return x * p + y * q + z * r;
        });
        expect(Math.max(...heights)).toBeLessThanOrEqual(distance + 1e-9 * size);
        for (let e = solid.start[plane]!; e < solid.start[plane + 1]!; e++)
          expect(Math.abs(heights[solid.corner[e]!]! - distance)).toBeLessThan(1e-9 * size);
      });
    });
  });

  it('is unchanged by every operation of its group', () => {
    holds(400, ({ crystal: { group }, solid, measures }) => {
      const size = Math.max(...solid.vertices.map(Math.abs));
      const vertices = Array.from({ length: solid.vertices.length / 3 }, (_, v) => [
        ...solid.vertices.subarray(3 * v, 3 * v + 3),
      ]);
      for (const { matrix } of group.operations)
        for (const [x, y, z] of vertices) {
          const image = matrix.map((row) => row[0] * x! + row[1] * y! + row[2] * z!);
          const nearest = Math.min(
            ...vertices.map((v) => Math.max(...v.map((value, i) => Math.abs(value - image[i]!)))),
          );
          expect(nearest).toBeLessThan(1e-9 * size);
        }
      const areas = new Map<number, number>();
      for (const plane of measures.faces) {
        const form = solid.planes.form[plane]!;
        const area = areas.get(form) ?? measures.area[plane]!;
        areas.set(form, area);
        expect(Math.abs(measures.area[plane]! - area)).toBeLessThan(1e-9 * measures.surface);
      }
    });
  });

  it('has the volume of the pyramids on its faces, and vector areas that add up to nothing', () => {
    holds(400, ({ crystal: { forms }, solid, measures }) => {
      const pyramids = measures.faces.map(
        (plane) => (measures.area[plane]! * forms[solid.planes.form[plane]!]!.distance) / 3,
      );
      const total = pyramids.reduce((sum, value) => sum + value, 0);
      expect(Math.abs(total / measures.volume - 1)).toBeLessThan(1e-9);
      for (let axis = 0; axis < 3; axis++) {
        const sum = measures.faces.reduce(
          (all, plane) => all + measures.area[plane]! * measures.normals[3 * plane + axis]!,
          0,
        );
        expect(Math.abs(sum)).toBeLessThan(1e-9 * measures.surface);
      }
    });
  });

  it('is written as a watertight STL file with the polyhedron’s volume', () => {
    holds(700, (shape) => {
      const scale = 30 / shape.measures.circumscribedRadius;
      const { mesh, normals } = readStl(writeStl(weldFloat32(crystalMesh(shape, scale)), 'random'));
      const report = checkMesh(mesh, normals);
      expect(report.problems).toEqual([]);
      expect(report.bodies).toHaveLength(1);
      expect(Math.abs(report.volume / (shape.measures.volume * scale ** 3) - 1)).toBeLessThan(1e-5);
    });
  });
});
