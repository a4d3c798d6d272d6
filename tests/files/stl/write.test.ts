import { describe, expect, it } from 'vitest';
import { weldFloat32 } from '../../../src/files/mesh/weld.ts';
import { fillFacets } from '../../../src/files/stl/facets.ts';
import { fillFacetsAssembled } from '../../../src/files/stl/facets-assembled.ts';
import { writeStl } from '../../../src/files/stl/write.ts';
import type { Mesh } from '../../../src/print/mesh.ts';
import { cube, meshOf, octahedron, torus } from '../shapes.ts';

const ascii = (bytes: Uint8Array): string => new TextDecoder('latin1').decode(bytes);
const viewOf = (bytes: Uint8Array): DataView => new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
const header = (title: string): string => ascii(writeStl(cube(), title).subarray(0, 80));

/** The twelve numbers of a facet. */
function facet(bytes: Uint8Array, number: number): number[] {
  return Array.from({ length: 12 }, (_, i) => viewOf(bytes).getFloat32(84 + 50 * number + 4 * i, true));
}

describe('writeStl', () => {
  // M. Burns, Automated Fabrication, section 6.5 (fabbers.com/tech/STL_Format): 80 bytes of header, a 4-byte unsigned
  // count, then for each facet twelve 4-byte floats and a 2-byte attribute count that should be zero, little-endian.
  it('lays the bytes out as the published format says', () => {
    const bytes = writeStl(cube(), 'cube');
    expect(bytes.length).toBe(84 + 12 * 50);
    expect([...bytes.subarray(80, 84)]).toEqual([12, 0, 0, 0]);
    for (let i = 0; i < 12; i++) expect(viewOf(bytes).getUint16(84 + 50 * i + 48, true), `attribute ${i}`).toBe(0);
    expect(facet(bytes, 0)).toEqual([-1, 0, 0, 0, 0, 0, 0, 0, 10, 0, 10, 10]);
  });

  it('writes a known facet byte by byte (float32 patterns of IEEE 754: 1 is 3f800000, 2 is 40000000)', () => {
    const bytes = writeStl(
      meshOf(
        [
          [0, 0, 0],
          [1, 0, 0],
          [0, 2, 0],
        ],
        [[0, 1, 2]],
      ),
      '',
    );
    const one = [0, 0, 0x80, 0x3f];
    const two = [0, 0, 0, 0x40];
    const zeros = (count: number): number[] => new Array<number>(4 * count).fill(0);
    const expected = [...zeros(2), ...one, ...zeros(3), ...one, ...zeros(3), ...two, ...zeros(1), 0, 0];
    expect([...bytes.subarray(84)]).toEqual(expected);
  });

  it('begins the header with Goniolith, in printable ASCII of exactly 80 bytes', () => {
    expect(header('Quartz, SiO\u2082')).toBe('Goniolith Quartz, SiO2'.padEnd(80));
    expect(header('x'.repeat(200))).toBe(`Goniolith ${'x'.repeat(70)}`);
    expect(header('')).toBe('Goniolith'.padEnd(80));
    expect(header('solid')).toMatch(/^Goniolith /);
  });

  it('spells a title in ASCII: overbars as minus signs, accents dropped, the rest marked', () => {
    expect(header('4\u03053m K\u00f6ln\n\u2013 CaSO\u2084\u00b72H\u2082O \u77f3').trimEnd()).toBe(
      'Goniolith -43m Koln - CaSO4.2H2O ?',
    );
  });

  // Readers such as three's STLLoader look for COLOR= in the header and then take the attributes for colours.
  it('leaves no COLOR= in the header', () => {
    expect(header('COLOR=abcd MATERIAL=efgh')).not.toContain('=');
  });

  it('gives unit normals by the right-hand rule: those of an octahedron are (±1, ±1, ±1)/√3', () => {
    const mesh = octahedron(7);
    const bytes = writeStl(mesh, '');
    for (let i = 0; i < 8; i++) {
      const [x, y, z, ...corners] = facet(bytes, i);
      const outward = [0, 1, 2].map((axis) => Math.sign(corners[axis]! + corners[3 + axis]! + corners[6 + axis]!));
      expect([x, y, z]).toEqual(outward.map((sign) => Math.fround(sign / Math.sqrt(3))));
    }
  });

  it('computes normals of slivers and of far small facets in double', () => {
    // (0, -h, w) × … by hand: the triangle (0,0,0), (1,0,0), (1,e,e) has the normal (0, -1, 1)/√2 for any e > 0.
    const e = 2 ** -60;
    const half = Math.fround(Math.SQRT1_2);
    expect(
      facet(
        writeStl(
          meshOf(
            [
              [0, 0, 0],
              [1, 0, 0],
              [1, e, e],
            ],
            [[0, 1, 2]],
          ),
          '',
        ),
        0,
      ).slice(0, 3),
    ).toEqual([0, -half, half]);
  });

  it('writes no negative zero and no NaN, not even for a facet without area', () => {
    const flat = meshOf(
      [
        [-0, -0, -0],
        [-1, 0, 0],
        [-2, 0, -1e-60],
      ],
      [
        [0, 1, 2],
        [2, 1, 0],
      ],
    );
    const bytes = writeStl(flat, '');
    for (const number of [0, 1]) for (const value of facet(bytes, number)) expect(Object.is(value, -0)).toBe(false);
    expect(facet(bytes, 0).slice(0, 3)).toEqual([0, 0, 0]);
  });

  it('gives the same bytes for the same mesh', () => {
    expect(writeStl(octahedron(3), 'a')).toEqual(writeStl(octahedron(3), 'a'));
  });

  it('refuses an empty mesh and an unsound one, small or large', () => {
    expect(() => writeStl(meshOf([], []), '')).toThrow(/no triangle to write/);
    for (const mesh of [cube(), torus(30, 10, 200, 200)]) {
      const holed = { ...mesh, positions: mesh.positions.map((v, i) => (i === 7 ? Number.NaN : v)) };
      expect(() => writeStl(holed, '')).toThrow(/y coordinate of vertex 2/);
      const astray = { ...mesh, triangles: mesh.triangles.map((v, i) => (i === 5 ? 4_000_000_000 : v)) };
      expect(() => writeStl(astray, '')).toThrow(/Triangle 1 names vertex 4000000000/);
    }
  });
});

