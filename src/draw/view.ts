import { type Metric, normal, toCartesian } from '../crystal/cell.ts';
import type { Miller, Zone } from '../crystal/spaces.ts';
import { cross, unit, type Vector } from './vector.ts';

/**
 * From where a crystal is seen, always by parallel rays: `general` shows it a little from the right and from above;
 * along a zone, its axis points at the viewer; onto a face, the face's normal does. `turn` is how far the viewer stands
 * to the right of x (towards y), `tilt` how far above the x–y plane, in degrees.
 */
export type View =
  | 'general'
  | { readonly along: Zone }
  | { readonly onto: Miller }
  | { readonly turn: number; readonly tilt: number };

/** Right-handed unit vectors in the crystal's Cartesian frame. */
export interface ViewFrame {
  /** To the right on the page. */
  readonly right: Vector;
  /** Upwards on the page. */
  readonly up: Vector;
  /** At the viewer. */
  readonly toward: Vector;
}

/**
 * Near the directions that textbooks use. No face of the cube, octahedron, rhomb-dodecahedron or of a hexagonal prism in
 * either position is within 5° of being seen edge-on.
 */
export const GENERAL_VIEW = { turn: 21, tilt: 13 } as const;

/** Sine of the angle to c below which the view counts as straight along it; far above rounding, far below any zone. */
const STRAIGHT = 1e-9;

/**
 * The directions of the page. c stands upright; where the view is along c itself, b* points right, so that from above
 * x (the direction of a, or of its part across c) points down, at a reader who has the page in front of them.
 * @throws RangeError where turn or tilt is not a number
 */
export function viewFrame(view: View, metric: Metric): ViewFrame {
  const toward = unit(direction(view, metric));
  if (!toward.every(Number.isFinite)) throw new RangeError('A view needs a turn and a tilt in degrees.');
  const sideways: Vector = [0 - toward[1], toward[0], 0]; // z × toward
  const right = Math.hypot(...sideways) < STRAIGHT ? ([0, 1, 0] as const) : unit(sideways);
  return { right, up: cross(toward, right), toward };
}

function direction(view: View, metric: Metric): Vector {
  if (view === 'general') return fromAngles(GENERAL_VIEW);
  if ('along' in view) return toCartesian(metric, view.along);
  if ('onto' in view) return normal(metric, view.onto);
  return fromAngles(view);
}

function fromAngles({ turn, tilt }: { readonly turn: number; readonly tilt: number }): Vector {
  const [a, b] = [(turn * Math.PI) / 180, (tilt * Math.PI) / 180];
  return [Math.cos(b) * Math.cos(a), Math.cos(b) * Math.sin(a), Math.sin(b)];
}
