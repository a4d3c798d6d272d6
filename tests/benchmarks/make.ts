import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { make } from '../../src/index.ts';
import { median, type Table } from './statistics.ts';

const RUNS = 40;

/** `make` in a warm process. */
export async function warm(): Promise<Table> {
  const rows: string[][] = [];
  for (const [name, print] of [
    ['quartz', '{}'],
    ['quartz, fused rods', '{ axes: all }'],
    ['quartz, separate rods', '{ axes: { fit: separate } }'],
  ] as const) {
    const recipe = `mineral: quartz\nprint: ${print}\n`;
    for (let i = 0; i < RUNS / 2; i++) await make(recipe);
    const found: number[] = [];
    for (let i = 0; i < RUNS; i++) {
      const begin = performance.now();
      await make(recipe);
      found.push(performance.now() - begin);
    }
    rows.push([name, median(found).toFixed(1)]);
  }
  return { title: 'make in a warm process, milliseconds, median', head: ['', 'ms'], rows };
}

/** Whole processes from start to end, against a Node that does nothing; and how long the boolean library takes to load. */
export function cold(): Table {
  const folder = mkdtempSync(join(tmpdir(), 'goniolith-benchmark-'));
  const command = join('dist', 'cli', 'main.js');
  const booleans = "const { default: load } = await import('manifold-3d'); (await load()).setup();";
  const processes: Record<string, string[]> = {
    'node -e 0': ['-e', '0'],
    'goniolith group m-3m': [command, 'group', 'm-3m'],
    'goniolith make quartz': [command, 'make', 'quartz', '--out', folder],
    'goniolith make quartz --axes': [command, 'make', 'quartz', '--axes', '--out', folder],
    'loading the boolean library': ['--input-type=module', '-e', booleans],
  };
  const names = Object.keys(processes);
  const found = new Map(names.map((name) => [name, [] as number[]]));
  for (let round = 0; round <= 11; round++)
    for (const name of names) {
      const begin = performance.now();
      const { status } = spawnSync(process.execPath, processes[name]!, { stdio: 'ignore' });
      if (status !== 0) throw new Error(`${name} ended with ${status}.`);
      if (round > 0) found.get(name)!.push(performance.now() - begin);
    }
  rmSync(folder, { recursive: true, force: true });
  const empty = median(found.get('node -e 0')!);
  const rows = names.map((name) => {
    const own = median(found.get(name)!);
    return [name, own.toFixed(0), (own / empty).toFixed(1)];
  });
  return { title: 'Whole processes, milliseconds, median', head: ['', 'ms', 'times node -e 0'], rows };
}

/** Peak memory of one make, as the system accounts it. */
export function memory(): Table {
  const measure = (words: string[]): string => {
    const script = `${words.join(';')}; process.stdout.write(String(process.resourceUsage().maxRSS))`;
    const { stdout } = spawnSync(process.execPath, ['--input-type=module', '-e', script], { encoding: 'utf8' });
    return (Number(stdout) / 1024).toFixed(0);
  };
  const making = (recipe: string): string[] => [
    `import { make } from ${JSON.stringify(join(process.cwd(), 'dist', 'index.js'))}`,
    `await make(${JSON.stringify(recipe)})`,
  ];
  return {
    title: 'Peak memory of a process, MiB',
    head: ['', 'MiB'],
    rows: [
      ['node alone', measure(['0'])],
      ['one make of quartz', measure(making('quartz'))],
      ['one make of quartz with rods', measure(making('mineral: quartz\nprint: { axes: all }\n'))],
    ],
  };
}
