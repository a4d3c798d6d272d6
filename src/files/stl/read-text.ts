import { FileError } from '../file-error.ts';
import { FloatList } from './float-list.ts';
import type { Facets } from './layout.ts';
import { StlTokens } from './tokens.ts';

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;
/** What programs print for a number they do not have: `nan`, `-nan(ind)`, `inf`, `1.#IND`, `-1.#QNAN`. */
const NO_NUMBER = /^[+-]?(nan|inf|\d\.#)/i;

/**
 * The facets of a text STL file. Upper or lower case, any white space and several solids are accepted, because files
 * like that exist; the grammar is that of M. Burns, Automated Fabrication, section 6.5 (fabbers.com/tech/STL_Format).
 * @throws FileError `syntax` with the line, `notFinite`
 */
export function readStlText(bytes: Uint8Array): Facets {
  const tokens = new StlTokens(bytes);
  const normals = new FloatList();
  const corners = new FloatList();
  for (let word = tokens.next(); word !== ''; word = tokens.next()) {
    if (word.toLowerCase() !== 'solid') throw unexpected(tokens, word, 'solid');
    readSolid(tokens, normals, corners);
  }
  return { normals: normals.toArray(), corners: corners.toArray() };
}

function readSolid(tokens: StlTokens, normals: FloatList, corners: FloatList): void {
  tokens.skipLine();
  for (;;) {
    const word = tokens.next();
    if (word.toLowerCase() === 'endsolid') break;
    if (word.toLowerCase() !== 'facet') throw unexpected(tokens, word, 'facet or endsolid');
    expectWords(tokens, 'normal');
    for (let i = 0; i < 3; i++) normals.push(readNumber(tokens));
    expectWords(tokens, 'outer', 'loop');
    for (let corner = 0; corner < 3; corner++) {
      expectWords(tokens, 'vertex');
      for (let i = 0; i < 3; i++) corners.push(readCoordinate(tokens, normals.length / 3));
    }
    expectWords(tokens, 'endloop', 'endfacet');
  }
  tokens.skipLine();
}

function expectWords(tokens: StlTokens, ...words: readonly string[]): void {
  for (const expected of words) {
    const word = tokens.next();
    if (word.toLowerCase() !== expected) throw unexpected(tokens, word, expected);
  }
}

/** A float32; NaN or infinite for a word that stands for no number. */
function readNumber(tokens: StlTokens): number {
  const word = tokens.next();
  if (NUMBER.test(word)) return Math.fround(Number(word));
  if (NO_NUMBER.test(word)) return Number.NaN;
  if (/^[+-]?\d+,\d+/.test(word)) {
    const what = `Line ${tokens.line} of the STL file has the number ${word} with a decimal comma.`;
    throw new FileError('syntax', what, 'Export it again with decimal points (an English number format).');
  }
  throw unexpected(tokens, word, 'a number');
}

function readCoordinate(tokens: StlTokens, facet: number): number {
  const value = readNumber(tokens);
  if (Number.isFinite(value)) return value;
  throw new FileError(
    'notFinite',
    `Line ${tokens.line} of the STL file (facet ${facet}) has a coordinate that is no finite number a facet can hold.`,
    'Export the model again; the program that wrote the file had no position for this corner.',
  );
}

function unexpected(tokens: StlTokens, word: string, expected: string): FileError {
  const shown = word.length > 40 ? `${word.slice(0, 40)}…` : word;
  const found = word === '' ? 'The STL file ends' : `Line ${tokens.line} of the STL file has '${shown}'`;
  const where = word === '' ? `in line ${tokens.line}, where ${expected} should follow` : `where ${expected} should be`;
  const hint = word === '' ? 'Copy or export it again; its end was lost.' : 'Mend that line, or export the file again.';
  return new FileError('syntax', `${found} ${where}.`, hint);
}
