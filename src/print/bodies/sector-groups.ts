import type { ClosedShape } from '../../shape/shape.ts';
import type { Piece, PieceFace } from './cut-piece.ts';

/** Faces, by plane number, whose sectors make one piece; and forms that had to be split into single faces. */
export interface SectorGroups {
  readonly groups: readonly (readonly number[])[];
  readonly split: readonly number[];
}

/**
 * The faces of each form that hang together by edges. Where their joined pyramids would touch themselves in a point (a
 * prism's faces all round: its two ends meet in the centre), each face stays by itself, unless a gap opens the centre.
 */
export function sectorGroups({ solid }: ClosedShape, { faces }: Piece, opened: boolean): SectorGroups {
  const { form } = solid.planes;
  const groups: number[][] = [];
  const split = new Set<number>();
  for (const connected of connectedFaces(faces, (face) => form[face.plane]!)) {
    const planes = connected.map(({ plane }) => plane);
    if (opened || isSimple(connected).simple) groups.push(planes);
    else {
      split.add(form[planes[0]!]!);
      groups.push(...planes.map((plane) => [plane]));
    }
  }
  return { groups, split: [...split] };
}

type Directed = readonly [number, number];

const edgesOf = ({ corners }: PieceFace): Directed[] =>
  corners.map((a, i): Directed => [a, corners[(i + 1) % corners.length]!]);

/** The outline of a set of faces, and whether it is one closed line at most that passes no corner twice. */
export function isSimple(faces: readonly PieceFace[]): { simple: boolean; boundary: readonly Directed[] } {
  const all = faces.flatMap(edgesOf);
  const known = new Set(all.map(([a, b]) => `${a},${b}`));
  const boundary = all.filter(([a, b]) => !known.has(`${b},${a}`));
  const next = new Map(boundary);
  if (next.size < boundary.length) return { simple: false, boundary };
  let steps = 0;
  let at = boundary[0]?.[0];
  while (at !== undefined && (steps === 0 || at !== boundary[0]![0])) {
    at = next.get(at);
    steps++;
  }
  return { simple: steps === boundary.length, boundary };
}

function connectedFaces(faces: readonly PieceFace[], kind: (face: PieceFace) => number): PieceFace[][] {
  const at = new Map(faces.flatMap((face) => edgesOf(face).map(([a, b]) => [`${a},${b}`, face] as const)));
  const seen = new Set<PieceFace>();
  return faces.flatMap((first) => {
    if (seen.has(first)) return [];
    const group = [first];
    seen.add(first);
    for (const face of group)
      for (const [a, b] of edgesOf(face)) {
        const other = at.get(`${b},${a}`);
        if (!other || seen.has(other) || kind(other) !== kind(first)) continue;
        seen.add(other);
        group.push(other);
      }
    return [group];
  });
}
