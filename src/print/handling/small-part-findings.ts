import type { Workbench } from '../kit.ts';
import type { Mesh } from '../mesh.ts';
import type { Part } from '../part.ts';
import { cross, dot, length, minus, type Vector, vectorAt } from '../vectors.ts';
import { SMALL_PARTS } from './figures.ts';
import type { Finding } from './finding.ts';
import { hullOf } from './hull.ts';
import { piecesOf } from './pieces.ts';
import { longestLine, type SmallPartVerdict, smallPart } from './small-parts.ts';

/** Every connected solid of every part in the small-parts cylinder; copies of a part are tried once. */
export function smallPartFindings(bench: Workbench, parts: readonly Part[]): Finding<'small-part'>[] {
  return parts.flatMap(({ name, mesh, placed }) => {
    const pieces = piecesOf(mesh);
    return pieces.map((piece, i) => {
      const hull = hullOf(bench, piece);
      const verdict = smallPart(hull.positions, { inscribed: inscribedRadius(hull) });
      const which =
        pieces.length > 1 ? `Piece ${i + 1} of ${pieces.length} of the part "${name}"` : `The part "${name}"`;
      return finding(name, which, placed.length, longestLine(pointsOf(hull)), verdict);
    });
  });
}

function finding(
  part: string,
  which: string,
  copies: number,
  length: number,
  verdict: SmallPartVerdict,
): Finding<'small-part'> {
  const gauge = `the ${SMALL_PARTS.across} mm small-parts cylinder`;
  const times = copies > 1 ? ` (${copies} copies)` : '';
  const words = {
    fits: `fits ${gauge}. Keep it from children under 3, fasten it, or make it larger.`,
    'does not fit': `does not fit ${gauge} in any direction.`,
    undecided: `is so near to the limit of ${gauge} that calculation does not decide; try it, or change its size.`,
  }[verdict.verdict];
  const within = verdict.verdict === 'undecided' ? ` Undecided within ${verdict.within.toFixed(2)} mm.` : '';
  return {
    code: 'small-part',
    severity: verdict.verdict === 'does not fit' ? 'note' : 'warning',
    part,
    measured: length,
    figure: SMALL_PARTS.across,
    unit: 'mm',
    source: SMALL_PARTS.source,
    text: `${which}${times}, ${length.toFixed(1)} mm at its longest, ${words}${within}`,
  };
}

/** Radius of a ball about the middle of a hull's corners that stays inside it; a little less, for single precision. */
function inscribedRadius({ positions, triangles }: Mesh): number {
  const count = positions.length / 3;
  const middle = [0, 1, 2].map((axis) => positions.reduce((sum, v, i) => (i % 3 === axis ? sum + v / count : sum), 0));
  const centre = [middle[0]!, middle[1]!, middle[2]!] as const;
  let least = Number.POSITIVE_INFINITY;
  for (let t = 0; t < triangles.length; t += 3) {
    const [a, b, c] = [triangles[t]!, triangles[t + 1]!, triangles[t + 2]!].map((v) => vectorAt(positions, v));
    const normal = cross(minus(b!, a!), minus(c!, a!));
    const size = length(normal);
    if (size > SLIVER) least = Math.min(least, dot(normal, minus(a!, centre)) / size);
  }
  return least - 0.01;
}

/** Twice the area, mm², below which single precision does not tell a triangle's direction. */
const SLIVER = 1e-4;

const pointsOf = ({ positions }: Mesh): Vector[] =>
  Array.from({ length: positions.length / 3 }, (_, i) => vectorAt(positions, i));
