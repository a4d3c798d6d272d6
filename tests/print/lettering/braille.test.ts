import { describe, expect, it } from 'vitest';
import { BRAILLE_SIZE, brailleCells, brailleDots } from '../../../src/print/lettering/braille.ts';

/** Unicode's braille patterns: dot n is bit n − 1 above U+2800 (The Unicode Standard, block Braille Patterns). */
const written = (text: string): string =>
  brailleCells(text)
    .map((dots) => String.fromCodePoint(0x2800 + dots.reduce((bits, dot) => bits + 2 ** (dot - 1), 0)))
    .join('');

describe('uncontracted Unified English Braille', () => {
  it('has the alphabet in order (from memory, as in any braille primer)', () => {
    expect(written('abcdefghij')).toBe('⠁⠃⠉⠙⠑⠋⠛⠓⠊⠚');
    expect(written('klmnopqrst')).toBe('⠅⠇⠍⠝⠕⠏⠟⠗⠎⠞');
    expect(written('uvwxyz')).toBe('⠥⠧⠺⠭⠽⠵');
  });

  // The Rules of Unified English Braille, 2nd edition 2013, sections 4 and 6; brackets, slash and capitals from memory.
  it.each([
    ['Quartz', '⠠⠟⠥⠁⠗⠞⠵'],
    ['NHM', '⠠⠠⠝⠓⠍'],
    ['SiO', '⠠⠎⠊⠠⠕'],
    ['CaSO', '⠠⠉⠁⠠⠠⠎⠕'],
    ['1987.12', '⠼⠁⠊⠓⠛⠲⠁⠃'],
    ['1987b', '⠼⠁⠊⠓⠛⠰⠃'],
    ['1987m', '⠼⠁⠊⠓⠛⠍'],
    ['1987B', '⠼⠁⠊⠓⠛⠠⠃'],
    ['2.65', '⠼⠃⠲⠋⠑'],
    ['2/m', '⠼⠃⠸⠌⠍'],
    ['-3', '⠤⠼⠉'],
    ['\u22123m', '⠐⠤⠼⠉⠍'],
    ['(001)', '⠐⠣⠼⠚⠚⠁⠐⠜'],
    ['m 4', '⠍⠀⠼⠙'],
    ['10-11', '⠼⠁⠚⠤⠼⠁⠁'],
    ['No. 4.', '⠠⠝⠕⠲⠀⠼⠙⠲'],
  ])('%s', (text, cells) => {
    expect(written(text)).toBe(cells);
  });

  it('refuses what it has no sign for, and lists it', () => {
    expect(() => brailleCells('SiO₂ é 3\u0305')).toThrow(/no sign for ₂ \(U\+2082\), é \(U\+00E9\), .+ \(U\+0305\)/);
  });
});

describe('the dots', () => {
  it('stand where ADA 2010, table 703.3.1, wants them', () => {
    expect(BRAILLE_SIZE.base).toBeGreaterThanOrEqual(1.5);
    expect(BRAILLE_SIZE.base).toBeLessThanOrEqual(1.6);
    expect(BRAILLE_SIZE.height).toBeGreaterThanOrEqual(0.6);
    expect(BRAILLE_SIZE.height).toBeLessThanOrEqual(0.9);
    const dots = brailleDots([[[1, 2, 3, 4, 5, 6], [1]], [[1]]], BRAILLE_SIZE);
    expect(dots).toEqual([
      [0, 0],
      [0, -2.5],
      [0, -5],
      [2.5, 0],
      [2.5, -2.5],
      [2.5, -5],
      [6.2, 0],
      [0, -10],
    ]);
  });
});
