import { execFileSync, spawn } from 'node:child_process';
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { folder, goniolith } from './run.ts';

const BUILT = fileURLToPath(new URL('../../dist/cli/main.js', import.meta.url));

describe('make', () => {
  it('writes the files, names them on stdout and tells the rest on stderr', async () => {
    const out = join(folder(), 'prints');
    const { code, out: said, err } = await goniolith('make', 'quartz', '--axes', '--out', out);
    expect(code).toBe(0);
    expect(said).toBe(`${join(out, 'quartz.stl')}\n`);
    expect(err).toMatch(/point group 32, 18 faces/);
    expect(err).toMatch(/local rules/);
    expect(readdirSync(out)).toEqual(['quartz.stl']);
  });

  it('gives the same bytes for the same recipe', async () => {
    const [one, two] = [folder(), folder()];
    for (const place of [one, two]) await goniolith('make', 'quartz', '--axes', '--rods', 'separate', '--out', place);
    const names = readdirSync(one);
    expect(names.length).toBeGreaterThan(3);
    for (const name of names) expect(readFileSync(join(one, name)).equals(readFileSync(join(two, name)))).toBe(true);
  });

  it('takes size, printer, name and text from flags over the recipe', async () => {
    const place = folder();
    const file = join(place, 'cube.yaml');
    writeFileSync(file, 'pointGroup: m-3m\nforms: [{ face: "100", distance: 1 }]\nprint: { size: 30, file: box }\n');
    const { code } = await goniolith('make', file, '--size', '4 cm', '--text', '--name', 'block', '--out', place);
    expect(code).toBe(0);
    expect(readFileSync(join(place, 'block.stl'), 'latin1')).toMatch(/^solid [^\n]*\n {2}facet normal/);
    const { out } = await goniolith('check', join(place, 'block.stl'), '--json');
    expect(JSON.parse(out)).toMatchObject({
      ok: true,
      watertight: true,
      extents: { min: [0, 0, 0], max: [40, 40, 40] },
    });
  });

  it('reports for machines', async () => {
    const { out } = await goniolith('make', 'quartz', '--json', '--out', folder());
    const report = JSON.parse(out);
    expect(report).toMatchObject({ pointGroup: '32', faces: 18 });
    expect(report.files[0]).toMatchObject({ watertight: true, bodies: 1 });
    expect(Math.max(...report.extents)).toBeCloseTo(70, 2);
  });

  it('tells which form does not appear and from where on it would', async () => {
    const file = join(folder(), 'cube.yaml');
    writeFileSync(file, 'pointGroup: m-3m\nforms: [{ face: "100", distance: 1 }, { face: "111", distance: 2 }]\n');
    const { err } = await goniolith('make', file, '--out', folder());
    expect(err).toMatch(/\{111\} does not appear: at distance 2 .* below 1.7321/);
  });

  it('names models of recipe files by the file, and of sets by their key', async () => {
    const place = folder();
    for (const name of ['vein one', 'vein-two']) writeFileSync(join(place, `${name}.yaml`), 'mineral: quartz\n');
    const files = ['vein one', 'vein-two'].map((name) => join(place, `${name}.yaml`));
    const { out } = await goniolith('make', 'quartz', ...files, '32-groups/1', '32-groups/-1', '--out', place);
    const names = ['quartz', 'vein-one', 'vein-two', '32-groups-1', '32-groups-bar1'];
    expect(out.trim().split('\n')).toEqual(names.map((name) => join(place, `${name}.stl`)));
  });

  it('writes nothing when one of several recipes is at fault, and refuses two models of one name', async () => {
    const out = join(folder(), 'out');
    expect((await goniolith('make', 'quartz', 'nope', '--out', out)).code).toBe(1);
    expect((await goniolith('make', 'quartz', 'quartz', '--out', out)).code).toBe(1);
    expect(existsSync(out)).toBe(false);
  });

  it('takes a recipe after a bare --axes for the recipe', async () => {
    const { code, err } = await goniolith('make', '--axes', 'quartz', '--out', folder());
    expect(code).toBe(0);
    expect(err).toMatch(/the whole object \d/);
  });

  it('keeps no provenance that no longer holds', async () => {
    const file = join(folder(), 'own.yaml');
    writeFileSync(
      file,
      'mineral: quartz\ncell: { a: 9, c: 20 }\nforms: [{ face: m, distance: 1 }, { face: r, distance: 1.5 }]\n',
    );
    const known = JSON.parse((await goniolith('inspect', file, '--json')).out);
    expect(known).toMatchObject({ title: 'Quartz', mineral: { habit: null, source: null } });
    expect(known.forms[0].letter).toBe('m');
  });

  it('says when a part is larger than the printer', async () => {
    const { err } = await goniolith('make', 'quartz', '--size', '900', '--printer', 'sla', '--out', folder());
    expect(err).toMatch(/larger than the 150 × 128 × 80 mm/);
  });

  it('keeps other files in the folder', async () => {
    const place = folder();
    writeFileSync(join(place, 'notes.txt'), 'mine');
    await goniolith('make', 'quartz', '--out', place);
    expect(readdirSync(place).sort()).toEqual(['notes.txt', 'quartz.stl']);
  });
});

