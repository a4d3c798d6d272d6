/** Lines broken between words so that each is no wider than allowed, and those of which one word alone is wider. */
export interface FittedLines {
  readonly lines: readonly string[];
  readonly tooWide: readonly string[];
}

/** @param width of a line, in the same units as `widest` */
export function fitLines(lines: readonly string[], width: (line: string) => number, widest: number): FittedLines {
  const fitted: string[] = [];
  const tooWide: string[] = [];
  for (const line of lines) {
    const pieces = broken(line, width, widest);
    if (pieces.every((piece) => width(piece) <= widest)) fitted.push(...pieces);
    else tooWide.push(line);
  }
  return { lines: fitted, tooWide };
}

/** Each line takes as many words as it can. */
function broken(line: string, width: (line: string) => number, widest: number): string[] {
  const pieces: string[] = [];
  for (const word of line.trim().split(/\s+/)) {
    const longer = pieces.length > 0 ? `${pieces.at(-1)} ${word}` : word;
    if (pieces.length > 0 && width(longer) <= widest) pieces[pieces.length - 1] = longer;
    else pieces.push(word);
  }
  return pieces;
}
