import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { FileError } from '../../../src/files/file-error.ts';
import { weldFloat32 } from '../../../src/files/mesh/weld.ts';
import { cube, meshOf, octahedron, unwelded } from '../shapes.ts';

describe('weldFloat32', () => {
  it('makes eight vertices of the 36 of an unwelded cube, and keeps its twelve triangles', () => {
    const welded = weldFloat32(unwelded(cube()));
    expect(welded.positions.length / 3).toBe(8);
    expect(welded.triangles.length / 3).toBe(12);
  });

  it('joins -0 and 0, which admesh 0.98.4 takes for different places (observed)', () => {
    const mixed = unwelded(cube());
    for (let i = 0; i < mixed.positions.length; i += 2) if (mixed.positions[i] === 0) mixed.positions[i] = -0;
    const welded = weldFloat32(mixed);
    expect(welded.positions.length / 3).toBe(8);
    expect([...welded.positions].some((value) => Object.is(value, -0))).toBe(false);
  });

  it('rounds what underflows to zero without a sign', () => {
    const mesh = meshOf(
      [
        [-1e-60, 0, 0],
        [1, 0, 0],
        [0, 1, 0],
      ],
      [[0, 1, 2]],
    );
    expect(Object.is(weldFloat32(mesh).positions[0], 0)).toBe(true);
  });

  it('joins what is one float32, keeps apart what is two, and leaves out triangles that collapse', () => {
    const near = 10 + 2 ** -25; // a float32 step at 10 is 2^-20 (IEEE 754: 24 digits)
    const next = 10 + 2 ** -20;
    const vertices = [
      [0, 0, 0],
      [10, 0, 0],
      [near, 0, 0],
      [next, 0, 0],
      [0, 5, 0],
    ] as const;
    const welded = weldFloat32(
      meshOf(vertices, [
        [0, 1, 4],
        [1, 2, 4],
        [2, 3, 4],
      ]),
    );
    expect([...welded.triangles]).toEqual([0, 1, 3, 1, 2, 3]);
    expect([...welded.positions]).toEqual([0, 0, 0, 10, 0, 0, next, 0, 0, 0, 5, 0]);
  });

  it('leaves out vertices that no triangle uses', () => {
    const mesh = meshOf(
      [
        [7, 7, 7],
        [0, 0, 0],
        [1, 0, 0],
        [0, 1, 0],
      ],
      [[1, 2, 3]],
    );
    expect([...weldFloat32(mesh).positions]).toEqual([0, 0, 0, 1, 0, 0, 0, 1, 0]);
  });

  it('changes nothing the second time, whatever the mesh', () => {
    const coordinate = fc.constantFrom(0, -0, 1, 1 + 2 ** -30, 2, -1.5, 1e-50);
    const mesh = fc.array(fc.array(coordinate, { minLength: 9, maxLength: 9 }), { maxLength: 12 }).map((facets) => ({
      positions: Float64Array.from(facets.flat()),
      triangles: Uint32Array.from({ length: 3 * facets.length }, (_, i) => i),
    }));
    fc.assert(
      fc.property(mesh, (some) => {
        const once = weldFloat32(some);
        expect(weldFloat32(once)).toEqual(once);
        const places = new Set<string>();
        for (let i = 0; i < once.positions.length; i += 3) places.add(String(once.positions.slice(i, i + 3)));
        expect(places.size, 'as many places as vertices').toBe(once.positions.length / 3);
      }),
    );
  });

  it('refuses what no file can hold, and says where', () => {
    const far = octahedron(1);
    far.positions[4] = 1e39; // the greatest float32 is 3.4e38
    expect(() => weldFloat32(far)).toThrow(/y coordinate of vertex 1/);
    const wrong = { ...octahedron(1), triangles: Uint32Array.of(0, 1, 6) };
    expect(() => weldFloat32(wrong)).toThrow(FileError);
    expect(() => weldFloat32(wrong)).toThrow(/names vertex 6 .*, but the mesh has only 6 vertices/);
  });
});
