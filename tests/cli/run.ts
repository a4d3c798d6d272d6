import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, vi } from 'vitest';
import { runCommandLine } from '../../src/cli/program.ts';

export interface Outcome {
  readonly code: number;
  readonly out: string;
  readonly err: string;
}

/** Runs one command line in this process and catches what it says. */
export async function goniolith(...words: string[]): Promise<Outcome> {
  let [out, err] = ['', ''];
  const toOut = vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
    out += String(text);
    return true;
  });
  const toErr = vi.spyOn(process.stderr, 'write').mockImplementation((text) => {
    err += String(text);
    return true;
  });
  const before = process.exitCode;
  process.exitCode = 0;
  try {
    await runCommandLine(words);
    return { code: Number(process.exitCode), out, err };
  } finally {
    process.exitCode = before;
    toOut.mockRestore();
    toErr.mockRestore();
  }
}

const folders: string[] = [];

/** A folder of its own for one test, removed afterwards. */
export function folder(): string {
  const made = mkdtempSync(join(tmpdir(), 'goniolith-'));
  folders.push(made);
  return made;
}

afterEach(() => {
  for (const made of folders.splice(0)) rmSync(made, { recursive: true, force: true });
});
