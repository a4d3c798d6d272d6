import type { Manifold } from 'manifold-3d';
import { normal } from '../../crystal/cell.ts';
import { type MirrorPlane, symmetryElements } from '../../crystal/elements.ts';
import { printFace } from '../../crystal/indices.ts';
import { reach } from '../../polyhedron/measures.ts';
import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { mm, mmAtMost } from '../bodies/body-parts.ts';
import { insetPiece, type Piece, pieceMesh } from '../bodies/cut-piece.ts';
import { largestInset } from '../bodies/hollow.ts';
import { frameAlong } from '../bodies/place.ts';
import type { Workbench } from '../kit.ts';
import { common, OVERSHOOT, ROOT } from '../lettering/solids.ts';
import type { Vector } from '../vectors.ts';
import { mirrorRemarks } from './mirror-remarks.ts';

/** How mirror planes are shown on the surface. Lengths in millimetres. */
export interface MirrorLinesPlan {
  /** Sunk, proud, or as strips of their own that fill what was sunk. */
  readonly relief: 'engraved' | 'raised' | 'inlaid';
  readonly width: number;
  /** How deep they go, or how far they stand out. */
  readonly depth: number;
  /** By default all mirror planes of the group. */
  readonly planes?: readonly MirrorPlane[];
}

/** A mirror plane with its Cartesian unit normal. */
export interface MirrorLine {
  readonly plane: MirrorPlane;
  readonly normal: Vector;
}

export interface MirrorLined {
  readonly solid: Manifold;
  /** What fills the grooves exactly; null unless inlaid. */
  readonly inlay: Manifold | null;
  readonly lines: readonly MirrorLine[];
  readonly remarks: readonly string[];
}

/**
 * The great line of each mirror plane on the crystal's surface, as a strip of even width about the plane and of even depth
 * under each face. Rods are joined afterwards, so that no line cuts through them; bores are cut into body and inlay alike.
 * @param body the crystal in its own frame
 * @throws ObjectError `plane` when the strips would cover the whole crystal, `wall` when their depth leaves nothing of it
 */
export function mirrorLines(
  bench: Workbench,
  body: Manifold,
  shape: ClosedShape,
  scale: number,
  plan: MirrorLinesPlan,
): MirrorLined {
  const { metric, group } = shape.crystal;
  const planes = plan.planes ?? symmetryElements(group).mirrorPlanes;
  const lines = planes.map((plane): MirrorLine => ({ plane, normal: normal(metric, plane.plane) }));
  if (lines.length === 0)
    return {
      solid: body,
      inlay: null,
      lines,
      remarks: [`Point group ${group.hermannMauguin} has no mirror planes, so there are no lines to show.`],
    };
  refuse(shape, scale, lines, plan);
  if (plan.relief !== 'raised' && !insetPiece(shape, scale, plan.depth)) throw tooDeep(shape, scale, plan.depth);
  const remarks = mirrorRemarks(shape, scale, lines, plan);
  const slabs = bench.union(lines.map((line) => slab(bench, shape, scale, line.normal, plan.width)));
  if (plan.relief === 'raised') {
    const strips = shell(bench, shape, scale, slabs, plan.depth, ROOT);
    return { solid: bench.union([body, strips]), inlay: null, lines, remarks };
  }
  const tool = shell(bench, shape, scale, slabs, OVERSHOOT, plan.depth);
  const inlay = plan.relief === 'inlaid' ? common(bench, body, tool) : null;
  return { solid: bench.subtract(body, [tool]), inlay, lines, remarks };
}

/** All that lies within half the width of a plane through the centre. */
function slab(bench: Workbench, shape: ClosedShape, scale: number, normal: Vector, width: number): Manifold {
  const far = 4 * shape.measures.circumscribedRadius * scale;
  const square = [
    [-far, -far],
    [far, -far],
    [far, far],
    [-far, far],
  ] as const;
  return bench.place(bench.prism([square], -width / 2, width / 2), frameAlong(normal, [0, 0, 0]));
}

/** What of the slabs lies less than `out` above the faces and less than `into` under them. */
function shell(
  bench: Workbench,
  shape: ClosedShape,
  scale: number,
  slabs: Manifold,
  out: number,
  into: number,
): Manifold {
  const [outer, inner] = [insetPiece(shape, scale, -out)!, insetPiece(shape, scale, into)];
  const within = common(bench, pieceSolid(bench, outer), slabs);
  return inner ? bench.subtract(within, [pieceSolid(bench, inner)]) : within;
}

/** Without surfaces of its own: no part of a strip counts as a crystal face. */
function pieceSolid(bench: Workbench, piece: Piece): Manifold {
  const { positions, triangles } = pieceMesh(piece, () => 0);
  return bench.solid({ positions, triangles });
}

function refuse(
  { crystal, measures }: ClosedShape,
  scale: number,
  lines: readonly MirrorLine[],
  plan: MirrorLinesPlan,
): void {
  if (!(plan.width > 0 && plan.depth > 0))
    throw new ObjectError(
      'plane',
      `lines ${mm(plan.width)} wide and ${mm(plan.depth)} deep cannot be made`,
      'give a width and a depth above 0',
    );
  const covering = lines.find(({ normal }) => 2 * scale * reach(measures.positions, normal) <= plan.width);
  if (covering)
    throw new ObjectError(
      'plane',
      `a line ${mm(plan.width)} wide along the mirror plane ${printFace(covering.plane.plane, crystal.group.axes, { brackets: '(' })} covers the whole crystal`,
      'choose narrower lines or a larger crystal',
    );
}

const tooDeep = (shape: ClosedShape, scale: number, depth: number): ObjectError => {
  const largest = largestInset(shape, scale);
  return new ObjectError(
    'wall',
    `lines ${mm(depth)} deep would cut the crystal apart: half its thinnest part is ${mm(largest)}`,
    `choose a depth below ${mmAtMost(largest)}, or a larger crystal`,
  );
};
