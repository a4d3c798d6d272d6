import type { Vector } from '../vectors.ts';

/** Corners closer than this, millimetres, are one: a file in single precision could not keep them apart. */
const ONE_CORNER = 1e-4;

/** Corners that many bodies share, each once. */
export class CornerPool {
  private readonly values: number[] = [];
  private readonly boxes = new Map<string, number[]>();

  /** Number of the corner at a point. */
  at([x, y, z]: Vector): number {
    const [i, j, k] = [x, y, z].map((value) => Math.floor(value / ONE_CORNER)) as [number, number, number];
    for (let di = -1; di <= 1; di++)
      for (let dj = -1; dj <= 1; dj++)
        for (let dk = -1; dk <= 1; dk++)
          for (const known of this.boxes.get(`${i + di} ${j + dj} ${k + dk}`) ?? [])
            if (this.distance(known, x, y, z) < ONE_CORNER) return known;
    const number = this.values.length / 3;
    this.values.push(x, y, z);
    const key = `${i} ${j} ${k}`;
    this.boxes.set(key, [...(this.boxes.get(key) ?? []), number]);
    return number;
  }

  /** The corners of a polygon, each once even where neighbours fell together; empty when it has no width left. */
  polygon(points: readonly Vector[]): number[] {
    const cycle = points
      .map((point) => this.at(point))
      .filter((corner, i, all) => corner !== all[(i + 1) % all.length]);
    return new Set(cycle).size < 3 ? [] : cycle;
  }

  get positions(): readonly number[] {
    return this.values;
  }

  private distance(corner: number, x: number, y: number, z: number): number {
    const [p, q, r] = this.values.slice(3 * corner, 3 * corner + 3);
    return Math.hypot(p! - x, q! - y, r! - z);
  }
}
