import { existsSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { folder, goniolith } from './run.ts';

/** Runs `make` into a new folder; gives the names of the files it wrote. */
async function made(...words: string[]) {
  const out = join(folder(), 'out');
  const { code, err, out: said } = await goniolith('make', ...words, '--out', out);
  expect(code, err).toBe(0);
  const names = readdirSync(out).sort();
  expect(said.trim().split('\n').sort()).toEqual(names.map((name) => join(out, name)));
  return { names, err, out };
}

describe('flags for objects', () => {
  it.each([
    [['--body', 'solid'], ['quartz.stl'], /18 faces/],
    [['--body', 'hollow'], ['quartz.stl'], /The cavity is sealed/],
    [['-b', 'frame'], ['quartz.stl'], /struts/],
    [['--body', 'halves'], ['quartz-dowel.stl', 'quartz-half-1.stl', 'quartz-half-2.stl'], /no STL file of the whole/],
    [['--letters'], ['quartz.stl'], /Letters on 18 faces/],
    [['-l', 'raised', '--blunt'], ['quartz.stl'], /rounded with a radius of 0.75 mm/],
    [['--blunt', '1.5'], ['quartz.stl'], /rounded with a radius of 1.5 mm/],
    [['--stand'], ['quartz-body.stl', 'quartz-stand.stl', 'quartz.stl'], /The stand is \d/],
    [['--files', '3mf'], ['quartz.3mf'], /closed, checked/],
    [['--files', 'glb,stl'], ['quartz.glb', 'quartz.stl'], /for screens/],
    [['-f', 'stl, 3mf,glb', '--axes', '--letters'], ['quartz.3mf', 'quartz.glb', 'quartz.stl'], /the whole object/],
  ] as const)('%j', async (words, names, message) => {
    const done = await made('quartz', ...words);
    expect(done.names).toEqual([...names]);
    expect(done.err).toMatch(message);
  });

  it('--body units writes the piece and the pin once and says how many to print', async () => {
    const { names, err } = await made('quartz', '--body', 'units');
    expect(names).toEqual(['quartz-pin.stl', 'quartz-unit.stl', 'quartz.stl']);
    // Point group 32 has six operations, and six pieces in a chain have five joints.
    expect(err).toMatch(/quartz-unit\.stl: .*; print 6\./);
    expect(err).toMatch(/quartz-pin\.stl: .*; print 5\./);
  });

  it('--body sectors names every sector by its face', async () => {
    const { names } = await made('fluorite', '--body', 'sectors');
    expect(names).toContain('fluorite-sector-100.stl');
    expect(names).toContain('fluorite-sector-bar100.stl');
  });

  it('go over what the recipe says', async () => {
    const file = join(folder(), 'own.yaml');
    writeFileSync(file, 'mineral: quartz\nprint: { body: hollow, files: [3mf], letters: false }\n');
    const { names } = await made(file, '--body', 'solid', '--letters', '--files', 'stl');
    expect(names).toEqual(['own.stl']);
  });

  it('what they make passes check', async () => {
    const { names, out } = await made('quartz', '--body', 'halves', '--files', 'stl,3mf');
    for (const name of names) {
      const { code, err, out: said } = await goniolith('check', join(out, name));
      expect(code, said + err).toBe(0);
    }
  });

  it('a cut that misses the crystal is refused, and nothing is written', async () => {
    const file = join(folder(), 'own.yaml');
    writeFileSync(file, 'mineral: fluorite\nprint: { size: 50, body: { kind: halves, plane: "111", offset: 60 } }\n');
    const out = join(folder(), 'out');
    const { code, err } = await goniolith('make', file, '--out', out);
    expect(code).toBe(1);
    // Half the diagonal of a cube of 50 mm.
    expect(err).toMatch(/misses the crystal, which reaches from -43\.3 mm to 43\.3 mm/);
    expect(existsSync(out)).toBe(false);
  });

  it('magnets are warned of', async () => {
    const file = join(folder(), 'own.yaml');
    writeFileSync(file, 'mineral: quartz\nprint: { body: { kind: halves, join: magnets } }\n');
    expect((await made(file)).err).toMatch(/Warning: This model holds 4 magnets.*16 CFR 1262/);
  });
});

const cube = 'pointGroup: m-3m\nforms: [{ face: "100", distance: 1 }]\n';
const line500 = 'all '.repeat(125).trim();

/** What cannot be made: the recipe's `print`, and what the message and its advice must say. */
const impossible: [string, string, RegExp, RegExp][] = [
  [
    'a wall thicker than the crystal',
    '{ size: 20, body: { kind: hollow, wall: 15 } }',
    /walls of 15 mm leave nothing to hollow out.* 10 mm/,
    /wall between 0 and 9.99 mm/,
  ],
  ['struts that fill the crystal', '{ size: 20, body: { kind: frame, strut: 24 } }', /struts of 24 mm fill/, /thinner/],
  ['a bead without a centre of inversion', 'bead', /422 has no centre of inversion/, /Leave the bead away/],
  [
    'drains without room',
    '{ size: 8, body: { kind: hollow, wall: 3, drains: true } }',
    /drain holes of 3.5 mm/,
    /Choose/,
  ],
  ['dowels without room', '{ size: 6, body: halves }', /no room for/, /larger crystal/],
  [
    'a gap that leaves nothing',
    '{ size: 20, body: { kind: sectors, gap: 30 } }',
    /gap of 30 mm leaves nothing/,
    /smaller gap/,
  ],
  [
    'units with a gap that leaves nothing',
    '{ size: 20, body: { kind: units, gap: 12 } }',
    /gap of 12 mm/,
    /smaller gap/,
  ],
  [
    'a blunting radius that is too large',
    '{ size: 20, blunt: 11 }',
    /radius of 11 mm does not fit.*10/,
    /smaller radius/,
  ],
  ['bevels that leave no face', '{ size: 20, blunt: { bevel: 40 } }', /bevels 40 mm wide leave no face/, /narrower/],
  [
    'a stand under a frame',
    '{ body: frame, stand: true }',
    /body of kind frame is not made together with a stand/,
    /two models/,
  ],
  ['letters on halves', '{ body: halves, letters: true }', /halves is not made together with letters/, /two models/],
  ['axes in units', '{ body: units, axes: true }', /units is not made together with axes/, /two models/],
  [
    'a script that the typeface lacks',
    '{ stand: { text: [Кварц], braille: false } }',
    /no sign for .*К.*в.*а.*р.*ц.*in "Кварц"/,
    /Latin letters/,
  ],
  ['Chinese text', '{ stand: { text: [水晶], braille: false } }', /no sign for .*水.*晶/, /Latin letters/],
  ['text that has no braille', '{ stand: { text: [Quartz & co] } }', /braille table has no sign for &/, /Use letters/],
  [
    'a plaque line of 500 characters',
    `{ stand: { text: [${line500}] } }`,
    /line 1 .* has 499 characters; a line may have \d+/,
    /Shorten/,
  ],
  ['a blank plaque line', '{ stand: { text: [Quartz, " "] } }', /line 2 .* is blank/, /Leave it out/],
  ['too many plaque lines', `{ stand: { text: [${'a, '.repeat(40)}b] } }`, /41 .*lines; it may have \d+/, /Keep to/],
  ['a line wider than the plaque', '{ stand: { text: [a rather long description] } }', /is \d+ mm wide/, /break it/],
  ['a QR code of 3000 characters', `{ stand: { qr: "${'x'.repeat(3000)}" } }`, /QR code .*2331 bytes/, /short address/],
];

const OCTAGON = 'pointGroup: "422"\ncell: { a: 5, c: 6 }\nforms: [{ face: "111", distance: 1 }]\n';

describe('refused with nothing left behind:', () => {
  it.each(impossible)('%s', async (_, print, message, advice) => {
    const place = folder();
    const file = join(place, 'recipe.yaml');
    writeFileSync(
      file,
      print === 'bead' ? `${OCTAGON}print: { body: { kind: frame, bead: true } }\n` : `${cube}print: ${print}\n`,
    );
    const { code, err, out } = await goniolith('make', file, '--out', join(place, 'out'));
    expect(err).toMatch(message);
    expect(err).toMatch(advice);
    expect(err).not.toMatch(/\n\s+at /);
    expect(out).toBe('');
    expect(code).toBe(1);
    expect(existsSync(join(place, 'out'))).toBe(false);
  });
});

/** What is no recipe: told with its place. */
const unreadable: [string, string, RegExp][] = [
  ['an unknown kind of body', '{ body: hollo }', /hollo/],
  ['an unknown kind with options', '{ body: { kind: shell, wall: 2 } }', /shell|kind/],
  ['an option of another body', '{ body: { kind: hollow, strut: 2 } }', /strut/],
  ['a cut by no plane', '{ body: { kind: halves, plane: "000" } }', /all zeros and names no face/],
  ['a cut by indices that are none', '{ body: { kind: halves, plane: xyz } }', /xyz/],
  ['a wall of zero', '{ body: { kind: hollow, wall: 0 } }', /a length of 0 leaves nothing/],
  ['a negative radius', '{ blunt: -1 }', /a length of -1 leaves nothing/],
  ['a gap in an unknown unit', '{ body: { kind: units, gap: 1 furlong } }', /"furlong" is not a unit/],
  ['an unknown way of lettering', '{ letters: painted }', /painted|engraved/],
  ['an unknown file', '{ files: [obj] }', /obj|3mf/],
  ['no files at all', '{ files: [] }', /files/],
  ['a stand of something unknown', '{ stand: { colour: red } }', /colour.*means nothing/],
];

describe('a recipe with', () => {
  it.each(unreadable)('%s', async (_, print, message) => {
    const place = folder();
    const file = join(place, 'recipe.yaml');
    writeFileSync(file, `${cube}print: ${print}\n`);
    const { code, err } = await goniolith('make', file, '--out', join(place, 'out'));
    expect(err).toMatch(message);
    expect(err).toContain('recipe.yaml:3:');
    expect(err).not.toMatch(/\n\s+at /);
    expect(code).toBe(1);
    expect(existsSync(join(place, 'out'))).toBe(false);
  });
});

describe('wrong flags', () => {
  it.each([
    [['--body', 'hollo'], /--body.*"?hollo/],
    [['--letters', 'painted'], /--letters.*painted/],
    [['--files', 'stl,obj'], /--files.*obj/],
    [['--files', ''], /--files/],
    [['--blunt', 'much'], /--blunt: .*much/],
  ])('%j exit with 2', async (words, message) => {
    const out = join(folder(), 'out');
    const { code, err } = await goniolith('make', 'quartz', ...words, '--out', out);
    expect(err).toMatch(message);
    expect(code).toBe(2);
    expect(existsSync(out)).toBe(false);
  });

  it('--stand with --body frame is refused', async () => {
    const out = join(folder(), 'out');
    const { code, err } = await goniolith('make', 'quartz', '--body', 'frame', '--stand', '--out', out);
    expect(err).toMatch(/not made together with a stand/);
    expect(code).toBe(1);
    expect(existsSync(out)).toBe(false);
  });
});
