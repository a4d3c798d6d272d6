import { type Mesh, moved } from './mesh.ts';

/** A thing to print. */
export interface Part {
  /** Short and fit for a file name: `body`, `rod-3`, `cap-3`. */
  readonly name: string;
  /** What it is for, in words. */
  readonly purpose: string;
  /** What the numbers in the mesh's `surface` mean. */
  readonly surfaces: readonly Surface[];
  /** As it lies on the bed. */
  readonly mesh: Mesh;
  /** Name of the part with which it is printed in one job, in a colour of its own; its mesh keeps its place there. */
  readonly with?: string;
  /** Where each copy sits in the finished object; one mesh a copy. */
  readonly placed: readonly Mesh[];
}

/** A set of triangles of one meaning: the faces of a form, a rod, a cut. */
export interface Surface {
  readonly name: string;
  /** #RRGGBB, sRGB. */
  readonly colour: string;
  /** Facets that stand for something round: pictures draw no lines between them. */
  readonly curved?: boolean;
  /** Strokes and lines: what is thin between them is no wall. */
  readonly fine?: boolean;
}

/** Parts that are printed in one job, the one that the others belong to first. */
export function jobs<T extends Pick<Part, 'name' | 'with'>>(parts: readonly T[]): T[][] {
  const found: T[][] = [];
  for (const part of parts) {
    const own = part.with === undefined ? undefined : found.findLast(([leader]) => leader!.name === part.with);
    if (own) own.push(part);
    else found.push([part]);
  }
  return found;
}

/** All parts in their places as one mesh. Its solids stay separate where the parts are. */
export const assemble = (parts: readonly Part[]): Mesh => together(parts.flatMap(({ placed }) => placed));

/** Meshes as one, without their surfaces unless it is one only. */
export function together(meshes: readonly Mesh[]): Mesh {
  const [only, ...others] = meshes;
  if (only && others.length === 0) return only;
  const positions = new Float64Array(meshes.reduce((sum, mesh) => sum + mesh.positions.length, 0));
  const triangles = new Uint32Array(meshes.reduce((sum, mesh) => sum + mesh.triangles.length, 0));
  let [point, corner] = [0, 0];
  for (const mesh of meshes) {
    positions.set(mesh.positions, point);
    triangles.set(
      mesh.triangles.map((vertex) => vertex + point / 3),
      corner,
    );
    point += mesh.positions.length;
    corner += mesh.triangles.length;
  }
  return { positions, triangles };
}

/** Moves meshes together so that their common box starts at the origin: the corner of a printer's bed. */
export function ontoBed(meshes: readonly Mesh[]): Mesh[] {
  const low = lowCorner(meshes);
  return meshes.map((mesh) => moved(mesh, [-low[0]!, -low[1]!, -low[2]!]));
}

/** The least of each coordinate. */
const lowCorner = (meshes: readonly Mesh[]): number[] =>
  [0, 1, 2].map((axis) =>
    meshes.reduce((least, { positions }) => {
      let own = least;
      for (let at = axis; at < positions.length; at += 3) own = Math.min(own, positions[at]!);
      return own;
    }, Number.POSITIVE_INFINITY),
  );
