import type { Mesh } from '../../print/mesh.ts';
import type { Surface } from '../../print/part.ts';
import type { Point } from '../check/report.ts';
import { FileError } from '../file-error.ts';
import { type ColourGroups, colourGroups, groupOf } from './colours.ts';
import type { ThreeMfModel } from './model.ts';
import { NAMESPACES, OWN_NAMESPACE, OWN_PREFIX } from './names.ts';
import { writeSurfaceSets } from './surface-sets.ts';
import { escaped, XmlBytes } from './xml-bytes.ts';

/** An object whose mesh is welded as it will be written. */
export interface ReadyObject {
  readonly name: string;
  readonly partNumber: string;
  readonly mesh: Mesh;
  readonly surfaces: readonly Surface[];
  readonly within?: number;
}

/** Numbers of the objects that make one thing on the bed: each that is not within another, with those within it. */
export const thingsOf = (objects: readonly Pick<ReadyObject, 'within'>[]): number[][] =>
  objects.flatMap(({ within }, i) =>
    within === undefined
      ? [[i, ...objects.keys()].filter((other, at) => at === 0 || objects[other]!.within === i)]
      : [],
  );

/**
 * The model part: one mesh object a body. Bodies that are one thing are components of an assembly, because slicers would
 * drop loose ones onto the bed; all others are no components, because slicers take those apart and lose the names.
 * Nothing that no item reaches, because a common slicer then refuses the file.
 * @param places millimetres, one a thing
 * @throws FileError `metadata`
 */
export function modelPart(model: ThreeMfModel, objects: readonly ReadyObject[], places: readonly Point[]): Uint8Array {
  const xml = new XmlBytes();
  const { core, m, t } = NAMESPACES;
  xml.text('<?xml version="1.0" encoding="UTF-8"?>\n<model unit="millimeter" xml:lang="en-US"');
  xml.text(` xmlns="${core}" xmlns:m="${m}" xmlns:t="${t}" xmlns:${OWN_PREFIX}="${OWN_NAMESPACE}">\n`);
  for (const [name, value] of metadataOf(model)) xml.text(`<metadata name="${name}">${escaped(value)}</metadata>\n`);
  xml.text('<resources>\n');
  const groups = colourGroups(objects);
  for (const [colour, id] of groups) xml.text(`<m:colorgroup id="${id}"><m:color color="${colour}"/></m:colorgroup>\n`);
  objects.forEach((object, i) => {
    writeObject(xml, object, groups.size + 1 + i, groups);
  });
  const items = thingsOf(objects).map((bodies, thing) => {
    const ids = bodies.map((body) => groups.size + 1 + body);
    const first = objects[bodies[0]!]!;
    return { ids, first, id: ids.length === 1 ? ids[0]! : groups.size + 1 + objects.length + thing };
  });
  for (const { ids, first, id } of items) if (ids.length > 1) writeAssembly(xml, first, id, ids);
  xml.text('</resources>\n<build>\n');
  items.forEach(({ id, first }, i) => {
    xml.text(`<item objectid="${id}" transform="1 0 0 0 1 0 0 0 1`);
    for (const value of places[i]!) xml.ascii(' ').decimal(value);
    xml.text(`" partnumber="${escaped(first.partNumber)}"/>\n`);
  });
  return xml.text('</build>\n</model>\n').finish();
}

function writeAssembly(xml: XmlBytes, { name, partNumber }: ReadyObject, id: number, bodies: readonly number[]): void {
  xml.text(
    `<object id="${id}" type="model" name="${escaped(name)}" partnumber="${escaped(partNumber)}">\n<components>\n`,
  );
  for (const body of bodies) xml.text(`<component objectid="${body}"/>\n`);
  xml.text('</components>\n</object>\n');
}

function metadataOf({ title, description, application, metadata }: ThreeMfModel): [string, string][] {
  const own = Object.entries(metadata).map(([name, value]): [string, string] => {
    if (/^[A-Za-z][A-Za-z0-9]*$/.test(name)) return [`${OWN_PREFIX}:${name}`, value];
    throw new FileError('metadata', `"${name}" is no name for metadata.`, 'Use letters and digits, a letter first.');
  });
  return [['Title', title], ['Description', description], ['Application', application], ...own];
}

function writeObject(xml: XmlBytes, object: ReadyObject, id: number, groups: ColourGroups): void {
  const { name, partNumber, mesh, surfaces } = object;
  xml.text(`<object id="${id}" type="model" name="${escaped(name)}" partnumber="${escaped(partNumber)}"`);
  xml.text(` pid="${groupOf(groups, largestSurface(object).colour)}" pindex="0">\n<mesh>\n<vertices>\n`);
  const { positions } = mesh;
  for (let i = 0; i < positions.length; i += 3) {
    xml.ascii('<vertex x="').decimal(positions[i]!);
    xml.ascii('" y="').decimal(positions[i + 1]!);
    xml
      .ascii('" z="')
      .decimal(positions[i + 2]!)
      .ascii('"/>\n');
  }
  xml.text('</vertices>\n<triangles>\n');
  const pids = surfaces.map(({ colour }) => `" pid="${groupOf(groups, colour)}" p1="0"/>\n`);
  const plain = !mesh.surface || mesh.surface.every((surface) => surface === mesh.surface![0]);
  for (let i = 0; i < mesh.triangles.length; i += 3) {
    xml.ascii('<triangle v1="').whole(mesh.triangles[i]!);
    xml.ascii('" v2="').whole(mesh.triangles[i + 1]!);
    xml.ascii('" v3="').whole(mesh.triangles[i + 2]!);
    xml.ascii(plain ? '"/>\n' : pids[mesh.surface![i / 3]!]!);
  }
  xml.text('</triangles>\n');
  writeSurfaceSets(xml, mesh, surfaces);
  xml.text('</mesh>\n</object>\n');
}

/** The surface of the greatest area: its colour stands for the whole where a reader knows one colour an object. */
function largestSurface({ mesh, surfaces }: ReadyObject): Surface {
  const areas = new Float64Array(surfaces.length);
  const { positions: p, triangles, surface } = mesh;
  for (let i = 0; i < triangles.length; i += 3) {
    const [a, b, c] = [3 * triangles[i]!, 3 * triangles[i + 1]!, 3 * triangles[i + 2]!];
    const [ux, uy, uz] = [p[b]! - p[a]!, p[b + 1]! - p[a + 1]!, p[b + 2]! - p[a + 2]!];
    const [vx, vy, vz] = [p[c]! - p[a]!, p[c + 1]! - p[a + 1]!, p[c + 2]! - p[a + 2]!];
    areas[surface?.[i / 3] ?? 0]! += Math.hypot(uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx);
  }
  return surfaces[areas.indexOf(Math.max(...areas))]!;
}
