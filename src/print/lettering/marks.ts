import { OVERBAR } from '../../crystal/marks.ts';

/** A character to be set, and how. */
export interface SetCharacter {
  readonly character: string;
  /** Figures below the line in formulas, above it in charges. */
  readonly level: 'line' | 'below' | 'above';
  readonly bar: boolean;
  /** The bar runs on from the one before: figures of one number. */
  readonly joined: boolean;
}

const BELOW = '₀₁₂₃₄₅₆₇₈₉₊₋';
const ABOVE = '⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻';
const PLAIN = '0123456789+−';
const OPENING = /[([{<]/;
const CLOSING = /[)\]}>]/;

/**
 * The characters of a text with their marks: U+0305 after a character is a bar over it, Unicode's small figures stand
 * below or above the line. In a symbol whose indices are parted by blanks, bars over neighbours belong to one number
 * and run together.
 */
export function readMarks(text: string): SetCharacter[] {
  const out: SetCharacter[] = [];
  const all = [...text.normalize('NFC')];
  let blanks = !OPENING.test(text) && text.includes(' ');
  all.forEach((character, i) => {
    if (character === OVERBAR) {
      const last = out.pop();
      if (last) out.push({ ...last, bar: true, joined: blanks && (out.at(-1)?.bar ?? false) });
      return;
    }
    if (OPENING.test(character)) {
      const end = all.findIndex((one, k) => k > i && CLOSING.test(one));
      blanks = all.slice(i, end < 0 ? all.length : end).includes(' ');
    }
    out.push({ ...levelOf(character), bar: false, joined: false });
  });
  return out;
}

function levelOf(character: string): Pick<SetCharacter, 'character' | 'level'> {
  const below = BELOW.indexOf(character);
  if (below >= 0) return { character: PLAIN[below]!, level: 'below' };
  const above = ABOVE.indexOf(character);
  if (above >= 0) return { character: PLAIN[above]!, level: 'above' };
  return { character, level: 'line' };
}

/** A chemical formula with its figures below the line; a figure that starts a part (·2H2O) counts units and stays. */
export const formulaText = (formula: string): string =>
  formula.replace(/(?<=[\p{L})\]])\d+(?:\.\d+)?/gu, (figures) =>
    figures.replace(/\d/g, (figure) => BELOW[Number(figure)]!),
  );
