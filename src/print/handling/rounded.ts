import { type Measures, measure } from '../../polyhedron/measures.ts';
import { intersect, type Solid } from '../../polyhedron/solid.ts';
import { ObjectError } from '../../shape/object-error.ts';
import { planesOf } from '../../shape/planes.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import type { Mesh } from '../mesh.ts';
import { withoutShortEdges } from '../short-edges.ts';
import { crystalSurfaces } from '../surfaces.ts';
import { angleBetween, plus, type Vector, vectorAt } from '../vectors.ts';
import { BLUNTED, type BluntBody, lostFaces } from './bevelled.ts';
import { between, sphereCap } from './cap.ts';

/**
 * Millimetres; taken when rounding is asked for without a radius. Such a corner reaches 0.20 mm into the point gauge.
 */
export const USUAL_RADIUS = 0.75;

/** Millimetres between a true rounding and its triangles. */
const CHORD_ERROR = 0.02;
/** Where the chord error would need more, it is given up first. */
const MOST_TRIANGLES = 20_000;
/** Millimetres; far below what any printer resolves, and what single precision still tells apart. */
const SHORTEST_EDGE = 0.001;

export interface RoundedBody extends BluntBody {
  readonly radius: number;
  /** Largest distance between the true rounding and the mesh that was aimed at, millimetres. */
  readonly chordError: number;
}

/**
 * The crystal with edges and corners rounded: the polyhedron whose planes are moved in by the radius, and everything
 * within the radius of it (their Minkowski sum). Flat faces stay in their planes; edges are cylinders, corners spheres.
 * @param radius millimetres
 * @throws ObjectError when the radius is not positive or reaches the crystal's inscribed sphere
 */
export function roundedBody(
  shape: ClosedShape,
  scale: number,
  { radius = USUAL_RADIUS }: { readonly radius?: number } = {},
): RoundedBody {
  const most = shape.measures.inscribedRadius * scale;
  if (!(radius > 0 && radius < most))
    throw new ObjectError(
      'size',
      `a rounding radius of ${radius} mm does not fit the crystal, which has room for less than ${most.toFixed(2)} mm`,
      'choose a smaller radius or a larger crystal',
    );
  const inner = innerPolyhedron(shape, scale, radius);
  let error = CHORD_ERROR;
  let mesh = roundedMesh(inner, radius, error, shape.crystal.forms.length);
  while (mesh.triangles.length > 3 * MOST_TRIANGLES && error < radius) {
    error *= 1.5;
    mesh = roundedMesh(inner, radius, error, shape.crystal.forms.length);
  }
  const [before, after] = [shape.measures.faces.length, inner.measures.faces.length];
  return {
    mesh: withoutShortEdges(mesh, SHORTEST_EDGE),
    surfaces: crystalSurfaces(shape.crystal, BLUNTED),
    radius,
    chordError: error,
    remarks: [
      `Edges and corners are rounded with a radius of ${radius} mm: the roundings are no crystal faces.`,
      ...lostFaces(before - after, before),
    ],
  };
}

interface Inner {
  readonly solid: Solid;
  readonly measures: Measures;
  /** Millimetres. */
  readonly positions: Float64Array;
}

/** Through the exact kernel, with the crystal's symmetry. */
function innerPolyhedron({ crystal }: ClosedShape, scale: number, radius: number): Inner {
  const forms = crystal.forms.map((form) => ({ ...form, distance: form.distance - radius / scale }));
  const solid = intersect(planesOf({ ...crystal, forms }));
  const measures = measure(solid, crystal.metric.frame.flat());
  return { solid, measures, positions: measures.positions.map((value) => value * scale) };
}

/**
 * A triangle with edges up to L on a sphere lies up to `r (1 − cos(L/√3))` inside it; a cap's edges are shorter than
 * √3 steps.
 */
function roundedMesh(inner: Inner, radius: number, error: number, blunted: number): Mesh {
  const step = Math.acos(Math.max(0, 1 - error / radius));
  const builder = new RoundedBuilder(inner, radius, step);
  builder.corners();
  const caps = builder.triangles.length / 3;
  const flat = builder.flatFaces();
  builder.strips();
  const surface = new Uint16Array(builder.triangles.length / 3).fill(blunted);
  surface.set(flat, caps);
  return {
    positions: Float64Array.from(builder.points),
    triangles: Uint32Array.from(builder.triangles),
    surface,
  };
}

