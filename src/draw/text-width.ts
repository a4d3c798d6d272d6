/**
 * Advance widths in type sizes of DejaVu Serif 2.37, upright and italic alike, rounded up to hundredths. It stands first
 * among the drawings' fonts and is the widest of them, so a line that fits by this table fits in the others too.
 */
const CLASSES: readonly (readonly [width: number, characters: string])[] = [
  [0.28, "'"],
  [0.32, ' ,.ilj·’'],
  [0.34, '-/:;\\|'],
  [0.38, 'f'],
  [0.4, '()[]!IJt'],
  [0.41, '₀₁₂₃₄₅₆₇₈₉'],
  [0.47, '"'],
  [0.48, 'r'],
  [0.51, '*_`s°–'],
  [0.54, 'z?'],
  [0.57, 'cvxy'],
  [0.6, 'aeo'],
  [0.61, 'k'],
  [0.65, '$0123456789bdghnpqu{}'],
  [0.68, 'LYPT'],
  [0.7, 'FSZ'],
  [0.73, 'XAV'],
  [0.76, 'BEKR'],
  [0.81, 'CDG'],
  [0.84, 'OQ#+<=>U^~'],
  [0.9, 'wHN&'],
  [0.96, '%m'],
  [1.03, 'M@W…—'],
];

const WIDTHS: ReadonlyMap<string, number> = new Map(
  CLASSES.flatMap(([width, characters]) => [...characters].map((character) => [character, width] as const)),
);

/** What the table does not hold: most small letters of Latin, Greek and Cyrillic stay below the first, all else of these
 * scripts, Chinese and the like below the second. */
const OTHER_SMALL = 1;
const OTHER = 1.4;

/** Width of words in type sizes, seldom less than it turns out; accents and overbars take none. */
export function textWidth(text: string): number {
  let width = 0;
  for (const character of text.normalize('NFD')) {
    if (/\p{M}/u.test(character)) continue;
    width += WIDTHS.get(character) ?? (/\p{Ll}/u.test(character) ? OTHER_SMALL : OTHER);
  }
  return width;
}
