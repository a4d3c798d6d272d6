import { facePlanes } from '../../shape/face-planes.ts';
import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import type { Workbench } from '../kit.ts';
import type { Mesh } from '../mesh.ts';
import type { Part, Surface } from '../part.ts';
import { minus, unit, type Vector, vectorAt } from '../vectors.ts';
import { type BodyParts, mm } from './body-parts.ts';
import { area } from './convex-polygon.ts';
import { type Cut, cutPiece, type Piece, pieceMesh } from './cut-piece.ts';
import { generalDirection, refuseSpecial } from './general-direction.ts';
import { lieOn, moved } from './lie.ts';
import { asMat4, cartesianTurns, type Turn, turned } from './operations.ts';
import { holeTool, type PinPlan, pinPart } from './pins.ts';
import { flatFace } from './sites.ts';
import { chainOf, type Joint, jointsOf, type Link } from './unit-joints.ts';

/** All lengths in millimetres. */
export interface UnitsPlan {
  /** Cartesian; lies in the first piece. By default the one that stays farthest from all symmetry elements. */
  readonly direction?: Vector;
  /** Between neighbouring pieces. */
  readonly gap: number;
  /** `wall` is the plastic left around their holes. */
  readonly pins: (PinPlan & { readonly wall: number }) | null;
}

/**
 * The crystal cut into as many congruent pieces as its group has operations: each is what lies nearer to one image of a
 * general direction than to all others (the Dirichlet domain of the direction among its images; International Tables A
 * call such a piece an asymmetric unit). Pieces that an improper operation makes are mirror images of the others.
 * @throws ObjectError `direction` for one on a symmetry element, `gap` when it leaves nothing of a piece
 */
export function asymmetricUnits(bench: Workbench, shape: ClosedShape, scale: number, plan: UnitsPlan): BodyParts {
  const { group } = shape.crystal;
  const turns = cartesianTurns(shape.crystal);
  const direction = plan.direction ? unit(plan.direction) : generalDirection(turns);
  refuseSpecial(turns, direction);
  const cuts = turns.slice(1).map((turn): Cut => {
    return { normal: unit(minus(turned(turn, direction), direction)), distance: -plan.gap / 2 };
  });
  const piece = plan.gap >= 0 ? cutPiece(shape, scale, cuts) : null;
  if (!piece) throw vanished(plan.gap);
  const joints = plan.pins ? jointsOf(shape, turns, piece, facePlanes(shape, scale), cuts, plan.pins) : [];
  const tools = joints.flatMap((joint) => holesOf(bench, joint, turns, plan.pins!));
  const mesh = bench.mesh(bench.subtract(bench.solid(pieceMesh(piece, () => 0)), tools), 0);
  const down = largestFace(shape, piece, cuts);
  const units = [false, true].flatMap((improper): Part[] => {
    const own = turns.filter((_, i) => group.operations[i]!.improper === improper);
    if (own.length === 0) return [];
    const placed = own.map((turn) => moved(mesh, turn, improper));
    const lying = lieOn(placed[0] as Mesh, turned(own[0]!, down));
    return [{ ...unitNames(improper, group.chiral), mesh: lying, placed }];
  });
  const links = chainOf(shape, joints);
  const places = links.map(({ from, joint, at }) => ({
    normal: turned(turns[from]!, joint.normal),
    at: turned(turns[from]!, at),
  }));
  const pins =
    plan.pins && places.length > 0 ? [pinPart(bench, 'pin', 'pin that joins two pieces', plan.pins, places)] : [];
  return { parts: [...units, ...pins], remarks: remarksOn(shape, plan, links), warnings: [] };
}

/** Okabe and Ito's orange and blue, as in `surfaces.ts`. */
const HANDS = { right: '#EDC28B', left: '#86A5CD' };

function unitNames(improper: boolean, chiral: boolean): Pick<Part, 'name' | 'purpose' | 'surfaces'> {
  const hand = improper ? 'left' : 'right';
  const surfaces: Surface[] = [{ name: chiral ? 'piece' : `${hand}-handed piece`, colour: HANDS[hand] }];
  if (chiral) return { name: 'unit', purpose: 'asymmetric unit', surfaces };
  return { name: `unit-${hand}`, purpose: `${hand}-handed asymmetric unit`, surfaces };
}

/** Both ends of a joint's holes in the first piece: the one towards its neighbour, and the one its neighbour needs. */
function holesOf(bench: Workbench, joint: Joint, turns: readonly Turn[], pins: PinPlan) {
  const { points, normal, back, operation } = joint;
  return points.flatMap((at) => {
    const hole = holeTool(bench, pins, normal, at);
    return back === operation ? [hole] : [hole, bench.place(hole, asMat4(turns[back]!))];
  });
}

function largestFace({ solid, measures }: ClosedShape, { corners, faces }: Piece, cuts: readonly Cut[]): Vector {
  const first = solid.planes.form.length;
  const sized = faces.map(({ plane, corners: cycle }) => {
    const normal = plane < first ? vectorAt(measures.normals, plane) : cuts[plane - first]!.normal;
    return { normal, size: area(flatFace(normal, corners, cycle).polygon) };
  });
  return sized.reduce((best, face) => (face.size > best.size * (1 + 1e-9) ? face : best)).normal;
}

const vanished = (gap: number): ObjectError =>
  new ObjectError(
    'gap',
    gap >= 0 ? `a gap of ${mm(gap)} leaves nothing of the pieces` : `a gap of ${mm(gap)} is none`,
    'choose a smaller gap, 0 or more, or a larger crystal',
  );

function remarksOn({ crystal: { group } }: ClosedShape, plan: UnitsPlan, links: readonly Link[]): string[] {
  const remarks: string[] = [];
  if (group.order === 1)
    remarks.push('Point group 1 has no operation but the identity: the piece is the whole crystal.');
  else if (!group.chiral)
    remarks.push('Left- and right-handed pieces are mirror images; which of them is called right is a convention.');
  if (!plan.pins || group.order === 1) return remarks;
  const joined = new Set(links.map(({ from, joint }) => `${from} ${joint.operation}`)).size;
  const groups = group.order - joined;
  if (joined === 0)
    return [...remarks, 'The pieces have no room for pins: glue them, or choose shorter and thinner pins.'];
  remarks.push(
    `${links.length} ${links.length === 1 ? 'pin joins' : 'pins join'} the pieces one to the next; where pieces close a ring, its last joint has holes but no pin, so that the ring can be closed.`,
  );
  if (groups > 1)
    remarks.push(
      `The pins make ${groups} groups of ${group.order / groups} pieces, which are to be glued together: other joints have no room for pins.`,
    );
  return remarks;
}
