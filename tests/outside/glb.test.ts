import { validateBytes } from 'gltf-validator';
import { describe, expect, it } from 'vitest';
import { PRESET_FOLDER } from '../../src/disk/preset-folder.ts';
import { writeGlb } from '../../src/files/glb/write.ts';
import { make } from '../../src/index.ts';
import { preset } from '../../src/recipe/shelf.ts';

/** The validator of the Khronos Group (npm gltf-validator) on our GLB files. */
const minerals = PRESET_FOLDER.list('minerals').flatMap((name) =>
  Object.keys(preset(PRESET_FOLDER, 'minerals', name)!.habits).map((habit) => `${name}/${habit}`),
);
const sample = minerals.filter((_, i) => i % Math.ceil(minerals.length / 60) === 0);
const rods = ['fused', 'separate'].map((fit) => `mineral: quartz\nprint: { size: 80, axes: { fit: ${fit} } }\n`);

async function glbOf(recipe: string): Promise<Uint8Array> {
  const { parts, shape } = await make(recipe);
  const objects = parts.flatMap(({ name, placed, surfaces }) => placed.map((mesh) => ({ name, mesh, surfaces })));
  return writeGlb({ title: shape.crystal.title, application: 'Goniolith 0.1.0', objects });
}

describe('the glTF validator', () => {
  it.each([...sample, ...rods])('has nothing to say of %s', async (recipe) => {
    const { issues, info } = await validateBytes(await glbOf(recipe));
    expect(issues.messages).toEqual([]);
    expect([issues.numErrors, issues.numWarnings, issues.numInfos, issues.numHints]).toEqual([0, 0, 0, 0]);
    expect(info.totalTriangleCount).toBeGreaterThan(3);
  });

  it('would find a normal that is not of unit length', async () => {
    const bytes = await glbOf('quartz');
    const view = new DataView(bytes.buffer, bytes.byteOffset);
    const binary = 20 + view.getUint32(12, true) + 8;
    const json = JSON.parse(new TextDecoder().decode(bytes.subarray(20, binary - 8)));
    const { NORMAL } = json.meshes[0].primitives[0].attributes;
    const { byteOffset = 0, bufferView } = json.accessors[NORMAL];
    view.setFloat32(binary + (json.bufferViews[bufferView].byteOffset ?? 0) + byteOffset, 2, true);
    expect((await validateBytes(bytes)).issues.numErrors).toBeGreaterThan(0);
  });
});
