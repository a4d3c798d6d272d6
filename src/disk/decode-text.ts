import { DiskError } from './disk-error.ts';

/**
 * The text that these bytes of UTF-8 spell, without a byte order mark. Nothing is replaced or guessed.
 * @param source what to call the text in a message, such as its path.
 * @throws DiskError `notText` with the place of the first byte that does not belong into a text
 */
export function decodeText(bytes: Uint8Array, source = 'The input'): string {
  if ((bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff))
    throw new DiskError('notText', `${source} is a text in UTF-16. Save it again as UTF-8.`);
  const zero = bytes.indexOf(0);
  const broken = firstBroken(bytes);
  if (zero >= 0 && (broken < 0 || zero < broken)) {
    const what = `it has a zero byte as byte ${zero + 1}`;
    throw new DiskError('notText', `${source} is not a text: ${what}. Give a text file, not a model or a picture.`);
  }
  if (broken >= 0) {
    const what = `byte ${broken + 1} (in line ${lineOf(bytes, broken)}) is not valid UTF-8`;
    throw new DiskError('notText', `${source} is not a text that can be read: ${what}. Save it again as UTF-8.`);
  }
  return new TextDecoder().decode(bytes); // drops the byte order mark
}

function lineOf(bytes: Uint8Array, at: number): number {
  let line = 1;
  for (let i = 0; i < at; i++) if (bytes[i] === 10) line++;
  return line;
}

/** Where the first sequence begins that is not well-formed UTF-8 (The Unicode Standard, table 3-7), or -1. */
function firstBroken(bytes: Uint8Array): number {
  for (let i = 0; i < bytes.length; ) {
    const length = sequenceLength(bytes, i);
    if (length === 0) return i;
    i += length;
  }
  return -1;
}

/** How many bytes the character at `at` has; 0 if it is not well-formed. */
function sequenceLength(bytes: Uint8Array, at: number): number {
  const [first = 0, second = 0] = bytes.subarray(at, at + 2);
  if (first < 0x80) return 1;
  const length = first < 0xc2 ? 0 : first < 0xe0 ? 2 : first < 0xf0 ? 3 : first < 0xf5 ? 4 : 0;
  if (at + length > bytes.length) return 0;
  const least = first === 0xe0 ? 0xa0 : first === 0xf0 ? 0x90 : 0x80;
  const greatest = first === 0xed ? 0x9f : first === 0xf4 ? 0x8f : 0xbf;
  if (length > 0 && (second < least || second > greatest)) return 0;
  for (let i = at + 2; i < at + length; i++) if ((bytes[i]! & 0xc0) !== 0x80) return 0;
  return length;
}
