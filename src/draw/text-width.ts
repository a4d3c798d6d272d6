/**
 * Advance widths in type sizes of DejaVu Serif 2.37, upright and italic alike, rounded up to hundredths. It stands first
 * among the drawings' fonts and is the widest of them, so a line that fits by this table fits in the others too.
 */
const CLASSES: readonly (readonly [width: number, characters: string])[] = [
  [0.28, "'"],
  [0.32, ' ,.ijl·’'],
  [0.34, '-/:;\\|'],
  [0.38, 'f'],
  [0.41, '!Jt₀₁₂₃₄₅₆₇₈₉()I[]'],
  [0.46, '"'],
  [0.48, 'r'],
  [0.5, '*_`–°'],
  [0.52, 's'],
  [0.54, '?z'],
  [0.57, 'cvxy'],
  [0.61, 'koae'],
  [0.65, 'bdghnpqu$0123456789{}'],
  [0.68, 'PLTY'],
  [0.7, 'FZS'],
  [0.73, 'AEVX'],
  [0.75, 'KB'],
  [0.77, 'CR'],
  [0.8, 'G'],
  [0.82, 'OQD'],
  [0.84, '#+<=>^~'],
  [0.86, 'wU'],
  [0.88, 'HN'],
  [0.9, '&'],
  [0.96, '%m'],
  [1.0, '@—…'],
  [1.03, 'MW'],
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
