/** Rows of words, the equal ones under one number. */
export interface NumberedRows {
  /** For each row its number; numbers are given in order of first appearance. */
  readonly numbers: Uint32Array;
  /** For each number the first row that has it. */
  readonly firsts: Uint32Array;
}

/**
 * Gives equal rows of `width` words one number, in an open-addressed table with at least twice as many places as rows.
 * The numbers do not depend on the hash.
 */
export function numberRows(words: Int32Array, width: number): NumberedRows {
  const count = words.length / width;
  let size = 16;
  while (size < 2 * count) size *= 2;
  const table = new Int32Array(size).fill(-1);
  const numbers = new Uint32Array(count);
  const firsts = new Uint32Array(count);
  let different = 0;
  for (let row = 0; row < count; row++) {
    let slot = hashRow(words, row * width, width) & (size - 1);
    let number = table[slot]!;
    while (number >= 0 && !equalRows(words, firsts[number]! * width, row * width, width)) {
      slot = (slot + 1) & (size - 1);
      number = table[slot]!;
    }
    if (number < 0) {
      number = different++;
      table[slot] = number;
      firsts[number] = row;
    }
    numbers[row] = number;
  }
  return { numbers, firsts: firsts.slice(0, different) };
}

function equalRows(words: Int32Array, a: number, b: number, width: number): boolean {
  for (let i = 0; i < width; i++) if (words[a + i] !== words[b + i]) return false;
  return true;
}

/** MurmurHash3 for 32-bit words (A. Appleby, public domain). */
function hashRow(words: Int32Array, start: number, width: number): number {
  let h = width;
  for (let i = start; i < start + width; i++) {
    const k = Math.imul(words[i]!, 0xcc9e2d51);
    h ^= Math.imul((k << 15) | (k >>> 17), 0x1b873593);
    h = (Math.imul((h << 13) | (h >>> 19), 5) + 0xe6546b64) | 0;
  }
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return h ^ (h >>> 16);
}
