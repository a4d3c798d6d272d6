import type { Mesh } from '../../print/mesh.ts';
import { assertNotEmpty } from '../mesh/sound-mesh.ts';
import { asciiTitle } from './ascii.ts';
import { fillFacets } from './facets.ts';
import { fillFacetsAssembled } from './facets-assembled.ts';
import { STL_FACET_BYTES, STL_FACETS_START, STL_HEADER_BYTES } from './layout.ts';

export { writeStlText } from './write-text.ts';

/** From this many facets on, starting the assembled loops pays off. */
const MANY_FACETS = 20_000;

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
  const facets = mesh.triangles.length / 3;
  const bytes = new Uint8Array(STL_FACETS_START + STL_FACET_BYTES * facets);
  bytes.set(new TextEncoder().encode(stlHeader(title)));
  new DataView(bytes.buffer).setUint32(STL_HEADER_BYTES, facets, true);
  if (facets < MANY_FACETS || !fillFacetsAssembled(bytes, mesh)) fillFacets(bytes, mesh);
  return bytes;
}

/** 80 characters. Without `=`, because some readers look for `COLOR=` and `MATERIAL=` in a header. */
function stlHeader(title: string): string {
  const text = `Goniolith ${asciiTitle(title).replaceAll('=', ':')}`;
  return text.slice(0, STL_HEADER_BYTES).padEnd(STL_HEADER_BYTES);
}
