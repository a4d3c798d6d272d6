import type { Manifold } from 'manifold-3d';
import { convexHull } from '../../polyhedron/polygon.ts';
import type { Outline } from '../../rods/axis-symbol.ts';
import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import type { Workbench } from '../kit.ts';
import type { Point } from '../lettering/field.ts';
import { sidesOf } from '../lettering/fit-box.ts';
import type { Mesh } from '../mesh.ts';
import { times, type Vector, vectorAt } from '../vectors.ts';
import { inStance, type Stance, stanceOf } from './attitude.ts';
import { liftRoom } from './cavity.ts';
import type { StandOptions } from './options.ts';
import { lowestOf, rodSlot } from './rod-slots.ts';

/** The cradle before it is put on its plaque; in the crystal's frame turned to the stance, centre at the origin. */
export interface Cradle {
  readonly stance: Stance;
  /** Outline of the pedestal seen from above. */
  readonly outline: Outline;
  /** What the crystal and its rods cover, seen from above. */
  readonly shadow: Outline;
  /** What is taken out of the pedestal. */
  readonly rooms: readonly Manifold[];
  /** Heights: of the lowest point of the rooms, of the rim. */
  readonly floor: number;
  readonly rim: number;
  /** How deep the crystal sits. */
  readonly hold: number;
}

const USUAL_HOLD = { share: 1 / 3, most: 25 };
/** The rooms go on this far above the rim. */
const ABOVE = 0.2;
/** The centre of mass must be this far inside of the rim. */
const STEADY = 0.5;

/** @throws ObjectError `stand` when the crystal would tip out of it */
export function cradleFor(bench: Workbench, shape: ClosedShape, scale: number, options: StandOptions): Cradle {
  const { clearance, wall, rods = [] } = options;
  const stance = stanceOf(options.attitude);
  const body = pointsOf(shape.measures.positions).map((p) => inStance(stance, times(p, scale)));
  const [low, high] = [Math.min(...body.map(([, , z]) => z)), Math.max(...body.map(([, , z]) => z))];
  const hold = options.hold ?? Math.min(USUAL_HOLD.most, USUAL_HOLD.share * (high - low));
  if (!(hold > 0 && hold < high - low)) throw wrongHold(hold, high - low);
  const rim = low + hold;
  const room = liftRoom(shape, scale, stance.up, clearance, rim + ABOVE);
  const corners = pointsOf(room.positions).map((p) => inStance(stance, p));
  const opening = convexHull(corners.map(([x, y]): Point => [x, y]));
  assertSteady(opening, inStance(stance, times(shape.measures.centroid, scale)), hold);
  const lowRods = rods.filter((rod) => lowestOf(rod, stance.up) - clearance < rim);
  const lift = rim + ABOVE - Math.min(low, ...rods.map((rod) => lowestOf(rod, stance.up))) + 2 * clearance;
  const floors = [...corners.map(([, , z]) => z), ...lowRods.map((rod) => lowestOf(rod, stance.up) - 2 * clearance)];
  const turned = (solid: Manifold): Manifold => bench.place(solid, stanceMatrix(stance));
  return {
    stance,
    outline: widened(opening, wall),
    shadow: convexHull([...body.map(([x, y]): Point => [x, y]), ...rods.flatMap((rod) => footOf(rod, stance))]),
    rooms: [
      turned(bench.solid(withoutSurface(room))),
      ...lowRods.map((rod) => turned(rodSlot(bench, rod, stance.up, clearance, lift))),
    ],
    floor: Math.min(...floors),
    rim,
    hold,
  };
}

const withoutSurface = ({ positions, triangles }: Mesh): Mesh => ({ positions, triangles });

const pointsOf = (positions: Float64Array): Vector[] =>
  Array.from({ length: positions.length / 3 }, (_, i) => vectorAt(positions, i));

function footOf({ from, to, radius }: { from: Vector; to: Vector; radius: number }, stance: Stance): Point[] {
  return [from, to].flatMap((end) => {
    const [x, y] = inStance(stance, end);
    return circle([x, y], radius);
  });
}

/** Takes the crystal's frame to the stance. */
export const stanceMatrix = ({ right: r, away: a, up: u }: Stance): Parameters<Workbench['place']>[1] => [
  r[0],
  a[0],
  u[0],
  0,
  r[1],
  a[1],
  u[1],
  0,
  r[2],
  a[2],
  u[2],
  0,
  0,
  0,
  0,
  1,
];

/** A convex outline with material of this thickness around it: its corners rounded, its sides moved out. */
const widened = (outline: readonly Point[], by: number): Point[] =>
  convexHull(outline.flatMap((corner) => circle(corner, by)));

const ROUND = 24;

/** Its sides touch the true circle. */
const circle = ([x, y]: Point, radius: number): Point[] =>
  Array.from({ length: ROUND }, (_, i): Point => {
    const angle = (2 * Math.PI * (i + 0.5)) / ROUND;
    const far = radius / Math.cos(Math.PI / ROUND);
    return [x + far * Math.cos(angle), y + far * Math.sin(angle)];
  });

function assertSteady(opening: readonly Point[], [x, y]: Vector, hold: number): void {
  const inside = Math.min(...sidesOf(opening).map(({ nx, ny, room }) => x * nx + y * ny + room));
  if (inside >= STEADY) return;
  throw new ObjectError(
    'stand',
    `the crystal would tip over: its centre of mass is ${inside < 0 ? `${(-inside).toFixed(1)} mm outside` : `only ${inside.toFixed(1)} mm inside`} of the cradle's rim when it sits ${hold.toFixed(1)} mm deep`,
    'let it rest on another face, or sit deeper in the stand',
  );
}

const wrongHold = (hold: number, height: number): ObjectError =>
  new ObjectError(
    'stand',
    `a crystal of ${height.toFixed(1)} mm height cannot sit ${hold.toFixed(1)} mm deep`,
    `give a depth between 0 and ${height.toFixed(1)} mm, a third of it for instance`,
  );
