import type { Mesh } from '../print/mesh.ts';
import { asciiTitle } from './ascii.ts';
import { FileError } from './file-error.ts';
import { positionsFloat32 } from './sound-mesh.ts';
import { STL_FACET_BYTES, STL_FACETS_START, STL_HEADER_BYTES } from './stl-layout.ts';

/** Facets whose normals are computed together before they are written: 12 kB, which stays in the nearest cache. */
const BLOCK = 1024;
/** The bits of the float32 -0. */
const NEGATIVE_ZERO = -0x80000000;

/**
 * A binary STL file of the mesh, in millimetres; pass what `weldFloat32` returned. Normals follow the right-hand rule
 * and are computed in double from the float32 vertices; a facet without area has no direction and gets 0 0 0.
 * The header begins with `Goniolith`, never with `solid`, which some readers take for text. The same mesh and title
 * give the same bytes.
 * @param title goes into the header in ASCII, cut to fit.
 * @throws FileError `empty`, `badMesh`, `notFinite`
 */
export function writeStl(mesh: Mesh, title: string): Uint8Array {
  assertNotEmpty(mesh);
  const positions = positionsFloat32(mesh);
  const facets = mesh.triangles.length / 3;
  const bytes = new Uint8Array(STL_FACETS_START + STL_FACET_BYTES * facets);
  const view = new DataView(bytes.buffer);
  bytes.set(new TextEncoder().encode(stlHeader(title)));
  view.setUint32(STL_HEADER_BYTES, facets, true);

  // Signed views: the compiler of V8 keeps their elements as small integers, those of a Uint32Array it may not.
  const triangles = new Int32Array(mesh.triangles.buffer, mesh.triangles.byteOffset, mesh.triangles.length);
  const bits = new Int32Array(positions.buffer);
  const normals = new Float32Array(3 * BLOCK);
  for (let from = 0; from < facets; from += BLOCK) {
    const to = Math.min(facets, from + BLOCK);
    fillNormals(normals, positions, triangles, from, to);
    fillFacets(view, new Int32Array(normals.buffer), bits, triangles, from, to);
  }
  return bytes;
}

/** 80 characters. Without `=`, because some readers look for `COLOR=` and `MATERIAL=` in a header. */
function stlHeader(title: string): string {
  const text = `Goniolith ${asciiTitle(title).replaceAll('=', ':')}`;
  return text.slice(0, STL_HEADER_BYTES).padEnd(STL_HEADER_BYTES);
}

/** @throws FileError `empty` */
export function assertNotEmpty(mesh: Mesh): void {
  if (mesh.triangles.length > 0) return;
  throw new FileError('empty', 'There is no triangle to write.', 'Check the part that this file was made for.');
}

/** The unit normals of facets `from` up to `to`, put at the beginning of `normals`. */
export function fillNormals(
  normals: Float32Array,
  positions: Float32Array,
  triangles: Int32Array | Uint32Array,
  from: number,
  to: number,
): void {
  for (let i = 3 * from, n = 0; i < 3 * to; i += 3, n += 3) {
    const a = Math.imul(3, triangles[i]!);
    const b = Math.imul(3, triangles[i + 1]!);
    const c = Math.imul(3, triangles[i + 2]!);
    const ax = positions[a]!;
    const ay = positions[a + 1]!;
    const az = positions[a + 2]!;
    const ux = positions[b]! - ax;
    const uy = positions[b + 1]! - ay;
    const uz = positions[b + 2]! - az;
    const vx = positions[c]! - ax;
    const vy = positions[c + 1]! - ay;
    const vz = positions[c + 2]! - az;
    const nx = uy * vz - uz * vy;
    const ny = uz * vx - ux * vz;
    const nz = ux * vy - uy * vx;
    const square = nx * nx + ny * ny + nz * nz;
    const scale = square > 0 ? 1 / Math.sqrt(square) : 0;
    normals[n] = nx * scale;
    normals[n + 1] = ny * scale;
    normals[n + 2] = nz * scale;
  }
}

/** Writes the facets `from` up to `to`: their normals' bits, then those of three vertices; the attribute stays 0. */
function fillFacets(
  view: DataView,
  normals: Int32Array,
  bits: Int32Array,
  triangles: Int32Array,
  from: number,
  to: number,
): void {
  let at = (STL_FACETS_START + STL_FACET_BYTES * from) | 0;
  for (let i = 3 * from, n = 0; i < 3 * to; i += 3, n += 3, at += STL_FACET_BYTES) {
    for (let axis = 0; axis < 3; axis++) {
      const normal = normals[n + axis]!;
      view.setInt32(at + 4 * axis, normal === NEGATIVE_ZERO ? 0 : normal, true);
    }
    const a = Math.imul(3, triangles[i]!);
    const b = Math.imul(3, triangles[i + 1]!);
    const c = Math.imul(3, triangles[i + 2]!);
    view.setInt32(at + 12, bits[a]!, true);
    view.setInt32(at + 16, bits[a + 1]!, true);
    view.setInt32(at + 20, bits[a + 2]!, true);
    view.setInt32(at + 24, bits[b]!, true);
    view.setInt32(at + 28, bits[b + 1]!, true);
    view.setInt32(at + 32, bits[b + 2]!, true);
    view.setInt32(at + 36, bits[c]!, true);
    view.setInt32(at + 40, bits[c + 1]!, true);
    view.setInt32(at + 44, bits[c + 2]!, true);
  }
}
