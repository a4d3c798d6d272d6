import { OVERBAR } from '../crystal/marks.ts';
import { layOutSymbol, symbolText, type TextPlace, words } from './symbol-text.ts';
import { textWidth } from './text-width.ts';

const BLANK = textWidth(' ');

const isBarred = (text: string): boolean => text.includes(OVERBAR);
const wordWidth = (word: string): number => (isBarred(word) ? layOutSymbol(word).width : textWidth(word));

/** Width of a line in type sizes. */
export function lineWidth(text: string): number {
  if (!isBarred(text)) return textWidth(text);
  const all = text.split(' ');
  return all.reduce((sum, word) => sum + wordWidth(word), BLANK * (all.length - 1));
}

/**
 * A line of words; those with overbars are set as symbols, so that the bars are drawn lines. Each run between them then
 * has a place of its own, which keeps them together whatever the font.
 */
export function lineText(text: string, place: TextPlace): string {
  if (!isBarred(text)) return words(text, place);
  const { at, size, anchor = 'start', ...look } = place;
  const share = { start: 0, middle: 0.5, end: 1 }[anchor];
  let x = at[0] - share * lineWidth(text) * size;
  return text
    .split(' ')
    .map((word) => {
      const start = [x, at[1]] as const;
      x += (wordWidth(word) + BLANK) * size;
      if (word === '') return '';
      return isBarred(word)
        ? symbolText(layOutSymbol(word), { start, size, ...look })
        : words(word, { at: start, size, ...look });
    })
    .join('');
}
