import fc from 'fast-check';
import { unzipSync, zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { placed, read3mf } from '../../../src/files/3mf/read.ts';
import { checkMesh } from '../../../src/files/check/check.ts';
import { FileError, type FileErrorCode } from '../../../src/files/file-error.ts';
import { meshVolume } from '../../../src/print/mesh.ts';
import { CORE, model, type Parts, type Pieces, pack, partOf, TETRAHEDRON } from './packages.ts';

function fault(bytes: Uint8Array): FileError {
  try {
    read3mf(bytes);
  } catch (error) {
    if (error instanceof FileError) return error;
    throw error;
  }
  throw new Error('nothing was wrong');
}

const read = (pieces: Pieces) => read3mf(pack(model(pieces)));
const VOLUME = 1000 / 6;
const object = (id: number, body: string, more = ''): string => `<object id="${id}"${more}>${body}</object>`;
const MATERIAL = '<basematerials id="2"><base name="a" displaycolor="#000000"/></basematerials>';
const components = (...all: string[]): string => `<components>${all.join('')}</components>`;

describe('read3mf', () => {
  it('reads a package written by hand', () => {
    const { objects, unit, unused } = read({});
    expect([objects.length, objects[0]!.name, objects[0]!.type, unit, unused]).toEqual([
      1,
      'corner',
      'model',
      'millimeter',
      [],
    ]);
    expect(checkMesh(objects[0]!.mesh).ok).toBe(true);
    expect(meshVolume(objects[0]!.mesh)).toBeCloseTo(VOLUME, 9);
  });

  // Lengths of the units: SI; inch and foot by the international yard of 1959.
  it.each([
    ['micron', 0.001],
    ['millimeter', 1],
    ['centimeter', 10],
    ['inch', 25.4],
    ['foot', 304.8],
    ['meter', 1000],
  ])('turns %s into millimetres, shifts too', (unit, length) => {
    const { objects } = read({
      attributes: `unit="${unit}"`,
      build: '<item objectid="1" transform="1 0 0 0 1 0 0 0 1 2 0 0"/>',
    });
    expect(meshVolume(objects[0]!.mesh) / (VOLUME * length ** 3)).toBeCloseTo(1, 6);
    expect(objects[0]!.transform[9]).toBeCloseTo(2 * length, 9);
  });

  it('takes the millimetre where no unit is stated, as the specification does (core 1.4.0, section 3.4)', () => {
    expect(meshVolume(read({ attributes: '' }).objects[0]!.mesh)).toBeCloseTo(VOLUME, 9);
  });

  it('takes assemblies apart, the inner matrix first (section 3.4.3.1)', () => {
    const turn = '0 1 0 -1 0 0 0 0 1 0 0 0'; // x to y, y to -x
    const { objects, unused } = read({
      resources: [
        object(1, TETRAHEDRON),
        object(2, components(`<component objectid="1" transform="1 0 0 0 1 0 0 0 1 5 0 0"/>`), ' name="arm"'),
        object(3, components('<component objectid="2"/>', `<component objectid="2" transform="${turn}"/>`)),
        object(4, TETRAHEDRON, ' name="left over"'),
      ].join(''),
      build: '<item objectid="3" transform="1 0 0 0 1 0 0 0 1 0 0 7"/>',
    });
    const origins = objects.map(({ mesh, transform }) => [...placed(mesh, transform).positions.slice(0, 3)]);
    expect(origins).toEqual([
      [5, 0, 7],
      [0, 5, 7],
    ]);
    expect(objects.map(({ name }) => name)).toEqual(['arm', 'arm']);
    expect(unused).toEqual(['left over']);
  });

  it('keeps the outside outside where a transform mirrors', () => {
    const { objects } = read({ build: '<item objectid="1" transform="-1 0 0 0 1 0 0 0 1 0 0 0"/>' });
    const mirrored = placed(objects[0]!.mesh, objects[0]!.transform);
    expect(meshVolume(mirrored)).toBeCloseTo(VOLUME, 9);
    expect(Math.min(...mirrored.positions)).toBe(-10);
    expect(checkMesh(mirrored).ok).toBe(true);
  });

  it('reads the core under any prefix, comments, CDATA, references and elements of extensions', () => {
    const text = model({
      before:
        '<!-- <item/> --><metadata name="Title">a &amp; b &#x63;<![CDATA[ <d> ]]></metadata>' +
        '<x:own xmlns:x="u:x"><item/></x:own>',
    });
    const prefixed = text
      .replace('xmlns=', 'xmlns:c=')
      .replace(/<(\/?)(?=[a-z])(?!x:)/g, '<$1c:')
      .replace('<c:d>', '<d>')
      .replace('<c:item/> -->', '<item/> -->')
      .replace('<c:item/></x:own>', '<item/></x:own>');
    for (const one of [text, prefixed]) {
      const { metadata, objects } = read3mf(pack(one));
      expect(metadata.Title).toBe('a & b c <d> ');
      expect(objects).toHaveLength(1);
    }
  });

  it('finds the model by its relationship, wherever it is', () => {
    const bytes = pack('', {
      '3D/3dmodel.model': null,
      'other/Place.model': model(),
      '_rels/.rels': `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship
        Target="/other/Place.model" Id="a"
        Type="http://schemas.microsoft.com/3dmanufacturing/2013/01/3dmodel"/></Relationships>`,
    });
    expect(read3mf(bytes).objects).toHaveLength(1);
  });

  it('takes objects from other parts of the package, as the production extension 1.2 lets assemblies do', () => {
    const production = 'unit="inch" xmlns:p="http://schemas.microsoft.com/3dmanufacturing/production/2015/06"';
    const pieces = {
      attributes: `${production} requiredextensions="p"`,
      resources: object(1, components('<component objectid="1" p:path="/3D/Objects/a.model"/>'), ' name="whole"'),
    };
    const other = (unit: string, resources?: string): Parts => ({
      '3D/Objects/a.model': model({
        attributes: `${production.replace('inch', unit)}`,
        build: '',
        ...(resources && { resources }),
      }),
    });
    const { objects, unused } = read3mf(pack(model(pieces), other('inch')));
    expect(objects.map(({ name }) => name)).toEqual(['corner']);
    expect(meshVolume(objects[0]!.mesh) / (VOLUME * 25.4 ** 3)).toBeCloseTo(1, 6);
    expect(unused).toEqual([]);
    expect(fault(pack(model(pieces), other('foot'))).code).toBe('unit');
    expect(fault(pack(model(pieces))).code).toBe('missingPart');
    const onward = object(1, components('<component objectid="1" p:path="/3D/Objects/a.model"/>'));
    expect(fault(pack(model(pieces), other('inch', onward))).code).toBe('unsupported');
  });

  it('says in single precision what is closed in double only', () => {
    const shifted = TETRAHEDRON.replace('x="10" y="0" z="0"', 'x="1e-60" y="0" z="0"');
    expect(checkMesh(read({ resources: object(1, shifted) }).objects[0]!.mesh).ok).toBe(false);
  });
});

const TWICE = object(1, TETRAHEDRON + TETRAHEDRON);
const broken: readonly [string, FileErrorCode, Pieces, RegExp][] = [
  ['two meshes in an object', 'syntax', { resources: TWICE }, /object 1 holds more than one/],
  ['an unknown unit', 'unit', { attributes: 'unit="mm"' }, /"mm" is none of micron, millimeter/],
  [
    'a vertex number too large',
    'index',
    { resources: object(1, TETRAHEDRON.replace('v1="1"', 'v1="4"'), ' name="a"') },
    /object 1 "a", triangle 3 names vertex "4".*0 to 3/,
  ],
  [
    'a negative vertex number',
    'index',
    { resources: object(1, TETRAHEDRON.replace('v1="1"', 'v1="-1"')) },
    /vertex "-1"/,
  ],
  ['a missing vertex number', 'index', { resources: object(1, TETRAHEDRON.replace('v1="1"', '')) }, /vertex ""/],
  [
    'a decimal comma',
    'notFinite',
    { resources: object(1, TETRAHEDRON.replace('x="10"', 'x="10,0"')) },
    /x of vertex 1 .*"10,0"/,
  ],
  ['an infinite coordinate', 'notFinite', { resources: object(1, TETRAHEDRON.replace('x="10"', 'x="INF"')) }, /"INF"/],
  [
    'a coordinate beyond double',
    'notFinite',
    { resources: object(1, TETRAHEDRON.replace('x="10"', 'x="1e999"')) },
    /"1e999"/,
  ],
  [
    'eleven numbers in a matrix',
    'transform',
    { build: '<item objectid="1" transform="1 0 0 0 1 0 0 0 1 0 0"/>' },
    /build item 1 is not twelve/,
  ],
  [
    'a word in a matrix',
    'transform',
    { build: '<item objectid="1" transform="1 0 0 0 1 0 0 0 1 0 0 x"/>' },
    /not twelve numbers/,
  ],
  [
    'a flattening matrix',
    'transform',
    { build: '<item objectid="1" transform="1 0 0 0 1 0 0 0 0 0 0 0"/>' },
    /flattens/,
  ],
  ['an item without object', 'index', { build: '<item objectid="7"/>' }, /build item 1 names object "7"/],
  [
    'a component before its object',
    'index',
    { resources: object(1, components('<component objectid="2"/>')) + object(2, TETRAHEDRON) },
    /not defined before/,
  ],
  ['an id used twice', 'index', { resources: object(1, TETRAHEDRON) + object(1, TETRAHEDRON) }, /id 1 is given twice/],
  ['the id 0', 'index', { resources: object(0, TETRAHEDRON) }, /"0"/],
  [
    'an unknown colour group',
    'index',
    { resources: object(1, TETRAHEDRON, ' pid="9" pindex="0"') },
    /group "9", but no such group/,
  ],
  [
    'a colour number too large',
    'index',
    {
      resources: `${MATERIAL}${object(1, TETRAHEDRON, ' pid="2" pindex="1"')}`,
    },
    /"1" of group "2", which has 1/,
  ],
  [
    'coloured triangles in an object without colour',
    'index',
    {
      resources: `${MATERIAL}${object(1, TETRAHEDRON.replace('v3="1"', 'v3="1" pid="2" p1="0"'))}`,
    },
    /the object itself has none/,
  ],
  ['an empty build', 'empty', { build: '' }, /places no object/],
  [
    'a mesh without triangles',
    'empty',
    { resources: object(1, '<mesh><vertices/><triangles/></mesh>') },
    /no triangles/,
  ],
  ['an object with neither', 'syntax', { resources: object(1, '') }, /either a mesh or components/],
  [
    'an element out of place',
    'syntax',
    { resources: '<vertex x="0" y="0" z="0"/>' },
    /"vertex" does not belong in "resources"/,
  ],
  ['text between elements', 'syntax', { resources: `hello${object(1, TETRAHEDRON)}` }, /text where none belongs/],
  [
    'metadata twice',
    'metadata',
    { before: '<metadata name="Title">a</metadata><metadata name="Title">b</metadata>' },
    /"Title" stands twice/,
  ],
  [
    'an extension it cannot do without',
    'unsupported',
    { attributes: 'xmlns:b="urn:beams" requiredextensions="b"' },
    /urn:beams/,
  ],
  ['a required extension without declaration', 'syntax', { attributes: 'requiredextensions="b"' }, /does not declare/],
  ['an undeclared prefix', 'syntax', { resources: `<z:a/>${object(1, TETRAHEDRON)}` }, /"z:a" is not declared/],
  ['an attribute twice', 'syntax', { build: '<item objectid="1" objectid="1"/>' }, /stands twice/],
  ['an unknown entity', 'syntax', { before: '<metadata name="Title">&nbsp;</metadata>' }, /"&" stands for nothing/],
];

describe('read3mf tells what is wrong with', () => {
  it.each(broken)('%s', (_, code, pieces, words) => {
    const error = fault(pack(model(pieces)));
    expect([error.code, error.message]).toEqual([code, expect.stringMatching(words)]);
    expect(error.hint).not.toBe('');
  });

  const whole = model();
  const packages: readonly [string, FileErrorCode, Uint8Array, RegExp][] = [
    ['no bytes', 'empty', new Uint8Array(), /no bytes/],
    ['an STL file', 'notZip', new TextEncoder().encode('solid a\nendsolid a\n'), /no zip archive/],
    ['half a file', 'damaged', pack(whole).slice(0, 600), /end is missing/],
    ['no content types', 'missingPart', pack(whole, { '[Content_Types].xml': null }), /"\[Content_Types\]\.xml"/],
    ['no relationships', 'missingPart', pack(whole, { '_rels/.rels': null }), /"_rels\/\.rels"/],
    ['no model', 'missingPart', pack(whole, { '3D/3dmodel.model': null }), /"3D\/3dmodel\.model"/],
    [
      'a model in other letter case',
      'missingPart',
      pack(whole, { '3D/3dmodel.model': null, '3D/3DModel.model': whole }),
      /"3D\/3DModel\.model", but letter case counts/,
    ],
    [
      'a model of unknown type',
      'contentType',
      pack(whole, swap('[Content_Types].xml', '3dmanufacturing-3dmodel', 'something')),
      /something/,
    ],
    ['no start', 'missingPart', pack(whole, swap('_rels/.rels', '2013/01/3dmodel', 'other')), /no model/],
    [
      'a promised picture that is not there',
      'missingPart',
      pack(
        whole,
        swap(
          '_rels/.rels',
          '</Relationships>',
          '<Relationship Target="/t.png" Id="b"\nType="http://schemas.openxmlformats.org/package/2006/relationships/metadata/thumbnail"/>' +
            '</Relationships>',
        ),
      ),
      /"t\.png"/,
    ],
    [
      'a document type',
      'syntax',
      pack(whole.replace('<model', '<!DOCTYPE model [<!ENTITY a "b">]><model')),
      /document type.*line 2/,
    ],
    ['an XML text cut short', 'syntax', pack(whole.slice(0, -8)), /is not closed/],
    ['crossed tags', 'syntax', pack(whole.replace('</resources>', '</mesh>')), /<\/mesh> closes <resources>/],
    ['two outermost elements', 'syntax', pack(`${whole}<model/>`), /second outermost/],
    ['another encoding', 'syntax', pack(whole.replace('UTF-8', 'UTF-16')), /encoding is UTF-16/],
    ['bytes that are no UTF-8', 'syntax', pack('', { '3D/3dmodel.model': new Uint8Array([60, 255, 62]) }), /not UTF-8/],
    ['nothing but a declaration', 'syntax', pack('<?xml version="1.0"?>'), /no element/],
    ['another kind of XML', 'syntax', pack('<svg xmlns="http://www.w3.org/2000/svg"/>'), /"svg".*at the top/],
  ];

  it.each(packages)('a package with %s', (_, code, bytes, words) => {
    const error = fault(bytes);
    expect([error.code, error.message]).toEqual([code, expect.stringMatching(words)]);
  });

  it('a byte that changed on the way, whichever it is', () => {
    const bytes = pack(whole);
    let told = 0;
    for (let at = 0; at < bytes.length; at += 3) {
      const changed = bytes.slice();
      changed[at]! ^= 4;
      try {
        read3mf(changed); // the date of an entry may be anything
      } catch (error) {
        expect(error).toBeInstanceOf(FileError);
        told++;
      }
    }
    expect(told).toBeGreaterThan(bytes.length / 6);
  });

  it('a file that ends anywhere', () => {
    const bytes = pack(whole);
    for (let end = 0; end < bytes.length; end += 7) expect(fault(bytes.slice(0, end)).hint).not.toBe('');
  });
});

describe('read3mf reads archives', () => {
  it('with large-file fields (PKWARE APPNOTE 6.3.10, sections 4.3.14, 4.3.15 and 4.5.3)', () => {
    expect(read3mf(asLarge(pack(model()))).objects).toHaveLength(1);
  });

  it('with a comment, with stored parts, and in a view of a longer buffer', () => {
    const bytes = pack(model());
    const commented = Uint8Array.from([9, 9, ...bytes, 65, 66, 67, 9]);
    commented[2 + bytes.length - 2] = 3;
    expect(read3mf(commented.subarray(2, -1)).objects).toHaveLength(1);
    expect(read3mf(zipSync(unzipSync(bytes), { level: 0 })).objects).toHaveLength(1);
  });

  it('or says what is wrong, whatever is changed in the model', () => {
    const text = model();
    const change = fc.tuple(
      fc.nat(text.length),
      fc.nat(8),
      fc.constantFrom('', '<', '>', '"', '&', '1', '-', ' ', '/', 'x'),
    );
    fc.assert(
      fc.property(change, ([at, length, instead]) => {
        try {
          const { objects } = read3mf(pack(text.slice(0, at) + instead + text.slice(at + length)));
          expect(objects.length).toBe(1);
        } catch (error) {
          expect(error).toBeInstanceOf(FileError);
        }
      }),
      { numRuns: 400 },
    );
  });
});

describe('read3mf against bombs', () => {
  it('refuses a part that unpacks to more than the limit, before it does', () => {
    const bytes = stating(zipSync({ '[Content_Types].xml': new Uint8Array(1000) }), 300 << 20);
    expect(fault(bytes).code).toBe('tooLarge');
  });

  it('does not unpack beyond the size that the list states', () => {
    const bytes = stating(zipSync({ '[Content_Types].xml': new Uint8Array(8 << 20) }), 100);
    expect(fault(bytes).code).toBe('damaged');
  });

  it('refuses assemblies that multiply, and deep ones', () => {
    const layers = Array.from({ length: 30 }, (_, i) =>
      object(i + 2, components(...Array.from({ length: 10 }, () => `<component objectid="${i + 1}"/>`))),
    );
    const many = { resources: object(1, TETRAHEDRON) + layers.join(''), build: '<item objectid="31"/>' };
    expect(fault(pack(model(many))).message).toMatch(/more than 10000 bodies/);
    const chain = Array.from({ length: 5000 }, (_, i) => object(i + 2, components(`<component objectid="${i + 1}"/>`)));
    const deep = { resources: object(1, TETRAHEDRON) + chain.join(''), build: '<item objectid="5001"/>' };
    expect(fault(pack(model(deep))).message).toMatch(/nested more than 100/);
    const nested = `<a ${CORE}>`.repeat(200);
    expect(fault(pack('', { '_rels/.rels': nested.replaceAll('core/2015/02', 'x') })).message).toMatch(
      /more than 100 deep/,
    );
  });
});

/** The same archive with sizes and places in the 64-bit fields. */
function asLarge(bytes: Uint8Array): Uint8Array {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const end = bytes.length - 22;
  const [count, start] = [view.getUint16(end + 10, true), view.getUint32(end + 16, true)];
  const list: number[] = [];
  for (let i = 0, at = start; i < count; i++) {
    const name = view.getUint16(at + 28, true);
    const entry = bytes.slice(at, at + 46 + name);
    const fields = new DataView(entry.buffer);
    const extra = new DataView(new ArrayBuffer(28));
    extra.setUint16(0, 1, true);
    extra.setUint16(2, 24, true);
    [24, 20, 42].forEach((offset, k) => {
      extra.setBigUint64(4 + 8 * k, BigInt(fields.getUint32(offset, true)), true);
      fields.setUint32(offset, 0xffffffff, true);
    });
    fields.setUint16(30, 28, true);
    list.push(...entry, ...new Uint8Array(extra.buffer));
    at += 46 + name + view.getUint16(at + 30, true) + view.getUint16(at + 32, true);
  }
  const tail = new DataView(new ArrayBuffer(56 + 20));
  tail.setUint32(0, 0x06064b50, true);
  tail.setBigUint64(32, BigInt(count), true);
  tail.setBigUint64(48, BigInt(start), true);
  tail.setUint32(56, 0x07064b50, true);
  tail.setBigUint64(64, BigInt(start + list.length), true);
  const last = bytes.slice(end);
  last.fill(0xff, 8, 20);
  return Uint8Array.from([...bytes.subarray(0, start), ...list, ...new Uint8Array(tail.buffer), ...last]);
}

/** The archive with another unpacked size for its first part (PKWARE APPNOTE, section 4.3.12). */
function stating(bytes: Uint8Array, size: number): Uint8Array {
  const view = new DataView(bytes.buffer, bytes.byteOffset);
  const entry = [...bytes.keys()].find((at) => at + 4 <= bytes.length && view.getUint32(at, true) === 0x02014b50)!;
  view.setUint32(entry + 24, size, true);
  return bytes;
}

/** A part of the whole package with some of its text replaced. */
function swap(path: '[Content_Types].xml' | '_rels/.rels', from: string, to: string): Parts {
  const found = partOf(path);
  expect(found).toContain(from);
  return { [path]: found.replaceAll(from, to) };
}
