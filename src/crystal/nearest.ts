/** Number of single characters to insert, delete or replace to turn one word into another (Levenshtein 1966). */
function editDistance(from: string, to: string): number {
  let previous = Array.from({ length: to.length + 1 }, (_, j) => j);
  for (let i = 1; i <= from.length; i++) {
    const current = [i];
    for (let j = 1; j <= to.length; j++) {
      const replaced = (previous[j - 1] ?? 0) + (from[i - 1] === to[j - 1] ? 0 : 1);
      current.push(Math.min(replaced, (previous[j] ?? 0) + 1, (current[j - 1] ?? 0) + 1));
    }
    previous = current;
  }
  return previous[to.length] ?? 0;
}

/**
 * The candidates at the smallest edit distance from the word, in their own order, at most `limit` of them; none when
 * even the nearest shares too little with it to be what was meant. Case does not count.
 */
export function nearest(word: string, candidates: Iterable<string>, limit = 4): string[] {
  const plain = word.toLowerCase();
  const measured = [...candidates].map((candidate) => ({
    candidate,
    distance: editDistance(plain, candidate.toLowerCase()),
  }));
  const best = Math.min(...measured.map(({ distance }) => distance));
  if (best > Math.max(2, Math.floor(word.length / 3))) return [];
  return measured
    .filter(({ distance }) => distance === best)
    .slice(0, limit)
    .map(({ candidate }) => candidate);
}
