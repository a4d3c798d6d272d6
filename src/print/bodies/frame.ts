import { faceCorners } from '../../polyhedron/measures.ts';
import type { RodPlan } from '../../rods/plan.ts';
import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { faceName } from '../face-name.ts';
import type { Workbench } from '../kit.ts';
import type { Mesh } from '../mesh.ts';
import type { Part } from '../part.ts';
import { ROD_COLOUR } from '../surfaces.ts';
import { vectorAt } from '../vectors.ts';
import { type BodyParts, mm } from './body-parts.ts';
import { largestDisc } from './convex-polygon.ts';
import { largestInset } from './hollow.ts';
import { lieOn } from './lie.ts';
import { downwards, type Resting } from './resting.ts';
import { flatFace } from './sites.ts';
import { crystalSkeleton, isHeld, stayTips } from './skeleton.ts';
import { firstSound, type IsSound } from './sound.ts';
import { ball, balls, strut, struts, throughRods } from './struts.ts';

/** Diameters in millimetres. */
export interface FramePlan {
  readonly strut: number;
  /** Of the balls at the corners. */
  readonly joint: number;
  /** A ball at the centre of inversion; null or absent for none. */
  readonly bead?: number | null;
  /** Of the three stays that hold the bead; by default as the struts. */
  readonly stay?: number;
  /** Symmetry axes as rods through the frame. */
  readonly rods?: RodPlan | null;
  /** By default the largest face. */
  readonly resting?: Resting;
}

/**
 * The edges of the crystal as struts with balls at its corners, so that one sees its centre. The edges are the middles of
 * the struts. What stands in the middle, a bead or rods, is held by three stays where no rod meets a strut.
 * @param isSound told whether a mesh can be written, this finds a layout of facets that can
 * @throws ObjectError `struts` when the struts fill the crystal or close every face, `no-centre` for a bead in a crystal
 * without a centre of inversion
 */
export function frameBody(
  bench: Workbench,
  shape: ClosedShape,
  scale: number,
  plan: FramePlan,
  isSound?: IsSound,
): BodyParts {
  const closed = closedFaces(shape, scale, plan);
  const { group } = shape.crystal;
  const bead = plan.bead ?? null;
  if (bead !== null && !group.centrosymmetric)
    throw new ObjectError(
      'no-centre',
      `point group ${group.hermannMauguin} has no centre of inversion, so there is no place for a bead`,
      'leave the bead away',
    );
  const rods = plan.rods?.ends.length ? plan.rods : null;
  const skeleton = crystalSkeleton(shape, scale);
  const stays = (bead !== null || rods) && !isHeld(skeleton, rods, plan.strut) ? stayTips(skeleton.corners) : [];
  const down = downwards(shape, plan.resting);
  const lie = (mesh: Mesh): Mesh => lieOn(mesh, down);
  const laid = firstSound(isSound, lie, (layout) => {
    const solids = [
      ...balls(bench, skeleton.corners, plan.joint, layout),
      ...struts(bench, skeleton, plan, layout),
      ...stays.map((tip) => strut(bench, [0, 0, 0], tip, plan.stay ?? plan.strut, layout)),
      ...(bead === null ? [] : [ball(bench, [0, 0, 0], bead)]),
      ...(rods ? throughRods(bench, rods) : []),
    ];
    return bench.mesh(bench.union(solids), 1);
  });
  if (!laid)
    throw new ObjectError(
      'not-sound',
      'the struts fold over each other in single precision however their facets are laid out',
      'choose a slightly different size or strut, and please report the recipe',
    );
  const part: Part = {
    name: 'body',
    purpose: `the edges of the crystal as struts of ${mm(plan.strut)}${bead === null ? '' : ', with a bead at its centre of inversion'}`,
    surfaces: [
      { name: 'frame', colour: FRAME_COLOUR },
      { name: 'rods', colour: ROD_COLOUR },
    ],
    mesh: laid.lying,
    placed: [laid.placed],
  };
  return {
    parts: [part],
    remarks: [...(plan.rods?.remarks ?? []), ...remarksOn(closed, plan, stays.length)],
    warnings: [],
  };
}

/** Okabe and Ito's yellow, mixed with white as in `surfaces.ts`: light against the dark rods. */
const FRAME_COLOUR = '#F3E7AB';

/** Names of the faces that the struts close. @throws ObjectError when nothing is left to see through */
function closedFaces(shape: ClosedShape, scale: number, { strut: thick, joint }: FramePlan): string[] {
  if (!(thick > 0) || !(joint >= thick))
    throw new ObjectError(
      'struts',
      `struts of ${mm(thick)} do not go with joints of ${mm(joint)}`,
      'choose struts thicker than 0 and joints at least as thick as the struts',
    );
  const { measures, solid } = shape;
  const openings = measures.faces.map((face) => {
    const disc = largestDisc(
      flatFace(vectorAt(measures.normals, face), measures.positions, faceCorners(solid, face)).polygon,
    );
    return { face, radius: (disc?.radius ?? 0) * scale };
  });
  const widest = 2 * Math.min(largestInset(shape, scale), Math.max(...openings.map(({ radius }) => radius)));
  if (thick >= widest)
    throw new ObjectError(
      'struts',
      `struts of ${mm(thick)} fill the crystal; there is room for less than ${mm(widest)}`,
      'choose thinner struts or a larger crystal',
    );
  return openings.filter(({ radius }) => radius <= thick / 2).map(({ face }) => faceName(shape, face));
}

function remarksOn(closed: readonly string[], { strut: thick, joint }: FramePlan, stays: number): string[] {
  const remarks = [
    `The crystal's edges are the middles of the struts, so the frame is ${mm(joint)} larger than the crystal.`,
  ];
  if (closed.length > 0)
    remarks.push(
      `Struts of ${mm(thick)} close ${closed.length === 1 ? 'the small face' : `${closed.length} small faces:`} ${listed(closed)}.`,
    );
  if (stays > 0) remarks.push(`Three stays, which are no symmetry elements, hold what is at the centre.`);
  return remarks;
}

/** The first dozen by name. */
const listed = (names: readonly string[]): string =>
  names.length > 12 ? `${names.slice(0, 12).join(', ')} and others` : names.join(', ');
