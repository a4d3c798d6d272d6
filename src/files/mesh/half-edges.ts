import type { Mesh } from '../../print/mesh.ts';

/** Half-edge h runs from corner h of `triangles` to the next corner of the same triangle. */
export const triangleOf = (halfEdge: number): number => Math.floor(halfEdge / 3);
const nextCorner = (halfEdge: number): number => (halfEdge % 3 === 2 ? halfEdge - 2 : halfEdge + 1);
export const startOf = ({ triangles }: Mesh, halfEdge: number): number => triangles[halfEdge]!;
export const endOf = ({ triangles }: Mesh, halfEdge: number): number => triangles[nextCorner(halfEdge)]!;
/** The number of the corner at the vertex that is the half-edge's end. */
export const endCorner = nextCorner;
/** The vertex that the half-edge does not touch. */
export const apexOf = ({ triangles }: Mesh, halfEdge: number): number => triangles[nextCorner(nextCorner(halfEdge))]!;

/**
 * Calls `visit` for each edge with the half-edges that run along it, in either direction, by rising vertex numbers.
 * The list is only valid during the call. Sorted by counting, so the time is linear whatever the mesh is like.
 * @param left 1 for triangles to leave out.
 */
export function visitEdges(mesh: Mesh, left: Uint8Array, visit: (uses: Uint32Array) => void): void {
  const order = sortedHalfEdges(mesh, left);
  const low = (h: number): number => Math.min(startOf(mesh, h), endOf(mesh, h));
  const high = (h: number): number => Math.max(startOf(mesh, h), endOf(mesh, h));
  let from = 0;
  while (from < order.length) {
    const [a, b] = [low(order[from]!), high(order[from]!)];
    let to = from + 1;
    while (to < order.length && low(order[to]!) === a && high(order[to]!) === b) to++;
    visit(order.subarray(from, to));
    from = to;
  }
}

/** By the smaller, then by the greater vertex number, then by their own. */
function sortedHalfEdges(mesh: Mesh, left: Uint8Array): Uint32Array {
  const kept = new Uint32Array(mesh.triangles.length);
  let count = 0;
  for (let h = 0; h < kept.length; h++) if (left[triangleOf(h)] === 0) kept[count++] = h;
  const vertices = mesh.positions.length / 3;
  const byHigh = sortByCounting(kept.subarray(0, count), vertices, (h) => Math.max(startOf(mesh, h), endOf(mesh, h)));
  return sortByCounting(byHigh, vertices, (h) => Math.min(startOf(mesh, h), endOf(mesh, h)));
}

/** Stable. */
function sortByCounting(items: Uint32Array, keys: number, keyOf: (item: number) => number): Uint32Array {
  const places = new Uint32Array(keys + 1);
  for (const item of items) places[keyOf(item) + 1]!++;
  for (let key = 0; key < keys; key++) places[key + 1]! += places[key]!;
  const sorted = new Uint32Array(items.length);
  for (const item of items) sorted[places[keyOf(item)]!++] = item;
  return sorted;
}
