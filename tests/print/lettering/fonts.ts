import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { readTypeface, type Typeface } from '../../../src/print/lettering/typeface.ts';

const require = createRequire(import.meta.url);

export function fontBytes(weight: 400 | 700): Uint8Array {
  const name = `@fontsource/atkinson-hyperlegible/files/atkinson-hyperlegible-latin-${weight}-normal.woff`;
  return readFileSync(require.resolve(name));
}

export const regular: Typeface = readTypeface(fontBytes(400));
export const bold: Typeface = readTypeface(fontBytes(700));
