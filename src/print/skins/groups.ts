import type { CellFace, Cells } from './cells.ts';

/**
 * Cells by number, in groups that each make a sound body: all of a form together where they do; else those that share
 * walls; else each by itself. Skins of one form that touch in an edge only cannot be one body.
 * @param form of each cell
 */
export function soundGroups(cells: Cells, form: readonly number[]): number[][] {
  const forms = [...new Set(form)];
  return forms.flatMap((one) => {
    const all = form.flatMap((own, cell) => (own === one && cells.skins[cell]!.length > 0 ? [cell] : []));
    if (all.length === 0) return [];
    if (isSound(outsideOf(cells, all))) return [all];
    return connected(cells, all).flatMap((group) =>
      isSound(outsideOf(cells, group)) ? [group] : group.map((cell) => [cell]),
    );
  });
}

/** The faces about a group of cells, without those between its own. */
export function outsideOf({ skins }: Cells, group: readonly number[]): CellFace[] {
  const own = new Set<CellFace['behind']>(group);
  return group.flatMap((cell) => skins[cell]!.filter(({ behind }) => !own.has(behind)));
}

function connected({ skins }: Cells, all: readonly number[]): number[][] {
  const left = new Set(all);
  const groups: number[][] = [];
  for (const first of all) {
    if (!left.delete(first)) continue;
    const group = [first];
    for (const cell of group)
      for (const { behind } of skins[cell]!) if (typeof behind === 'number' && left.delete(behind)) group.push(behind);
    groups.push(group);
  }
  return groups;
}

/** Whether every edge has two faces, and the faces about every corner hang together. */
function isSound(faces: readonly CellFace[]): boolean {
  const onward = new Map<number, Map<number, number>>();
  for (const { corners } of faces)
    for (const [i, corner] of corners.entries()) {
      const before = corners.at(i - 1)!;
      const after = corners[(i + 1) % corners.length]!;
      const turns = onward.get(corner) ?? new Map<number, number>();
      onward.set(corner, turns);
      if (turns.has(after)) return false;
      turns.set(after, before);
    }
  return [...onward.values()].every(isOneFan);
}

/** Each entry takes an edge at the corner to the next one across a face. */
function isOneFan(turns: ReadonlyMap<number, number>): boolean {
  const [start] = turns.keys();
  let [at, steps] = [turns.get(start!), 1];
  while (at !== undefined && at !== start && steps <= turns.size) {
    at = turns.get(at);
    steps++;
  }
  return at === start && steps === turns.size;
}
