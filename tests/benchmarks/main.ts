import { kernel } from './kernel.ts';
import { cold, memory, warm } from './make.ts';
import { print } from './statistics.ts';
import { stl } from './stl.ts';

/** Runs from the top of the project, after a build: scripts, reference files and the command are looked for there. */
const tables = [...(await kernel('tests/benchmarks/kernel_scipy.py')), await warm(), cold(), memory(), stl()];
for (const table of tables) console.log(`${print(table)}\n`);
