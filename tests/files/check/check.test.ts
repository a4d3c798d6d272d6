import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { checkMesh, type MeshReport, type ProblemCode } from '../../../src/files/check/check.ts';
import { MOST_TOUCHING } from '../../../src/files/check/touching.ts';
import { weldFloat32 } from '../../../src/files/mesh/weld.ts';
import { readStl } from '../../../src/files/stl/read.ts';
import { writeStl } from '../../../src/files/stl/write.ts';
import { cube, octahedron, together, torus, turned, withMore, without } from '../shapes.ts';

const kinds = (report: MeshReport): string[] => report.bodies.map(({ kind }) => kind);
const message = (report: MeshReport, code: ProblemCode): string | undefined =>
  report.problems.find((problem) => problem.code === code)?.message;

describe('checkMesh finds nothing wrong', () => {
  it('with a cube: 10³ mm³, 6·10² mm²', () => {
    const report = checkMesh(cube());
    expect(report).toMatchObject({ ok: true, problems: [], triangles: 12, vertices: 8, watertight: true });
    expect(report.volume).toBe(1000);
    expect(report.area).toBe(600);
    expect(report.extents).toEqual({ min: [0, 0, 0], max: [10, 10, 10] });
    expect(kinds(report)).toEqual(['solid']);
  });

  it('with an octahedron far from the origin: 4r³/3 mm³, 4√3 r² mm²', () => {
    const mesh = octahedron(3);
    const report = checkMesh({ ...mesh, positions: mesh.positions.map((value) => value + 4096) });
    expect(report.ok).toBe(true);
    expect(report.volume).toBeCloseTo(36, 9);
    expect(report.area).toBeCloseTo(36 * Math.sqrt(3), 9);
  });

  it('with a ring: 2π²Rr² mm³ (Pappus) when finely divided, one body, whatever its handle', () => {
    const report = checkMesh(weldFloat32(torus(30, 10, 200, 200)));
    expect(report.ok).toBe(true);
    expect(report.volume / (2 * Math.PI ** 2 * 30 * 100)).toBeCloseTo(1, 3);
  });

  it('with two cubes apart, and with a cube in the cavity of another', () => {
    expect(kinds(checkMesh(together(cube(), cube(10, [11, 0, 0]))))).toEqual(['solid', 'solid']);
    const nest = checkMesh(together(cube(10), turned(cube(6, [2, 2, 2])), cube(2, [4, 4, 4])));
    expect(nest.ok).toBe(true);
    expect(kinds(nest)).toEqual(['solid', 'cavity', 'solid']);
    expect(nest.volume).toBe(1000 - 216 + 8);
    expect(nest.bodies[1]!.volume).toBe(-216);
  });

  it('with a cavity whose corner is nearest to the wall', () => {
    const report = checkMesh(together(turned(cube(1, [0.001, 0.001, 0.001])), cube(10)));
    expect(kinds(report)).toEqual(['cavity', 'solid']);
    expect(report.ok).toBe(true);
  });

  it('with any box, at any size', () => {
    const side = fc.double({ min: 1e-3, max: 1e3, noNaN: true });
    fc.assert(
      fc.property(side, side, side, (x, y, z) => {
        const mesh = cube(1);
        const scaled = { ...mesh, positions: mesh.positions.map((value, i) => value * [x, y, z][i % 3]!) };
        const report = checkMesh(scaled);
        expect(report.problems).toEqual([]);
        expect(report.volume / (x * y * z)).toBeCloseTo(1, 9);
      }),
    );
  });

  it('with the normals that were written', () => {
    const { mesh, normals } = readStl(writeStl(weldFloat32(torus(30, 10, 30, 20)), ''));
    expect(checkMesh(mesh, normals)).toMatchObject({ ok: true, wrongNormals: 0, missingNormals: 0 });
  });
});

describe('checkMesh', () => {
  it('does not depend on the order of triangles or on which corner comes first', () => {
    const mesh = together(weldFloat32(torus(30, 10, 12, 9)), cube(10, [25, 0, 0]));
    const count = mesh.triangles.length / 3;
    const plain = checkMesh(mesh);
    fc.assert(
      fc.property(fc.shuffledSubarray([...Array(count).keys()], { minLength: count }), fc.nat(2), (order, turn) => {
        const triangles = Uint32Array.from(
          order.flatMap((t) => [0, 1, 2].map((i) => mesh.triangles[3 * t + ((i + turn) % 3)]!)),
        );
        const report = checkMesh({ ...mesh, triangles });
        expect(report.selfTouching.count).toBe(plain.selfTouching.count);
        expect(report.volume).toBeCloseTo(plain.volume, 8);
      }),
      { numRuns: 20 },
    );
    expect(plain.selfTouching.count).toBeGreaterThan(0);
  });

  it('finds any one triangle that is left out, turned, or given twice', () => {
    const mesh = weldFloat32(torus(30, 10, 9, 7));
    fc.assert(
      fc.property(fc.nat(2 * 9 * 7 - 1), (t) => {
        expect(checkMesh(without(mesh, t)).openEdges.count).toBe(3);
        const [a, b, c] = [0, 1, 2].map((i) => mesh.triangles[3 * t + i]!) as [number, number, number];
        expect(checkMesh(withMore(without(mesh, t), [b, a, c])).flippedEdges.count).toBe(3);
        expect(checkMesh(withMore(mesh, [b, c, a])).duplicateTriangles.count).toBe(1);
      }),
      { numRuns: 40 },
    );
  });

  it('stops counting where a mesh lies on itself everywhere', () => {
    const heap = Array.from({ length: 150 }, (_, i) => cube(10, [i / 64, i / 128, i / 256]));
    const report = checkMesh(together(...heap));
    expect(report).toMatchObject({ ok: false, selfTouchingCounted: false, selfTouching: { count: MOST_TOUCHING } });
    expect(message(report, 'selfTouching')).toMatch(/^At least 100000 pairs/);
  });

  it('takes less than two seconds for 100,000 triangles', () => {
    const mesh = weldFloat32(torus(30, 10, 224, 224));
    const start = performance.now();
    const report = checkMesh(mesh);
    expect(report.ok).toBe(true);
    expect(performance.now() - start).toBeLessThan(2000);
  });
});
