import { edges } from '../polyhedron/measures.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { dot, type Vector, vectorAt } from './vector.ts';

/** `edge-on`: the face is seen as a line. */
export type FaceState = 'front' | 'back' | 'edge-on';

/**
 * Sine of the angle under which a face counts as seen edge-on. Rounding is a million times smaller; a face and a zone
 * with indices up to 999 that do not belong together make a larger angle (it is at least 1 / (|h|*·|u|)).
 */
export const EDGE_ON = 1e-9;

export const stateOf = (normal: Vector, toward: Vector): FaceState => {
  const height = dot(normal, toward);
  return height > EDGE_ON ? 'front' : height < -EDGE_ON ? 'back' : 'edge-on';
};

/**
 * How an edge is seen: `outline` between a face in front and one that is not, `inner` between two faces in front,
 * `hidden` behind the body, `end-on` as a point.
 */
export type EdgeKind = 'outline' | 'inner' | 'hidden' | 'end-on';

export interface SeenEdge {
  readonly kind: EdgeKind;
  readonly vertices: readonly [number, number];
}

export interface Sight {
  /** Faces in front by plane number, in the planes' order. */
  readonly front: readonly number[];
  /** Every edge of the solid, once. */
  readonly edges: readonly SeenEdge[];
  /** Vertices around the outline, counter-clockwise as it is seen. */
  readonly silhouette: readonly number[];
}

/**
 * What is seen of a crystal from a direction. It is convex, so a face hides no other: it is seen whole when its outward
 * normal leans towards the viewer, and not at all otherwise.
 * @param toward unit vector at the viewer, Cartesian
 */
export function look({ solid, measures }: ClosedShape, toward: Vector): Sight {
  const state = new Map(
    measures.faces.map((plane) => [plane, stateOf(vectorAt(measures.normals, plane), toward)] as const),
  );
  const front = measures.faces.filter((plane) => state.get(plane) === 'front');
  return {
    front,
    edges: edges(solid, measures).map(({ faces: [p, q], vertices }) => ({
      kind: kindOf(state.get(p)!, state.get(q)!),
      vertices,
    })),
    silhouette: silhouetteOf({ solid, front: new Set(front) }),
  };
}

function kindOf(p: FaceState, q: FaceState): EdgeKind {
  if (p === 'front' && q === 'front') return 'inner';
  if (p === 'front' || q === 'front') return 'outline';
  return p === 'edge-on' && q === 'edge-on' ? 'end-on' : 'hidden';
}

/** Edges of front faces to any other face follow one another in a single cycle. */
function silhouetteOf({ solid, front }: { solid: ClosedShape['solid']; front: ReadonlySet<number> }): number[] {
  const next = new Map<number, number>();
  for (const plane of front) {
    const [first, end] = [solid.start[plane]!, solid.start[plane + 1]!];
    for (let e = first; e < end; e++) {
      if (front.has(solid.neighbour[e]!)) continue;
      next.set(solid.corner[e === first ? end - 1 : e - 1]!, solid.corner[e]!);
    }
  }
  const [start] = next.keys();
  const cycle: number[] = [];
  for (let vertex = start; vertex !== undefined; vertex = next.get(vertex)) {
    cycle.push(vertex);
    if (next.get(vertex) === start) break;
  }
  return cycle;
}
