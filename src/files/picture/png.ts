import { zlibSync } from 'fflate';
import { crc32 } from './crc32.ts';

const SIGNATURE = [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a];
const EIGHT_BIT_RGBA = [8, 6, 0, 0, 0];
/** Each pixel as its difference from the one above: evenly coloured faces become zeros. */
const FILTER_UP = 2;

/**
 * A PNG picture (W3C PNG Specification, third edition).
 * @param rgba four bytes a pixel, rows from the top, alpha not premultiplied
 */
export function encodePng(rgba: Uint8Array, width: number, height: number): Uint8Array {
  const row = 4 * width;
  const lines = new Uint8Array(height * (row + 1));
  for (let y = 0; y < height; y++) {
    lines[y * (row + 1)] = FILTER_UP;
    for (let x = 0; x < row; x++)
      lines[y * (row + 1) + 1 + x] = rgba[y * row + x]! - (y > 0 ? rgba[(y - 1) * row + x]! : 0);
  }
  const header = new Uint8Array(13);
  new DataView(header.buffer).setUint32(0, width);
  new DataView(header.buffer).setUint32(4, height);
  header.set(EIGHT_BIT_RGBA, 8);
  return Uint8Array.from([
    ...SIGNATURE,
    ...chunk('IHDR', header),
    ...chunk('IDAT', zlibSync(lines, { level: 6 })),
    ...chunk('IEND', new Uint8Array()),
  ]);
}

function chunk(type: string, content: Uint8Array): Uint8Array {
  const bytes = new Uint8Array(12 + content.length);
  const view = new DataView(bytes.buffer);
  view.setUint32(0, content.length);
  for (let i = 0; i < 4; i++) bytes[4 + i] = type.charCodeAt(i);
  bytes.set(content, 8);
  view.setUint32(8 + content.length, crc32(bytes.subarray(4, 8 + content.length)));
  return bytes;
}
