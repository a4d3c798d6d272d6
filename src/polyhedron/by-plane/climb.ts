import { CORNER } from '../exact/meet.ts';
import { PLANE } from '../exact/plane-table.ts';
import { exactTriple, ULP } from '../exact/side.ts';
import type { Shell } from './shell.ts';

/** Looks for a vertex outside a plane by going uphill along edges. */
export class Climber {
  /** Where the last climb ended. */
  vertex = 0;

  constructor(private readonly shell: Shell) {}

  /**
   * Climbs from vertex `start` until it is outside plane p (1), or as high as the solid goes, and that is on the plane
   * (0) or inside (−1). A vertex that no edge leaves upwards is the highest of a convex solid.
   */
  climb(p: number, start: number): -1 | 0 | 1 {
    const { place, next, twin, end, into, planes } = this.shell;
    const { rows } = planes;
    const hx = rows[PLANE * p]!;
    const hy = rows[PLANE * p + 1]!;
    const hz = rows[PLANE * p + 2]!;
    const offset = rows[PLANE * p + 3]!;
    const length = Math.abs(hx) + Math.abs(hy) + Math.abs(hz);
    const rounding = 8 * ULP * Math.abs(offset);
    let v = start;
    let height = hx * place[CORNER * v]! + hy * place[CORNER * v + 1]! + hz * place[CORNER * v + 2]! - offset;
    let doubt = length * place[CORNER * v + 3]! + rounding;
    while (!(height > doubt)) {
      let best = -1;
      let bestHeight = height;
      let bestDoubt = 0;
      const first = into[v]!;
      let e = first;
      do {
        const out = next[e]!;
        const at = CORNER * end[out]!;
        const other = hx * place[at]! + hy * place[at + 1]! + hz * place[at + 2]! - offset;
        const otherDoubt = length * place[at + 3]! + rounding;
        const clear = Math.abs(other - height) > doubt + otherDoubt;
        // The best so far may be higher exactly and yet lower in doubles, where its place is poorly known.
        if (clear ? other > height && other > bestHeight : best === -1 && this.rises(p, out)) {
          best = end[out]!;
          bestHeight = other;
          bestDoubt = otherDoubt;
        }
        e = twin[out]!;
      } while (e !== first);
      if (best === -1) break;
      v = best;
      height = bestHeight;
      doubt = bestDoubt;
    }
    this.vertex = v;
    return height > doubt ? 1 : height < -doubt ? -1 : this.shell.exactSide(v, p);
  }

  /** Whether a half-edge runs uphill: its direction is the cross product of the normals of its face and its twin's. */
  private rises(p: number, edge: number): boolean {
    const { planes, face, twin } = this.shell;
    return exactTriple(planes, p, face[edge]!, face[twin[edge]!]!) > 0;
  }
}
