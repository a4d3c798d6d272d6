import type { ClosedShape } from '../shape/shape.ts';
import type { Mesh } from './mesh.ts';

/**
 * The crystal itself at true size, its centre at the origin: each face cut into triangles from its first corner, every
 * form a surface of its own.
 */
export function crystalMesh({ solid, measures }: ClosedShape, millimetresPerUnit: number): Mesh {
  const triangles: number[] = [];
  const surface: number[] = [];
  for (const face of measures.faces) {
    const from = solid.start[face]!;
    const apex = solid.corner[from]!;
    for (let edge = from + 1; edge + 1 < solid.start[face + 1]!; edge++) {
      triangles.push(apex, solid.corner[edge]!, solid.corner[edge + 1]!);
      surface.push(solid.planes.form[face]!);
    }
  }
  return {
    positions: measures.positions.map((value) => value * millimetresPerUnit),
    triangles: Uint32Array.from(triangles),
    surface: Uint16Array.from(surface),
  };
}
