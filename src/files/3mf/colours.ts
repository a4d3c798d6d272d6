import { FileError } from '../file-error.ts';
import type { ReadyObject } from './model-part.ts';

/** Resource numbers of the colour groups by colour, `#RRGGBB`. */
export type ColourGroups = ReadonlyMap<string, number>;

/**
 * One group a colour, with that colour alone: a reader that keeps one colour of each group then still has them all.
 * Numbered from 1 in the order of the surfaces; those that no triangle belongs to are left out.
 * @throws FileError `badMesh` for a triangle of an unknown surface or a colour that is not `#RRGGBB`
 */
export function colourGroups(objects: readonly ReadyObject[]): ColourGroups {
  const groups = new Map<string, number>();
  for (const { name, mesh, surfaces } of objects) {
    const used = new Set(mesh.surface ?? [0]);
    for (const surface of used)
      if (!surfaces[surface])
        throw new FileError(
          'badMesh',
          `A triangle of "${name}" belongs to surface ${surface}, but there are only ${surfaces.length}.`,
          'This is a fault of the program that made the mesh; make it again there.',
        );
    surfaces.forEach(({ colour }, surface) => {
      if (!used.has(surface)) return;
      const key = normal(colour);
      if (!groups.has(key)) groups.set(key, groups.size + 1);
    });
  }
  return groups;
}

export const groupOf = (groups: ColourGroups, colour: string): number => groups.get(normal(colour)) ?? 0;

/** The schema takes capitals and small letters, but no short colours. */
function normal(colour: string): string {
  if (/^#[0-9A-F]{6}$/i.test(colour)) return colour.toUpperCase();
  throw new FileError('badMesh', `"${colour}" is not a colour.`, 'Write colours as # and six hexadecimal digits.');
}
