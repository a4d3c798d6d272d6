import type { Mesh } from '../../src/print/mesh.ts';

type Triple = readonly [number, number, number];

/** A mesh from vertices and triangles written as lists. */
export function meshOf(vertices: readonly Triple[], triangles: readonly Triple[]): Mesh {
  return { positions: Float64Array.from(vertices.flat()), triangles: Uint32Array.from(triangles.flat()) };
}

/** The twelve triangles of a box, counter-clockwise from outside; vertex 4x + 2y + z for x, y, z in {0, 1}. */
const BOX: readonly Triple[] = [
  [0, 1, 3],
  [0, 3, 2],
  [4, 6, 7],
  [4, 7, 5],
  [0, 4, 5],
  [0, 5, 1],
  [2, 3, 7],
  [2, 7, 6],
  [0, 2, 6],
  [0, 6, 4],
  [1, 5, 7],
  [1, 7, 3],
];

/** A cube with its least corner at `at`; side in millimetres. */
export function cube(side = 10, at: Triple = [0, 0, 0]): Mesh {
  const vertices: Triple[] = [];
  for (const x of [0, 1]) for (const y of [0, 1]) for (const z of [0, 1]) vertices.push([x, y, z]);
  const placed = vertices.map((v): Triple => [at[0] + side * v[0], at[1] + side * v[1], at[2] + side * v[2]]);
  return meshOf(placed, BOX);
}

/** Meshes side by side in one, each with its own vertices. */
export function together(...meshes: readonly Mesh[]): Mesh {
  const triangles: number[] = [];
  let start = 0;
  for (const mesh of meshes) {
    for (const vertex of mesh.triangles) triangles.push(start + vertex);
    start += mesh.positions.length / 3;
  }
  return {
    positions: Float64Array.from(meshes.flatMap((mesh) => [...mesh.positions])),
    triangles: Uint32Array.from(triangles),
  };
}

/** Every triangle turned round. */
export function turned(mesh: Mesh): Mesh {
  const triangles = mesh.triangles.slice();
  for (let i = 0; i < triangles.length; i += 3) {
    triangles[i] = mesh.triangles[i + 1]!;
    triangles[i + 1] = mesh.triangles[i]!;
  }
  return { ...mesh, triangles };
}

/** Without some of the triangles. */
export function without(mesh: Mesh, ...left: readonly number[]): Mesh {
  return { ...mesh, triangles: mesh.triangles.filter((_, i) => !left.includes(Math.floor(i / 3))) };
}

/** With further triangles. */
export function withMore(mesh: Mesh, ...more: readonly Triple[]): Mesh {
  return { ...mesh, triangles: Uint32Array.from([...mesh.triangles, ...more.flat()]) };
}

/** Each triangle with three vertices of its own. */
export function unwelded(mesh: Mesh): Mesh {
  const positions = new Float64Array(3 * mesh.triangles.length);
  mesh.triangles.forEach((vertex, i) => {
    positions.set(mesh.positions.subarray(3 * vertex, 3 * vertex + 3), 3 * i);
  });
  return { positions, triangles: Uint32Array.from({ length: mesh.triangles.length }, (_, i) => i) };
}

/** A regular octahedron with corners at ±r on the axes. */
export function octahedron(r: number): Mesh {
  const vertices: Triple[] = [
    [r, 0, 0],
    [-r, 0, 0],
    [0, r, 0],
    [0, -r, 0],
    [0, 0, r],
    [0, 0, -r],
  ];
  return meshOf(vertices, [
    [0, 2, 4],
    [2, 1, 4],
    [1, 3, 4],
    [3, 0, 4],
    [2, 0, 5],
    [1, 2, 5],
    [3, 1, 5],
    [0, 3, 5],
  ]);
}

/** A ring of 2·n·m triangles round the z axis: radius R to the middle of the tube, r of the tube. */
export function torus(R: number, r: number, n: number, m: number): Mesh {
  const positions: number[] = [];
  const triangles: number[] = [];
  const at = (i: number, j: number): number => (i % n) * m + (j % m);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < m; j++) {
      const [u, v] = [(2 * Math.PI * i) / n, (2 * Math.PI * j) / m];
      const out = R + r * Math.cos(v);
      positions.push(out * Math.cos(u), out * Math.sin(u), r * Math.sin(v));
      triangles.push(at(i, j), at(i + 1, j), at(i + 1, j + 1), at(i, j), at(i + 1, j + 1), at(i, j + 1));
    }
  }
  return { positions: Float64Array.from(positions), triangles: Uint32Array.from(triangles) };
}
