import { checkMesh } from './files/check/check.ts';
import type { MeshReport } from './files/check/report.ts';
import { weldFloat32 } from './files/mesh/weld.ts';
import { readStl } from './files/stl/read.ts';
import { writeStl } from './files/stl/write.ts';
import { writeStlText } from './files/stl/write-text.ts';
import { extentsOf, type Mesh, meshVolume } from './print/mesh.ts';
import { assemble, ontoBed, type Part } from './print/part.ts';
import { printedParts } from './print/parts.ts';
import type { Resolved } from './recipe/crystal.ts';
import { LARGEST_SIZE, USUAL_SIZE } from './recipe/print-plan.ts';
import type { PrinterProfile } from './recipe/schema.ts';
import { closedOrThrow } from './shape/closing.ts';
import { ObjectError } from './shape/object-error.ts';
import { millimetresPerUnit } from './shape/scale.ts';
import { type ClosedShape, polyhedron } from './shape/shape.ts';

/** A file ready to be written. */
export interface MadeFile {
  readonly name: string;
  readonly bytes: Uint8Array;
  /** What it holds, in words. */
  readonly holds: string;
  /** What reading it back found. */
  readonly check: MeshReport;
}

export interface Made {
  readonly shape: ClosedShape;
  readonly millimetresPerUnit: number;
  readonly parts: readonly Part[];
  readonly files: readonly MadeFile[];
  /** Sentences for the person who prints: decisions taken, cautions. */
  readonly remarks: readonly string[];
}

/** Relative difference allowed between the volume of what is read back and that of the part in double precision. */
const VOLUME_TOLERANCE = 1e-5;

/**
 * From a resolved recipe to printable files in memory: solves the polyhedron, builds the parts, writes each file, reads
 * it back and checks it.
 * @throws ObjectError when the crystal is open, cannot carry what is asked, or a file fails its own check
 */
export async function makeModel(resolved: Resolved): Promise<Made> {
  const shape = closedOrThrow(polyhedron(resolved.crystal));
  const { print, crystal } = resolved;
  const scale = millimetresPerUnit(shape, print.size ?? USUAL_SIZE);
  const { parts, remarks } = await printedParts(shape, scale, print);
  const stem = fileStem(resolved);
  const write = (name: string, holds: string, mesh: Mesh): MadeFile =>
    writeChecked(name, holds, mesh, `${crystal.title}: ${holds}`, print.stl);
  const whole = ontoBed([assemble(parts)])[0]!;
  refuseGiants(whole);
  const files = [write(`${stem}.stl`, parts.length === 1 ? parts[0]!.purpose : 'all parts in their places', whole)];
  if (parts.length > 1)
    for (const part of parts) {
      const times = part.placed.length > 1 ? `; print ${part.placed.length}` : '';
      files.push(write(`${stem}-${part.name}.stl`, `${part.purpose}${times}`, part.mesh));
    }
  const bed = parts.flatMap((part) => bedRemark(part, print.printer));
  return { shape, millimetresPerUnit: scale, parts, files, remarks: [...remarks, ...bed] };
}

/** The size limit holds for the whole model, rods included. */
function refuseGiants(whole: Mesh): void {
  const longest = Math.max(...extentsOf(whole));
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

function writeChecked(name: string, holds: string, mesh: Mesh, title: string, kind: 'binary' | 'text'): MadeFile {
  const welded = weldFloat32(mesh);
  const bytes = kind === 'text' ? new TextEncoder().encode(writeStlText(welded, title)) : writeStl(welded, title);
  const back = readStl(bytes);
  const check = checkMesh(back.mesh, back.normals);
  if (!check.ok) throw notSound(name, check.problems.map(({ message }) => message).join(' '));
  const off = Math.abs(check.volume / meshVolume(mesh) - 1);
  if (off > VOLUME_TOLERANCE) throw notSound(name, `its volume is off by ${off.toExponential(1)} of itself.`);
  return { name, bytes, holds, check };
}

const notSound = (name: string, why: string): ObjectError =>
  new ObjectError(
    'not-sound',
    `${name} failed its own check and is not written: ${why}`,
    'the crystal may be too slender to write; else try a slightly different size, and please report the recipe',
  );

/** File name without ending: what the recipe asks for, else the mineral and habit, else the title. */
export function fileStem({ crystal: { mineral, title }, print }: Resolved): string {
  if (print.file !== null) return print.file;
  if (!mineral?.habit) return slug(title);
  return slug(mineral.isFirstHabit ? mineral.id : `${mineral.id}-${mineral.habit}`);
}

/** Lower-case letters, digits and hyphens: safe as a file name everywhere. */
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