describe('check', () => {
  it('passes what make wrote', async () => {
    const place = folder();
    await goniolith('make', 'quartz', '--axes', '--out', place);
    const { code, out } = await goniolith('check', join(place, 'quartz.stl'));
    expect(code).toBe(0);
    expect(out).toMatch(/sound \(binary STL, \d+ triangles, one body\)\n {2}watertight yes/);
  });

  it('says where a broken file is open, with exit code 1', async () => {
    const place = folder();
    await goniolith('make', 'quartz', '--out', place);
    const whole = readFileSync(join(place, 'quartz.stl'));
    const holed = Buffer.concat([whole.subarray(0, 84), whole.subarray(134)]);
    holed.writeUInt32LE(whole.readUInt32LE(80) - 1, 80);
    writeFileSync(join(place, 'holed.stl'), holed);
    const { code, out } = await goniolith('check', join(place, 'holed.stl'));
    expect(code).toBe(1);
    const corner = [0, 1, 2].map((axis) => whole.readFloatLE(84 + 12 + 4 * axis));
    expect(out).toMatch(/NOT sound/);
    expect(out).toContain(String(Number(corner[0]!.toFixed(3))).slice(0, 5));
  });

  it('goes on after a file that cannot be read', async () => {
    const place = folder();
    await goniolith('make', 'quartz', '--out', place);
    const { code, out, err } = await goniolith('check', join(place, 'none.stl'), join(place, 'quartz.stl'));
    expect(code).toBe(1);
    expect(err).toMatch(/none\.stl/);
    expect(out).toMatch(/quartz\.stl: sound/);
  });

  it('refuses what is no STL', async () => {
    const file = join(folder(), 'x.stl');
    writeFileSync(file, 'hello');
    const { code, err } = await goniolith('check', file);
    expect(code).toBe(1);
    expect(err).toMatch(/STL/);
  });
});

describe('group', () => {
  it.each(['-43m', 'Td', '6/mmm', '3m:R', 'm3m'])('knows %s', async (symbol) => {
    const { code, out } = await goniolith('group', symbol);
    expect(code).toBe(0);
    expect(out).toMatch(/point group/);
  });

  it('gives data with a leading minus and a flag in any order', async () => {
    for (const words of [
      ['group', '-43m', '--json'],
      ['group', '--json', '-43m'],
    ]) {
      const { out } = await goniolith(...words);
      expect(JSON.parse(out)).toMatchObject({ schoenflies: 'Td', order: 24, centrosymmetric: false });
    }
  });

  it('lists all settings', async () => {
    const { out } = await goniolith('group', '--json');
    expect(JSON.parse(out)).toHaveLength(47);
  });

  it('names the nearest when it does not know one', async () => {
    const { code, err } = await goniolith('group', 'm-3n');
    expect(code).toBe(1);
    expect(err).toMatch(/Nearest: .*m-3m/);
  });
});

