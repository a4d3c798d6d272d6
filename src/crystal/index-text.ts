import { CrystalError } from './errors.ts';
import { OVERBAR, overbarsToMinus, plainMarks, withOverbar } from './marks.ts';

/** Largest index accepted. It keeps every later product of indices an exact integer. */
export const MAX_INDEX = 999;

/** What indices are of, for the words of a message. */
export type IndexKind = 'face' | 'zone';

const OPENING = /^[([{<]/;
const CLOSING = /[)\]}>]$/;

/**
 * The integers of an index symbol. Without separators every digit is an index of its own ("10-11"); with blanks or
 * commas every word is one ("1 0 -1 12"). A minus sign goes before its number; a combining overbar (U+0304, U+0305)
 * goes after its digit, and over each digit of a longer number. Brackets of any kind may surround the whole.
 * @throws CrystalError `index-text`, `index-not-integer`
 */
export function readIndices(input: string | readonly number[], kind: IndexKind): number[] {
  if (typeof input !== 'string') return input.map((value) => wholeNumber(value, input.join(' '), kind));
  const text = plainMarks(input);
  const bare = text.replace(OPENING, '').replace(CLOSING, '').trim();
  if (OPENING.test(text) !== CLOSING.test(text) || bare === '') throw unreadable(input, kind);
  const words = bare.split(/\s*,\s*|\s+/);
  if (words.length > 1) return words.map((word) => wholeNumber(readWord(word, input, kind), input, kind));
  const digits = overbarsToMinus(bare).match(/-?\d/g) ?? [];
  if (digits.join('') !== overbarsToMinus(bare)) throw unreadable(input, kind);
  return digits.map((digit) => Number(digit) + 0);
}

function readWord(word: string, input: string, kind: IndexKind): number {
  if (/^(\d\u0305)+$/.test(word)) return -Number(word.replaceAll(OVERBAR, ''));
  if (/^[+-]?\d+(\.\d+)?$/.test(word)) return Number(word);
  throw unreadable(input, kind);
}

function wholeNumber(value: number, whole: string, kind: IndexKind): number {
  if (Number.isInteger(value)) return value + 0; // −0 becomes 0
  throw new CrystalError(
    'index-not-integer',
    `the ${kind} symbol "${whole}" has the index ${value}, which is not a whole number`,
    'multiply all indices by the same number until they are whole',
  );
}

const unreadable = (input: string, kind: IndexKind): CrystalError =>
  new CrystalError(
    'index-text',
    `"${input}" cannot be read as a ${kind} symbol`,
    kind === 'face' ? 'write it like 111, 10-11 or 1 0 -1 12' : 'write it like [001], [1-10] or [1 -1 10]',
  );

/** Indices run together, or with blanks between when one of them has more than one digit. */
export function joinIndices(indices: readonly number[], overbar: boolean): string {
  const separator = indices.some((index) => Math.abs(index) > 9) ? ' ' : '';
  return indices.map((index) => (overbar ? withOverbar(index) : String(index))).join(separator);
}
