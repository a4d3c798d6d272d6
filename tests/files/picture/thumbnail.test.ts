import { crc32, inflateSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { crc32 as ours } from '../../../src/files/picture/crc32.ts';
import { drawnEdges, flatFaces } from '../../../src/files/picture/flat-faces.ts';
import { thumbnailPng } from '../../../src/files/picture/thumbnail.ts';
import type { Mesh } from '../../../src/print/mesh.ts';
import { cube, octahedron, together, torus } from '../shapes.ts';

const RED = [{ name: 'a', colour: '#FF0000' }];
const FRONT = [1, 0, 0] as const;

/** Pixels of a PNG, RGBA, read by the W3C specification with Node's zlib; only filter "up" and 8-bit RGBA. */
function decode(png: Uint8Array): { size: number; at: (x: number, y: number) => number[] } {
  expect([...png.slice(0, 8)]).toEqual([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);
  const view = new DataView(png.buffer, png.byteOffset);
  const chunks: [string, Uint8Array][] = [];
  for (let at = 8; at < png.length; ) {
    const length = view.getUint32(at);
    const body = png.subarray(at + 4, at + 8 + length);
    expect(view.getUint32(at + 8 + length)).toBe(crc32(body));
    chunks.push([String.fromCharCode(...body.subarray(0, 4)), body.subarray(4)]);
    at += 12 + length;
  }
  expect(chunks.map(([type]) => type)).toEqual(['IHDR', 'IDAT', 'IEND']);
  const header = chunks[0]![1];
  const size = new DataView(header.buffer, header.byteOffset).getUint32(0);
  expect([...header.subarray(8)]).toEqual([8, 6, 0, 0, 0]);
  const lines = inflateSync(chunks[1]![1]);
  expect(lines.length).toBe(size * (4 * size + 1));
  for (let y = 1; y < size; y++)
    for (let x = 1; x <= 4 * size; x++) {
      const at = y * (4 * size + 1) + x;
      lines[at] = lines[at]! + lines[at - 4 * size - 1]!;
    }
  return { size, at: (x, y) => [...lines.subarray(y * (4 * size + 1) + 1 + 4 * x).subarray(0, 4)] };
}

describe('thumbnailPng', () => {
  it('shows a cube from the front as a square in its colour with dark edges on a see-through ground', () => {
    const { size, at } = decode(thumbnailPng([{ mesh: cube(10), surfaces: RED }], { toward: FRONT }));
    expect(size).toBe(256);
    const [red, green, blue, alpha] = at(128, 128);
    expect(alpha).toBe(255);
    expect(red! - Math.max(green!, blue!)).toBeGreaterThan(150);
    for (const corner of [0, 255]) expect(at(corner, corner)[3]).toBe(0);
    const edge = Math.floor(256 * 0.05); // the margin
    expect(Math.max(...at(edge, 128).slice(0, 3))).toBeLessThan(90);
    expect(at(edge + 4, 128)).toEqual([red, green, blue, 255]);
    expect(at(edge - 4, 128)[3]).toBe(0);
  });

  it('shows z upwards and, from the front, y to the right', () => {
    const mesh = together(cube(10), cube(2, [4, 20, 18]));
    const surface = Uint16Array.from({ length: 24 }, (_, t) => (t < 12 ? 0 : 1));
    const surfaces = [...RED, { name: 'b', colour: '#0000FF' }];
    const { at } = decode(thumbnailPng([{ mesh: { ...mesh, surface }, surfaces }], { toward: FRONT }));
    const [lowLeft, highRight] = [at(60, 190), at(233, 34)];
    expect(lowLeft[0]).toBeGreaterThan(lowLeft[2]! + 100);
    expect(highRight[2]).toBeGreaterThan(highRight[0]! + 100);
  });

  it('hides what is behind, edges too', () => {
    const surfaces = [...RED, { name: 'b', colour: '#0000FF' }];
    const front = { mesh: cube(10), surfaces };
    const behind = { mesh: cube(4, [-9, 3, 3]), surfaces: surfaces.slice(1) };
    const alone = thumbnailPng([front], { toward: FRONT });
    expect(thumbnailPng([front, behind], { toward: FRONT })).toEqual(alone);
    expect(thumbnailPng([behind, front], { toward: FRONT })).toEqual(alone);
    expect(thumbnailPng([front, behind], { toward: [-1, 0, 0] })).not.toEqual(alone);
  });

  it('fills the ground when asked, at any size, and looks straight down too', () => {
    const { size, at } = decode(
      thumbnailPng([{ mesh: octahedron(5), surfaces: RED }], { toward: [0, 0, 1], size: 32, ground: '#F7F5EF' }),
    );
    expect(size).toBe(32);
    expect(at(0, 0)).toEqual([0xf7, 0xf5, 0xef, 255]);
    expect(at(10, 12)[3]).toBe(255);
  });

  it('gives the same bytes each time', () => {
    const objects = () => [{ mesh: torus(30, 10, 40, 20), surfaces: RED }];
    expect(thumbnailPng(objects(), { toward: [3, 1, 1] })).toEqual(thumbnailPng(objects(), { toward: [3, 1, 1] }));
  });
});

describe('crc32', () => {
  it('agrees with zlib', () => {
    for (const length of [0, 1, 9, 1000]) {
      const bytes = Uint8Array.from({ length }, (_, i) => (i * i * 31) % 251);
      expect(ours(bytes)).toBe(crc32(bytes));
    }
    expect(ours(new TextEncoder().encode('123456789'))).toBe(0xcbf43926); // the usual check value
  });
});

describe('flatFaces', () => {
  it('finds the six faces and twelve edges of a cube, the eight and twelve of an octahedron', () => {
    for (const [mesh, faces] of [
      [cube(10), 6],
      [octahedron(4), 8],
    ] as const) {
      const { faceOf, normals, creases, sides, order } = flatFaces(mesh);
      expect([new Set(faceOf).size, normals.length / 3, creases.length / 2]).toEqual([faces, faces, 12]);
      expect([...order].sort((a, b) => a - b)).toEqual([...faceOf.keys()]);
      for (let k = 0; k < sides.length; k += 2) expect(sides[k]).not.toBe(sides[k + 1]);
      for (let f = 0; f < normals.length; f += 3) expect(Math.hypot(...normals.slice(f, f + 3))).toBeCloseTo(1, 12);
    }
  });

  it('gives a sliver the normal of the face that it lies in', () => {
    // A square pyramid whose base has an extra vertex a hair off one of its edges' lines, in the base's plane.
    const mesh = {
      positions: Float64Array.from([0, 0, 0, 10, 0, 0, 10, 10, 0, 0, 10, 0, 5, 5, 8, 5, 1e-12, 0]),
      triangles: Uint32Array.from([0, 3, 2, 0, 2, 1, 0, 1, 5, 0, 5, 4, 5, 1, 4, 1, 2, 4, 2, 3, 4, 3, 0, 4]),
    };
    const { faceOf, normals } = flatFaces(mesh);
    expect(faceOf[2]).toBe(faceOf[1]);
    expect(normals.slice(3 * faceOf[1]!, 3 * faceOf[1]! + 3)).toEqual(Float64Array.from([0, 0, -1]));
  });

  it('keeps surfaces apart that are flush, without an edge line between them', () => {
    const { faceOf, creases } = flatFaces({
      ...cube(10),
      surface: Uint16Array.from([0, 1, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0]),
    });
    expect(faceOf[0]).not.toBe(faceOf[1]);
    expect(creases.length / 2).toBe(12);
  });

  it('draws no lines along a rod that is told to be round, but its rims', () => {
    const mesh = prism(24);
    const faces = flatFaces(mesh);
    const edges = (curved: boolean) => drawnEdges(faces, [{ ...RED[0]!, curved }]).creases.length / 2;
    expect([edges(false), edges(true)]).toEqual([72, 48]);
  });
});

/** An upright prism over a regular polygon. */
function prism(n: number): Mesh {
  const positions: number[] = [];
  const triangles: number[] = [];
  for (let i = 0; i < n; i++) {
    const [x, y] = [Math.cos((2 * Math.PI * i) / n), Math.sin((2 * Math.PI * i) / n)];
    positions.push(x, y, 0, x, y, 5);
    const [a, b] = [2 * i, 2 * ((i + 1) % n)];
    triangles.push(a, b, b + 1, a, b + 1, a + 1);
    if (i > 0 && i < n - 1) triangles.push(0, b, a, 1, a + 1, b + 1);
  }
  return { positions: Float64Array.from(positions), triangles: Uint32Array.from(triangles) };
}
