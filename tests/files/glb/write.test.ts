import { type Document, WebIO } from '@gltf-transform/core';
import { describe, expect, it } from 'vitest';
import { FileError } from '../../../src/files/file-error.ts';
import { writeGlb } from '../../../src/files/glb/write.ts';
import { make } from '../../../src/index.ts';
import { cube, torus } from '../shapes.ts';

const SURFACES = [
  { name: 'a', colour: '#86A5CD' },
  { name: 'b', colour: '#FFFFFF' },
];
const application = 'Goniolith 0.1.0';
const box = { ...cube(10, [5, 20, -3]), surface: Uint16Array.from([0, 0, 0, 0, 0, 0, 0, 0, 1, 1, 0, 0]) };
const glb = () => writeGlb({ title: 'Box', application, objects: [{ name: 'box', mesh: box, surfaces: SURFACES }] });
const opened = async (bytes: Uint8Array): Promise<Document> => new WebIO().readBinary(bytes);
const primitives = (document: Document) => document.getRoot().listMeshes()[0]!.listPrimitives();
/** The JSON chunk, the first of a GLB (glTF 2.0, "GLB File Format Specification"). */
const jsonOf = (bytes: Uint8Array) => {
  const length = new DataView(bytes.buffer, bytes.byteOffset).getUint32(12, true);
  return JSON.parse(new TextDecoder().decode(bytes.subarray(20, 20 + length)));
};

describe('writeGlb', () => {
  it('is in metres with Y up: (x, y, z) mm is (x, z, -y)/1000', async () => {
    const [first] = primitives(await opened(await glb()));
    const position = first!.getAttribute('POSITION')!;
    // Bounds by hand: x 5 to 15 mm, y 20 to 30 mm, z -3 to 7 mm.
    const near = (found: number[], wanted: number[]): void =>
      found.forEach((value, i) => {
        expect(value).toBeCloseTo(wanted[i]!, 8);
      });
    near(position.getMin([]), [0.005, -0.003, -0.03]);
    near(position.getMax([]), [0.015, 0.007, -0.02]);
  });

  it('states bounds that are the stored floats', async () => {
    const bytes = await glb();
    const json = jsonOf(bytes);
    const bounded = json.accessors.filter((one: { min?: number[] }) => one.min !== undefined);
    expect(bounded.length).toBeGreaterThanOrEqual(3);
    const document = await opened(bytes);
    for (const primitive of primitives(document)) {
      const position = primitive.getAttribute('POSITION')!;
      const low = position.getMinNormalized([]);
      expect(bounded.some((one: { min: number[] }) => String(one.min.map(Math.fround)) === String(low))).toBe(true);
    }
  });

  it('has a primitive for each surface, with flat faces that keep their winding, and one of edges', async () => {
    const document = await opened(await glb());
    const [a, b, edges, ...others] = primitives(document);
    expect(others).toEqual([]);
    expect([a!, b!, edges!].map((primitive) => primitive.getMode())).toEqual([4, 4, 1]);
    expect([a!, b!].map((primitive) => primitive.getIndices()!.getCount())).toEqual([30, 6]);
    expect([a!, b!].map((primitive) => primitive.getAttribute('POSITION')!.getCount())).toEqual([20, 4]);
    expect(edges!.getIndices()!.getCount()).toBe(2 * 12); // a cube has twelve edges
    expect(edges!.getAttribute('POSITION')!.getCount()).toBe(8);
    for (const primitive of [a!, b!]) {
      const [positions, normals] = ['POSITION', 'NORMAL'].map((name) => primitive.getAttribute(name)!);
      const indices = primitive.getIndices()!;
      for (let i = 0; i < indices.getCount(); i += 3) {
        const [p, q, r] = [0, 1, 2].map((k) => positions!.getElement(indices.getScalar(i + k), []));
        const [u, v] = [q!, r!].map((point) => point.map((value, k) => value - p![k]!));
        const across = [
          u![1]! * v![2]! - u![2]! * v![1]!,
          u![2]! * v![0]! - u![0]! * v![2]!,
          u![0]! * v![1]! - u![1]! * v![0]!,
        ];
        const length = Math.hypot(...across);
        for (let k = 0; k < 3; k++) {
          const normal = normals!.getElement(indices.getScalar(i + k), []);
          normal.forEach((value, axis) => {
            expect(value).toBeCloseTo(across[axis]! / length, 5);
          });
        }
      }
    }
  });

  it('has linear colours of dull plastic (IEC 61966-2-1)', async () => {
    const [a, b] = primitives(await opened(await glb())).map((primitive) => primitive.getMaterial()!);
    // 0x86/255 = 0.52549 is 0.23840 of linear light, 0xA5 0.37626, 0xCD 0.61050: worked by hand from the standard.
    const [red, green, blue, alpha] = a!.getBaseColorFactor();
    expect(red).toBeCloseTo(0.2384, 4);
    expect(green).toBeCloseTo(0.37626, 4);
    expect(blue).toBeCloseTo(0.6105, 4);
    expect(alpha).toBe(1);
    expect(b!.getBaseColorFactor()).toEqual([1, 1, 1, 1]);
    expect([a!.getMetallicFactor(), a!.getRoughnessFactor()]).toEqual([0, 0.8]);
  });

  it('names scene, nodes and primitives, and its generator', async () => {
    const bytes = await glb();
    const root = (await opened(bytes)).getRoot();
    expect([jsonOf(bytes).asset.generator, root.listScenes()[0]!.getName()]).toEqual([application, 'Box']);
    expect(root.listNodes().map((node) => node.getName())).toEqual(['box']);
  });

  it('has no edge lines between triangles of one face, nor where rods meet nothing', async () => {
    const { parts } = await make('fluorite');
    const objects = parts.map(({ name, mesh, surfaces }) => ({ name, mesh, surfaces }));
    const lines = primitives(await opened(await writeGlb({ title: 'F', application, objects }))).at(-1)!;
    const { positions, triangles } = parts[0]!.mesh;
    expect(lines.getAttribute('POSITION')!.getCount()).toBe(positions.length / 3);
    expect(lines.getIndices()!.getCount() / 2).toBeLessThanOrEqual(triangles.length / 2);
  });

  it('gives the same bytes each time', async () => {
    expect(await glb()).toEqual(await glb());
  });

  it('uses wider indices when there are many vertices', async () => {
    const mesh = torus(40, 12, 200, 100);
    const document = await opened(
      await writeGlb({ title: 'T', application, objects: [{ name: 't', mesh, surfaces: SURFACES }] }),
    );
    const [faces] = primitives(document);
    expect(faces!.getAttribute('POSITION')!.getCount()).toBeGreaterThan(65_535);
    expect(faces!.getIndices()!.getArray()).toBeInstanceOf(Uint32Array);
    expect(faces!.getIndices()!.getCount()).toBe(mesh.triangles.length);
  });

  it('refuses a mesh without triangles', async () => {
    const mesh = { positions: new Float64Array(9), triangles: new Uint32Array() };
    await expect(
      writeGlb({ title: 'T', application, objects: [{ name: 't', mesh, surfaces: SURFACES }] }),
    ).rejects.toThrow(FileError);
  });
});
