/** A closed triangle mesh in millimetres: shared vertices, counter-clockwise triangles seen from outside. */
export interface Mesh {
  /** x, y, z of each vertex, one after the other, millimetres. */
  readonly positions: Float64Array;
  /** Three vertex numbers a triangle. */
  readonly triangles: Uint32Array;
  /** For each triangle the number of the surface it belongs to, in the part's list; absent where nothing tells them apart. */
  readonly surface?: Uint16Array;
}

/** Volume that a closed mesh encloses, mm³; cavities, whose triangles are turned inwards, subtract. */
export function meshVolume({ positions: p, triangles }: Mesh): number {
  let sixfold = 0;
  for (let t = 0; t < triangles.length; t += 3) {
    const [a, b, c] = [3 * triangles[t]!, 3 * triangles[t + 1]!, 3 * triangles[t + 2]!];
    sixfold +=
      p[a]! * (p[b + 1]! * p[c + 2]! - p[b + 2]! * p[c + 1]!) +
      p[a + 1]! * (p[b + 2]! * p[c]! - p[b]! * p[c + 2]!) +
      p[a + 2]! * (p[b]! * p[c + 1]! - p[b + 1]! * p[c]!);
  }
  return sixfold / 6;
}

/** Width, depth and height of the box around a mesh, millimetres. */
export function extentsOf({ positions }: Mesh): [number, number, number] {
  const extent = (axis: number): number => {
    let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
    for (let at = axis; at < positions.length; at += 3) {
      low = Math.min(low, positions[at]!);
      high = Math.max(high, positions[at]!);
    }
    return high - low;
  };
  return [extent(0), extent(1), extent(2)];
}

/** A mesh shifted. */
export const moved = (mesh: Mesh, by: readonly number[]): Mesh => ({
  ...mesh,
  positions: mesh.positions.map((value, i) => value + by[i % 3]!),
});
