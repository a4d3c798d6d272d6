import { glbFile, isSound, type MadeFile, pngFile, stlFiles, threeMfFile } from './model-files.ts';
import type { ModelFinding } from './print/examined.ts';
import { extentsOf, type Mesh } from './print/mesh.ts';
import { assemble, ontoBed, type Part } from './print/part.ts';
import { printedParts } from './print/parts.ts';
import type { Supplies } from './print/tools.ts';
import type { Resolved } from './recipe/crystal.ts';
import { allAxes, LARGEST_SIZE, USUAL_SIZE } from './recipe/print-plan.ts';
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
  /** Sentences about what could do harm. */
  readonly warnings: readonly string[];
  /** What to know before printing and handling; only where the recipe asks for checks. */
  readonly findings: readonly ModelFinding[];
}

export interface ModelSupplies extends Omit<Supplies, 'isSound'> {
  /** Program and version, as files that have a place for it state it. */
  readonly application: string;
}

/**
 * From a resolved recipe to printable files in memory: solves the polyhedron, builds the parts, writes each file, reads
 * it back and checks it.
 * @throws ObjectError when the crystal is open, cannot carry what is asked, or a file fails its own check
 */
export async function makeModel(resolved: Resolved, supplies: ModelSupplies): Promise<Made> {
  return resolved.print.pair ? makePair(resolved, supplies) : makeOne(resolved, supplies);
}

/** Two copies, as teachers and curators ask for: one plain, and one with its symmetry axes and lettered faces. */
async function makePair(resolved: Resolved, supplies: ModelSupplies): Promise<Made> {
  const { print } = resolved;
  const stem = fileStem(resolved);
  const plain = { ...print, axes: null, letters: null, stand: null, planes: null, key: false, file: `${stem}-plain` };
  const marked = {
    ...print,
    axes: print.axes ?? allAxes(print.printer),
    letters: print.letters ?? ({ relief: 'engraved', text: 'letters' } as const),
    file: `${stem}-marked`,
  };
  const [first, second] = [
    await makeOne({ ...resolved, print: plain }, supplies),
    await makeOne({ ...resolved, print: marked }, supplies),
  ];
  return {
    ...second,
    files: [...first.files, ...second.files],
    parts: [...first.parts, ...second.parts],
    findings: [...first.findings, ...second.findings],
  };
}

async function makeOne(resolved: Resolved, supplies: ModelSupplies): Promise<Made> {
  const shape = closedOrThrow(polyhedron(resolved.crystal));
  const { print } = resolved;
  const scale = millimetresPerUnit(shape, print.size ?? USUAL_SIZE);
  const printed = await printedParts(shape, scale, print, { ...supplies, isSound: isSoundOnBed });
  const { remarks, warnings } = printed;
  const examining = print.flat || print.checks ? await import('./print/examined.ts') : null;
  const parts = print.flat && examining ? await examining.laidFlat(printed.parts, print) : printed.parts;
  const { application } = supplies;
  refuseGiants(parts);
  const stem = fileStem(resolved);
  const files: MadeFile[] = [];
  if (print.files.includes('stl')) files.push(...stlFiles(resolved, parts, stem));
  if (print.files.includes('3mf')) files.push(await threeMfFile(resolved, parts, stem, { application, scale }));
  if (print.files.includes('glb')) files.push(await glbFile(resolved, parts, stem, application));
  if (print.files.includes('png')) files.push(await pngFile(parts, stem));
  const apart =
    parts.length > 1 && files[0]?.name === `${stem}-${parts[0]!.name}.stl`
      ? ['The parts touch in their places, so there is no STL file of the whole; 3MF and GLB show it.']
      : [];
  const findings =
    print.checks && examining ? await examining.examined(parts, shape, scale, print, printed.blunted) : [];
  const bed = parts.flatMap((part) => bedRemark(part, print.printer));
  return {
    shape,
    millimetresPerUnit: scale,
    parts,
    files,
    remarks: [...remarks, ...apart, ...bed],
    warnings,
    findings,
  };
}

/** Files take parts to the bed first, and single precision rounds otherwise there. */
const isSoundOnBed = (mesh: Mesh): boolean => isSound(mesh) && isSound(ontoBed([mesh])[0]!);

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
