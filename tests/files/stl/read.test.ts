import fc from 'fast-check';
import { STLLoader } from 'three/examples/jsm/loaders/STLLoader.js';
import { describe, expect, it } from 'vitest';
import { FileError, type FileErrorCode } from '../../../src/files/file-error.ts';
import { weldFloat32 } from '../../../src/files/mesh/weld.ts';
import { readStl } from '../../../src/files/stl/read.ts';
import { writeStl, writeStlText } from '../../../src/files/stl/write.ts';
import { cube, octahedron, torus } from '../shapes.ts';

const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text);

/** The error that reading these bytes gives. */
function fault(bytes: Uint8Array): FileError {
  try {
    readStl(bytes);
  } catch (error) {
    if (error instanceof FileError) return error;
    throw error;
  }
  throw new Error('nothing was wrong');
}

/** Replaces the first bytes of the header. */
function headed(bytes: Uint8Array, header: string): Uint8Array {
  const copy = bytes.slice();
  copy.set(bytesOf(header.padEnd(80)));
  return copy;
}

const FACET = `facet normal 0 0 1
outer loop
vertex 0 0 0
vertex 1 0 0
vertex 0 1 0
endloop
endfacet
`;
const solid = (inside: string): Uint8Array => bytesOf(`solid a name\n${inside}endsolid a name\n`);

describe('readStl', () => {
  it('gives back what was written: vertices, order and normals', () => {
    const mesh = weldFloat32(torus(30, 10, 12, 8));
    const read = readStl(writeStl(mesh, 'ring'));
    expect(read.format).toBe('binary');
    expect(weldFloat32(read.mesh).positions.length).toBe(mesh.positions.length);
    const places = ({ positions, triangles }: typeof mesh): string[] =>
      Array.from(triangles, (vertex) => String(positions.slice(3 * vertex, 3 * vertex + 3)));
    expect(places(read.mesh)).toEqual(places(mesh));
    expect(read.normals.length).toBe(mesh.triangles.length);
  });

  it('gives back any float32 mesh, binary and text', () => {
    const float = fc.float({ noNaN: true, noDefaultInfinity: true }).map((value) => value + 0);
    const facets = fc.array(fc.array(float, { minLength: 9, maxLength: 9 }), { minLength: 1, maxLength: 6 });
    fc.assert(
      fc.property(facets, fc.string(), (corners, title) => {
        const mesh = {
          positions: Float64Array.from(corners.flat()),
          triangles: Uint32Array.from({ length: 3 * corners.length }, (_, i) => i),
        };
        for (const bytes of [writeStl(mesh, title), bytesOf(writeStlText(mesh, title))]) {
          const read = readStl(bytes).mesh;
          const values = Array.from(read.triangles).flatMap((v) => [...read.positions.slice(3 * v, 3 * v + 3)]);
          expect(values).toEqual(corners.flat());
        }
      }),
    );
  });

  // The loader of three.js, written by others.
  it('finds the same triangles and normals as STLLoader of three', () => {
    const mesh = weldFloat32(torus(30, 10, 9, 7));
    const files = [writeStl(mesh, 'ring'), bytesOf(writeStlText(mesh, 'ring')), headed(writeStl(mesh, ''), 'solid x')];
    for (const bytes of files) {
      const geometry = new STLLoader().parse(bytes.slice().buffer);
      const ours = readStl(bytes);
      const corners = Array.from(ours.mesh.triangles).flatMap((v) => [...ours.mesh.positions.slice(3 * v, 3 * v + 3)]);
      expect([...geometry.getAttribute('position').array]).toEqual(corners);
      const theirs = geometry.getAttribute('normal').array;
      expect([0, 1, 2].map((i) => theirs[9 * 5 + i])).toEqual([...ours.normals.slice(15, 18)]);
    }
  });

  // nschloe/meshio#530, assimp/assimp#102: many binary files begin with the word solid.
  it('goes by the size, not by the word solid', () => {
    expect(readStl(headed(writeStl(cube(), ''), 'solid cube')).format).toBe('binary');
  });

  it('reads a part of a larger array', () => {
    const file = writeStl(cube(), '');
    const larger = new Uint8Array(file.length + 3);
    larger.set(file, 3);
    expect(readStl(larger.subarray(3)).mesh.triangles.length).toBe(36);
  });

  it('keeps -0 and 0 apart, as readers that compare bits do', () => {
    const file = writeStl(octahedron(1), '');
    const view = new DataView(file.buffer);
    view.setFloat32(84 + 12 + 4, -0, true);
    expect(readStl(file).mesh.positions.length / 3).toBe(7);
  });

  it.each([
    ['upper case', bytesOf(new TextDecoder().decode(solid(FACET)).toUpperCase())],
    ['tabs and CRLF', solid(FACET.replaceAll('\n', '\r\n\t'))],
    ['no name', bytesOf(`solid\n${FACET}endsolid`)],
    ['a byte order mark', bytesOf(`\ufeffsolid\n${FACET}endsolid`)],
    ['a name with other letters', bytesOf(`solid Bergkristall \u00fc endsolid\n${FACET}endsolid \u00fc`)],
    ['exponents', solid(FACET.replace('vertex 1 0 0', 'vertex +1.0E+0 0e5 -.0'))],
    ['a normal of nan', solid(FACET.replace('normal 0 0 1', 'normal nan -nan(ind) -1.#IND'))],
    ['a second solid', bytesOf(`solid a\nendsolid a\nsolid b\n${FACET}endsolid b\n`)],
  ])('reads text with %s', (_, bytes) => {
    const { mesh, format, normals } = readStl(bytes);
    expect(format).toBe('text');
    expect(mesh.triangles.length).toBe(3);
    expect([...mesh.positions.slice(3, 6)].map((v) => v + 0)).toEqual([1, 0, 0]);
    expect(normals.length).toBe(3);
  });
});

