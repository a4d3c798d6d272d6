import { kernel } from './kernel.ts';
import { cold, memory, warm } from './make.ts';
import { growthWithFaces, objectMemory, optionCosts } from './objects.ts';
import { openscad } from './openscad.ts';
import { print, type Table } from './statistics.ts';
import { stl } from './stl.ts';

/** Runs from the top of the project, after a build: scripts, reference files and the command are looked for there. */
const show = (table: Table): void => console.log(`${print(table)}\n`);
for (const table of await kernel('tests/benchmarks/kernel_scipy.py')) show(table);
show(stl());
show(await warm());
show(cold());
show(memory());
show(await optionCosts());
show(await growthWithFaces());
show(objectMemory());
show(await openscad());
