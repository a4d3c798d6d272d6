import type { Mesh } from '../../print/mesh.ts';
import type { Creases, FlatFaces } from '../picture/flat-faces.ts';

/** Arrays of a primitive: metres, Y up. */
export interface Geometry {
  readonly positions: Float32Array<ArrayBuffer>;
  readonly indices: Uint16Array<ArrayBuffer> | Uint32Array<ArrayBuffer>;
}

/** The triangles of one surface; each flat face has vertices of its own, because it has a normal of its own. */
export function facesOf(
  mesh: Mesh,
  faces: FlatFaces,
  surface: number,
): Geometry & { normals: Float32Array<ArrayBuffer> } {
  const { triangles, positions: p } = mesh;
  const { order, faceOf, normals: n } = faces;
  const own = order.filter((t) => (mesh.surface?.[t] ?? 0) === surface);
  const indices = new Uint32Array(3 * own.length);
  const positions = new Float32Array(9 * own.length);
  const normals = new Float32Array(9 * own.length);
  const number = new Uint32Array(p.length / 3);
  const lastFace = new Uint32Array(p.length / 3).fill(0xffffffff);
  let [end, count] = [0, 0];
  for (const t of own) {
    const face = faceOf[t]!;
    for (let corner = 0; corner < 3; corner++) {
      const vertex = triangles[3 * t + corner]!;
      if (lastFace[vertex] !== face) {
        lastFace[vertex] = face;
        number[vertex] = count;
        turn(p, 3 * vertex, positions, 3 * count, 1000);
        turn(n, 3 * face, normals, 3 * count, 1);
        count++;
      }
      indices[end++] = number[vertex]!;
    }
  }
  return {
    positions: positions.slice(0, 3 * count),
    normals: normals.slice(0, 3 * count),
    indices: fit(indices, count),
  };
}

/** Edges as pairs of vertices. */
export function edgesOf({ positions: p }: Mesh, { creases }: Creases): Geometry {
  const number = new Map<number, number>();
  const indices = creases.map((vertex) => {
    const known = number.get(vertex) ?? number.size;
    number.set(vertex, known);
    return known;
  });
  const positions = new Float32Array(3 * number.size);
  for (const [vertex, at] of number) turn(p, 3 * vertex, positions, 3 * at, 1000);
  return { positions, indices: fit(indices, number.size) };
}

/** Z up to Y up: a quarter turn about x, so that no triangle is turned round. */
function turn(from: Float64Array, i: number, to: Float32Array, j: number, divisor: number): void {
  to[j] = from[i]! / divisor;
  to[j + 1] = from[i + 2]! / divisor;
  to[j + 2] = 0 - from[i + 1]! / divisor;
}

/** Two bytes an index where they do; the greatest number that they hold is forbidden. */
function fit(indices: Uint32Array<ArrayBuffer>, count: number): Uint16Array<ArrayBuffer> | Uint32Array<ArrayBuffer> {
  return count <= 0xffff ? Uint16Array.from(indices) : indices;
}
