/** x, y, z in millimetres. */
export type Point = readonly [number, number, number];

/** Least and greatest x, y, z in millimetres. */
export interface Extents {
  readonly min: Point;
  readonly max: Point;
}

/** One place where a mesh is at fault. */
export interface Place {
  /** A corner, the two ends of an edge, the three corners of a triangle, or a point near which two triangles meet. */
  readonly points: readonly Point[];
  /** The triangles concerned, counted from 0. */
  readonly triangles: readonly number[];
}

/** A fault: how often it occurs, and where it does first. */
export interface Finding {
  readonly count: number;
  readonly first: readonly Place[];
}

/**
 * What a connected piece of surface is. `solid`: closed, its outside outwards, material within. `cavity`: closed and
 * turned inwards, inside exactly one solid. `insideOut`: closed and turned inwards, with no solid around it. `nested`:
 * closed, but inside of material that is there already (or a cavity within a cavity). `open`: not closed, or turned
 * inconsistently; its volume means nothing.
 */
export type BodyKind = 'solid' | 'cavity' | 'insideOut' | 'nested' | 'open';

/** A piece of surface that is connected by edges. */
export interface Body {
  readonly kind: BodyKind;
  readonly triangles: number;
  /** mm³, negative when the surface is turned inwards. */
  readonly volume: number;
  /** mm². */
  readonly area: number;
  readonly extents: Extents;
}

export type ProblemCode =
  | 'empty'
  | 'openEdges'
  | 'overusedEdges'
  | 'flippedEdges'
  | 'degenerateTriangles'
  | 'duplicateTriangles'
  | 'tJunctions'
  | 'negativeZeros'
  | 'coincidentVertices'
  | 'pinchedVertices'
  | 'selfTouching'
  | 'insideOut'
  | 'nested'
  | 'wrongNormals';

/** A fault in a person's words, with coordinates in millimetres. */
export interface Problem {
  readonly code: ProblemCode;
  readonly message: string;
  readonly count: number;
}

/** Everything that `checkMesh` finds out. */
export interface MeshReport {
  /** Nothing is wrong; `problems` is empty. */
  readonly ok: boolean;
  readonly problems: readonly Problem[];
  readonly triangles: number;
  readonly vertices: number;
  /** There are triangles, and each edge is used by exactly two of them, once in each direction. */
  readonly watertight: boolean;
  /** Edges of one triangle only. */
  readonly openEdges: Finding;
  /** Edges of more than two triangles. */
  readonly overusedEdges: Finding;
  /** Edges that two triangles use in the same direction: one of them is turned the wrong way round. */
  readonly flippedEdges: Finding;
  /** Triangles with a repeated vertex or without area (see `mesh-triangles.ts`). */
  readonly degenerateTriangles: Finding;
  /** Triangles on the same three points as an earlier one, whichever way round. */
  readonly duplicateTriangles: Finding;
  /** Ends of open edges that lie within another open edge (see `mesh-junctions.ts`). */
  readonly tJunctions: Finding;
  /** Vertices at the place of an earlier vertex with another number. */
  readonly coincidentVertices: Finding;
  /** Of these, the ones that differ from the earlier vertex in the sign of a zero only. */
  readonly negativeZeros: number;
  /** Vertices in which several fans of triangles meet that share no edge there. */
  readonly pinchedVertices: Finding;
  /** Pairs of triangles that meet elsewhere than in common corners or a common edge. */
  readonly selfTouching: Finding;
  /** False when there were so many such pairs that counting stopped. */
  readonly selfTouchingCounted: boolean;
  /** Connected pieces of surface, in the order of their first triangle. */
  readonly bodies: readonly Body[];
  /** Stored normals that are zero, not a number, or more than 1 degree off the right-hand rule. */
  readonly wrongNormals: number;
  /** Of these, the ones that are zero or not a number. */
  readonly missingNormals: number;
  /** mm³: the sum over the bodies, cavities subtracting. */
  readonly volume: number;
  /** mm². */
  readonly area: number;
  /** All zero for an empty mesh. */
  readonly extents: Extents;
}
