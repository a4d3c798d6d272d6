import type { Made, MadeFile, ModelSupplies } from './make.ts';
import { checked } from './model-files.ts';
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
    made.parts.flatMap((part) =>
      part.placed.map((_, copy) => {
        const number = part.placed.length > 1 ? ` ${copy + 1} of ${part.placed.length}` : '';
        return { name: `${resolved.crystal.title}: ${part.name}${number}`, part, mesh: part.mesh };
      }),
    ),
  );
  const { printer } = models[0]!.resolved.print;
  return layOut(items, printer.bed).map((places, bed): MadeFile => {
    const objects = places.map(({ item, mesh }) => ({
      name: item.name,
      partNumber: item.part.name,
      mesh,
      surfaces: item.part.surfaces,
    }));
    const title = `Bed ${bed + 1}, ${printer.name}`;
    const bytes = write3mf({
      title,
      description: objects.map(({ name }) => name).join('; '),
      application,
      metadata: {},
      objects,
      places: objects.map(() => [0, 0, 0] as const),
    });
    const name = `bed-${bed + 1}.3mf`;
    const checks = read3mf(bytes).objects.map(({ mesh, transform }, i) =>
      checked(name, placed(mesh, transform), objects[i]!.mesh),
    );
    return { name, bytes, holds: `${objects.length} parts laid out on one bed`, copies: 1, checks };
  });
}
