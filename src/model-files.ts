import { printFace } from './crystal/indices.ts';
import { checkMesh } from './files/check/check.ts';
import type { MeshReport } from './files/check/report.ts';
import { weldFloat32 } from './files/mesh/weld.ts';
import { readStl } from './files/stl/read.ts';
import { writeStl } from './files/stl/write.ts';
import { writeStlText } from './files/stl/write-text.ts';
import { type Mesh, meshVolume } from './print/mesh.ts';
import { assemble, jobs, ontoBed, type Part } from './print/part.ts';
import type { Resolved } from './recipe/crystal.ts';
import { ObjectError } from './shape/object-error.ts';

/** A file ready to be written. */
export interface MadeFile {
  readonly name: string;
  readonly bytes: Uint8Array;
  /** What it holds, in words. */
  readonly holds: string;
  /** How many of it to print. */
  readonly copies: number;
  /** What reading it back found, one report a body that the file names. */
  readonly checks: readonly MeshReport[];
}

/** From the object at the viewer, in the crystal's frame: somewhat from the right and above, c upright. */
const GENERAL_VIEW = [0.91, 0.35, 0.3] as const;
/** Pixels of a side. */
const PICTURE = 720;

/** Relative difference allowed between the volume of what is read back and that of the part in double precision. */
const VOLUME_TOLERANCE = 1e-5;

/**
 * STL: the whole model, and each part where there are several. Parts that touch in their places cannot be one STL file,
 * in which touching solids have no meaning; then there is none of the whole.
 * @throws ObjectError when a file fails its own check
 */
export function stlFiles({ crystal, print }: Resolved, parts: readonly Part[], stem: string): MadeFile[] {
  const write = (name: string, holds: string, copies: number, mesh: Mesh): MadeFile => {
    const welded = weldFloat32(mesh);
    const title = `${crystal.title}: ${holds}`;
    const bytes =
      print.stl === 'text' ? new TextEncoder().encode(writeStlText(welded, title)) : writeStl(welded, title);
    const back = readStl(bytes);
    return { name, bytes, holds, copies, checks: [checked(name, back.mesh, mesh, back.normals)] };
  };
  const [only, ...others] = parts;
  const whole = ontoBed([assemble(parts)])[0]!;
  if (others.length === 0) return [write(`${stem}.stl`, only!.purpose, 1, whole)];
  const each = parts.map((part) => write(`${stem}-${part.name}.stl`, part.purpose, part.placed.length, part.mesh));
  const all = unlessNotSound(() => write(`${stem}.stl`, 'all parts in their places', 1, whole));
  return all ? [all, ...each] : each;
}

/** Each part has passed its own check by then: what fails the check of the whole is that they touch. */
function unlessNotSound(step: () => MadeFile): MadeFile | null {
  try {
    return step();
  } catch (error) {
    if (error instanceof ObjectError && error.code === 'not-sound') return null;
    throw error;
  }
}

/** Whether a mesh passes the check once it is in single precision. */
export const isSound = (mesh: Mesh): boolean => checkMesh(weldFloat32(mesh)).ok;

/** 3MF: every body to print as an object of its own, side by side, with colours and a picture. @throws ObjectError */
export async function threeMfFile(
  resolved: Resolved,
  parts: readonly Part[],
  stem: string,
  { application, scale }: { application: string; scale: number },
): Promise<MadeFile> {
  const [{ write3mf }, { placed, read3mf }, { thumbnailPng }] = await Promise.all([
    import('./files/3mf/write.ts'),
    import('./files/3mf/read.ts'),
    import('./files/picture/thumbnail.ts'),
  ]);
  const { crystal } = resolved;
  const objects = inJobs(parts).flatMap(({ part, within }) =>
    part.placed.map((_, copy) => ({
      name: `${crystal.title}: ${part.name}${part.placed.length > 1 ? ` ${copy + 1} of ${part.placed.length}` : ''}`,
      partNumber: `${stem}-${part.name}`,
      mesh: part.mesh,
      surfaces: part.surfaces,
      ...(within !== undefined && { within }),
    })),
  );
  const forms = crystal.forms.map(({ form }) => printFace(form.indices, crystal.group.axes, { brackets: '{' }));
  const bytes = write3mf({
    title: crystal.title,
    description: parts.map(({ purpose }) => purpose).join('; '),
    application,
    metadata: {
      ...(crystal.mineral && { Mineral: crystal.mineral.name }),
      PointGroup: crystal.group.hermannMauguin,
      Forms: forms.join(' '),
      MillimetresPerUnit: String(scale),
      RecipeHash: await recipeHash(resolved),
    },
    objects,
    thumbnail: thumbnailPng(assembled(parts), { toward: GENERAL_VIEW }),
  });
  const name = `${stem}.3mf`;
  const read = read3mf(bytes).objects;
  const checks: MeshReport[] = [];
  for (const [i, { mesh, transform }] of read.entries()) {
    const isCopy = i > 0 && sameMesh(mesh, read[i - 1]!.mesh);
    checks.push(isCopy ? checks[i - 1]! : checked(name, placed(mesh, transform), objects[i]!.mesh));
  }
  return {
    name,
    bytes,
    holds: `${objects.length === 1 ? 'one object' : `${objects.length} objects`} to print, with colours`,
    copies: 1,
    checks,
  };
}

