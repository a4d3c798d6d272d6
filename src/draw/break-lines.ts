import { textWidth } from './text-width.ts';

/**
 * Lines broken at blanks and after hyphens; a word too long for a line is broken wherever it must be.
 * @param room width of a line in type sizes
 */
export function breakLines(text: string, room: number): string[] {
  const lines: string[] = [];
  let line = '';
  const fits = (more: string): boolean => textWidth((line + more).trimEnd()) <= room;
  const end = (): void => {
    if (line.trim() !== '') lines.push(line.trimEnd());
    line = '';
  };
  for (const piece of pieces(text)) {
    if (!fits(piece)) end();
    for (const part of fits(piece) ? [piece] : characters(piece)) {
      if (!fits(part)) end();
      line += part;
    }
  }
  end();
  return lines;
}

/** In steps of this many type sizes lines are narrowed to be even. */
const STEP = 0.25;

/** As few lines as the room allows, as even as they can be without breaking words for it. */
export function evenLines(text: string, room: number): string[] {
  const longest = Math.max(0, ...pieces(text).map((piece) => textWidth(piece.trimEnd())));
  let best = breakLines(text, room);
  for (let narrower = room - STEP; narrower >= longest; narrower -= STEP) {
    const trial = breakLines(text, narrower);
    if (trial.length > best.length) break;
    best = trial;
  }
  return best;
}

/** At most so many even lines; an ellipsis stands where the text would go on. */
export function firstLines(text: string, room: number, most: number): string[] {
  const lines = evenLines(text, room);
  if (lines.length <= most) return lines;
  const kept = breakLines(text, room).slice(0, most);
  const last = characters(kept.at(-1)!);
  while (last.length > 1 && textWidth(`${last.join('')}…`) > room) last.pop();
  return [...kept.slice(0, -1), `${last.join('').trimEnd()}…`];
}

/** Where a line may be broken: after blanks, and after a hyphen between letters. */
const pieces = (text: string): string[] => text.split(/(?<=\s)(?=\S)|(?<=\p{L}-)(?=[\p{L}(])/u);

/** Characters with their accents. */
const characters = (text: string): string[] => text.match(/\P{M}\p{M}*|\p{M}+/gu) ?? [];
