import type { Mesh } from '../../src/print/mesh.ts';
import type { Part } from '../../src/print/part.ts';

/** A closed box from the origin. */
export function box(width: number, depth: number, height: number): Mesh {
  const positions = [0, height].flatMap((z) => [
    ...[0, 0, z],
    ...[width, 0, z],
    ...[width, depth, z],
    ...[0, depth, z],
  ]);
  const quads = [
    [0, 3, 2, 1],
    [4, 5, 6, 7],
    [0, 1, 5, 4],
    [1, 2, 6, 5],
    [2, 3, 7, 6],
    [3, 0, 4, 7],
  ];
  const triangles = quads.flatMap(([a, b, c, d]) => [a!, b!, c!, a!, c!, d!]);
  return { positions: Float64Array.from(positions), triangles: Uint32Array.from(triangles) };
}

/** A straight prism over a regular polygon, along z from 0. */
export function prism(sides: number, radius: number, height: number): Mesh {
  const rings = [0, height].flatMap((z) =>
    Array.from({ length: sides }, (_, i) => {
      const angle = (2 * Math.PI * i) / sides;
      return [radius * Math.cos(angle), radius * Math.sin(angle), z];
    }),
  );
  const triangles = Array.from({ length: sides }, (_, i) => {
    const next = (i + 1) % sides;
    const caps = i > 0 && i + 1 < sides ? [0, next, i, sides, sides + i, sides + next] : [];
    return [i, next, sides + next, i, sides + next, sides + i, ...caps];
  });
  return { positions: Float64Array.from(rings.flat()), triangles: Uint32Array.from(triangles.flat()) };
}

/** Turned about x, then about z, and shifted. */
export function turned(mesh: Mesh, aboutX: number, aboutZ: number, shift = 0): Mesh {
  const positions = new Float64Array(mesh.positions.length);
  for (let at = 0; at < positions.length; at += 3) {
    const [x, y, z] = mesh.positions.subarray(at, at + 3);
    const [u, w] = [Math.cos(aboutX) * y! - Math.sin(aboutX) * z!, Math.sin(aboutX) * y! + Math.cos(aboutX) * z!];
    positions[at] = Math.cos(aboutZ) * x! - Math.sin(aboutZ) * u + shift;
    positions[at + 1] = Math.sin(aboutZ) * x! + Math.cos(aboutZ) * u + shift;
    positions[at + 2] = w + shift;
  }
  return { ...mesh, positions };
}

export const partOf = (name: string, mesh: Mesh, copies = 1): Part => ({
  name,
  purpose: 'for a test',
  surfaces: [],
  mesh,
  placed: Array.from({ length: copies }, () => mesh),
});
