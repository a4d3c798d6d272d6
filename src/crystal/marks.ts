/** Overbars, minus signs and blanks as people type and paste them. */

const OVERBAR = '\u0305';

/**
 * Compatibility forms made plain (subscript digits, no-break blanks), and every dash taken for a minus sign: hyphen,
 * no-break hyphen, figure dash, en dash, minus. Combining overbars (U+0304, U+0305) stay where they are, *after* their
 * digit, all in one spelling.
 */
export function plainMarks(text: string): string {
  return text
    .normalize('NFKD')
    .replace(/[\u2010-\u2013\u2212]/g, '-')
    .replace(/[\u2044\u2215]/g, '/')
    .replace(/\u0304/g, OVERBAR)
    .trim();
}

/** Each digit with an overbar after it becomes a minus sign and the digit. */
export const overbarsToMinus = (plain: string): string => plain.replace(/(\d)\u0305/g, '-$1');

/** The digits of a number with a true overbar after each, for negative numbers; plain digits for the others. */
export const withOverbar = (value: number): string =>
  value < 0 ? String(-value).replace(/\d/g, `$&${OVERBAR}`) : String(value);

export { OVERBAR };
