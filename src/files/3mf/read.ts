import type { Mesh } from '../../print/mesh.ts';
import { FileError } from '../file-error.ts';
import { MILLIMETRES } from './names.ts';
import { openPackage } from './package.ts';
import { readModelPart } from './read-model.ts';
import { fault, isMesh, type ModelPart, type ObjectResource } from './resources.ts';
import { chain, type Transform } from './transform.ts';

export { placed } from './transform.ts';

/** A body as the file places it. */
export interface PlacedObject {
  /** That of the object with the mesh, or of the assembly around it where it has none. */
  readonly name: string;
  readonly partNumber: string;
  /** `model`, or what else the file calls it: `support`, `solidsupport`, `surface`. */
  readonly type: string;
  /**
   * In its own coordinates, millimetres, in single precision as slicers keep it: what is closed in double need not be
   * closed then. Vertices as the file numbers them, nothing welded.
   */
  readonly mesh: Mesh;
  /** From there to the bed, the shift in millimetres; `placed(mesh, transform)` applies it, mirrors included. */
  readonly transform: Transform;
}

/** What a 3MF file holds. */
export interface ThreeMfContents {
  /** One for each mesh of each build item, in order; assemblies are taken apart. */
  readonly objects: readonly PlacedObject[];
  /** As the file states it; lengths above are millimetres whatever it is. */
  readonly unit: string;
  /** By name, with the prefix that the file gives it. */
  readonly metadata: Readonly<Record<string, string>>;
  /** Names or ids of objects that no build item reaches; a common slicer refuses files that have any. */
  readonly unused: readonly string[];
}

/** Bodies that assemblies of assemblies may multiply to. */
const MOST_BODIES = 10_000;
const DEEPEST = 100;

/**
 * Reads a 3MF file (core specification 1.4.0) strictly: nothing is guessed and nothing repaired. Check each mesh with
 * `checkMesh`; colours and extensions that add no shape are passed over.
 * @throws FileError `empty`, `notZip`, `damaged`, `tooLarge`, `missingPart`, `contentType`, `syntax`, `notFinite`,
 * `unit`, `index`, `transform`, `unsupported`, `metadata`
 */
export function read3mf(bytes: Uint8Array): ThreeMfContents {
  const { model: part, modelPath, otherModel } = openPackage(bytes);
  const others = new Map<string, ModelPart>();
  const model = readModelPart(part, modelPath, (path) => {
    const other = others.get(path) ?? readModelPart(otherModel(path), path);
    others.set(path, other);
    return other;
  });
  const reached = new Set<ObjectResource>();
  const objects = placedObjects(model, reached);
  if (objects.length === 0)
    throw new FileError('empty', 'The 3MF file places no object on the bed.', 'Save the model again with its parts.');
  const unused = [...model.objects.values()].filter((object) => !reached.has(object));
  return {
    objects,
    unit: model.unit,
    metadata: Object.fromEntries(model.metadata),
    unused: unused.map(({ id, name }) => name || `object ${id}`),
  };
}

function placedObjects({ items, unit }: ModelPart, reached: Set<ObjectResource>): PlacedObject[] {
  const scale = MILLIMETRES[unit]!;
  const meshes = new Map<ObjectResource, Mesh>();
  const found: PlacedObject[] = [];
  const place = (object: ObjectResource, transform: Transform, assembly: string, depth: number): void => {
    reached.add(object);
    if (depth > DEEPEST) throw fault('tooLarge', `Its assemblies are nested more than ${DEEPEST} deep.`);
    const name = object.name || assembly;
    const { body, partNumber, type } = object;
    if (!isMesh(body)) {
      for (const part of body) place(part.object, chain(part.transform, transform), name, depth + 1);
      return;
    }
    if (found.length >= MOST_BODIES) throw fault('tooLarge', `Its assemblies make more than ${MOST_BODIES} bodies.`);
    const mesh = meshes.get(object) ?? inMillimetres(body, scale);
    meshes.set(object, mesh);
    const shifted = transform.map((value, i) => (i < 9 ? value : value * scale));
    found.push({ name, partNumber, type, mesh, transform: shifted });
  };
  for (const { object, transform } of items) place(object, transform, '', 0);
  return found;
}

function inMillimetres(mesh: Mesh, scale: number): Mesh {
  return { ...mesh, positions: Float64Array.from(mesh.positions, (value) => Math.fround(value * scale)) };
}
