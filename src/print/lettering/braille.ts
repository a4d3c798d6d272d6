import { ObjectError } from '../../shape/object-error.ts';

/** The dots of one cell: 1, 2, 3 down the left, 4, 5, 6 down the right; none for a blank. */
export type Cell = readonly number[];

/*
 * Unified English Braille, uncontracted (The Rules of Unified English Braille, 2nd edition 2013, ICEB: section 4 letters,
 * 5.6 and 6 numbers, 7 punctuation, 8 capitals). The letters, brackets, slash and the marks of punctuation are from
 * memory.
 */
const FIRST_TEN = ['1', '12', '14', '145', '15', '124', '1245', '125', '24', '245'];
const LETTERS = new Map<string, Cell>([
  ...[...'abcdefghij'].map((letter, i) => [letter, cell(FIRST_TEN[i]!)] as const),
  ...[...'klmnopqrst'].map((letter, i) => [letter, cell(`${FIRST_TEN[i]!}3`)] as const),
  ...[...'uvxyz'].map((letter, i) => [letter, cell(`${FIRST_TEN[i]!}36`)] as const),
  ['w', cell('2456')],
]);
const DIGITS = new Map<string, Cell>([...'1234567890'].map((digit, i) => [digit, cell(FIRST_TEN[i]!)] as const));
const MARKS = new Map<string, readonly Cell[]>([
  [' ', [[]]],
  ['-', [cell('36')]],
  ['\u2212', [cell('5'), cell('36')]],
  ['(', [cell('5'), cell('126')]],
  [')', [cell('5'), cell('345')]],
  ['/', [cell('456'), cell('34')]],
  ['.', [cell('256')]],
  [',', [cell('2')]],
  [':', [cell('25')]],
  ["'", [cell('3')]],
  ['\u2019', [cell('3')]],
]);
const NUMBER_SIGN = cell('3456');
const CAPITAL_SIGN = cell('6');
/** Also the letter sign: says that what follows a number is no figure. */
const GRADE_1_SIGN = cell('56');
const DECIMAL_POINT = cell('256');
const NUMBER_COMMA = cell('2');

function cell(dots: string): Cell {
  return [...dots].map(Number).sort((a, b) => a - b);
}

/**
 * A text in uncontracted Unified English Braille: a number sign before figures, the letter sign where a small letter a
 * to j follows them, a capital sign before a capital and two before a run of capitals that no small letter ends.
 * @throws ObjectError `text`, listing every character that there is no sign for here
 */
export function brailleCells(text: string): Cell[] {
  assertSigns(text);
  const characters = [...text];
  const cells: Cell[] = [];
  let [inNumber, inCapitals] = [false, false];
  characters.forEach((character, i) => {
    const next = characters[i + 1] ?? '';
    const digit = DIGITS.get(character);
    if (digit) {
      cells.push(...(inNumber ? [digit] : [NUMBER_SIGN, digit]));
      inNumber = true;
      return;
    }
    if (inNumber && (character === '.' || character === ',') && DIGITS.has(next)) {
      cells.push(character === '.' ? DECIMAL_POINT : NUMBER_COMMA);
      return;
    }
    const small = character.toLowerCase();
    const letter = LETTERS.get(small);
    const isCapital = letter !== undefined && small !== character;
    if (isCapital && !inCapitals) {
      inCapitals = capitalRun(characters, i) > 1;
      cells.push(...(inCapitals ? [CAPITAL_SIGN, CAPITAL_SIGN] : [CAPITAL_SIGN]));
    }
    if (!isCapital) inCapitals = false;
    if (letter && !isCapital && inNumber && small <= 'j') cells.push(GRADE_1_SIGN);
    cells.push(...(letter ? [letter] : MARKS.get(character)!));
    inNumber = false;
  });
  return cells;
}

/** Length of the run of capitals from here; 1 where a small letter follows, so that each gets its own sign. */
function capitalRun(characters: readonly string[], from: number): number {
  let end = from;
  while (end < characters.length && isLetter(characters[end]!) && characters[end] === characters[end]!.toUpperCase())
    end++;
  return isLetter(characters[end] ?? '') ? 1 : end - from;
}

const isLetter = (character: string): boolean => LETTERS.has(character.toLowerCase());

function assertSigns(text: string): void {
  const unknown = [...text].filter((one) => !isLetter(one) && !DIGITS.has(one) && !MARKS.has(one));
  if (unknown.length === 0) return;
  const list = [...new Set(unknown)].map(
    (one) => `${one} (U+${one.codePointAt(0)!.toString(16).toUpperCase().padStart(4, '0')})`,
  );
  throw new ObjectError(
    'text',
    `the braille table has no sign for ${list.join(', ')} in "${text}"`,
    "use letters, figures, blanks and - / ( ) . , : ' only",
  );
}

/** Braille on an object, millimetres. */
export interface BrailleSize {
  /** Diameter of a dot at its base, and its height. */
  readonly base: number;
  readonly height: number;
  /** Between neighbouring dots of a cell, neighbouring cells, and lines. */
  readonly dot: number;
  readonly cell: number;
  readonly line: number;
}

/** Within the ADA 2010 Standards, table 703.3.1 (base 1.5-1.6, height 0.6-0.9, 2.3-2.5, 6.1-7.6, 10.0-10.2 mm). */
export const BRAILLE_SIZE: BrailleSize = { base: 1.6, height: 0.7, dot: 2.5, cell: 6.2, line: 10 };

/** Middles of all dots: lines downwards, from the first dot's place at the origin. */
export function brailleDots(lines: readonly (readonly Cell[])[], size: BrailleSize): [number, number][] {
  return lines.flatMap((cells, row) =>
    cells.flatMap((dots, column) =>
      dots.map((dot): [number, number] => [
        column * size.cell + (dot > 3 ? size.dot : 0),
        0 - row * size.line - ((dot - 1) % 3) * size.dot,
      ]),
    ),
  );
}
