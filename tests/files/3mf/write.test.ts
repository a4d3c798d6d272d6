import fc from 'fast-check';
import { strFromU8, unzipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { decimalOf, weldDecimals } from '../../../src/files/3mf/decimals.ts';
import { placed, read3mf } from '../../../src/files/3mf/read.ts';
import { type ThreeMfModel, type ThreeMfObject, write3mf } from '../../../src/files/3mf/write.ts';
import { XmlBytes } from '../../../src/files/3mf/xml-bytes.ts';
import { checkMesh } from '../../../src/files/check/check.ts';
import { FileError } from '../../../src/files/file-error.ts';
import { make } from '../../../src/index.ts';
import { extentsOf, meshVolume } from '../../../src/print/mesh.ts';
import { cube, octahedron, torus, unwelded } from '../shapes.ts';

const BLUE = { name: 'm {10-10}', colour: '#86a5cd' };
const ORANGE = { name: 'r {10-11}', colour: '#EDC28B' };
const plain: ThreeMfObject = { name: 'Cube', partNumber: 'cube', mesh: cube(10), surfaces: [BLUE] };
const twoFaced: ThreeMfObject = {
  name: 'Cube & co',
  partNumber: 'cube-2',
  mesh: { ...cube(10), surface: Uint16Array.from([0, 0, 0, 1, 0, 0, 1, 1, 0, 0, 0, 0]) },
  surfaces: [BLUE, ORANGE, { name: 'nowhere', colour: '#000000' }],
};
const modelOf = (objects: readonly ThreeMfObject[], more: Partial<ThreeMfModel> = {}): ThreeMfModel => ({
  title: 'Quartz <α> "habit"',
  description: 'line\none',
  application: 'Goniolith 0.1.0',
  metadata: { Mineral: 'quartz', PointGroup: '32' },
  objects,
  ...more,
});
const partsOf = (model: ThreeMfModel): Record<string, string> =>
  Object.fromEntries(Object.entries(unzipSync(write3mf(model))).map(([path, part]) => [path, strFromU8(part)]));
const xmlOf = (model: ThreeMfModel): string => partsOf(model)['3D/3dmodel.model']!;

async function quartz(): Promise<ThreeMfObject[]> {
  const { parts } = await make('mineral: quartz\nprint: { size: 60, axes: { fit: separate } }\n');
  return parts.flatMap(({ name, placed, surfaces }) =>
    placed.map((mesh, i) => ({ name: `${name} ${i + 1}`, partNumber: name, mesh, surfaces })),
  );
}

describe('write3mf', () => {
  // Paths, types and namespaces typed from 3MF Core Specification 1.4.0, sections 2.1, 2.2 and appendix C.
  it('writes the parts of a package under their exact names, in a fixed order', () => {
    const bare = partsOf(modelOf([plain]));
    expect(Object.keys(bare)).toEqual(['[Content_Types].xml', '_rels/.rels', '3D/3dmodel.model']);
    const pictured = partsOf(modelOf([plain], { thumbnail: new Uint8Array([1, 2, 3]) }));
    expect(Object.keys(pictured)).toEqual([...Object.keys(bare), 'Metadata/thumbnail.png']);
    expect(pictured['[Content_Types].xml']).toContain('<Default Extension="png" ContentType="image/png"/>');
    expect(bare['[Content_Types].xml']).toContain(
      'ContentType="application/vnd.ms-package.3dmanufacturing-3dmodel+xml"',
    );
    expect(bare['_rels/.rels']).toContain('Target="/3D/3dmodel.model"');
    expect(bare['_rels/.rels']).toContain('Type="http://schemas.microsoft.com/3dmanufacturing/2013/01/3dmodel"');
    expect(pictured['_rels/.rels']).toMatch(/Target="\/Metadata\/thumbnail.png" .*relationships\/metadata\/thumbnail"/);
    expect(bare['_rels/.rels']).not.toContain('thumbnail');
  });

  it('writes units, declared prefixes and legal metadata', () => {
    const xml = xmlOf(modelOf([plain]));
    expect(xml).toMatch(/^<\?xml version="1.0" encoding="UTF-8"\?>\n<model unit="millimeter"/);
    expect(xml).toContain(' xmlns:m="http://schemas.microsoft.com/3dmanufacturing/material/2015/02"');
    expect(xml).not.toMatch(/requiredextensions|xmlns:p=|metadatagroup|component/);
    expect(xml).toContain('<metadata name="Title">Quartz &lt;α&gt; &quot;habit&quot;</metadata>');
    const names = [...xml.matchAll(/<metadata name="([^"]+)"/g)].map(([, name]) => name);
    expect(names).toEqual(['Title', 'Description', 'Application', 'goniolith:Mineral', 'goniolith:PointGroup']);
    expect(xml).toContain('xmlns:goniolith="urn:uuid:');
    expect(() => write3mf(modelOf([plain], { metadata: { 'a b': '1' } }))).toThrow(FileError);
  });

  it('writes one mesh object and one item a body, colours one group each, groups before objects', () => {
    const xml = xmlOf(modelOf([plain, twoFaced]));
    expect(xml.match(/<m:colorgroup id="\d+"><m:color color="#[0-9A-F]{6}"\/><\/m:colorgroup>/g)).toHaveLength(2);
    expect(xml.match(/<object /g)).toHaveLength(2);
    expect(xml.match(/type="model"/g)).toHaveLength(2);
    expect(xml).toContain('<object id="4" type="model" name="Cube &amp; co" partnumber="cube-2" pid="1" pindex="0">');
    expect([...xml.matchAll(/<item objectid="(\d+)"/g)].map(([, id]) => id)).toEqual(['3', '4']);
    expect(xml.lastIndexOf('</m:colorgroup>')).toBeLessThan(xml.indexOf('<object'));
    expect(xml).not.toContain('nowhere');
  });

  it('colours every triangle of an object with several surfaces and none of one with a single surface', () => {
    const objects = xmlOf(modelOf([plain, twoFaced]))
      .split('<object ')
      .slice(1);
    const [lone, several] = objects.map((text) => text.match(/<triangle [^>]*>/g)!);
    expect(lone!.every((triangle) => !triangle.includes('pid'))).toBe(true);
    expect(several!.every((triangle) => / pid="[12]" p1="0"\/>$/.test(triangle))).toBe(true);
    expect(several!.map((triangle) => Number(/pid="(\d)"/.exec(triangle)![1]) - 1)).toEqual([
      ...twoFaced.mesh.surface!,
    ]);
  });

  it('names surfaces as triangle sets that cover each triangle once', () => {
    const xml = xmlOf(modelOf([twoFaced]));
    const sets = [...xml.matchAll(/<t:triangleset name="([^"]+)" identifier="([^"]+)">(.*?)<\/t:triangleset>/gs)];
    expect(sets.map(([, name]) => name)).toEqual(['m {10-10}', 'r {10-11}']);
    const triangles = sets.map(([, , , inside]) => [
      ...[...inside!.matchAll(/<t:ref index="(\d+)"/g)].map(([, t]) => Number(t)),
      ...[...inside!.matchAll(/startindex="(\d+)" endindex="(\d+)"/g)].flatMap(([, from, to]) =>
        Array.from({ length: Number(to) - Number(from) + 1 }, (_, i) => Number(from) + i),
      ),
    ]);
    triangles.forEach((own, surface) => {
      const expected = [...twoFaced.mesh.surface!.keys()].filter((t) => twoFaced.mesh.surface![t] === surface);
      expect(own.sort((a, b) => a - b)).toEqual(expected);
    });
  });

  it('gives the same bytes each time', async () => {
    const objects = await quartz();
    const first = write3mf(modelOf(objects));
    expect(write3mf(modelOf(structuredClone(objects)))).toEqual(first);
  });

  it('keeps nothing of the time of day', () => {
    const bytes = write3mf(modelOf([plain]));
    const view = new DataView(bytes.buffer, bytes.byteOffset);
    // MS-DOS date of 1 January 2000, midnight: (2000 - 1980) << 9 | 1 << 5 | 1 (PKWARE APPNOTE, section 4.4.6).
    expect([view.getUint16(10, true), view.getUint16(12, true)]).toEqual([0, (20 << 9) | (1 << 5) | 1]);
  });

  it('is read back as it was: quartz with its rods, vertices to the bit', async () => {
    const objects = await quartz();
    expect(objects.length).toBeGreaterThan(4);
    const back = read3mf(write3mf(modelOf(objects, { places: 'inPlace' })));
    expect(back.unused).toEqual([]);
    expect(back.objects.map(({ name }) => name)).toEqual(objects.map(({ name }) => name));
    back.objects.forEach(({ mesh }, i) => {
      const written = weldDecimals(objects[i]!.mesh);
      expect(mesh.positions).toEqual(written.positions);
      expect(mesh.triangles).toEqual(written.triangles);
      expect(checkMesh(mesh).problems).toEqual([]);
      expect(meshVolume(mesh) / meshVolume(objects[i]!.mesh)).toBeCloseTo(1, 5);
    });
    const whole = back.objects.map(({ mesh, transform }) => placed(mesh, transform));
    const least = [0, 1, 2].map((axis) => Math.min(...whole.map((mesh) => leastOf(mesh.positions, axis))));
    for (const value of least) expect(value).toBeGreaterThanOrEqual(0);
    for (const value of least) expect(value).toBeLessThan(0.0011);
    expect(new Set(back.objects.map(({ transform }) => String(transform))).size).toBe(1);
  });

  it('lays bodies side by side without overlap, on the bed, in the positive octant', () => {
    const objects = Array.from({ length: 23 }, (_, i) => ({
      ...plain,
      mesh: i % 2 ? octahedron(3 + ((7 * i) % 11)) : cube(2 + ((5 * i) % 13), [-50 * i, 9, i]),
    }));
    const boxes = read3mf(write3mf(modelOf(objects))).objects.map(({ mesh, transform }) => {
      const { positions } = placed(mesh, transform);
      const low = [0, 1, 2].map((axis) => leastOf(positions, axis));
      return { low, high: extentsOf({ ...mesh, positions }).map((extent, axis) => extent + low[axis]!) };
    });
    boxes.forEach(({ low, high }, i) => {
      for (const value of low) expect(value).toBeGreaterThan(-1e-6);
      expect(low[2]).toBeCloseTo(0, 5);
      for (const other of boxes.slice(i + 1)) {
        const apart = [0, 1].some((axis) => other.low[axis]! - high[axis]! > 4 || low[axis]! - other.high[axis]! > 4);
        expect(apart).toBe(true);
      }
    });
  });

  it('takes places as given', () => {
    const places = [
      [1, 2.5, 0],
      [30, 0, 1e-7],
    ] as const;
    const xml = xmlOf(modelOf([plain, plain], { places }));
    expect([...xml.matchAll(/transform="([^"]*)"/g)].map(([, text]) => text)).toEqual([
      '1 0 0 0 1 0 0 0 1 1 2.5 0',
      '1 0 0 0 1 0 0 0 1 30 0 0',
    ]);
    expect(() => write3mf(modelOf([plain], { places }))).toThrow(/a place each/);
  });

  it('refuses what is no model', () => {
    expect(() => write3mf(modelOf([]))).toThrow(/no object/);
    expect(() => write3mf(modelOf([{ ...plain, surfaces: [] }]))).toThrow(/only 0/);
    expect(() => write3mf(modelOf([{ ...plain, surfaces: [{ name: 'a', colour: '#0f0' }] }]))).toThrow(/"#0f0"/);
    expect(() => write3mf(modelOf([{ ...plain, mesh: { ...plain.mesh, triangles: new Uint32Array() } }]))).toThrow(
      /no triangle/,
    );
  });
});

const SCHEMA_NUMBER = /^-?\d+(\.\d{1,6})?$/;

describe('numbers', () => {
  it.each([
    [0, '0'],
    [-0, '0'],
    [-1e-9, '0'],
    [1e-7, '0'],
    [0.000001, '0.000001'],
    [-12.5, '-12.5'],
    [100, '100'],
    [0.1 + 0.2, '0.3'],
    [999999.9999996, '1000000'],
    [1e9, '1000000000'],
  ])('%d is written %s', (value, text) => {
    expect(decimalOf(value)).toBe(text);
    expect(new TextDecoder().decode(new XmlBytes().decimal(value).finish())).toBe(text);
  });

  it('any length has a plain decimal that a reader in single precision turns into the same float', () => {
    const length = fc.double({ min: -2000, max: 2000, noNaN: true });
    fc.assert(
      fc.property(fc.array(length, { minLength: 3, maxLength: 3 }), (point) => {
        const corner = {
          positions: Float64Array.from([...point, 5e3, 0, 0, 0, 5e3, 0]),
          triangles: Uint32Array.from([0, 1, 2]),
        };
        const { positions } = weldDecimals(corner);
        expect(weldDecimals({ ...corner, positions }).positions).toEqual(positions);
        for (const value of positions) {
          const text = new TextDecoder().decode(new XmlBytes().decimal(value).finish());
          expect(text).toMatch(SCHEMA_NUMBER);
          expect(text).not.toBe('-0');
          expect(text.endsWith('0') && text.includes('.')).toBe(false);
          expect(Math.fround(Number(text))).toBe(value);
        }
      }),
      { numRuns: 2000 },
    );
  });

  it('welds what becomes one point on writing', () => {
    const loose = unwelded(torus(30, 10, 12, 8));
    const positions = loose.positions.map((value, i) => Math.round(value * 1000) / 1000 + 1e-8 * (i % 5));
    expect(weldDecimals({ ...loose, positions }).positions.length).toBe(3 * 12 * 8);
  });
});

function leastOf(positions: Float64Array, axis: number): number {
  return positions.reduce((least, value, i) => (i % 3 === axis ? Math.min(least, value) : least), Infinity);
}

describe('bodies that are printed in one job', () => {
  const inlay: ThreeMfObject = { name: 'Inlay', partNumber: 'inlay', mesh: cube(2), surfaces: [ORANGE], within: 0 };
  const model = modelOf([plain, inlay, twoFaced]);

  it('are components of one object with one build item, so that no slicer drops one onto the bed', () => {
    const xml = xmlOf(model);
    expect(xml.match(/<item /g)).toHaveLength(2);
    const [, first, second] =
      /<components>\n<component objectid="(\d+)"\/>\n<component objectid="(\d+)"\/>\n<\/components>/.exec(xml)!;
    expect(xml).toMatch(new RegExp(`<object id="${first}"[^>]* name="Cube"`));
    expect(xml).toMatch(new RegExp(`<object id="${second}"[^>]* name="Inlay"`));
    expect(xml.match(/<components>/g)).toHaveLength(1);
  });

  it('keep their places to each other', () => {
    const { objects, unused } = read3mf(write3mf(model));
    expect(unused).toEqual([]);
    expect(objects.map(({ name }) => name)).toEqual(['Cube', 'Inlay', 'Cube & co']);
    expect(objects[1]!.transform).toEqual(objects[0]!.transform);
    expect(objects[2]!.transform).not.toEqual(objects[0]!.transform);
  });
});
