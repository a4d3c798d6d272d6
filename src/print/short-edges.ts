import type { Mesh } from './mesh.ts';

/**
 * Draws the ends of edges shorter than `limit` together. Where a tool's side passes a corner of the crystal within
 * rounding, the boolean library leaves edges of a millionth of a millimetre, which single precision can fold over.
 */
export function withoutShortEdges(mesh: Mesh, limit: number): Mesh {
  const { positions, triangles, surface } = mesh;
  const merged = Uint32Array.from({ length: positions.length / 3 }, (_, vertex) => vertex);
  const find = (vertex: number): number => {
    let root = vertex;
    while (merged[root] !== root) root = merged[root]!;
    return root;
  };
  const distance = (a: number, b: number): number =>
    Math.hypot(
      positions[3 * a]! - positions[3 * b]!,
      positions[3 * a + 1]! - positions[3 * b + 1]!,
      positions[3 * a + 2]! - positions[3 * b + 2]!,
    );
  let found = false;
  for (let corner = 0; corner < triangles.length; corner++) {
    const next = corner % 3 === 2 ? corner - 2 : corner + 1;
    const [a, b] = [find(triangles[corner]!), find(triangles[next]!)];
    if (a === b || distance(a, b) >= limit) continue;
    merged[Math.max(a, b)] = Math.min(a, b);
    found = true;
  }
  if (!found) return mesh;
  const kept: number[] = [];
  const keptSurface: number[] = [];
  for (let t = 0; t < triangles.length; t += 3) {
    const [a, b, c] = [find(triangles[t]!), find(triangles[t + 1]!), find(triangles[t + 2]!)];
    if (a === b || b === c || c === a) continue;
    kept.push(a, b, c);
    if (surface) keptSurface.push(surface[t / 3]!);
  }
  return { ...usedOnly(positions, kept), ...(surface && { surface: Uint16Array.from(keptSurface) }) };
}

/** Vertices that no triangle uses would count in the model's extents. */
function usedOnly(positions: Float64Array, triangles: readonly number[]): Mesh {
  const numbers = new Map<number, number>();
  const renumbered = triangles.map((vertex) => {
    const number = numbers.get(vertex) ?? numbers.size;
    numbers.set(vertex, number);
    return number;
  });
  const kept = new Float64Array(3 * numbers.size);
  for (const [vertex, number] of numbers) kept.set(positions.subarray(3 * vertex, 3 * vertex + 3), 3 * number);
  return { positions: kept, triangles: Uint32Array.from(renumbered) };
}
