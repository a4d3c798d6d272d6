import { readFileSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';

const TYPEFACE = '@fontsource/atkinson-hyperlegible/files/atkinson-hyperlegible-latin-700-normal.woff';

/** The version in package.json. */
export const VERSION: string = versionOf(
  JSON.parse(readFileSync(new URL('../../package.json', import.meta.url), 'utf8')),
);

/** What making a model takes from this package and those it depends on. */
export const SUPPLIES = {
  application: `Goniolith ${VERSION}`,
  /** Atkinson Hyperlegible, made by the Braille Institute to be told apart letter by letter; bold, for thick strokes. */
  typeface: async (): Promise<Uint8Array> => readFile(createRequire(import.meta.url).resolve(TYPEFACE)),
};

function versionOf(manifest: unknown): string {
  return typeof manifest === 'object' && manifest !== null && 'version' in manifest
    ? String(manifest.version)
    : '0.0.0';
}
