import type { Mesh } from '../../print/mesh.ts';
import { assertFinite, assertWholeMesh } from '../mesh/sound-mesh.ts';
import { measureBodies } from './bodies.ts';
import { examineEdges } from './edges.ts';
import { findJunctions } from './junctions.ts';
import { examineNormals } from './normals.ts';
import { problemsOf } from './problems.ts';
import type { Body, Extents, MeshReport } from './report.ts';
import { findTouching } from './touching.ts';
import { examineTriangles } from './triangles.ts';
import { examineVertices } from './vertices.ts';

export type { MeshReport, ProblemCode } from './report.ts';

/**
 * Whether a mesh bounds solids that can be printed, and everything that is wrong with it. Check what will be written
 * (after `weldFloat32`) or what was read; nothing is repaired. Vertices are joined by their numbers; whether triangles
 * cross is decided exactly at the given coordinates.
 * @param mesh millimetres, triangles counter-clockwise seen from outside.
 * @param storedNormals the normals that came with the file, three numbers a triangle.
 * @throws FileError `badMesh` for unknown vertex numbers, `notFinite` for coordinates that are no finite numbers.
 */
export function checkMesh(mesh: Mesh, storedNormals?: Float32Array): MeshReport {
  assertWholeMesh(mesh);
  assertFinite(mesh.positions);
  const vertices = examineVertices(mesh);
  const { collapsed, flat, degenerate, duplicate } = examineTriangles(mesh, vertices.same);
  const edges = examineEdges(mesh, collapsed);
  const { touching, counted } = findTouching(mesh, vertices.same, flat);
  const normals = storedNormals ? examineNormals(mesh, storedNormals, flat) : { wrong: 0, missing: 0 };
  const bodies = measureBodies(mesh, edges.bodies, edges.unpaired, collapsed);
  const facts = {
    triangles: collapsed.length,
    vertices: vertices.same.length,
    watertight: bodies.length > 0 && edges.open.count + edges.overused.count + edges.flipped.count === 0,
    openEdges: edges.open,
    overusedEdges: edges.overused,
    flippedEdges: edges.flipped,
    degenerateTriangles: degenerate,
    duplicateTriangles: duplicate,
    tJunctions: findJunctions(mesh, edges.openHalfEdges, vertices.same),
    coincidentVertices: vertices.coincident,
    negativeZeros: vertices.negativeZeros,
    pinchedVertices: edges.pinched,
    selfTouching: touching,
    selfTouchingCounted: counted,
    bodies,
    wrongNormals: normals.wrong,
    missingNormals: normals.missing,
    volume: bodies.reduce((sum, body) => sum + body.volume, 0),
    area: bodies.reduce((sum, body) => sum + body.area, 0),
    extents: extentsOf(bodies),
  };
  const problems = problemsOf(facts);
  return { ok: problems.length === 0, problems, ...facts };
}

function extentsOf(bodies: readonly Body[]): Extents {
  if (bodies.length === 0) return { min: [0, 0, 0], max: [0, 0, 0] };
  const least = (axis: number): number =>
    bodies.reduce((value, { extents }) => Math.min(value, extents.min[axis]!), Infinity);
  const most = (axis: number): number =>
    bodies.reduce((value, { extents }) => Math.max(value, extents.max[axis]!), -Infinity);
  return { min: [least(0), least(1), least(2)], max: [most(0), most(1), most(2)] };
}
