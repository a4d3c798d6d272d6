import { edges, measure } from '../../polyhedron/measures.ts';
import { exactOffsets } from '../../polyhedron/offset.ts';
import { loosePlanes } from '../../polyhedron/planes.ts';
import { intersect } from '../../polyhedron/solid.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { crystalMesh } from '../body.ts';
import type { Mesh } from '../mesh.ts';
import { dot, type Vector, vectorAt } from '../vectors.ts';

/** Sine below which a face counts as upright, far below any angle between lattice planes in use. */
const UPRIGHT = 1e-9;

interface Wall {
  /** In the basis of the crystal's planes. */
  readonly normal: Vector;
  /** In the crystal's own unit of length, times the normal's length. */
  readonly offset: number;
  /** Length of the normal in Cartesian units. */
  readonly length: number;
}

/**
 * The room that a crystal needs to be lifted straight up out of a block: within its lower and its upright faces, and
 * within the upright planes through its silhouette, each moved out by the clearance. All bounds look downwards or
 * sideways, so the room is as wide above as below and nothing can catch.
 * @param up unit vector in the crystal's frame; `top` how far along it the room reaches, millimetres from the centre
 * @returns a mesh in the crystal's frame, millimetres
 */
export function liftRoom(shape: ClosedShape, scale: number, up: Vector, clearance: number, top: number): Mesh {
  const lid: Wall = { normal: toBasis(shape, up), offset: top / scale, length: 0 };
  const walls = [...lowerFaces(shape, up), ...silhouette(shape, up)];
  const all = [...walls.map((wall) => ({ ...wall, offset: wall.offset + (clearance / scale) * wall.length })), lid];
  const normals = Float64Array.from(all.flatMap(({ normal }) => [...normal]));
  const solid = intersect(loosePlanes(normals, exactOffsets(all.map(({ offset }) => offset))));
  return crystalMesh({ ...shape, solid, measures: measure(solid, shape.crystal.metric.frame.flat()) }, scale);
}

function lowerFaces({ solid, measures }: ClosedShape, up: Vector): Wall[] {
  return measures.faces
    .filter((face) => dot(vectorAt(measures.normals, face), up) <= UPRIGHT)
    .map((face) => {
      const offset = solid.planes.offsets[solid.planes.form[face]!]!.approximate;
      return { normal: vectorAt(solid.planes.normals, face), offset, length: offset / measures.distance[face]! };
    });
}

/** Upright planes through the edges at which the crystal's surface turns from looking down to looking up. */
function silhouette(shape: ClosedShape, up: Vector): Wall[] {
  const { solid, measures } = shape;
  const walls: Wall[] = [];
  for (const edge of edges(solid, measures)) {
    const [a, b] = [vectorAt(measures.normals, edge.faces[0]), vectorAt(measures.normals, edge.faces[1])];
    const [upA, upB] = [dot(a, up), dot(b, up)];
    if (Math.min(upA, upB) >= -UPRIGHT || Math.max(upA, upB) <= UPRIGHT) continue;
    const sense = Math.sign(upB - upA);
    const across = (i: 0 | 1 | 2): number => sense * (a[i] * upB - b[i] * upA);
    const sideways: Vector = [across(0), across(1), across(2)];
    const length = Math.hypot(...sideways);
    const outward: Vector = [sideways[0] / length, sideways[1] / length, sideways[2] / length];
    const offset = dot(outward, vectorAt(measures.positions, edge.vertices[0]));
    walls.push({ normal: toBasis(shape, outward), offset, length: 1 });
  }
  return walls.filter((wall, i) => !walls.slice(0, i).some((other) => isSame(wall, other)));
}

/** A Cartesian direction as a row in the basis of the crystal's planes. */
function toBasis({ crystal }: ClosedShape, [x, y, z]: Vector): Vector {
  const [p, q, r] = crystal.metric.frame;
  return [x * p[0] + y * q[0] + z * r[0], x * p[1] + y * q[1] + z * r[1], x * p[2] + y * q[2] + z * r[2]];
}

/** Two edges of one upright plane give it twice, up to rounding. */
const isSame = (a: Wall, b: Wall): boolean =>
  Math.abs(a.offset - b.offset) < SAME * Math.abs(a.offset) &&
  a.normal.every((value, i) => Math.abs(value - b.normal[i]!) < SAME * Math.hypot(...a.normal));

const SAME = 1e-9;