describe('readStl says what is wrong', () => {
  const binary = writeStl(cube(), '');
  const counted = (count: number, bytes: Uint8Array): Uint8Array => {
    const copy = bytes.slice();
    new DataView(copy.buffer).setUint32(80, count, true);
    return copy;
  };
  const broken = (facet: number, number: number, value: number): Uint8Array => {
    const copy = binary.slice();
    new DataView(copy.buffer).setFloat32(84 + 50 * facet + 4 * number, value, true);
    return copy;
  };
  const random = Uint8Array.from({ length: 5000 }, (_, i) => (i * 7919 + (i >> 3) * 104729) & 255);

  const cases: [string, Uint8Array, FileErrorCode, RegExp][] = [
    ['nothing', new Uint8Array(), 'empty', /no bytes/],
    ['a few bytes', binary.slice(0, 83), 'tooShort', /only 83 bytes/],
    // 84 + 12·50 = 684 bytes promised; cut after 400: (400 − 84)/50 = 6 whole facets
    [
      'a file cut off',
      binary.slice(0, 400),
      'truncated',
      /promises 12 facets but breaks off after 6: 284 bytes are mi/,
    ],
    ['a file cut off at once', binary.slice(0, 100), 'truncated', /after 0: 584 bytes/],
    ['a cut file headed solid', headed(binary, 'solid').slice(0, 400), 'truncated', /284 bytes/],
    ['bytes to spare', counted(11, binary), 'surplus', /promises 11 facets but has 50 bytes after/],
    ['no facets, binary', counted(0, binary.slice(0, 84)), 'empty', /no facets/],
    ['no facets, text', solid(''), 'empty', /no facets/],
    ['rubbish', random, 'notStl', /not an STL file/],
    ['a ZIP archive', bytesOf(`PK\u0003\u0004${'x'.repeat(200)}`), 'notStl', /ZIP archive, as 3MF/],
    ['a short JSON file', bytesOf('{}'), 'notStl', /JSON/],
    ['NaN', broken(4, 5, Number.NaN), 'notFinite', /z coordinate of corner 1 of facet 5 .* not a number/],
    ['infinity', broken(11, 9, -Infinity), 'notFinite', /x coordinate of corner 3 of facet 12 .* infinite/],
    ['nan in text', solid(FACET.replace('vertex 1 0 0', 'vertex 1 nan 0')), 'notFinite', /Line 5 .*facet 1/],
    ['more than float32', solid(FACET.replace('vertex 1 0 0', 'vertex 1e39 0 0')), 'notFinite', /Line 5/],
    ['a decimal comma', solid(FACET.replace('vertex 1 0 0', 'vertex 1,5 0 0')), 'syntax', /Line 5 .*decimal comma/],
    ['a misspelt word', solid(FACET.replace('endloop', 'endlop')), 'syntax', /Line 7 .*'endlop' where endloop/],
    ['two corners', solid(FACET.replace('vertex 0 1 0\n', '')), 'syntax', /Line 6 .*'endloop' where vertex/],
    ['a number missing', solid(FACET.replace('1 0 0', '1 0')), 'syntax', /Line 6 .*'vertex' where a number/],
    ['hexadecimal', solid(FACET.replace('1 0 0', '0x10 0 0')), 'syntax', /'0x10' where a number/],
    [
      'a text cut off',
      bytesOf(`solid\n${FACET.slice(0, FACET.indexOf('vertex 0 1'))}`),
      'syntax',
      /ends in line 6, where vertex/,
    ],
    ['words after the end', bytesOf(`solid\n${FACET}endsolid\nmore`), 'syntax', /Line 10 .*'more' where solid/],
  ];
  it.each(cases)('%s', (_, bytes, code, words) => {
    const error = fault(bytes);
    expect(error.code).toBe(code);
    expect(error.message).toMatch(words);
    expect(error.hint, 'what mends it').toMatch(/^[A-Z].*\.$/);
  });

  it('never fails otherwise, whatever the bytes', () => {
    const tail = fc.uint8Array({ maxLength: 300 });
    const start = fc.constantFrom('', 'solid ', 'solid\nfacet normal 0 0 ', 'x'.repeat(80));
    fc.assert(
      fc.property(start, tail, (text, bytes) => {
        const file = Uint8Array.from([...bytesOf(text), ...bytes]);
        try {
          expect(readStl(file).mesh.triangles.length).toBeGreaterThan(0);
        } catch (error) {
          expect(error).toBeInstanceOf(FileError);
        }
      }),
    );
  });
});
