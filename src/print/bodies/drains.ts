import type { Manifold } from 'manifold-3d';
import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { faceName } from '../face-name.ts';
import type { Workbench } from '../kit.ts';
import { boreOutline } from '../rods/solid.ts';
import { dot, type Vector, vectorAt } from '../vectors.ts';
import { mm, mmAtMost } from './body-parts.ts';
import { largestDisc } from './convex-polygon.ts';
import type { Piece } from './cut-piece.ts';
import { frameAlong } from './place.ts';
import { flatFace, inSpace } from './sites.ts';

/** A round hole square through one wall. */
export interface Drain {
  readonly face: string;
  readonly normal: Vector;
  /** Where its axis meets the cavity's face. */
  readonly at: Vector;
  readonly wall: number;
  readonly diameter: number;
  /** Largest hole that this face has room for. */
  readonly room: number;
  /** How far down it lies: the height of `at` along the downward direction. */
  readonly depth: number;
}

/**
 * Drain holes: the first through the resting face, or the lowest face with room, so that resin runs out there and no
 * suction builds up; the second through the highest, to let air in; further ones from below and above in turn.
 * @param down unit vector towards the bed
 * @throws ObjectError `drain`
 */
export function placeDrains(
  shape: ClosedShape,
  cavity: Piece,
  down: Vector,
  wall: number,
  { diameter, count }: { diameter: number; count: number },
): Drain[] {
  const sites = cavity.faces.flatMap(({ plane, corners }): Drain[] => {
    const normal = vectorAt(shape.measures.normals, plane);
    const flat = flatFace(normal, cavity.corners, corners);
    const disc = largestDisc(flat.polygon);
    if (!disc) return [];
    const at = inSpace(flat, disc.centre);
    return [{ face: faceName(shape, plane), normal, at, wall, diameter, room: 2 * disc.radius, depth: dot(at, down) }];
  });
  const roomy = sites.filter(({ room }) => room >= diameter);
  const resting = (site: Drain): number => (dot(site.normal, down) > 1 - 1e-9 ? 1 : 0);
  const lowest = roomy.toSorted((a, b) => resting(b) - resting(a) || b.depth - a.depth);
  if (lowest.length < count) throw noRoom(sites, roomy.length, diameter, count);
  return Array.from({ length: count }, (_, i) => (i % 2 === 0 ? lowest[i / 2]! : lowest[lowest.length - (i + 1) / 2]!));
}

function noRoom(sites: readonly Drain[], roomy: number, diameter: number, count: number): ObjectError {
  const widest = sites.map(({ room }) => room).sort((a, b) => b - a)[Math.max(0, count - 1)] ?? 0;
  return new ObjectError(
    'drain',
    `${count} drain holes of ${mm(diameter)} need as many faces of the cavity that hold one; ${roomy} of its ${sites.length} do`,
    widest > 0
      ? `choose holes of ${mmAtMost(widest)} or less, fewer holes, a thinner wall, or a larger crystal`
      : 'choose fewer holes, a thinner wall, or a larger crystal',
  );
}

/** The hole as a tool: it overshoots the wall on both sides. */
export function drainTool(bench: Workbench, { normal, at, wall, diameter }: Drain): Manifold {
  return bench.place(bench.prism([boreOutline(diameter, 0)], -wall / 2, 1.5 * wall), frameAlong(normal, at));
}

export function drainRemarks(drains: readonly Drain[], diameter: number): string[] {
  const [low, high] = drains;
  if (!low) return [];
  const second = high ? `, the highest through ${high.face}` : '';
  return [`Drain holes of ${mm(diameter)}: the lowest through ${low.face}${second}.`];
}