describe('the assembled loops', () => {
  const fill = (mesh: Mesh, how: (bytes: Uint8Array, mesh: Mesh) => unknown) => {
    const bytes = new Uint8Array(84 + (50 * mesh.triangles.length) / 3);
    return { answer: how(bytes, mesh), bytes };
  };

  it('write the same bytes as those in TypeScript, across blocks', () => {
    const ring = torus(30.1, 9.7, 101, 83); // 16,766 facets: not a multiple of the block
    const shapes = [
      cube(),
      weldFloat32(ring),
      ring,
      meshOf(
        [
          [-0, 0, -1e-60],
          [1, -0, 0],
          [0, 1, 0],
        ],
        [[0, 1, 2]],
      ),
    ];
    for (const mesh of shapes) {
      const assembled = fill(mesh, fillFacetsAssembled);
      expect(assembled.answer).toBe(true);
      expect(Buffer.compare(assembled.bytes, fill(mesh, fillFacets).bytes)).toBe(0);
    }
  });

  it('leave unsound meshes alone', () => {
    expect(
      fill(
        meshOf(
          [
            [0, 0, 0],
            [1e39, 0, 0],
            [0, 1, 0],
          ],
          [[0, 1, 2]],
        ),
        fillFacetsAssembled,
      ).answer,
    ).toBe(false);
    expect(
      fill(
        meshOf(
          [
            [0, 0, 0],
            [1, 0, 0],
            [0, 1, 0],
          ],
          [[0, 1, 3]],
        ),
        fillFacetsAssembled,
      ).answer,
    ).toBe(false);
  });
});
