import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { type MadeFile, make } from '../src/index.ts';
import { goniolith } from './cli/run.ts';

/**
 * The pictures in the README are the project's own drawings. After a change that is meant, look at them and renew them
 * with: npm run pictures
 */
const PICTURES: Readonly<Record<string, readonly string[]>> = {
  'quartz.svg': ['quartz', '--axes', '--labels', 'letters', '--size', '70'],
  'fluorite.svg': ['fluorite/hexoctahedral', '--axes', '4,3', '--labels', 'indices', '--size', '60'],
  'tetrahedrite.svg': ['tetrahedrite', '--axes', '-4', '--labels', 'letters', '--size', '60'],
  'gypsum.svg': ['gypsum', '--axes', '--labels', 'letters', '--size', '60'],
  'quartz-along-c.svg': ['quartz/right-handed', '--view', 'c', '--bare', '--labels', 'letters'],
  'quartz-onto-m.svg': ['quartz/right-handed', '--view', '(10-10)', '--bare', '--labels', 'letters'],
  'quartz-lines.svg': ['quartz/right-handed', '--lines', '--bare'],
  'axis-key.svg': ['--key'],
  'minerals.svg': ['all', '--sheet'],
  'groups.svg': ['32-groups', '--sheet', '--columns', '8'],
};

/** Pictures of printed objects: mineral and habit, and what its recipe prints. */
const OBJECTS: Readonly<Record<string, string>> = {
  'frame.png': 'mineral: fluorite\nhabit: hexoctahedral\nprint: { body: frame, axes: "4", files: [png] }',
  'letters.png': 'mineral: quartz\nprint: { letters: engraved, axes: all, files: [png] }',
  'units.png': 'mineral: calcite\nprint: { body: units, files: [png] }',
  'planes.png': 'mineral: fluorite\nprint: { planes: inlaid, letters: inlaid, files: [png] }',
  'stand.png': 'mineral: gypsum\nprint: { stand: true, files: [png] }',
  'blunt.png': 'mineral: pyrite\nhabit: pyritohedron\nprint: { blunt: 2, files: [png] }',
};

const path = (name: string): string => fileURLToPath(new URL(`../presets/pictures/${name}`, import.meta.url));

describe('the picture', () => {
  it.each(Object.entries(PICTURES))('%s is what the project draws today', async (name, words) => {
    const { code, out } = await goniolith('draw', ...words, '--out', '-');
    expect(code).toBe(0);
    if (process.env.GONIOLITH_RENEW_PICTURES) writeFileSync(path(name), out);
    expect(readFileSync(path(name), 'utf8') === out, `${name} is out of date: npm run pictures`).toBe(true);
  });

  it.each(Object.entries(OBJECTS))('%s is what the project makes today', async (name, recipe) => {
    const { files } = await make(recipe);
    const [{ bytes }] = files as [MadeFile];
    if (process.env.GONIOLITH_RENEW_PICTURES) writeFileSync(path(name), bytes);
    expect(readFileSync(path(name)).equals(bytes), `${name} is out of date: npm run pictures`).toBe(true);
  });
});
