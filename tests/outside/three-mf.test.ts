import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { unzipSync, zipSync } from 'fflate';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { PRESET_FOLDER } from '../../src/disk/preset-folder.ts';
import { placed, read3mf } from '../../src/files/3mf/read.ts';
import { type ThreeMfModel, write3mf } from '../../src/files/3mf/write.ts';
import { checkMesh } from '../../src/files/check/check.ts';
import { thumbnailPng } from '../../src/files/picture/thumbnail.ts';
import { make } from '../../src/index.ts';
import { meshVolume } from '../../src/print/mesh.ts';
import { preset } from '../../src/recipe/shelf.ts';

/**
 * What others say of our 3MF files: the published schemas (tests/outside/reference/3mf) by xmllint, lib3mf in strict
 * mode (the 3MF Consortium's own implementation) and PrusaSlicer, all from Debian. Without them these tests are
 * left out, unless GONIOLITH_OUTSIDE asks for them.
 */
const demanded = process.env.GONIOLITH_OUTSIDE !== undefined;
const has = (program: string): boolean => spawnSync('sh', ['-c', `command -v ${program}`]).status === 0;
const folder = mkdtempSync(join(tmpdir(), 'goniolith-3mf-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));
const here = (path: string): string => fileURLToPath(new URL(path, import.meta.url));

const run = (program: string, ...words: string[]): string =>
  execFileSync(program, words, { encoding: 'utf8', maxBuffer: 1 << 28, timeout: 240_000 });

const minerals = PRESET_FOLDER.list('minerals').flatMap((name) =>
  Object.keys(preset(PRESET_FOLDER, 'minerals', name)!.habits).map((habit) => `${name}/${habit}`),
);
/** Sixty habits spread over the list, and quartz with its rods in all ways. */
const sample = minerals.filter((_, i) => i % Math.ceil(minerals.length / 60) === 0);
const rods = ['fused', 'separate'].flatMap((fit) =>
  ['quartz', 'pyrite', 'calcite'].map(
    (name) => `mineral: ${name}\nprint: { size: 80, axes: { fit: ${fit}, diameter: 2 } }\n`,
  ),
);

interface Written {
  readonly path: string;
  readonly model: ThreeMfModel;
  readonly bytes: Uint8Array;
}
const written: Written[] = [];

beforeAll(async () => {
  for (const recipe of [...sample, ...rods]) {
    const { parts, shape } = await make(recipe);
    const objects = parts.flatMap((part) =>
      part.placed.map((mesh, i) => {
        const name = part.placed.length > 1 ? `${part.name} ${i + 1}` : part.name;
        return { name, partNumber: part.name, mesh, surfaces: part.surfaces };
      }),
    );
    const model = {
      title: shape.crystal.title,
      description: `${shape.crystal.title} & its "parts" <1>`,
      application: 'Goniolith 0.1.0',
      metadata: { PointGroup: shape.crystal.group.hermannMauguin, Scale: '1:1' },
      objects,
      thumbnail: thumbnailPng(objects, { toward: [0.9, 0.35, 0.22], size: 64 }),
      places: written.length % 2 ? ('inPlace' as const) : ('sideBySide' as const),
    };
    const [path, bytes] = [join(folder, `m${written.length}.3mf`), write3mf(model)];
    writeFileSync(path, bytes);
    written.push({ path, model, bytes });
  }
}, 120_000);

describe('our own reader', () => {
  it('finds every body whole', () => {
    expect(written.length).toBeGreaterThan(40);
    for (const { model, bytes } of written) {
      const { objects } = read3mf(bytes);
      expect(objects).toHaveLength(model.objects.length);
      objects.forEach(({ mesh, transform }, i) => {
        expect(checkMesh(mesh).problems, model.title).toEqual([]);
        const volume = meshVolume(model.objects[i]!.mesh);
        expect(Math.abs(meshVolume(placed(mesh, transform)) / volume - 1)).toBeLessThan(1e-5);
      });
    }
  });
});

describe.runIf(demanded || has('xmllint'))('the published schemas', () => {
  const validate = (paths: readonly string[]) => {
    const schema = here('./reference/3mf/3mf-all.xsd');
    return spawnSync('xmllint', ['--nonet', '--noout', '--schema', schema, ...paths], { encoding: 'utf8' });
  };
  const unpacked = (name: string, text: (xml: string) => string): string => {
    const xml = new TextDecoder().decode(unzipSync(written[0]!.bytes)['3D/3dmodel.model']);
    expect(text(xml)).not.toBe('');
    writeFileSync(join(folder, name), text(xml));
    return join(folder, name);
  };

  it('take every model part', () => {
    const paths = written.map(({ bytes, path }) => {
      writeFileSync(`${path}.model`, unzipSync(bytes)['3D/3dmodel.model']!);
      return `${path}.model`;
    });
    const { status, stderr } = validate(paths);
    expect(stderr.match(/ validates$/gm)).toHaveLength(written.length);
    expect(status).toBe(0);
  });

  it('would refuse a wrong one', () => {
    for (const [name, from, to] of [
      ['unit.model', 'unit="millimeter"', 'unit="mm"'],
      ['colour.model', /color="#[^"]*"/, 'color="#0F0"'],
      ['set.model', '<t:triangleset name=', '<t:triangleset title='],
    ] as const)
      expect(validate([unpacked(name, (xml) => xml.replace(from, to))]).status, name).not.toBe(0);
  });
});

const library = spawnSync('sh', [
  '-c',
  'command -v cc && echo "int main(void){return 0;}" | cc -x c - -l3MF -o /dev/null',
]);

describe.runIf(demanded || library.status === 0)('lib3mf in strict mode', () => {
  const program = join(folder, 'lib3mf-strict');
  beforeAll(() => {
    run('cc', '-Wall', '-Werror', '-o', program, here('./lib3mf-strict.c'), '-l3MF');
  });

  it('reads every file without a warning and finds every object valid', () => {
    const lines = run(program, ...written.map(({ path }) => path))
      .trim()
      .split('\n');
    const expected = written.map(
      ({ model: { objects } }) => `ok ${objects.length} valid ${objects.length} items ${objects.length}`,
    );
    expect(lines).toEqual(expected);
  });

  it('would refuse metadata without a declared prefix', () => {
    const path = join(folder, 'odd.3mf');
    const parts = unzipSync(written[0]!.bytes);
    const xml = new TextDecoder().decode(parts['3D/3dmodel.model']).replace('name="Title"', 'name="Heading"');
    writeFileSync(path, zipSync({ ...parts, '3D/3dmodel.model': new TextEncoder().encode(xml) }));
    expect(spawnSync(program, [path], { encoding: 'utf8' }).stdout).toMatch(/^error /);
  });
});

describe.runIf(demanded || has('prusa-slicer'))('PrusaSlicer', () => {
  it('says manifold of every body, with its volume', () => {
    const report = run('prusa-slicer', '--info', ...written.map(({ path }) => path));
    const bodies = written.flatMap(({ model }) => model.objects);
    expect(report.match(/^manifold = yes$/gm)).toHaveLength(bodies.length);
    expect(report.match(/^number_of_parts = +1$/gm)).toHaveLength(bodies.length);
    const volumes = [...report.matchAll(/^volume = ([\d.]+)$/gm)].map(([, volume]) => Number(volume));
    bodies.forEach(({ mesh }, i) => {
      expect(Math.abs(volumes[i]! / meshVolume(mesh) - 1)).toBeLessThan(1e-4);
    });
    const facets = [...report.matchAll(/^number_of_facets = +(\d+)$/gm)].map(([, count]) => Number(count));
    expect(facets).toEqual(bodies.map(({ mesh }) => mesh.triangles.length / 3));
  });
});
