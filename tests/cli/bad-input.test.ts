import { existsSync, mkdirSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { folder, goniolith } from './run.ts';

/** Makes a recipe file and runs `make` on it; nothing may be left in the output folder. */
async function makeFrom(text: string | Uint8Array, ...flags: string[]) {
  const place = folder();
  const file = join(place, 'recipe.yaml');
  writeFileSync(file, text);
  const outcome = await goniolith('make', file, '--out', join(place, 'out'), ...flags);
  expect(existsSync(join(place, 'out')), outcome.err).toBe(false);
  return outcome;
}

const cube = 'pointGroup: m-3m\nforms:\n  - { face: "100", distance: 1 }\n';
const withForm = (line: string): string => `pointGroup: m-3m\nforms:\n  - ${line}\n`;

/** Recipe, what the message must say, where the fault stands (line:column). */
const faults: [string, string, RegExp, string?][] = [
  ['an unknown mineral', 'mineral: quarz\n', /no mineral "quarz".*\n.*\n.*\^{5}\n.*Did you mean quartz/s, '1:10'],
  ['an unknown habit', 'mineral: quartz\nhabit: cubic\n', /quartz has no habit "cubic".*It has prismatic/s, '2:8'],
  [
    'an unknown group',
    'pointGroup: m-3n\nforms: [{ face: "100", distance: 1 }]\n',
    /"m-3n" is not one of the 32 point groups.*m-3m/s,
    '1:13',
  ],
  ['an unknown key', `${cube}colour: red\n`, /"colour" means nothing in a recipe.*Known here: title, mineral/s, '4:1'],
  [
    'a misspelt key',
    withForm('{ fase: "100", distance: 1 }'),
    /"fase" means nothing in forms.*Did you mean face\?/s,
    '3:7',
  ],
  [
    'an unknown unit',
    `${cube}print: { size: 3 furlong }\n`,
    /"furlong" is not a unit of a length known here.*mm, cm, m or in/s,
    '4:16',
  ],
  ['an unknown fit', `${cube}print: { axes: { fit: pres } }\n`, /Use fused, separate, press or slide/, '4:23'],
  [
    'a depth of bores for printed rods',
    `${cube}print: { axes: { depth: 9 } }\n`,
    /bores for bought metal rod, and these rods are printed.*fit: press/s,
    '4:25',
  ],
  ['skins without a depth', `${cube}print: { body: { kind: skins, depth: 0 } }\n`, /leaves nothing to print/, '4:38'],
  [
    'a cut at no distance',
    `${cube}print: { body: { kind: halves, offset: 5 mm } }\n`,
    /"5 mm" cannot be read as offset.*a number of millimetres/s,
    '4:40',
  ],
  ['a face 000', withForm('{ face: "000", distance: 1 }'), /all zeros and names no face/, '3:13'],
  ['a face 010 without quotes is (010), not ten', withForm('{ face: 000, distance: 1 }'), /all zeros/, '3:13'],
  ['an index that is no whole number', withForm('{ face: [1, 0.5, 0], distance: 1 }'), /whole number/, '3:13'],
  ['an index that is too large', withForm('{ face: "1000 1 1", distance: 1 }'), /beyond ±999/, '3:13'],
  [
    'four indices on cubic axes',
    withForm('{ face: "10-11", distance: 1 }'),
    /four indices, which only hexagonal axes have/,
    '3:13',
  ],
  [
    'four indices that do not add up',
    'pointGroup: "321"\ncell: { a: 4.9, c: 5.4 }\nforms:\n  - { face: "1 1 -1 0", distance: 1 }\n',
    /do not add up to zero.*the third is -2/s,
    '4:13',
  ],
  [
    'a cell that contradicts the group',
    'pointGroup: 4mm\ncell: { a: 3, b: 4, c: 5 }\nforms: [{ face: "111", distance: 1 }]\n',
    /tetragonal cell needs a = b/,
    '2:7',
  ],
  [
    'angles that close no cell',
    'pointGroup: "1"\ncell: { a: 3, b: 4, c: 5, alpha: 100, beta: 130, gamma: 140 }\nforms: [{ face: "111", distance: 1 }]\n',
    /no cell has the angles α = 100°, β = 130°, γ = 140°/,
    '2:7',
  ],
  ['a missing cell', 'pointGroup: mmm\nforms: [{ face: "111", distance: 1 }]\n', /mmm needs a cell, and none is given/],
  ['a distance of zero', withForm('{ face: "100", distance: 0 }'), /puts the face through the centre/, '3:30'],
  ['a negative distance', withForm('{ face: "100", distance: -2 }'), /puts the face behind the centre/, '3:30'],
  [
    'a distance that is not a number',
    withForm('{ face: "100", distance: .nan }'),
    /NaN cannot be read as distance/,
    '3:30',
  ],
  ['an infinite distance', withForm('{ face: "100", distance: .inf }'), /Infinity/, '3:30'],
  ['a missing distance', withForm('{ face: "100" }'), /distance is missing here/, '3:5'],
  [
    'an open combination',
    'pointGroup: 6mm\ncell: { a: 1, c: 1 }\nforms: [{ face: "10-10", distance: 1 }]\n',
    /stays open along \[001\], \[00-1\].*face: "0001".*face: "000-1"/s,
  ],
  ['a size of zero', `${cube}print: { size: 0 }\n`, /a size of 0 leaves nothing to print/, '4:16'],
  ['a size beyond 10 m', `${cube}print: { size: 11 m }\n`, /larger than 10000 mm \(10 m\)/, '4:16'],
  [
    'a rod wider than the crystal',
    `${cube}print: { size: 5, axes: { diameter: 6 } }\n`,
    /rod of 6 mm along \[\d+\] is wider than the crystal/,
  ],
  ['an axis the group does not have', `${cube}print: { axes: { orders: [6] } }\n`, /has no symmetry axis of order 6/],
  ['an order no crystal has', `${cube}print: { axes: { orders: [5] } }\n`, /no crystal has an axis of order 5/, '4:26'],
  [
    '10,000 forms',
    `pointGroup: m-3m\nforms:\n${'  - { face: "100", distance: 1 }\n'.repeat(10_000)}`,
    /10000 forms are more than the 250/,
    '3:3',
  ],
  ['no forms', 'pointGroup: m-3m\n', /no forms are given/],
  ['an empty recipe', '', /missing|neither/],
  ['a list in place of a recipe', '- 1\n- 2\n', /a recipe is a list of keys and values/],
  ['YAML that is none', 'forms: [1, 2\nx: 1\n', /this is not YAML/],
  ['aliases that multiply', bomb(), /aliases .* repeat too much/],
  [
    'a file name that leaves the folder',
    `${cube}print: { file: ../../evil }\n`,
    /"\.\.\/\.\.\/evil" cannot be a file name/,
    '4:16',
  ],
  [
    'an unknown printer',
    `${cube}print: { printer: fdm-0.5 }\n`,
    /no printer profile "fdm-0.5".*Did you mean fdm-0/s,
    '4:19',
  ],
];

function bomb(): string {
  const lines = ['a0: &a0 [x, x, x, x, x, x, x, x, x]'];
  for (let i = 1; i < 12; i++)
    lines.push(
      `a${i}: &a${i} [${Array<string>(9)
        .fill(`*a${i - 1}`)
        .join(', ')}]`,
    );
  return `${lines.join('\n')}\n`;
}

describe('a recipe with', () => {
  it.each(faults)('%s', async (_, text, message, place) => {
    const { code, err } = await makeFrom(text);
    expect(err).toMatch(message);
    if (place) expect(err).toContain(`recipe.yaml:${place}:`);
    expect(code).toBe(1);
  });

  it('several faults tells all of them, in their order', async () => {
    const { err } = await makeFrom(
      'mineral: quarz\nforms:\n  - { face: "000", distance: -1 }\nprint: { sise: 3, printer: nil, axes: { orders: [5] } }\n',
    );
    const told = [
      'no mineral "quarz"',
      'all zeros',
      'behind the centre',
      '"sise" means nothing',
      'profile "nil"',
      'order 5',
    ];
    const places = told.map((text) => err.indexOf(text));
    expect(Math.min(...places), err).toBeGreaterThan(-1);
    expect(places).toEqual([...places].sort((a, b) => a - b));
  });

  it('an unknown group tells what is wrong with its faces too', async () => {
    const { err } = await makeFrom(
      'pointGroup: xyz\nforms:\n  - { face: "1 1 1 1", distance: 1 }\n  - { face: "1.5 1 1", distance: 0 }\n',
    );
    for (const fault of ['"xyz" is not one', 'do not add up', 'through the centre']) expect(err).toContain(fault);
  });
});

describe('a file that is', () => {
  it('50 MB long is not read', async () => {
    const { code, err } = await makeFrom(new Uint8Array(50_000_000).fill(32));
    expect(err).toMatch(/too large|larger than|at most/i);
    expect(code).toBe(1);
  });

  it('binary rubbish is told so', async () => {
    const { code, err } = await makeFrom(Uint8Array.from({ length: 4000 }, (_, i) => (i * 7919) % 256));
    expect(err).toMatch(/not (a )?text|UTF-8|zero byte/i);
    expect(code).toBe(1);
  });

  it('a folder is told so', async () => {
    const place = folder();
    mkdirSync(join(place, 'recipes.yaml'));
    const { code, err } = await goniolith('make', join(place, 'recipes.yaml'), '--out', join(place, 'out'));
    expect(err).toMatch(/folder/);
    expect(code).toBe(1);
  });

  it('absent is told so, with the nearest name', async () => {
    const place = folder();
    writeFileSync(join(place, 'garnet.yaml'), cube);
    const { code, err } = await goniolith('make', join(place, 'granet.yaml'), '--out', join(place, 'out'));
    expect(err).toMatch(/garnet\.yaml/);
    expect(code).toBe(1);
  });

  it('in the way of the output folder is told so and kept', async () => {
    const place = folder();
    writeFileSync(join(place, 'out'), 'precious');
    const { code, err } = await goniolith('make', 'quartz', '--out', join(place, 'out'));
    expect(err).toMatch(/folder/);
    expect(code).toBe(1);
    expect(readdirSync(place)).toEqual(['out']);
  });
});

describe('an output folder that cannot be made', () => {
  it.runIf(process.platform === 'linux')('is told so at once', async () => {
    const { code, err } = await goniolith('make', 'quartz', '--out', '/proc/goniolith/out');
    expect(err).toMatch(/Cannot make the folder \/proc\/goniolith\/out/);
    expect(code).toBe(1);
  });
});

describe('wrong use', () => {
  it.each([
    [['mak', 'quartz'], /unknown command 'mak'/],
    [['make'], /missing required argument/],
    [['make', 'quartz', '--colour'], /unknown option/],
    [['make', 'quartz', '--rods', 'loose', '--axes'], /--rods is fused, separate, press or slide, not "loose"/],
    [['make', 'quartz', '--reach', '5'], /go with --axes/],
    [['draw', 'quartz', '--view', 'sideways'], /view/],
    [['draw', 'all', '--sheet', '--labels', 'letters'], /contact sheet has no --labels/],
    [['draw', 'quartz', '--columns', '3'], /--columns goes with --sheet/],
    [['draw', 'quartz', '--key'], /leave out the recipe/],
    [['draw', 'quartz', '--out', 'x.png'], /let --out end in .svg/],
    [['draw', 'all'], /go with --sheet/],
    [['make', 'quartz', 'calcite', '--name', 'both'], /--name takes one recipe/],
    [['make', 'quartz', '--name', 'x.stl'], /takes no ending/],
    [['make', 'quartz', '--size', '0,5'], /^goniolith: --size: .*decimal comma/],
    [['make', 'quartz', '--printer', 'prusa-x'], /^goniolith: --printer: no printer profile/],
    [['quartz'], /goniolith make quartz/],
  ])('%j exits with 2', async (words, message) => {
    const { code, err } = await goniolith(...words);
    expect(err).toMatch(message);
    expect(code).toBe(2);
  });
});
