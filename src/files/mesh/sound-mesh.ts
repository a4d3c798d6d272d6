import type { Mesh } from '../../print/mesh.ts';
import { FileError } from '../file-error.ts';

/**
 * The positions as float32, without negative zeros.
 * @throws FileError `badMesh` for incomplete triples or an unknown vertex number, `notFinite` for a coordinate that is
 * not a number or larger than float32 holds.
 */
export function positionsFloat32(mesh: Mesh): Float32Array {
  assertWholeMesh(mesh);
  const { positions } = mesh;
  const rounded = new Float32Array(positions.length);
  for (let i = 0; i < positions.length; i++) rounded[i] = Math.fround(positions[i]!) + 0; // -0 + 0 is 0
  assertFinite(rounded);
  return rounded;
}

/** @throws FileError `badMesh` unless all triples are complete and all vertex numbers known. */
export function assertWholeMesh({ positions, triangles }: Mesh): void {
  const hint = 'This is a fault of the program that made the mesh; make it again there.';
  if (positions.length % 3 !== 0 || triangles.length % 3 !== 0)
    throw new FileError('badMesh', 'The mesh has an incomplete vertex or triangle at its end.', hint);
  const vertices = positions.length / 3;
  for (let i = 0; i < triangles.length; i++) {
    if (triangles[i]! < vertices) continue;
    const what = `Triangle ${Math.floor(i / 3)} names vertex ${triangles[i]} (both counted from 0)`;
    throw new FileError('badMesh', `${what}, but the mesh has only ${vertices} vertices.`, hint);
  }
}

/** @throws FileError `notFinite` naming the first vertex with a coordinate that is no finite number. */
export function assertFinite(positions: Float32Array | Float64Array): void {
  for (let i = 0; i < positions.length; i++) {
    if (Number.isFinite(positions[i]!)) continue;
    const vertex = Math.floor(i / 3);
    const axis = 'xyz'[i % 3]!;
    throw new FileError(
      'notFinite',
      `The ${axis} coordinate of vertex ${vertex} is not a finite number that a model file can hold (${positions[i]}).`,
      'Make the mesh again near the origin and in millimetres; file coordinates must stay below 3.4e38.',
    );
  }
}

/** @throws FileError `empty` */
export function assertNotEmpty(mesh: Mesh): void {
  if (mesh.triangles.length > 0) return;
  throw new FileError('empty', 'There is no triangle to write.', 'Check the part that this file was made for.');
}
