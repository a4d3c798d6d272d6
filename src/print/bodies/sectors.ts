import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { faceName, fileWord } from '../face-name.ts';
import type { Workbench } from '../kit.ts';
import type { Mesh } from '../mesh.ts';
import type { Part, Surface } from '../part.ts';
import { crystalSurfaces } from '../surfaces.ts';
import { minus, times, unit, vectorAt } from '../vectors.ts';
import { type BodyParts, mm } from './body-parts.ts';
import { type Cut, cutPiece, insetPiece, type Piece, pieceMesh } from './cut-piece.ts';
import { faceMesh } from './face-mesh.ts';
import { lieOn } from './lie.ts';
import { isSimple, sectorGroups } from './sector-groups.ts';
import { firstSound, type IsSound, type Laid } from './sound.ts';

export interface SectorsPlan {
  /** A piece for each face, or for all faces of a form that hang together. */
  readonly by: 'face' | 'form';
  /** Between neighbouring pieces, millimetres; with 0 they fill the crystal exactly. */
  readonly gap: number;
}

/**
 * The growth sectors of an ideal crystal: the pyramids from its centre over its faces, each of which is what that face
 * has laid down.
 * @param isSound told whether a mesh can be written, this finds tools whose cuts can
 * @throws ObjectError `gap` when the gap leaves nothing of a sector, `not-sound` for one that is too thin
 */
export function growthSectors(
  bench: Workbench,
  shape: ClosedShape,
  scale: number,
  plan: SectorsPlan,
  isSound?: IsSound,
): BodyParts {
  if (!(plan.gap >= 0)) throw new ObjectError('gap', `a gap of ${mm(plan.gap)} is none`, 'choose 0 or more');
  const whole = insetPiece(shape, scale, 0)!;
  const { groups, split } = plan.by === 'face' ? singleFaces(whole) : sectorGroups(shape, whole, plan.gap > 0);
  const surfaces = crystalSurfaces(shape.crystal, 'sector');
  const { solid } = shape;
  const folded = new Set<number>();
  const part = (planes: readonly number[]): Part[] => {
    const form = solid.planes.form[planes[0]!]!;
    const lie = (mesh: Mesh): Mesh => lieOn(mesh, vectorAt(shape.measures.normals, planes[0]!));
    const laid = firstSound(isSound, lie, sectorMesh(bench, shape, scale, whole, planes, plan.gap));
    if (laid) return [sectorPart(shape, surfaces[form]!, planes, laid)];
    if (planes.length === 1) throw notSound(shape, planes[0]!);
    folded.add(form);
    return planes.flatMap((plane) => part([plane]));
  };
  const parts = groups.flatMap(part);
  const named = (forms: Iterable<number>): string => [...forms].map((form) => surfaces[form]!.name).join(', ');
  return { parts, remarks: remarksOn(named(split), named(folded)), warnings: [] };
}

function sectorPart(shape: ClosedShape, form: Surface, planes: readonly number[], { placed, lying }: Laid): Part {
  const names = planes.map((plane) => faceName(shape, plane));
  return {
    name: `sector-${fileWord(names[0]!)}`,
    purpose: `growth sector of ${names.join(', ')}`,
    surfaces: [form, { name: `sector of ${form.name}`, colour: form.colour }],
    mesh: lying,
    placed: [placed],
  };
}

const singleFaces = ({ faces }: Piece) => ({ groups: faces.map(({ plane }) => [plane]), split: [] });

function remarksOn(split: string, folded: string): string[] {
  const each = (faces: string, forms: string, why: string): string[] =>
    forms === '' ? [] : [`${faces} of ${forms} have a sector each: ${why}`];
  return [
    ...each('The faces', split, 'joined, these would touch themselves in a point. A gap joins them.'),
    ...each('Some faces', folded, 'joined, these would fold over themselves where they are thinnest.'),
  ];
}

