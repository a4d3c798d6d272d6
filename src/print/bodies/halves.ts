import { reach } from '../../polyhedron/measures.ts';
import { facePlanes } from '../../shape/face-planes.ts';
import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import type { Workbench } from '../kit.ts';
import type { Part } from '../part.ts';
import { crystalSurfaces } from '../surfaces.ts';
import { times, type Vector } from '../vectors.ts';
import { type BodyParts, mm } from './body-parts.ts';
import { type Cut, cutPiece, type Piece, pieceMesh } from './cut-piece.ts';
import { joinSites } from './halves-sites.ts';
import { lieOn } from './lie.ts';
import { type MagnetPlan, magnetWarning, pauseRemark, pocketTool, refuseThinCover } from './magnets.ts';
import { holeTool, type PinPlan, pinPart } from './pins.ts';

/** All lengths in millimetres. */
export interface HalvesPlan {
  /** The cut `normal · x = offset`, Cartesian unit normal. */
  readonly plane: { readonly normal: Vector; readonly offset: number };
  readonly dowel: (PinPlan & { readonly count: number }) | null;
  readonly magnets?: MagnetPlan | null;
  /** Plastic left around holes and pockets. */
  readonly wall: number;
  /** Distance between the cut faces in the assembled object; 0 unless given. */
  readonly gap?: number;
}

/**
 * The crystal cut in two, each half lying on its cut, with holes for dowels that are parts of their own.
 * @throws ObjectError `plane` when the plane misses the crystal, `dowel` and `magnet` when there is no room for them
 */
export function halves(bench: Workbench, shape: ClosedShape, scale: number, plan: HalvesPlan): BodyParts {
  const { plane, dowel, magnets = null, gap = 0 } = plan;
  if (magnets) refuseThinCover(magnets);
  const back = times(plane.normal, -1);
  const cuts: readonly Cut[] = [
    { normal: plane.normal, distance: plane.offset - gap / 2 },
    { normal: back, distance: -plane.offset - gap / 2 },
  ];
  const pieces = cuts.map((cut) => cutPiece(shape, scale, [cut]));
  if (!pieces.every((piece): piece is Piece => hasCut(shape, piece))) throw misses(shape, scale, plan);
  const sites = joinSites(pieces as Piece[], facePlanes(shape, scale), shape, plan);
  const surfaces = crystalSurfaces(shape.crystal, 'cut');
  const other = surfaces.length - 1;
  const { form } = shape.solid.planes;
  const solids = pieces.map((piece) => bench.solid(pieceMesh(piece as Piece, (face) => form[face] ?? other)));
  const bores = dowel ? sites.dowels.map((at) => holeTool(bench, dowel, plane.normal, at)) : [];
  const parts = solids.map((solid, i): Part => {
    const { normal } = cuts[i]!;
    const pockets = magnets ? sites.magnets.map((at) => pocketTool(bench, magnets, times(normal, -1), at)) : [];
    const mesh = bench.mesh(bench.subtract(solid, [...bores, ...pockets]), other);
    const purpose = `${i === 0 ? 'one half' : 'the other half'} of the crystal, cut side down`;
    return { name: `half-${i + 1}`, purpose, surfaces, mesh: lieOn(mesh, normal), placed: [mesh] };
  });
  const places = sites.dowels.map((at) => ({ normal: plane.normal, at }));
  const dowels =
    dowel && places.length > 0 ? [pinPart(bench, 'dowel', 'dowel that joins the halves', dowel, places)] : [];
  return {
    parts: [...parts, ...dowels],
    remarks: [...sites.remarks, ...(magnets ? [pauseRemark(magnets, gap)] : [])],
    warnings: magnets ? [magnetWarning(magnets, 2 * sites.magnets.length)] : [],
  };
}

/** Whether a piece has a face on the first cut, which is numbered after all planes. */
const hasCut = ({ solid }: ClosedShape, piece: Piece | null): boolean =>
  piece?.faces.some(({ plane }) => plane === solid.planes.form.length) ?? false;

function misses({ measures }: ClosedShape, scale: number, { plane: { normal, offset } }: HalvesPlan): ObjectError {
  const high = scale * reach(measures.positions, normal);
  const low = -scale * reach(measures.positions, times(normal, -1));
  return new ObjectError(
    'plane',
    `the cut at ${mm(offset)} from the centre misses the crystal, which reaches from ${mm(low)} to ${mm(high)} there`,
    'choose a plane nearer to the centre; one through the centre always cuts',
  );
}
