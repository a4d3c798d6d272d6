import { readdirSync } from 'node:fs';
import fc from 'fast-check';
import load from 'manifold-3d';
import { expect } from 'vitest';
import { normal } from '../../../src/crystal/cell.ts';
import { symmetryElements } from '../../../src/crystal/elements.ts';
import { checkMesh } from '../../../src/files/check/check.ts';
import type { MeshReport } from '../../../src/files/check/report.ts';
import { weldFloat32 } from '../../../src/files/mesh/weld.ts';
import { crystal, polyhedron } from '../../../src/index.ts';
import type { BodyParts } from '../../../src/print/bodies/body-parts.ts';
import { type Workbench, withSolids } from '../../../src/print/kit.ts';
import type { Mesh } from '../../../src/print/mesh.ts';
import { mm } from '../../../src/recipe/quantity.ts';
import type { RecipeInput } from '../../../src/recipe/schema.ts';
import { millimetresPerUnit } from '../../../src/shape/scale.ts';
import { type ClosedShape, isClosed } from '../../../src/shape/shape.ts';
import { crystals, runs } from '../../shape/random-crystals.ts';

/** A crystal at the size to print it, millimetres. */
export interface Sample {
  readonly name: string;
  readonly shape: ClosedShape;
  readonly scale: number;
}

export function sample(recipe: RecipeInput | string, longest = 60): Sample {
  const shape = polyhedron(crystal(recipe));
  if (!isClosed(shape)) throw new Error('a sample must close');
  const name = typeof recipe === 'string' ? recipe : JSON.stringify(recipe);
  return { name, shape, scale: millimetresPerUnit(shape, { kind: 'longest', length: mm(longest) }) };
}

export const cube = (longest = 60): Sample =>
  sample({ pointGroup: 'm-3m', forms: [{ face: '100', distance: 1 }] }, longest);

/** Two of three mineral presets, which is more than 60, in the order of their names. */
export const minerals = (): string[] =>
  readdirSync('presets/minerals')
    .map((file) => file.replace('.yaml', ''))
    .filter((_, i) => i % 3 !== 1);

/** Random crystals, the same in every run; more with GONIOLITH_RUNS. */
export const randomSamples = (count: number): Sample[] =>
  fc.sample(crystals, { numRuns: runs(count), seed: 20261201 }).map((recipe) => sample(recipe));

export const made = (make: (bench: Workbench) => BodyParts): Promise<BodyParts> => withSolids(make);

/** What the program tells the bodies that can choose. */
export const isSound = (mesh: Mesh): boolean => reportOf(mesh).ok;

const reports = new WeakMap<Mesh, MeshReport>();

function reportOf(mesh: Mesh): MeshReport {
  const known = reports.get(mesh) ?? checkMesh(weldFloat32(mesh));
  reports.set(mesh, known);
  return known;
}

/** Checks a mesh as a file would hold it. */
export function clean(mesh: Mesh, what: string): MeshReport {
  const report = reportOf(mesh);
  expect(report.problems, what).toEqual([]);
  return report;
}

/** A mirror plane where the group has one, else a plane askew to everything. */
export function cutNormal({ crystal: { group, metric } }: ClosedShape): readonly [number, number, number] {
  const [mirror] = symmetryElements(group).mirrorPlanes;
  return mirror ? normal(metric, mirror.plane) : [0.48, 0.6, 0.64];
}

let loading: ReturnType<typeof load> | undefined;

/** The boolean library, to measure gaps and overlaps with. */
export async function kit() {
  loading ??= load();
  const library = await loading;
  library.setup();
  const solid = ({ positions, triangles }: Mesh) =>
    new library.Manifold(
      new library.Mesh({ numProp: 3, vertProperties: Float32Array.from(positions), triVerts: triangles }),
    );
  return { solid };
}

export const lowest = (mesh: Mesh, axis: number): number =>
  mesh.positions.reduce((least, value, i) => (i % 3 === axis ? Math.min(least, value) : least), Infinity);
