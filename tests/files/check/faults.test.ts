import { describe, expect, it } from 'vitest';
import { checkMesh, type MeshReport, type ProblemCode } from '../../../src/files/check/check.ts';
import { weldFloat32 } from '../../../src/files/mesh/weld.ts';
import { readStl } from '../../../src/files/stl/read.ts';
import { writeStl } from '../../../src/files/stl/write.ts';
import { cube, meshOf, octahedron, together, turned, unwelded, withMore, without } from '../shapes.ts';

const codes = (report: MeshReport): ProblemCode[] => report.problems.map(({ code }) => code);
const kinds = (report: MeshReport): string[] => report.bodies.map(({ kind }) => kind);
const message = (report: MeshReport, code: ProblemCode): string | undefined =>
  report.problems.find((problem) => problem.code === code)?.message;

// What must be found follows from the shape itself; each can be checked on a sketch of the cube.
describe('checkMesh finds', () => {
  it('a hole: three open edges round a missing triangle', () => {
    const report = checkMesh(without(cube(), 0));
    expect(report).toMatchObject({ ok: false, watertight: false, openEdges: { count: 3 } });
    expect(codes(report)).toEqual(['openEdges']);
    expect(kinds(report)).toEqual(['open']);
    expect(report.openEdges.first[0]!.points).toEqual([
      [0, 0, 0],
      [0, 0, 10],
    ]);
    expect(message(report, 'openEdges')).toBe(
      '3 edges belong to one triangle only, so the surface has a hole or a gap ' +
        '(first edge from (0, 0, 0) to (0, 0, 10)).',
    );
  });

  it('a triangle turned the wrong way: its three edges', () => {
    const mesh = cube();
    const flipped = { ...mesh, triangles: Uint32Array.from([0, 3, 1, ...mesh.triangles.slice(3)]) };
    const report = checkMesh(flipped);
    expect(report).toMatchObject({ watertight: false, flippedEdges: { count: 3 }, openEdges: { count: 0 } });
    expect(codes(report)).toEqual(['flippedEdges']);
    expect(report.flippedEdges.first[0]!.triangles).toContain(0);
  });

  it('a cube turned inside out: all edges in order, volume −1000', () => {
    const report = checkMesh(turned(cube()));
    expect(report).toMatchObject({ ok: false, watertight: true, volume: -1000 });
    expect(codes(report)).toEqual(['insideOut']);
    expect(message(report, 'insideOut')).toContain('between (0, 0, 0) and (10, 10, 10)');
  });

  it('a mesh whose triangles share no vertices: 36 open edges, 28 vertices too many', () => {
    const report = checkMesh(unwelded(cube()));
    expect(report).toMatchObject({ watertight: false, openEdges: { count: 36 }, coincidentVertices: { count: 28 } });
    expect(codes(report)).toEqual(['openEdges', 'coincidentVertices']);
    expect(report.bodies.length).toBe(12);
  });

  // A cube mixing 0 and -0 has disconnected facets in admesh 0.98.4 (observed).
  it('zeros of both signs', () => {
    const mixed = unwelded(cube());
    for (let i = 0; i < 9; i++) if (mixed.positions[i] === 0) mixed.positions[i] = -0;
    const loose = readStl(writeStl(cube(), ''));
    expect(checkMesh(loose.mesh).ok).toBe(true);
    const bytes = writeStl(cube(), '');
    const view = new DataView(bytes.buffer);
    for (let at = 84 + 12; at < 84 + 48; at += 4) if (view.getFloat32(at, true) === 0) view.setFloat32(at, -0, true);
    const report = checkMesh(readStl(bytes).mesh);
    expect(report.negativeZeros).toBe(3);
    expect(codes(report)).toEqual(['openEdges', 'negativeZeros']);
    expect(checkMesh(weldFloat32(mixed)).ok).toBe(true);
  });

  // M. Burns, Automated Fabrication, section 6.5, figure 2: the vertex-to-vertex rule.
  it('a corner on the side of another triangle', () => {
    const mesh = cube();
    const middle = 8; // halfway along the edge from vertex 0 to vertex 1, used by triangle 0 only
    const split = {
      positions: Float64Array.from([...mesh.positions, 0, 0, 5]),
      triangles: Uint32Array.from([0, middle, 3, middle, 1, 3, ...mesh.triangles.slice(3)]),
    };
    const report = checkMesh(split);
    expect(report).toMatchObject({ tJunctions: { count: 1 }, openEdges: { count: 3 }, watertight: false });
    expect(report.tJunctions.first[0]!.points[0]).toEqual([0, 0, 5]);
    expect(message(report, 'tJunctions')).toBe(
      '1 corner lies on the side of another triangle instead of at its corner ' +
        '(first at (0, 0, 5), on the edge from (0, 0, 10) to (0, 0, 0)).',
    );
  });

  it('such a corner also where rounding has moved it off a slanted edge', () => {
    const r = 1 / 3;
    const split = octahedron(7);
    const point = [7 * r, 7 * (1 - r), 0];
    const report = checkMesh(
      weldFloat32({
        positions: Float64Array.from([...split.positions, ...point]),
        triangles: Uint32Array.from([0, 6, 4, 6, 2, 4, ...split.triangles.slice(3)]),
      }),
    );
    expect(report.tJunctions.count).toBe(1);
  });

  it('a triangle given twice', () => {
    const report = checkMesh(withMore(cube(), [0, 1, 3]));
    expect(report).toMatchObject({ watertight: false, duplicateTriangles: { count: 1 }, overusedEdges: { count: 3 } });
    expect(report.duplicateTriangles.first[0]!.triangles).toEqual([0, 12]);
    expect(message(report, 'duplicateTriangles')).toContain('(0, 0, 0), (0, 0, 10), (0, 10, 10)');
  });

  it('a triangle with a repeated corner, and one with its corners in line', () => {
    const repeated = checkMesh(withMore(cube(), [0, 0, 1]));
    expect(repeated).toMatchObject({ ok: false, watertight: true, degenerateTriangles: { count: 1 }, volume: 1000 });
    expect(codes(repeated)).toEqual(['degenerateTriangles']);
    const mesh = cube();
    const line = checkMesh({
      positions: Float64Array.from([...mesh.positions, 0.1, 0.1, 0.1, 0.2, 0.2, 0.2, 0.3, 0.3, 0.3]),
      triangles: Uint32Array.from([...mesh.triangles, 8, 9, 10]),
    });
    expect(line.degenerateTriangles.count).toBe(1);
    expect(line.degenerateTriangles.first[0]!.points[2]).toEqual([0.3, 0.3, 0.3]);
  });

  it('but takes no thin triangle for one: a height of a millionth of its length', () => {
    const thin = meshOf(
      [
        [0, 0, 0],
        [100, 0, 0],
        [50, 1e-4, 0],
        [50, 0, 1e-4],
      ],
      [
        [0, 2, 1],
        [0, 1, 3],
        [1, 2, 3],
        [2, 0, 3],
      ],
    );
    expect(checkMesh(thin)).toMatchObject({ ok: true, degenerateTriangles: { count: 0 } });
  });

  it('two cubes that touch along an edge: four triangles there, still two solids', () => {
    const report = checkMesh(weldFloat32(together(cube(), cube(10, [10, 10, 0]))));
    expect(report).toMatchObject({ watertight: false, overusedEdges: { count: 1 }, vertices: 14 });
    expect(codes(report)).toEqual(['overusedEdges']);
    expect(report.bodies.map(({ volume }) => volume)).toEqual([1000, 1000]);
    expect(kinds(report)).toEqual(['solid', 'solid']);
    expect(message(report, 'overusedEdges')).toContain('edge from (10, 10, 0) to (10, 10, 10), 4 triangles');
  });

  it('the same with the walls turned into cavities: material is on the other side', () => {
    const touching = weldFloat32(together(cube(2, [2, 2, 2]), cube(2, [4, 4, 2])));
    const report = checkMesh(together(cube(10), turned(touching)));
    expect(report.volume).toBe(1000 - 16);
    expect(report.overusedEdges.count).toBe(1);
  });

  it('two cubes that touch in a corner', () => {
    const report = checkMesh(weldFloat32(together(cube(), cube(10, [10, 10, 10]))));
    expect(report).toMatchObject({ watertight: true, ok: false, pinchedVertices: { count: 1 } });
    expect(codes(report)).toEqual(['pinchedVertices']);
    expect(report.pinchedVertices.first[0]!.points).toEqual([[10, 10, 10]]);
  });

  it('cubes with vertices of their own that touch in a corner, or face to face', () => {
    const corner = checkMesh(together(cube(), cube(10, [10, 10, 10])));
    expect(codes(corner)).toEqual(['coincidentVertices']);
    expect(message(corner, 'coincidentVertices')).toContain('at (10, 10, 10)): solids touch there');
    const stacked = checkMesh(together(cube(), cube(10, [0, 0, 10])));
    expect(stacked.coincidentVertices.count).toBe(4);
    const shifted = checkMesh(together(cube(), cube(4, [3, 3, 10])));
    expect(codes(shifted)).toEqual(['selfTouching']);
    expect(shifted.bodies.map(({ kind }) => kind)).toEqual(['solid', 'solid']);
  });

  it('cubes that run through each other, and where', () => {
    const report = checkMesh(together(cube(), cube(10, [5, 5, 5])));
    expect(report.watertight).toBe(true);
    expect(codes(report)).toEqual(['selfTouching']);
    const [x, y, z] = report.selfTouching.first[0]!.points[0]!;
    for (const value of [x, y, z]) expect(value >= 5 && value <= 10, `${value} between 5 and 10`).toBe(true);
    expect(message(report, 'selfTouching')).toMatch(/pairs of triangles cross or touch where .* near \(/);
  });

  it('a spike that touches the opposite wall from within', () => {
    // The bottom of the cube is drawn up to a point of the top, 10 mm above it.
    const mesh = without(cube(), 8, 9);
    const spiked = {
      positions: Float64Array.from([...mesh.positions, 6, 3, 10]),
      triangles: Uint32Array.from([...mesh.triangles, 0, 2, 8, 2, 6, 8, 6, 4, 8, 4, 0, 8]),
    };
    const report = checkMesh(spiked);
    expect(report.watertight).toBe(true);
    expect(codes(report)).toEqual(['selfTouching']);
  });

  it('a solid within a solid, and a cavity within a cavity', () => {
    const nested = checkMesh(together(cube(10), cube(4, [3, 3, 3])));
    expect(codes(nested)).toEqual(['nested']);
    expect(kinds(nested)).toEqual(['solid', 'nested']);
    const hollow = checkMesh(together(cube(10), turned(cube(6, [2, 2, 2])), turned(cube(2, [4, 4, 4]))));
    expect(kinds(hollow)).toEqual(['solid', 'cavity', 'insideOut']);
  });

  it('normals that are wrong or missing: one degree is the limit', () => {
    const mesh = cube();
    const { normals } = readStl(writeStl(mesh, ''));
    const degrees = (angle: number): number[] => {
      const turn = (angle * Math.PI) / 180; // triangle 0 looks along −x
      return [-Math.cos(turn), Math.sin(turn), 0];
    };
    const withFirst = (first: readonly number[]): MeshReport => {
      const changed = normals.slice();
      changed.set(first);
      return checkMesh(mesh, changed);
    };
    expect(withFirst(degrees(0.9)).ok).toBe(true);
    expect(withFirst(degrees(1.1))).toMatchObject({ ok: false, wrongNormals: 1, missingNormals: 0 });
    expect(withFirst([0, 0, 0])).toMatchObject({ wrongNormals: 1, missingNormals: 1 });
    expect(withFirst([Number.NaN, 0, 0])).toMatchObject({ wrongNormals: 1, missingNormals: 1 });
    expect(withFirst([1, 0, 0]).problems[0]!.code).toBe('wrongNormals');
    expect(withFirst([-5, 0, 0]).ok, 'length does not matter').toBe(true);
  });

  it('nothing at all', () => {
    expect(codes(checkMesh(meshOf([], [])))).toEqual(['empty']);
    expect(checkMesh(meshOf([], []))).toMatchObject({ ok: false, watertight: false, volume: 0 });
    expect(
      checkMesh(
        meshOf(
          [
            [0, 0, 0],
            [1, 0, 0],
          ],
          [[0, 1, 1]],
        ),
      ).watertight,
    ).toBe(false);
  });

  it('unsound meshes, which it refuses', () => {
    expect(() => checkMesh({ ...cube(), triangles: Uint32Array.of(0, 1) })).toThrow(/incomplete/);
    expect(() => checkMesh(meshOf([[0, 0, Number.NaN]], []))).toThrow(/z coordinate of vertex 0/);
  });
});
