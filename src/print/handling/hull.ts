import type { Workbench } from '../kit.ts';
import type { Mesh } from '../mesh.ts';

/** The convex hull of a closed mesh, in single precision. */
export function hullOf(bench: Workbench, { positions, triangles }: Mesh): Mesh {
  const hull = bench.solid({ positions, triangles }).hull();
  try {
    const { vertProperties, triVerts, numProp } = hull.getMesh();
    const points = new Float64Array((vertProperties.length / numProp) * 3);
    for (let v = 0; 3 * v < points.length; v++)
      points.set(vertProperties.subarray(v * numProp, v * numProp + 3), 3 * v);
    return { positions: points, triangles: Uint32Array.from(triVerts) };
  } finally {
    hull.delete();
  }
}
