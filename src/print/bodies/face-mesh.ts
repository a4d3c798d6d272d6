import type { Mesh } from '../mesh.ts';

/** A convex face as a cycle of corner numbers, counter-clockwise seen from outside. */
export interface FacePolygon {
  readonly corners: readonly number[];
}

/** A mesh from convex faces; only the corners in use are kept. */
export function faceMesh<F extends FacePolygon>(
  positions: ArrayLike<number>,
  faces: readonly F[],
  surfaceOf: (face: F) => number,
): Mesh {
  const numbers = new Map<number, number>();
  const points: number[] = [];
  const numberOf = (corner: number): number => {
    const known = numbers.get(corner);
    if (known !== undefined) return known;
    numbers.set(corner, numbers.size);
    points.push(positions[3 * corner]!, positions[3 * corner + 1]!, positions[3 * corner + 2]!);
    return numbers.size - 1;
  };
  const triangles: number[] = [];
  const surface: number[] = [];
  for (const face of faces)
    for (let i = 1; i + 1 < face.corners.length; i++) {
      triangles.push(...[face.corners[0]!, face.corners[i]!, face.corners[i + 1]!].map(numberOf));
      surface.push(surfaceOf(face));
    }
  return {
    positions: Float64Array.from(points),
    triangles: Uint32Array.from(triangles),
    surface: Uint16Array.from(surface),
  };
}

/** A mesh with every triangle turned round: a cavity. */
export const inwards = (mesh: Mesh): Mesh => ({
  ...mesh,
  triangles: mesh.triangles.map((_, i, all) => all[i % 3 === 0 ? i : i % 3 === 1 ? i + 1 : i - 1]!),
});

/** Several meshes as one, nothing joined. */
export function together(meshes: readonly Mesh[]): Mesh {
  let vertices = 0;
  const triangles = meshes.flatMap((mesh) => {
    const moved = Array.from(mesh.triangles, (vertex) => vertex + vertices);
    vertices += mesh.positions.length / 3;
    return moved;
  });
  return {
    positions: Float64Array.from(meshes.flatMap(({ positions }) => Array.from(positions))),
    triangles: Uint32Array.from(triangles),
    surface: Uint16Array.from(
      meshes.flatMap(({ surface, triangles: own }) => Array.from(surface ?? new Uint16Array(own.length / 3))),
    ),
  };
}
