import type { Point } from './field.ts';

/** Room that grows into the field: `x·nx + y·ny + room`, the normal a unit vector. */
export interface Side {
  readonly nx: number;
  readonly ny: number;
  readonly room: number;
}

export interface Disc {
  readonly centre: Point;
  readonly radius: number;
}

export interface Box {
  readonly width: number;
  readonly height: number;
}

/**
 * How large a box of given proportions may be about any point, as a multiple of the one given. It touches a side when its
 * middle is half of its shadow on the side's normal away, so beside straight sides the size is the least of linear
 * functions, which has one hill.
 */
export class BoxRoom {
  /** Linear functions of the point. */
  private readonly slopes: readonly { readonly gx: number; readonly gy: number; readonly at0: number }[];

  constructor(
    sides: readonly Side[],
    private readonly discs: readonly Disc[],
    private readonly box: Box,
  ) {
    this.slopes = sides.map(({ nx, ny, room }) => {
      const half = this.shadow(nx, ny);
      return { gx: nx / half, gy: ny / half, at0: room / half };
    });
  }

  private shadow(nx: number, ny: number): number {
    return (Math.abs(nx) * this.box.width + Math.abs(ny) * this.box.height) / 2;
  }

  /** The largest size about a point; not positive where nothing fits. */
  sizeAt([x, y]: Point): number {
    let size = Number.POSITIVE_INFINITY;
    for (const { gx, gy, at0 } of this.slopes) size = Math.min(size, gx * x + gy * y + at0);
    for (const disc of this.discs) size = Math.min(size, this.besideDisc([x, y], disc));
    return size;
  }

  /** Convex shapes are apart when a direction parts them: the box's own two, or the one towards the disc's centre. */
  private besideDisc([x, y]: Point, { centre, radius }: Disc): number {
    const [dx, dy] = [x - centre[0], y - centre[1]];
    const far = Math.hypot(dx, dy);
    return Math.max(
      (Math.abs(dx) - radius) / this.shadow(1, 0),
      (Math.abs(dy) - radius) / this.shadow(0, 1),
      far === 0 ? 0 : (far - radius) / this.shadow(dx / far, dy / far),
    );
  }

  /** Both ways along the line on which the two nearest sides stay equally near: the crest that small steps slide off. */
  crestAt([x, y]: Point): Point[] {
    const [a, b] = this.slopes
      .map(({ gx, gy, at0 }) => ({ gx, gy, size: gx * x + gy * y + at0 }))
      .sort((one, other) => one.size - other.size);
    if (!a || !b) return [];
    const [dx, dy] = [b.gy - a.gy, a.gx - b.gx];
    const length = Math.hypot(dx, dy);
    return length === 0 ? [] : [1, -1].map((sense): Point => [(sense * dx) / length, (sense * dy) / length]);
  }
}
