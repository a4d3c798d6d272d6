import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { PresetKind, Shelf } from '../recipe/shelf.ts';

const FOLDER = new URL('../../presets/', import.meta.url);
const ENDING = '.yaml';

/** The presets that come with Goniolith, read from the package's own `presets` folder when asked for. */
export const PRESET_FOLDER: Shelf = {
  list: (kind) =>
    readdirSync(fileURLToPath(new URL(`${kind}/`, FOLDER)))
      .filter((name) => name.endsWith(ENDING))
      .map((name) => name.slice(0, -ENDING.length))
      .sort(),
  read: (kind, name) => readIfThere(kind, name),
};

function readIfThere(kind: PresetKind, name: string): string | undefined {
  try {
    return readFileSync(fileURLToPath(new URL(`${kind}/${name}${ENDING}`, FOLDER)), 'utf8');
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return undefined;
    throw error;
  }
}
