import { glbFile, type MadeFile, stlFiles, threeMfFile } from './model-files.ts';
import { extentsOf } from './print/mesh.ts';
import { assemble, type Part } from './print/part.ts';
import { printedParts } from './print/parts.ts';
import type { Resolved } from './recipe/crystal.ts';
import { LARGEST_SIZE, USUAL_SIZE } from './recipe/print-plan.ts';
import type { PrinterProfile } from './recipe/schema.ts';
import { closedOrThrow } from './shape/closing.ts';
import { ObjectError } from './shape/object-error.ts';
import { millimetresPerUnit } from './shape/scale.ts';
import { type ClosedShape, polyhedron } from './shape/shape.ts';

export type { MadeFile };

export interface Made {
  readonly shape: ClosedShape;
  readonly millimetresPerUnit: number;
  readonly parts: readonly Part[];
  readonly files: readonly MadeFile[];
  /** Sentences for the person who prints: decisions taken, cautions. */
  readonly remarks: readonly string[];
}

/**
 * From a resolved recipe to printable files in memory: solves the polyhedron, builds the parts, writes each file, reads
 * it back and checks it.
 * @param application program and version, as files that have a place for it state it
 * @throws ObjectError when the crystal is open, cannot carry what is asked, or a file fails its own check
 */
export async function makeModel(resolved: Resolved, application: string): Promise<Made> {
  const shape = closedOrThrow(polyhedron(resolved.crystal));
  const { print } = resolved;
  const scale = millimetresPerUnit(shape, print.size ?? USUAL_SIZE);
  const { parts, remarks } = await printedParts(shape, scale, print);
  refuseGiants(parts);
  const stem = fileStem(resolved);
  const files: MadeFile[] = [];
  if (print.files.includes('stl')) files.push(...stlFiles(resolved, parts, stem));
  if (print.files.includes('3mf')) files.push(await threeMfFile(resolved, parts, stem, { application, scale }));
  if (print.files.includes('glb')) files.push(await glbFile(resolved, parts, stem, application));
  const bed = parts.flatMap((part) => bedRemark(part, print.printer));
  return { shape, millimetresPerUnit: scale, parts, files, remarks: [...remarks, ...bed] };
}

/** The size limit holds for the whole model, rods included. */
function refuseGiants(parts: readonly Part[]): void {
  const longest = Math.max(...extentsOf(assemble(parts)));
  if (longest <= LARGEST_SIZE) return;
  const message = `the whole model is ${Math.round(longest)} mm long, more than ${LARGEST_SIZE} mm (10 m)`;
  throw new ObjectError('size', message, 'choose a smaller size, or rods that reach less far');
}

/** A part that does not fit the printer's space however it is turned by right angles. */
function bedRemark({ name, mesh }: Part, printer: PrinterProfile): string[] {
  const descending = (a: number, b: number): number => b - a;
  const [part, bed] = [[...extentsOf(mesh)].sort(descending), [...printer.bed].sort(descending)];
  if (part.every((extent, i) => extent <= bed[i]!)) return [];
  const sizes = [part, bed].map((all) => all.map((value) => Math.round(value)).join(' × '));
  return [
    `The ${name}, ${sizes[0]} mm, is larger than the ${sizes[1]} mm that "${printer.name}" can print: choose a smaller size or another printer.`,
  ];
}

/** File name without ending: what the recipe asks for, else the mineral and habit, else the title. */
export function fileStem({ crystal: { mineral, title }, print }: Resolved): string {
  if (print.file !== null) return print.file;
  if (!mineral?.habit) return slug(title);
  return slug(mineral.isFirstHabit ? mineral.id : `${mineral.id}-${mineral.habit}`);
}

/** Lower-case letters, digits and hyphens: safe as a file name everywhere. A minus that means an overbar becomes "bar". */
export function slug(title: string): string {
  const plain = title
    .replace(/(?<![\p{L}\p{N}])-(?=\d)/gu, 'bar')
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase();
  return (
    plain
      .replace(/\//g, '_')
      .replace(/[^a-z0-9_]+/g, '-')
      .replace(/^-+|-+$/g, '')
      .slice(0, 60) || 'crystal'
  );
}
