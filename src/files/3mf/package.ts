import { FileError } from '../file-error.ts';
import {
  CONTENT_TYPES_PATH,
  MODEL_TYPE,
  RELATIONSHIPS_PATH,
  RELATIONSHIPS_TYPE,
  START_RELATIONSHIP,
  THUMBNAIL_RELATIONSHIP,
} from './names.ts';
import { scanXml } from './xml-scan.ts';
import { unpack, type ZipEntry, zipEntries } from './zip.ts';

/** The parts of a package that matter here. */
export interface ThreeMfPackage {
  readonly modelPath: string;
  readonly model: Uint8Array;
  /** Another model part by its absolute path. @throws FileError `missingPart`, `contentType`, and those of unpacking */
  readonly otherModel: (path: string) => Uint8Array;
}

/**
 * Opens the package and finds its model by content types and start relationship, as the specification wants it.
 * @throws FileError `empty`, `notZip`, `damaged`, `tooLarge`, `unsupported`, `missingPart`, `contentType`, `syntax`
 */
export function openPackage(bytes: Uint8Array): ThreeMfPackage {
  if (bytes.length === 0)
    throw new FileError(
      'empty',
      'The file is empty: it has no bytes.',
      'Save the model again and copy the file whole.',
    );
  const entries = zipEntries(bytes);
  const typeOf = readContentTypes(unpack(bytes, part(entries, CONTENT_TYPES_PATH)));
  const relationships = readRelationships(unpack(bytes, part(entries, RELATIONSHIPS_PATH)));
  demandType(typeOf, RELATIONSHIPS_PATH, RELATIONSHIPS_TYPE);
  const start = relationships.filter(({ type }) => type === START_RELATIONSHIP);
  if (start.length !== 1)
    throw new FileError(
      'missingPart',
      `${RELATIONSHIPS_PATH} names ${start.length === 0 ? 'no model' : `${start.length} models`} to start with.`,
      'A 3MF file has one relationship of the type "3dmodel"; save the model again as 3MF.',
    );
  const modelPath = start[0]!.path;
  const modelAt = (path: string): Uint8Array => {
    const entry = part(entries, path);
    demandType(typeOf, path, MODEL_TYPE);
    return unpack(bytes, entry);
  };
  const model = modelAt(modelPath);
  for (const { type, path } of relationships) if (type === THUMBNAIL_RELATIONSHIP) part(entries, path);
  return { modelPath, model, otherModel: (path) => modelAt(path.replace(/^\//, '')) };
}

function part(entries: ReadonlyMap<string, ZipEntry>, path: string): ZipEntry {
  const found = entries.get(path);
  if (found) return found;
  const similar = [...entries.keys()].find((other) => other.toLowerCase() === path.toLowerCase());
  const holds = similar ? `; it has "${similar}", but letter case counts` : '';
  throw new FileError(
    'missingPart',
    `The package has no part "${path}"${holds}.`,
    'Save the model again as 3MF; a zip archive of other files is no 3MF file.',
  );
}

function demandType(typeOf: (path: string) => string | undefined, path: string, wanted: string): void {
  const found = typeOf(path);
  if (found === wanted) return;
  throw new FileError(
    'contentType',
    `${CONTENT_TYPES_PATH} says "${found ?? 'nothing'}" of the part "${path}", where "${wanted}" is needed.`,
    'Save the model again as 3MF; if another program made the file, report it there.',
  );
}

/** Types by path: what is said of the part itself goes before what is said of its ending. Case does not count. */
function readContentTypes(bytes: Uint8Array): (path: string) => string | undefined {
  const [endings, paths] = [new Map<string, string>(), new Map<string, string>()];
  scanXml(bytes, CONTENT_TYPES_PATH, {
    open: (name, attributes) => {
      const type = attributes.get('ContentType') ?? '';
      if (name === 'types:Default') endings.set((attributes.get('Extension') ?? '').toLowerCase(), type);
      if (name === 'types:Override') paths.set((attributes.get('PartName') ?? '').toLowerCase(), type);
    },
    close: () => {},
    text: () => {},
  });
  return (path) => paths.get(`/${path}`.toLowerCase()) ?? endings.get(path.split('.').at(-1)!.toLowerCase());
}

/** Targets inside the package; they are absolute, or relative to the root. */
function readRelationships(bytes: Uint8Array): { type: string; path: string }[] {
  const found: { type: string; path: string }[] = [];
  scanXml(bytes, RELATIONSHIPS_PATH, {
    open: (name, attributes) => {
      if (name !== 'rels:Relationship' || attributes.get('TargetMode') === 'External') return;
      const path = (attributes.get('Target') ?? '').replace(/^\.?\//, '');
      found.push({ type: attributes.get('Type') ?? '', path });
    },
    close: () => {},
    text: () => {},
  });
  return found;
}
