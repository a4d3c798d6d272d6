import { type Measures, measure } from '../../polyhedron/measures.ts';
import { exactOffsets } from '../../polyhedron/offset.ts';
import { loosePlanes } from '../../polyhedron/planes.ts';
import { intersect, type Solid } from '../../polyhedron/solid.ts';
import { facePlanes } from '../../shape/face-planes.ts';
import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import type { Mesh } from '../mesh.ts';
import type { Surface } from '../part.ts';
import { withoutShortEdges } from '../short-edges.ts';
import { crystalSurfaces } from '../surfaces.ts';
import { bevelPlanes } from './bevel-planes.ts';

/** A crystal with its edges and corners taken off. */
export interface BluntBody {
  /** Centre at the origin. Surfaces: one a form, and after them one for all that is no crystal face. */
  readonly mesh: Mesh;
  readonly surfaces: readonly Surface[];
  /** What was done, for the report. */
  readonly remarks: readonly string[];
}

/** A bevelled crystal is a polyhedron and can be measured as one. Millimetres. */
export interface BevelledBody extends BluntBody {
  readonly solid: Solid;
  readonly measures: Measures;
}

export const BLUNTED = 'blunted, no crystal face';

/**
 * The crystal with every edge and corner bevelled to strips and facets of a width, solved by the exact kernel.
 * @param width millimetres
 * @throws ObjectError when the width is no positive number, or the strips leave nothing of the crystal's faces
 */
export function bevelledBody(shape: ClosedShape, scale: number, { width }: { readonly width: number }): BevelledBody {
  if (!(width > 0)) throw new ObjectError('size', `a bevel of ${width} mm has no width`, 'give a width above 0 mm');
  const faces = facePlanes(shape, scale);
  const planes = [...faces, ...bevelPlanes(shape, scale, { width })];
  const solid = intersect(
    loosePlanes(Float64Array.from(planes.flatMap(({ normal }) => normal)), exactOffsets(planes.map((p) => p.distance))),
  );
  const left = faces.filter((_, face) => solid.start[face + 1]! > solid.start[face]!).length;
  if (solid.state !== 'bounded' || left === 0)
    throw new ObjectError(
      'size',
      `bevels ${width} mm wide leave no face of the crystal`,
      'choose narrower bevels or a larger crystal',
    );
  const measures = measure(solid, UNCHANGED);
  const forms = shape.crystal.forms.length;
  const formOf = (plane: number): number =>
    plane < faces.length ? shape.solid.planes.form[shape.measures.faces[plane]!]! : forms;
  return {
    solid,
    measures,
    mesh: withoutShortEdges(facesAsMesh(solid, measures, formOf), SHORTEST_EDGE),
    surfaces: crystalSurfaces(shape.crystal, BLUNTED),
    remarks: [
      `Edges and corners are blunted by bevels ${width} mm wide: these are no crystal faces.`,
      ...lostFaces(faces.length - left, faces.length),
    ],
  };
}

/** What is to be said when blunting takes whole faces away. */
export function lostFaces(lost: number, of: number): string[] {
  if (lost === 0) return [];
  return [`The blunting takes ${lost} of the crystal's ${of} faces away altogether: blunt less, or make it larger.`];
}

function facesAsMesh(solid: Solid, { positions, faces }: Measures, surfaceOf: (plane: number) => number): Mesh {
  const triangles: number[] = [];
  const surface: number[] = [];
  for (const face of faces) {
    const from = solid.start[face]!;
    for (let edge = from + 1; edge + 1 < solid.start[face + 1]!; edge++) {
      triangles.push(solid.corner[from]!, solid.corner[edge]!, solid.corner[edge + 1]!);
      surface.push(surfaceOf(face));
    }
  }
  return { positions, triangles: Uint32Array.from(triangles), surface: Uint16Array.from(surface) };
}

const UNCHANGED = [1, 0, 0, 0, 1, 0, 0, 0, 1];

/** Millimetres; far below what any printer resolves, and what single precision still tells apart. */
const SHORTEST_EDGE = 0.001;
