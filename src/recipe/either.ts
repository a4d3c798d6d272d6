/** "a, b or c". */
export function either(words: readonly string[], joint: 'or' | 'and' = 'or'): string {
  return words.length < 2 ? (words[0] ?? 'nothing') : `${words.slice(0, -1).join(', ')} ${joint} ${words.at(-1)}`;
}
