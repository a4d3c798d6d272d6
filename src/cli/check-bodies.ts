import { checkMesh } from '../files/check/check.ts';
import type { MeshReport } from '../files/check/report.ts';

export interface CheckedBodies {
  readonly format: string;
  readonly bodies: readonly { readonly body: string | null; readonly found: MeshReport }[];
  readonly remarks: readonly string[];
}

/** Reads a file of either kind and checks each body that it names; a 3MF file is a zip and begins with PK. */
export async function checkedBodies(bytes: Uint8Array): Promise<CheckedBodies> {
  if (bytes[0] !== 0x50 || bytes[1] !== 0x4b) {
    const { readStl } = await import('../files/stl/read.ts');
    const { mesh, format, normals } = readStl(bytes);
    return { format: `${format} STL`, bodies: [{ body: null, found: checkMesh(mesh, normals) }], remarks: [] };
  }
  const { placed, read3mf } = await import('../files/3mf/read.ts');
  const { objects, unit, unused } = read3mf(bytes);
  const bodies = objects.map(({ name, mesh, transform }) => ({
    body: name,
    found: checkMesh(placed(mesh, transform)),
  }));
  const remarks = unused.map((name) => `"${name}" is in the file but not on the bed; some slicers refuse such files.`);
  return { format: `3MF in ${unit}`, bodies, remarks };
}
