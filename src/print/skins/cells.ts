import { faceCorners } from '../../polyhedron/measures.ts';
import { facePlanes } from '../../shape/face-planes.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { insetPiece, type Piece } from '../bodies/cut-piece.ts';
import { times, vectorAt } from '../vectors.ts';
import { CornerPool } from './corner-pool.ts';
import { skinWalls } from './walls.ts';

/** A face of a cell: corners in the common pool, and what lies behind it. */
export interface CellFace {
  readonly corners: readonly number[];
  /** The neighbouring cell's number; null on the crystal's surface, `core` towards the core. */
  readonly behind: number | 'core' | null;
}

/** The skins of single faces, and the core, as cells that share corners and whole faces. */
export interface Cells {
  readonly positions: readonly number[];
  /** For each face of the crystal (in the order of `measures.faces`) the faces of its skin. */
  readonly skins: readonly (readonly CellFace[])[];
  /** Faces of the core, seen from outside. */
  readonly core: readonly (readonly number[])[];
}

/** Divides a crystal into skins and core. Null when skins this deep leave no core. */
export function skinCells(shape: ClosedShape, scale: number, depth: number): Cells | null {
  const inner = insetPiece(shape, scale, depth);
  if (!inner) return null;
  const { measures, solid } = shape;
  const pool = new CornerPool();
  const outlines = measures.faces.map((face) =>
    faceCorners(solid, face).map((corner) => times(vectorAt(measures.positions, corner), scale)),
  );
  const skins = outlines.map((outline): CellFace[] => [{ corners: pool.polygon(outline), behind: null }]);
  const core = innerFaces(inner, pool, measures.faces, skins);
  const radius = measures.circumscribedRadius * scale;
  for (const { faces, corners } of skinWalls(facePlanes(shape, scale), outlines, depth, radius)) {
    const cycle = pool.polygon(corners);
    const [f, g] = faces;
    // The wall's polygon runs counter-clockwise about n_f − n_g, which points out of the cell of g.
    skins[g]!.push({ corners: cycle, behind: f });
    skins[f]!.push({ corners: cycle.toReversed(), behind: g });
  }
  const filled = skins.map((faces) => faces.filter(({ corners }) => corners.length > 0));
  return { positions: pool.positions, skins: filled, core };
}

function innerFaces(
  { corners, faces }: Piece,
  pool: CornerPool,
  planes: readonly number[],
  skins: readonly CellFace[][],
): number[][] {
  return faces.flatMap((face) => {
    const cycle = pool.polygon(face.corners.map((corner) => vectorAt(corners, corner)));
    if (cycle.length === 0) return [];
    skins[planes.indexOf(face.plane)]!.push({ corners: cycle.toReversed(), behind: 'core' });
    return [cycle];
  });
}