class RoundedBuilder {
  readonly points: number[] = [];
  readonly triangles: number[] = [];
  /** The points on the rim of a corner's cap from one face's normal to the next one's, by corner and first face. */
  private readonly rims = new Map<string, number[]>();

  constructor(
    private readonly inner: Inner,
    private readonly radius: number,
    private readonly step: number,
  ) {}

  /** A cap on every vertex of the inner polyhedron; its rim is kept for the strips and faces beside it. */
  corners(): void {
    const { positions, measures } = this.inner;
    this.facesAround().forEach((faces, vertex) => {
      const normals = faces.map((face) => vectorAt(measures.normals, face));
      const arcs = normals.map((normal, i) => this.arc(normal, normals[(i + 1) % normals.length]!));
      const { directions, triangles } = sphereCap(arcs, this.step);
      const first = this.points.length / 3;
      for (const direction of directions)
        this.points.push(...plus(vectorAt(positions, vertex), direction, this.radius));
      for (const point of triangles) this.triangles.push(first + point);
      const rim = arcs.flat().length;
      let place = 0;
      arcs.forEach((arc, i) => {
        const points = Array.from({ length: arc.length + 1 }, (_, k) => first + ((place + k) % rim));
        this.rims.set(`${vertex} ${faces[i]!}`, points);
        place += arc.length;
      });
    });
  }

  /** The faces, moved out to the crystal's own planes. Returns the form of each triangle. */
  flatFaces(): number[] {
    const { solid, measures } = this.inner;
    return measures.faces.flatMap((face) => {
      const corners = Array.from(solid.corner.subarray(solid.start[face], solid.start[face + 1]), (vertex) => {
        return this.rim(vertex, face)[0]!;
      });
      for (let i = 1; i + 1 < corners.length; i++) this.triangles.push(corners[0]!, corners[i]!, corners[i + 1]!);
      return corners.slice(2).map(() => solid.planes.form[face]!);
    });
  }

  /** The cylinder along every edge. */
  strips(): void {
    const { start, neighbour, corner } = this.inner.solid;
    for (let face = 0; face + 1 < start.length; face++)
      for (let edge = start[face]!; edge < start[face + 1]!; edge++) {
        if (neighbour[edge]! < face) continue;
        const from = corner[edge === start[face] ? start[face + 1]! - 1 : edge - 1]!;
        const end = this.rim(corner[edge]!, face);
        const begin = [...this.rim(from, neighbour[edge]!)].reverse();
        for (let i = 0; i + 1 < end.length; i++) {
          this.triangles.push(end[i]!, begin[i]!, begin[i + 1]!);
          this.triangles.push(end[i]!, begin[i + 1]!, end[i + 1]!);
        }
      }
  }

  private rim(vertex: number, face: number): readonly number[] {
    return this.rims.get(`${vertex} ${face}`)!;
  }

  private arc(from: Vector, to: Vector): Vector[] {
    const pieces = Math.max(1, Math.ceil(angleBetween(from, to) / this.step));
    return Array.from({ length: pieces }, (_, i) => between(from, to, i / pieces));
  }

  /** For each vertex its faces, counter-clockwise seen from outside: past the edge that comes in lies the next face. */
  private facesAround(): number[][] {
    const { solid, positions } = this.inner;
    const next: Map<number, number>[] = Array.from({ length: positions.length / 3 }, () => new Map());
    for (let face = 0; face + 1 < solid.start.length; face++)
      for (let edge = solid.start[face]!; edge < solid.start[face + 1]!; edge++)
        next[solid.corner[edge]!]!.set(face, solid.neighbour[edge]!);
    return next.map((following) => {
      const first = Math.min(...following.keys());
      const faces = [first];
      for (let face = following.get(first)!; face !== first; face = following.get(face)!) faces.push(face);
      return faces;
    });
  }
}
