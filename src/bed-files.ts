import type { ThreeMfObject } from './files/3mf/write.ts';
import type { Made, MadeFile, ModelSupplies } from './make.ts';
import { checked } from './model-files.ts';
import type { Place } from './print/before/layout.ts';
import type { Mesh } from './print/mesh.ts';
import { jobs, type Part, together } from './print/part.ts';
import type { Resolved } from './recipe/crystal.ts';

interface Model {
  readonly resolved: Resolved;
  readonly made: Made;
}

/**
 * All parts of several models laid out on as few printing beds as it takes, one 3MF file a bed. The bed is that of the
 * first model's printer.
 * @throws ObjectError for a part that is larger than the bed
 */
export async function bedFiles(models: readonly Model[], { application }: ModelSupplies): Promise<MadeFile[]> {
  const [{ layOut }, { write3mf }, { read3mf, placed }] = await Promise.all([
    import('./print/before/layout.ts'),
    import('./files/3mf/write.ts'),
    import('./files/3mf/read.ts'),
  ]);
  const items = models.flatMap(({ resolved, made }) =>
    jobs(made.parts).flatMap((parts) => {
      const { name, placed } = parts[0]!;
      return placed.map((_, copy) => {
        const number = placed.length > 1 ? ` ${copy + 1} of ${placed.length}` : '';
        return { name: `${resolved.crystal.title}: ${name}${number}`, parts, mesh: jobMesh(parts) };
      });
    }),
  );
  const { printer } = models[0]!.resolved.print;
  return layOut(items, printer.bed).map((places, bed): MadeFile => {
    const objects = objectsOf(places);
    const title = `Bed ${bed + 1}, ${printer.name}`;
    const bytes = write3mf({
      title,
      description: objects.map(({ name }) => name).join('; '),
      application,
      metadata: {},
      objects,
      places: places.map(() => [0, 0, 0] as const),
    });
    const name = `bed-${bed + 1}.3mf`;
    const checks = read3mf(bytes).objects.map(({ mesh, transform }, i) =>
      checked(name, placed(mesh, transform), objects[i]!.mesh),
    );
    return { name, bytes, holds: `${places.length} parts laid out on one bed`, copies: 1, checks };
  });
}

interface Job {
  readonly name: string;
  readonly parts: readonly Part[];
  readonly mesh: Mesh;
}

const jobMesh = (parts: readonly Part[]): Mesh => together(parts.map(({ mesh }) => mesh));

/** The parts of each job, moved as the whole of it was. */
function objectsOf(places: readonly Place<Job>[]): ThreeMfObject[] {
  const objects: ThreeMfObject[] = [];
  for (const { item, mesh } of places) {
    const first = objects.length;
    let from = 0;
    for (const part of item.parts) {
      const positions = mesh.positions.subarray(from, from + part.mesh.positions.length);
      from += positions.length;
      objects.push({
        name: part === item.parts[0] ? item.name : `${item.name}: ${part.name}`,
        partNumber: part.name,
        mesh: { ...part.mesh, positions },
        surfaces: part.surfaces,
        ...(objects.length > first && { within: first }),
      });
    }
  }
  return objects;
}
