import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimalFloat32 } from '../../../src/files/stl/decimal.ts';
import { readStl } from '../../../src/files/stl/read.ts';
import { writeStl, writeStlText } from '../../../src/files/stl/write.ts';
import { cube, meshOf, torus } from '../shapes.ts';

describe('writeStlText', () => {
  // The words and their order: M. Burns, Automated Fabrication, section 6.5 (fabbers.com/tech/STL_Format).
  it('writes the published grammar in lower case with spaces', () => {
    const text = writeStlText(
      meshOf(
        [
          [0, 0, 0],
          [1.5, 0, 0],
          [0, 0.1, 0],
        ],
        [[0, 1, 2]],
      ),
      'G\u00f6the 1',
    );
    expect(text).toBe(
      [
        'solid Gothe 1',
        '  facet normal 0 0 1',
        '    outer loop',
        '      vertex 0 0 0',
        '      vertex 1.5 0 0',
        '      vertex 0 0.1 0',
        '    endloop',
        '  endfacet',
        'endsolid Gothe 1',
        '',
      ].join('\n'),
    );
  });

  it('has no trailing space without a title', () => {
    expect(writeStlText(cube(), ' ').split('\n')[0]).toBe('solid');
  });

  it('holds the same numbers as the binary file', () => {
    const mesh = torus(3, 1, 9, 7);
    const text = readStl(new TextEncoder().encode(writeStlText(mesh, 'ring')));
    const binary = readStl(writeStl(mesh, 'ring'));
    expect(text.format).toBe('text');
    expect(text.mesh).toEqual(binary.mesh);
    expect(text.normals).toEqual(binary.normals);
  });
});

describe('decimalFloat32', () => {
  it.each([
    [0, '0'],
    [-0, '0'],
    [-1e-60, '0'],
    [0.1, '0.1'],
    [-2.5, '-2.5'],
    [100, '100'],
    [1 / 3, '0.33333334'], // 1/3 as float32 is 0.3333333432674…
    [16777216, '16777216'], // 2^24
    [1.5e-7, '0.00000015'],
    [1e10, '10000000000'],
    [2 ** -149, `0.${'0'.repeat(44)}1`], // the least float32, 1.4e-45
  ])('spells %f as %s', (value, text) => {
    expect(decimalFloat32(value)).toBe(text);
  });

  it('reads back as the same float32, without exponent, and no shorter one of its digits would do', () => {
    fc.assert(
      fc.property(fc.float({ noNaN: true, noDefaultInfinity: true }), (value) => {
        const text = decimalFloat32(value);
        expect(text).toMatch(/^-?\d+(\.\d*[1-9])?$/);
        expect(Math.fround(Number(text))).toBe(value + 0);
        const digits = text
          .replace(/^-?[0.]*/, '')
          .replace('.', '')
          .replace(/0+$/, '').length;
        if (digits > 1) expect(Math.fround(Number(value.toPrecision(digits - 1)))).not.toBe(value);
      }),
      { numRuns: 2000 },
    );
  });
});
