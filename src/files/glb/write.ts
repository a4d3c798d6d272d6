import { Document, type Material, type TypedArray, VertexLayout, WebIO } from '@gltf-transform/core';
import type { Mesh } from '../../print/mesh.ts';
import { assertFinite, assertNotEmpty, assertWholeMesh } from '../mesh/sound-mesh.ts';
import { channels, linear } from '../picture/colour.ts';
import { drawnEdges, flatFaces, type SeenSurface } from '../picture/flat-faces.ts';
import { edgesOf, facesOf } from './geometry.ts';

/** One body of a scene, where it is to stand. */
export interface GlbObject {
  readonly name: string;
  /** Millimetres, Z up. */
  readonly mesh: Mesh;
  /** What the numbers in the mesh's `surface` mean; without these numbers all is the first surface. Never empty. */
  readonly surfaces: readonly SeenSurface[];
}

export interface GlbModel {
  readonly title: string;
  /** Program and version. */
  readonly application: string;
  readonly objects: readonly GlbObject[];
  /** Colour of the edge lines, #RRGGBB. */
  readonly ink?: string;
}

/** Printed plastic, neither polished nor chalky. */
const ROUGHNESS = 0.8;
/** glTF 2.0, meshes: the mode of a primitive whose indices are pairs. */
const LINES = 1;
const INK = '#1D2333';

/**
 * A binary glTF 2.0 file: metres, Y up, so that (x, y, z) mm becomes (x, z, -y)/1000. Faces are flat, each surface a
 * primitive with a colour of its own; a further primitive of lines has the edges. The same model gives the same bytes.
 * @throws FileError `empty`, `badMesh`, `notFinite`
 */
export async function writeGlb({ title, application, objects, ink = INK }: GlbModel): Promise<Uint8Array> {
  const document = new Document();
  document.getRoot().getAsset().generator = application;
  document.createBuffer();
  const scene = document.createScene(title);
  document.getRoot().setDefaultScene(scene);
  const paint = painter(document);
  for (const { name, mesh, surfaces } of objects) {
    assertWholeMesh(mesh);
    assertFinite(mesh.positions);
    assertNotEmpty(mesh);
    const faces = flatFaces(mesh);
    const body = document.createMesh(name);
    surfaces.forEach((surface, number) => {
      const { positions, normals, indices } = facesOf(mesh, faces, number);
      if (indices.length === 0) return;
      const primitive = document
        .createPrimitive()
        .setMaterial(paint(surface.name, surface.colour))
        .setName(surface.name);
      primitive.setAttribute('POSITION', accessor(document, positions, 'VEC3'));
      primitive.setAttribute('NORMAL', accessor(document, normals, 'VEC3'));
      body.addPrimitive(primitive.setIndices(accessor(document, indices, 'SCALAR')));
    });
    const { positions, indices } = edgesOf(mesh, drawnEdges(faces, surfaces));
    if (indices.length > 0) {
      const lines = document.createPrimitive().setMode(LINES).setMaterial(paint('edges', ink));
      lines.setName('edges').setAttribute('POSITION', accessor(document, positions, 'VEC3'));
      body.addPrimitive(lines.setIndices(accessor(document, indices, 'SCALAR')));
    }
    scene.addChild(document.createNode(name).setMesh(body));
  }
  return new WebIO().setVertexLayout(VertexLayout.SEPARATE).writeBinary(document);
}

const accessor = (document: Document, array: TypedArray, type: 'VEC3' | 'SCALAR') =>
  document.createAccessor().setType(type).setArray(array);

/** Materials by name and colour, each made once. */
function painter(document: Document): (name: string, colour: string) => Material {
  const made = new Map<string, Material>();
  return (name, colour) => {
    const key = `${colour} ${name}`;
    const material = made.get(key) ?? document.createMaterial(name);
    made.set(key, material);
    const [red, green, blue] = channels(colour);
    material.setBaseColorFactor([linear(red), linear(green), linear(blue), 1]);
    return material.setMetallicFactor(0).setRoughnessFactor(ROUGHNESS);
  };
}
