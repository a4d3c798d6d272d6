import { type Mesh, meshVolume } from '../mesh.ts';

/**
 * The connected solids of a mesh, in the order of their first triangle; the walls of cavities are no pieces of their
 * own.
 */
export function piecesOf({ positions, triangles }: Mesh): Mesh[] {
  const root = Uint32Array.from({ length: positions.length / 3 }, (_, vertex) => vertex);
  const find = (vertex: number): number => {
    let top = vertex;
    while (root[top] !== top) {
      root[top] = root[root[top]!]!;
      top = root[top]!;
    }
    return top;
  };
  for (let t = 0; t < triangles.length; t += 3)
    for (const other of [triangles[t + 1]!, triangles[t + 2]!]) root[find(other)] = find(triangles[t]!);
  const members = new Map<number, number[]>();
  for (let t = 0; t < triangles.length; t += 3) {
    const of = find(triangles[t]!);
    const list = members.get(of) ?? [];
    if (list.length === 0) members.set(of, list);
    list.push(triangles[t]!, triangles[t + 1]!, triangles[t + 2]!);
  }
  return [...members.values()].map((list) => compact(positions, list)).filter((mesh) => meshVolume(mesh) > 0);
}

function compact(positions: Float64Array, triangles: readonly number[]): Mesh {
  const numbers = new Map<number, number>();
  const renumbered = Uint32Array.from(triangles, (vertex) => {
    const number = numbers.get(vertex) ?? numbers.size;
    numbers.set(vertex, number);
    return number;
  });
  const kept = new Float64Array(3 * numbers.size);
  for (const [vertex, number] of numbers) kept.set(positions.subarray(3 * vertex, 3 * vertex + 3), 3 * number);
  return { positions: kept, triangles: renumbered };
}
