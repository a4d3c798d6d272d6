// Outside source: spellings of International Tables (short, full) and of older books; common practice, from memory.
import { describe, expect, it } from 'vitest';
import { SETTINGS } from '../../src/crystal/setting.ts';
import { printSymbol, readSymbol } from '../../src/crystal/symbol.ts';
import { thrown } from './thrown.ts';

it.each([
  ['32', '321'],
  ['3m', '3m1'],
  ['-3m', '-3m1'],
  ['-3 2/m', '-3m1'],
  ['-3 1 2/m', '-31m'],
  ['2/m 2/m 2/m', 'mmm'],
  ['mm', 'mm2'],
  ['4/m 2/m 2/m', '4/mmm'],
  ['6/m 2/m 2/m', '6/mmm'],
  ['4/m -3 2/m', 'm-3m'],
  ['2/m -3', 'm-3'],
  ['m3', 'm-3'],
  ['m3m', 'm-3m'],
  ['42', '422'],
  ['62', '622'],
  ['43', '432'],
  ['3/m', '-6'],
  ['3/m m 2', '-6m2'],
  ['3/m 2 m', '-62m'],
  ['121', '2'],
  ['1m1', 'm'],
  ['12/m1', '2/m'],
  ['32:r', '32:R'],
  ['-3m : R', '-3m:R'],
])('reads %s as %s', (text, key) => {
  expect(readSymbol(text).key).toBe(key);
});

it.each([
  ['combining macron', 'm3\u0304m', 'm-3m'],
  ['combining overline', '4\u03052m', '-42m'],
  ['two overbars', '4/m 3\u0305 2/m', 'm-3m'],
  ['minus sign', '\u22126m2', '-6m2'],
  ['en dash', '\u20134', '-4'],
  ['no-break blank', '4\u00a0m\u00a0m', '4mm'],
  ['fraction slash', '6\u2044mmm', '6/mmm'],
])('reads a %s', (_, text, key) => {
  expect(readSymbol(text).key).toBe(key);
});

it.each([
  ['S6', '-3'],
  ['s2', '-1'],
  ['C1h', 'm'],
  ['S3', '-6'],
  ['V', '222'],
  ['Vh', 'mmm'],
  ['Vd', '-42m'],
  ['d2D', '-42m'],
  ['OH', 'm-3m'],
  ['D₃d', '-3m1'],
  ['Td', '-43m'],
])('reads the Schoenflies symbol %s as %s', (text, key) => {
  expect(readSymbol(text).key).toBe(key);
});

describe('an unknown symbol', () => {
  it.each([
    ['m-4m', 'm-3m'],
    ['43m', '-43m'],
    ['4/mm', '4/mmm'],
    ['D7', 'D'],
  ])('%s is refused with the nearest symbols', (text) => {
    const error = thrown(() => readSymbol(text));
    expect([error.code, error.message]).toEqual(['unknown-group', `"${text}" is not one of the 32 point groups`]);
    expect(error.hint).toMatch(/^nearest: /);
  });

  it.each([
    ['m-4m', 'm-3m'],
    ['43m', '-43m'],
    ['4/mm', '4/mmm'],
    ['6/mmn', '6/mmm'],
  ])('%s is near %s', (text, key) => {
    expect(
      thrown(() => readSymbol(text))
        .hint?.replace('nearest: ', '')
        .split(', '),
    ).toContain(key);
  });
});

it('prints true overbars after the digit, and reads them back', () => {
  expect(printSymbol('-43m')).toBe('4\u03053m');
  expect(printSymbol('m-3m')).toBe('m3\u0305m');
  for (const { key } of SETTINGS) expect(readSymbol(printSymbol(key)).key).toBe(key);
});
