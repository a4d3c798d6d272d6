import type { Mesh } from '../../print/mesh.ts';
import { assertNotEmpty, positionsFloat32 } from '../mesh/sound-mesh.ts';
import { asciiTitle } from './ascii.ts';
import { decimalFloat32 } from './decimal.ts';
import { fillNormals } from './facet-normals.ts';

/**
 * A text STL file of the mesh, in millimetres: the binary file's numbers as the shortest decimals that read back as the
 * same float32, with a point and without exponents. Lower case and spaces, because some readers insist on both.
 * Source: M. Burns, Automated Fabrication, section 6.5 (fabbers.com/tech/STL_Format).
 * @throws FileError `empty`, `badMesh`, `notFinite`
 */
export function writeStlText(mesh: Mesh, title: string): string {
  assertNotEmpty(mesh);
  const positions = positionsFloat32(mesh);
  const corners = cornerTexts(positions);
  const normals = new Float32Array(mesh.triangles.length);
  fillNormals(normals, positions, mesh.triangles, 0, mesh.triangles.length / 3);

  const name = `solid ${asciiTitle(title)}`.trimEnd();
  const lines = [name];
  for (let i = 0; i < mesh.triangles.length; i += 3) {
    const [x, y, z] = normals.subarray(i, i + 3);
    lines.push(`  facet normal ${decimalFloat32(x!)} ${decimalFloat32(y!)} ${decimalFloat32(z!)}`, '    outer loop');
    for (let corner = i; corner < i + 3; corner++) lines.push(`      vertex ${corners[mesh.triangles[corner]!]}`);
    lines.push('    endloop', '  endfacet');
  }
  lines.push(`end${name}`, '');
  return lines.join('\n');
}

/** Each vertex is spelt once, however many facets meet in it. */
function cornerTexts(positions: Float32Array): string[] {
  const texts: string[] = [];
  for (let i = 0; i < positions.length; i += 3) {
    const [x, y, z] = positions.subarray(i, i + 3);
    texts.push(`${decimalFloat32(x!)} ${decimalFloat32(y!)} ${decimalFloat32(z!)}`);
  }
  return texts;
}
