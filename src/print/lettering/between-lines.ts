import { dot, type Vector } from '../vectors.ts';
import type { Field, Point } from './field.ts';

/** A strip on the surface, about a plane through the crystal's centre, that letters must stay off. Millimetres. */
export interface SurfaceLine {
  /** Of the plane, of unit length. */
  readonly normal: Vector;
  /** Half the width of the strip. */
  readonly half: number;
}

/** The convex pieces that lines leave of a convex polygon on a field. */
export function betweenLines(polygon: readonly Point[], field: Field, lines: readonly SurfaceLine[]): Point[][] {
  return lines.reduce<Point[][]>(
    (pieces, { normal, half }) =>
      pieces.flatMap((piece) =>
        [1, -1]
          .map((sign) => clipped(piece, (point) => sign * heightOver(normal, field, point) - half))
          .filter((one) => one.length >= 3),
      ),
    [[...polygon]],
  );
}

const heightOver = (normal: Vector, { origin, right, up }: Field, [x, y]: Point): number =>
  dot(normal, origin) + x * dot(normal, right) + y * dot(normal, up);

/** What of a convex polygon has `inside` not below 0 (Sutherland and Hodgman 1974). */
function clipped(polygon: readonly Point[], inside: (point: Point) => number): Point[] {
  return polygon.flatMap((point, i) => {
    const next = polygon[(i + 1) % polygon.length]!;
    const [own, other] = [inside(point), inside(next)];
    const kept = own >= 0 ? [point] : [];
    if (own >= 0 === other >= 0) return kept;
    const t = own / (own - other);
    return [...kept, [point[0] + t * (next[0] - point[0]), point[1] + t * (next[1] - point[1])] as const];
  });
}
