import type { Mesh } from '../../print/mesh.ts';
import { numberRows } from './number-rows.ts';
import { positionsFloat32 } from './sound-mesh.ts';

/**
 * The mesh as a file holds it: positions rounded to float32 without negative zeros, equal positions made one vertex,
 * triangles with a repeated vertex and vertices that no triangle uses left out. Order is kept, so the result depends
 * on nothing but the mesh. Millimetres in, millimetres out. Check the result before writing it: what was closed in
 * double need not be in float32.
 * @throws FileError `badMesh`, `notFinite`
 */
export function weldFloat32(mesh: Mesh): Mesh {
  const rounded = positionsFloat32(mesh);
  const { numbers, firsts } = numberRows(new Int32Array(rounded.buffer), 3);
  const triangles = new Uint32Array(mesh.triangles.length);
  const used = new Uint8Array(firsts.length);
  const surface = mesh.surface && new Uint16Array(mesh.surface.length);
  let end = 0;
  for (let i = 0; i < triangles.length; i += 3) {
    const a = numbers[mesh.triangles[i]!]!;
    const b = numbers[mesh.triangles[i + 1]!]!;
    const c = numbers[mesh.triangles[i + 2]!]!;
    if (a === b || b === c || c === a) continue;
    if (surface) surface[end / 3] = mesh.surface![i / 3]!;
    triangles[end++] = a;
    triangles[end++] = b;
    triangles[end++] = c;
    used[a] = used[b] = used[c] = 1;
  }
  const welded = keepUsed(rounded, firsts, triangles.slice(0, end), used);
  return surface ? { ...welded, surface: surface.slice(0, end / 3) } : welded;
}

/** The vertices in use under new numbers; writes these into `triangles`, which must be a fresh array. */
function keepUsed(rounded: Float32Array, firsts: Uint32Array, triangles: Uint32Array, used: Uint8Array): Mesh {
  const renumbered = new Uint32Array(firsts.length);
  const positions = new Float64Array(3 * firsts.length);
  let kept = 0;
  for (let vertex = 0; vertex < firsts.length; vertex++) {
    if (used[vertex] === 0) continue;
    for (let axis = 0; axis < 3; axis++) positions[3 * kept + axis] = rounded[3 * firsts[vertex]! + axis]!;
    renumbered[vertex] = kept++;
  }
  for (let i = 0; i < triangles.length; i++) triangles[i] = renumbered[triangles[i]!]!;
  return { positions: positions.slice(0, 3 * kept), triangles };
}
