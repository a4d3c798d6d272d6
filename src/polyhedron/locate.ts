import { CORNER } from './meet.ts';
import { PLANE } from './plane-table.ts';
import type { Shell } from './shell.ts';
import { exactTriple, ULP } from './side.ts';

/**
 * Looks for a vertex outside plane p by climbing along edges from `start`; −1 where there is none. A vertex that no
 * edge leaves upwards is the highest of a convex solid: if it is not outside, none is.
 */
export function vertexOutside(shell: Shell, p: number, start: number): number {
  const { place, next, twin, end, into } = shell;
  const { rows } = shell.planes;
  const hx = rows[PLANE * p]!;
  const hy = rows[PLANE * p + 1]!;
  const hz = rows[PLANE * p + 2]!;
  const offset = rows[PLANE * p + 3]!;
  const length = Math.abs(hx) + Math.abs(hy) + Math.abs(hz);
  const rounding = 8 * ULP * Math.abs(offset);
  let v = start;
  let height = hx * place[CORNER * v]! + hy * place[CORNER * v + 1]! + hz * place[CORNER * v + 2]! - offset;
  let doubt = length * place[CORNER * v + 3]! + rounding;
  for (;;) {
    if (height > doubt) return v;
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
      const rise = other - height;
      const known = Math.abs(rise) > doubt + otherDoubt;
      if (known ? other > bestHeight : best === -1 && rises(shell, p, out)) {
        best = end[out]!;
        bestHeight = other;
        bestDoubt = otherDoubt;
      }
      e = twin[out]!;
    } while (e !== first);
    if (best === -1) return !(height < -doubt) && shell.exactSide(v, p) > 0 ? v : -1;
    v = best;
    height = bestHeight;
    doubt = bestDoubt;
  }
}

/** Whether a half-edge runs towards the outside of plane p: its direction is the cross product of its two normals. */
function rises({ planes, face, twin }: Shell, p: number, edge: number): boolean {
  return exactTriple(planes, p, face[edge]!, face[twin[edge]!]!) > 0;
}