describe('presets', () => {
  it('finds the garnets', async () => {
    const { code, out } = await goniolith('presets', 'garnet');
    expect(code).toBe(0);
    expect(out.split('\n').length).toBeGreaterThan(2);
    expect(out).toMatch(/garnet/);
  });

  it('finds by several words and says when there is nothing', async () => {
    const { out } = await goniolith('presets', 'trigonal', 'SiO2');
    expect(out).toMatch(/^quartz/m);
    expect((await goniolith('presets', 'unobtainium')).code).toBe(1);
  });
});

describe('inspect', () => {
  it('gives the whole inspection as JSON', async () => {
    const { out } = await goniolith('inspect', 'pyrite/pyritohedron', '--json');
    const known = JSON.parse(out);
    expect(known).toMatchObject({ bounded: true, pointGroup: { hermannMauguin: 'm-3', order: 24 } });
    expect(known.pointGroup.operations).toHaveLength(24);
  });

  it('does not fail on an open crystal', async () => {
    const file = join(folder(), 'open.yaml');
    writeFileSync(file, 'pointGroup: 6mm\ncell: { a: 1, c: 1 }\nforms: [{ face: "10-10", distance: 1 }]\n');
    const { code, out } = await goniolith('inspect', file);
    expect(code).toBe(0);
    expect(out).toMatch(/Open along \[001\], \[00-1\]/);
  });
});

describe('schema', () => {
  it('describes recipes', async () => {
    const { out } = await goniolith('schema');
    expect(Object.keys(JSON.parse(out).properties)).toEqual(
      expect.arrayContaining(['mineral', 'pointGroup', 'cell', 'forms', 'print']),
    );
  });
});

describe('the built command', () => {
  it('reads a recipe from standard input', () => {
    const place = folder();
    const recipe = 'pointGroup: m-3m\ntitle: Test cube\nforms: [{ face: 100, distance: 1 }]\n';
    const out = execFileSync(process.execPath, [BUILT, 'make', '-', '--out', place], {
      input: recipe,
      encoding: 'utf8',
      stdio: ['pipe', 'pipe', 'ignore'],
    });
    expect(out.trim()).toBe(join(place, 'test-cube.stl'));
    expect(existsSync(out.trim())).toBe(true);
  });

  it('leaves nothing half-written when it is interrupted', async () => {
    for (const delay of [60, 120, 180, 240, 300]) {
      const place = folder();
      const run = spawn(
        process.execPath,
        [BUILT, 'make', 'quartz', 'pyrite', 'gypsum', '--axes', '--rods', 'separate', '--out', place],
        { stdio: 'ignore' },
      );
      await new Promise((done) => setTimeout(done, delay));
      run.kill('SIGINT');
      await new Promise((done) => run.on('exit', done));
      const left = readdirSync(place);
      expect(left.filter((name) => !name.endsWith('.stl') || name.startsWith('.'))).toEqual([]);
      for (const name of left) expect((await goniolith('check', join(place, name))).code, name).toBe(0);
    }
  });

  it('on a disk that takes no more leaves nothing behind', () => {
    const place = folder();
    const limited = `ulimit -f 8; exec "${process.execPath}" "${BUILT}" make quartz --axes --out "${join(place, 'out')}"`;
    const run = (): string =>
      execFileSync('bash', ['-c', limited], { encoding: 'utf8', stdio: ['ignore', 'ignore', 'pipe'] });
    expect(run).toThrow(/quartz\.stl/);
    expect(existsSync(join(place, 'out'))).toBe(false);
  });
});