/** Copies of a part stand one after the other, and one look at them is enough. */
const sameMesh = (one: Mesh, other: Mesh): boolean =>
  same(one.positions, other.positions) && same(one.triangles, other.triangles);

const same = (one: ArrayLike<number>, other: ArrayLike<number>): boolean =>
  one.length === other.length && Array.prototype.every.call(one, (value, i) => value === other[i]);

/** Parts of one job behind each other, with the number that the object of each job's first part has. */
function inJobs(parts: readonly Part[]): { part: Part; within?: number }[] {
  let objects = 0;
  return jobs(parts).flatMap(([leader, ...others]) => {
    const within = objects;
    objects += leader!.placed.length + others.length;
    return [{ part: leader! }, ...others.map((part) => ({ part, within }))];
  });
}

/** GLB for screens and phones: the finished object in colour. @throws ObjectError */
export async function glbFile(
  { crystal }: Resolved,
  parts: readonly Part[],
  stem: string,
  application: string,
): Promise<MadeFile> {
  const { writeGlb } = await import('./files/glb/write.ts');
  const objects = parts.flatMap((part) =>
    part.placed.map((mesh) => ({ name: part.name, mesh, surfaces: part.surfaces })),
  );
  const name = `${stem}.glb`;
  const checks = objects.map(({ mesh }) => checked(name, weldFloat32(mesh), mesh));
  const bytes = await writeGlb({ title: crystal.title, application, objects });
  return { name, bytes, holds: 'the finished object for screens', copies: 1, checks };
}

/** A picture of the finished object. */
export async function pngFile(parts: readonly Part[], stem: string): Promise<MadeFile> {
  const { thumbnailPng } = await import('./files/picture/thumbnail.ts');
  const bytes = thumbnailPng(assembled(parts), { toward: GENERAL_VIEW, size: PICTURE, ground: '#F7F5EF' });
  return { name: `${stem}.png`, bytes, holds: 'a picture of the finished object', copies: 1, checks: [] };
}

const assembled = (parts: readonly Part[]) =>
  parts.flatMap(({ placed: meshes, surfaces }) => meshes.map((mesh) => ({ mesh, surfaces })));

/** Checks what was read back against the part it was written from. @throws ObjectError */
export function checked(name: string, mesh: Mesh, part: Mesh, normals?: Float32Array): MeshReport {
  const check = checkMesh(mesh, normals);
  if (!check.ok) throw notSound(name, check.problems.map(({ message }) => message).join(' '));
  const off = Math.abs(check.volume / meshVolume(part) - 1);
  if (off > VOLUME_TOLERANCE) throw notSound(name, `its volume is off by ${off.toExponential(1)} of itself.`);
  return check;
}

const notSound = (name: string, why: string): ObjectError =>
  new ObjectError(
    'not-sound',
    `${name} failed its own check and is not written: ${why}`,
    'the crystal may be too slender to write; else try a slightly different size, and please report the recipe',
  );

/** Tells whether two files were made from the same crystal and print plan: SHA-256 of both, the first 16 digits. */
async function recipeHash({ crystal, print }: Resolved): Promise<string> {
  const { group, cell, forms } = crystal;
  const facts = {
    group: group.key,
    cell,
    forms: forms.map(({ form, distance }) => [...form.indices, distance]),
    print,
  };
  const digest = await crypto.subtle.digest('SHA-256', new TextEncoder().encode(JSON.stringify(facts)));
  return Array.from(new Uint8Array(digest).subarray(0, 8), (byte) => byte.toString(16).padStart(2, '0')).join('');
}
