import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DiskError } from '../../src/disk/disk-error.ts';
import { decodeText } from '../../src/disk/read-input.ts';

const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text);

describe('decodeText', () => {
  it('takes off one byte order mark and keeps all else', () => {
    expect(decodeText(bytesOf('\ufeffa\ufeffb\r\n\u{1f48e}'))).toBe('a\ufeffb\r\n\u{1f48e}');
    expect(decodeText(new Uint8Array())).toBe('');
  });

  it.each([
    ['a zero byte', [65, 0, 66], /The input is not a text: it has a zero byte as byte 2/],
    ['a byte of Latin-1', [65, 10, 66, 0xfc, 66], /byte 4 \(in line 2\) is not valid UTF-8/],
    ['a character cut off', [65, 0xe2, 0x82], /byte 2 /],
    ['an overlong slash', [0xc0, 0xaf], /byte 1 /],
    ['half a surrogate pair', [65, 0xed, 0xa0, 0x80], /byte 2 /],
    ['a number beyond Unicode', [0xf4, 0x90, 0x80, 0x80], /byte 1 /],
    ['UTF-16', [0xff, 0xfe, 65, 0], /UTF-16/],
    ['UTF-16 the other way', [0xfe, 0xff, 0, 65], /UTF-16/],
  ])('refuses %s', (_, bytes, words) => {
    const decode = (): string => decodeText(Uint8Array.from(bytes));
    expect(decode).toThrow(DiskError);
    expect(decode).toThrow(words);
  });

  it('names the source', () => {
    expect(() => decodeText(Uint8Array.of(0), 'a.yaml')).toThrow(/^a\.yaml is not a text/);
  });

  // The decoder of the platform in its strict mode is the reference (WHATWG Encoding Standard, fatal).
  it('accepts exactly what the strict decoder of the platform accepts, but for zero bytes and UTF-16 marks', () => {
    const strict = (bytes: Uint8Array): string | undefined => {
      try {
        return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
      } catch {
        return undefined;
      }
    };
    const byte = fc.constantFrom(
      0x41,
      0x7f,
      0x80,
      0x8f,
      0x90,
      0x9f,
      0xa0,
      0xbf,
      0xc2,
      0xe0,
      0xe1,
      0xed,
      0xf0,
      0xf4,
      0xf5,
    );
    fc.assert(
      fc.property(fc.array(byte, { maxLength: 6 }), (numbers) => {
        const bytes = Uint8Array.from(numbers);
        const expected = strict(bytes);
        if (expected === undefined) expect(() => decodeText(bytes)).toThrow(DiskError);
        else expect(decodeText(bytes)).toBe(expected);
      }),
      { numRuns: 3000 },
    );
  });
});
