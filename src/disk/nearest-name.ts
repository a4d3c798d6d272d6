/**
 * The name that a misspelt one was probably meant to be: the one that the fewest insertions, deletions and replacements
 * of single characters turn into it (V. I. Levenshtein, Soviet Physics Doklady 10, 1966), if they are few enough.
 * Case does not count.
 */
export function nearestName(name: string, names: readonly string[]): string | undefined {
  const limit = Math.max(2, Math.floor(name.length / 4));
  let nearest: string | undefined;
  let least = limit + 1;
  for (const candidate of names.toSorted()) {
    const steps = editSteps(name.toLowerCase(), candidate.toLowerCase());
    if (steps >= least) continue;
    least = steps;
    nearest = candidate;
  }
  return nearest;
}

function editSteps(from: string, to: string): number {
  let row = Array.from({ length: to.length + 1 }, (_, j) => j);
  for (let i = 1; i <= from.length; i++) {
    const next = [i];
    for (let j = 1; j <= to.length; j++) {
      const replaced = row[j - 1]! + (from[i - 1] === to[j - 1] ? 0 : 1);
      next.push(Math.min(replaced, row[j]! + 1, next[j - 1]! + 1));
    }
    row = next;
  }
  return row[to.length]!;
}