/** How to make a sector's mesh; the layout moves tools a little where it takes tools. */
function sectorMesh(
  bench: Workbench,
  shape: ClosedShape,
  scale: number,
  whole: Piece,
  planes: readonly number[],
  gap: number,
): (layout: number) => Mesh {
  if (gap === 0) return () => coneMesh(whole, planes);
  const [only] = planes;
  if (planes.length === 1) {
    const piece = cutPiece(shape, scale, sides(shape, only!, -gap / 2), [only!]);
    if (!piece) throw vanished(shape, only!, gap);
    return () => pieceMesh(piece, (plane) => (plane === only ? 0 : 1));
  }
  const others = whole.faces.filter(({ plane }) => !planes.includes(plane));
  const body = bench.solid(pieceMesh(whole, () => 0));
  return (layout) => {
    const tools = others.map(({ plane }, i) =>
      bench.solid(pieceMesh(grownSector(shape, scale, plane, gap * growth(i + layout / LAYOUTS)), () => 1)),
    );
    const sector = bench.subtract(body, tools);
    if (sector.isEmpty()) throw vanished(shape, only!, gap);
    return bench.mesh(sector, 1);
  };
}

/** The pyramids over some faces, their walls between each other left out. */
function coneMesh(whole: Piece, planes: readonly number[]): Mesh {
  const centre = whole.corners.length / 3;
  const own = whole.faces.filter(({ plane }) => planes.includes(plane));
  const cone = isSimple(own).boundary.map(([a, b]) => ({ corners: [centre, b, a], plane: -1 }));
  const faces = own.map(({ corners, plane }) => ({ corners, plane }));
  return faceMesh([...whole.corners, 0, 0, 0], [...faces, ...cone], ({ plane }) => (plane < 0 ? 1 : 0));
}

/** The walls of a face's pyramid, moved outwards: each is the plane through the centre and the edge of two faces. */
function sides({ solid, measures, crystal }: ClosedShape, plane: number, by: number): Cut[] {
  const normal = (p: number) => vectorAt(measures.normals, p);
  const distance = (p: number) => crystal.forms[solid.planes.form[p]!]!.distance;
  return Array.from(solid.neighbour.subarray(solid.start[plane], solid.start[plane + 1]), (other) => ({
    normal: unit(minus(times(normal(other), distance(plane)), times(normal(plane), distance(other)))),
    distance: by,
  }));
}

/**
 * Tools grow by a little more than the gap, each by another share: where they lay alike by symmetry, their sides would
 * meet in the same points but for rounding, which leaves slivers.
 */
const growth = (tool: number): number => 1 + MOST_GROWTH * ((tool * GOLDEN_RATIO) % 1);
const GOLDEN_RATIO = (Math.sqrt(5) - 1) / 2;
const MOST_GROWTH = 0.2;
/** Layouts shift the shares against each other. */
const LAYOUTS = 7.3;

/** How far a tool stands out of the crystal, millimetres. */
const OVERSHOOT = 1;

/** A face's pyramid grown to all sides by half the gap, as a tool. */
function grownSector(shape: ClosedShape, scale: number, plane: number, gap: number): Piece {
  const normal = vectorAt(shape.measures.normals, plane);
  const top = shape.measures.distance[plane]! * scale + OVERSHOOT;
  const ends: Cut[] = [
    { normal, distance: top },
    { normal: times(normal, -1), distance: gap },
  ];
  return cutPiece(shape, scale, [...sides(shape, plane, gap / 2), ...ends], [])!;
}

const notSound = (shape: ClosedShape, plane: number): ObjectError =>
  new ObjectError(
    'not-sound',
    `the growth sector of ${faceName(shape, plane)} is too thin to be written in single precision`,
    'choose another gap, a larger crystal, or leave forms with such small faces away',
  );

const vanished = (shape: ClosedShape, plane: number, gap: number): ObjectError =>
  new ObjectError(
    'gap',
    `a gap of ${mm(gap)} leaves nothing of the growth sector of ${faceName(shape, plane)}`,
    'choose a smaller gap, a larger crystal, or leave forms with such small faces away',
  );
