import { growthWithFaces, objectMemory, optionCosts } from './objects.ts';
import { openscad } from './openscad.ts';
import { print } from './statistics.ts';
for (const table of [await openscad(), await optionCosts(), objectMemory(), await growthWithFaces()]) console.log(`${print(table)}\n`);
