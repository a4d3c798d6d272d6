import { checkMesh } from './files/mesh/check.ts';
import type { MeshReport } from './files/mesh/report.ts';
import { weldFloat32 } from './files/mesh/weld.ts';
import { readStl } from './files/stl/read.ts';
import { writeStl } from './files/stl/write.ts';
import { writeStlText } from './files/stl/write-text.ts';
import { closedOrThrow } from './habit/closing.ts';
import { type ClosedHabit, polyhedron } from './habit/habit.ts';
import { ObjectError } from './habit/object-error.ts';
import { millimetresPerUnit } from './habit/scale.ts';
import type { Mesh } from './print/mesh.ts';
import { assemble, ontoBed, type Part } from './print/part.ts';
import { printedParts } from './print/parts.ts';
import type { Resolved } from './recipe/crystal.ts';
import { USUAL_SIZE } from './recipe/print-plan.ts';

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
  readonly habit: ClosedHabit;
  readonly millimetresPerUnit: number;
  readonly parts: readonly Part[];
  readonly files: readonly MadeFile[];
  /** Sentences for the person who prints: decisions taken, cautions. */
  readonly remarks: readonly string[];
}

/** Relative difference allowed between the volume of a written crystal and that of the exact polyhedron. */
const VOLUME_TOLERANCE = 1e-5;

/**
 * From a resolved recipe to printable files in memory: solves the polyhedron, builds the parts, writes each file, reads
 * it back and checks it.
 * @throws ObjectError when the crystal is open, cannot carry what is asked, or a file fails its own check
 */
export async function makeModel(resolved: Resolved): Promise<Made> {
  const habit = closedOrThrow(polyhedron(resolved.crystal));
  const { print, crystal } = resolved;
  const scale = millimetresPerUnit(habit, print.size ?? USUAL_SIZE);
  const { parts, remarks } = await printedParts(habit, scale, print);
  const stem = fileStem(resolved);
  const titled = (what: string): string => `${crystal.title}: ${what}`;
  const write = (name: string, holds: string, mesh: Mesh): MadeFile =>
    writeChecked(name, holds, mesh, titled(holds), print.stl);
  const whole = ontoBed([assemble(parts)])[0]!;
  const files = [write(`${stem}.stl`, parts.length === 1 ? parts[0]!.purpose : 'all parts in their places', whole)];
  if (parts.length > 1)
    for (const part of parts) {
      const times = part.placed.length > 1 ? ` (print ${part.placed.length})` : '';
      files.push(write(`${stem}-${part.name}.stl`, `${part.purpose}${times}`, part.mesh));
    }
  if (parts.length === 1 && !print.axes) assertVolume(files[0]!, habit.measures.volume * scale ** 3);
  return { habit, millimetresPerUnit: scale, parts, files, remarks };
}

function writeChecked(name: string, holds: string, mesh: Mesh, title: string, kind: 'binary' | 'text'): MadeFile {
  const welded = weldFloat32(mesh);
  const bytes = kind === 'text' ? new TextEncoder().encode(writeStlText(welded, title)) : writeStl(welded, title);
  const back = readStl(bytes);
  const check = checkMesh(back.mesh, back.normals);
  if (!check.ok) throw notSound(name, check.problems.map(({ message }) => message).join(' '));
  return { name, bytes, holds, check };
}

function assertVolume({ name, check }: MadeFile, exact: number): void {
  const off = Math.abs(check.volume / exact - 1);
  if (off > VOLUME_TOLERANCE) throw notSound(name, `Its volume differs from the crystal's by ${off.toExponential(1)}.`);
}

const notSound = (name: string, why: string): ObjectError =>
  new ObjectError(
    'not-sound',
    `${name} failed its own check and is not written: ${why}`,
    'try a slightly different size or rod diameter, and please report the recipe',
  );

/** File name without ending: what the recipe asks for, else the mineral and habit, else the title. */
export function fileStem({ crystal, print }: Resolved): string {
  return print.file ?? slug(crystal.mineral ? crystal.mineral.id + habitSuffix(crystal.mineral) : crystal.title);
}

const habitSuffix = ({ habit, firstHabit }: { habit: string; firstHabit: string }): string =>
  habit === firstHabit ? '' : `-${habit}`;

/** Lower-case letters, digits and hyphens: safe as a file name everywhere. */
function slug(title: string): string {
  const plain = title.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase();
  return (
    plain
      .replace(/\//g, '_')
      .replace(/[^a-z0-9_]+/g, '-')
      .replace(/^-+|-+$/g, '')
      .slice(0, 60) || 'crystal'
  );
}
