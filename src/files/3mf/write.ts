import { type ZippableFile, zipSync } from 'fflate';
import type { Mesh } from '../../print/mesh.ts';
import { together } from '../../print/part.ts';
import type { Point } from '../check/report.ts';
import { FileError } from '../file-error.ts';
import { assertNotEmpty } from '../mesh/sound-mesh.ts';
import { weldDecimals } from './decimals.ts';
import type { ThreeMfModel } from './model.ts';
import { modelPart, thingsOf } from './model-part.ts';
import {
  CONTENT_TYPES_PATH,
  MODEL_PATH,
  MODEL_TYPE,
  NAMESPACES,
  RELATIONSHIPS_PATH,
  RELATIONSHIPS_TYPE,
  START_RELATIONSHIP,
  THUMBNAIL_PATH,
  THUMBNAIL_RELATIONSHIP,
} from './names.ts';
import { inPlace, sideBySide } from './places.ts';

export type { ThreeMfModel, ThreeMfObject } from './model.ts';

/** The zip format keeps local time; this gives the same bytes in every time zone. */
const STAMP = new Date(2000, 0, 1);
/** Chosen by measurement: the usual 6 takes twice the time for files 6 % smaller. */
const LEVEL = 2;

/**
 * A 3MF file after the core specification 1.4.0, in millimetres, Z up, with one named mesh object a
 * body and one build item a thing, which is a body or an assembly of bodies. Meshes are welded at six decimal places (`weldDecimals`) but not checked: read the file back and check that.
 * Colours are one group each; an object whose triangles belong to several surfaces has them on every triangle, and all
 * surfaces by name as triangle sets. The same model gives the same bytes.
 * @throws FileError `empty`, `badMesh`, `notFinite`, `metadata`
 */
export function write3mf(model: ThreeMfModel): Uint8Array {
  const objects = model.objects.map((object) => {
    const mesh = weldDecimals(object.mesh);
    assertNotEmpty(mesh);
    return { ...object, mesh };
  });
  if (objects.length === 0) throw new FileError('empty', 'There is no object to write.', 'Give at least one part.');
  const things = thingsOf(objects).map((bodies) => together(bodies.map((body) => objects[body]!.mesh)));
  const picture = model.thumbnail;
  const store = (text: string): ZippableFile => [new TextEncoder().encode(text), { mtime: STAMP, level: LEVEL }];
  return zipSync({
    [CONTENT_TYPES_PATH]: store(contentTypes(picture !== undefined)),
    [RELATIONSHIPS_PATH]: store(relationships(picture !== undefined)),
    [MODEL_PATH]: [modelPart(model, objects, placesOf(model, things)), { mtime: STAMP, level: LEVEL }],
    ...(picture && { [THUMBNAIL_PATH]: [picture, { mtime: STAMP, level: 0 }] satisfies ZippableFile }),
  });
}

function placesOf({ places = 'sideBySide' }: ThreeMfModel, meshes: readonly Mesh[]): readonly Point[] {
  if (places === 'sideBySide') return sideBySide(meshes);
  if (places === 'inPlace') return inPlace(meshes);
  if (places.length === meshes.length && places.flat().every(Number.isFinite)) return places;
  throw new FileError(
    'badMesh',
    `${meshes.length} objects need a place each, of three finite numbers; ${places.length} places are given.`,
    'This is a fault of the program that laid them out.',
  );
}

const DECLARATION = '<?xml version="1.0" encoding="UTF-8"?>\n';

function contentTypes(picture: boolean): string {
  const kinds = [['rels', RELATIONSHIPS_TYPE], ['model', MODEL_TYPE], ...(picture ? [['png', 'image/png']] : [])];
  const lines = kinds.map(([ending, type]) => `<Default Extension="${ending}" ContentType="${type}"/>\n`);
  return `${DECLARATION}<Types xmlns="${NAMESPACES.types}">\n${lines.join('')}</Types>\n`;
}

function relationships(picture: boolean): string {
  const targets = [[MODEL_PATH, START_RELATIONSHIP], ...(picture ? [[THUMBNAIL_PATH, THUMBNAIL_RELATIONSHIP]] : [])];
  const lines = targets.map(([path, type], i) => `<Relationship Target="/${path}" Id="rel${i}" Type="${type}"/>\n`);
  return `${DECLARATION}<Relationships xmlns="${NAMESPACES.rels}">\n${lines.join('')}</Relationships>\n`;
}
