import { execFileSync } from 'node:child_process';

/**
 * Whether the tests with a program are to run: where it is installed, and everywhere when GONIOLITH_OUTSIDE asks for
 * them, so that a machine which lacks it fails there instead of passing without a word.
 */
export function canRun(program: string): boolean {
  if (process.env.GONIOLITH_OUTSIDE !== undefined) return true;
  try {
    execFileSync('sh', ['-c', `command -v ${program}`], { stdio: 'ignore' });
    return true;
  } catch {
    return false;
  }
}

/** Statistics of admesh's report (0.98.4) that are 0 for a sound file; of two columns the left, the file as it came. */
export const ADMESH_ZEROS = [
  'Total disconnected facets',
  'Degenerate facets',
  'Edges fixed',
  'Facets removed',
  'Facets added',
  'Facets reversed',
  'Backwards edges',
  'Normals fixed',
];
