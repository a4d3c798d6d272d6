type Colour = readonly [number, number, number];

/** A square of samples, each with a colour and the depth of what is nearest. Points are x, y downwards, depth. */
export class Raster {
  private readonly depth: Float64Array;
  private readonly colour: Float32Array;

  constructor(private readonly side: number) {
    this.depth = new Float64Array(side * side).fill(-Infinity);
    this.colour = new Float32Array(3 * side * side);
  }

  /** Fills a triangle whose vertex numbers start at `from`, where it is the nearest so far. */
  triangle(points: Float64Array, triangles: Uint32Array, from: number, colour: Colour): void {
    const [a, b, c] = [3 * triangles[from]!, 3 * triangles[from + 1]!, 3 * triangles[from + 2]!];
    const [ax, ay, az] = [points[a]!, points[a + 1]!, points[a + 2]!];
    const [bx, by, bz] = [points[b]! - ax, points[b + 1]! - ay, points[b + 2]! - az];
    const [cx, cy, cz] = [points[c]! - ax, points[c + 1]! - ay, points[c + 2]! - az];
    const area = bx * cy - by * cx;
    if (area === 0) return;
    const [left, right] = this.span(ax, ax + bx, ax + cx);
    const [top, bottom] = this.span(ay, ay + by, ay + cy);
    for (let y = top; y <= bottom; y++)
      for (let x = left; x <= right; x++) {
        const [px, py] = [x + 0.5 - ax, y + 0.5 - ay];
        const v = (px * cy - py * cx) / area;
        const w = (bx * py - by * px) / area;
        if (v < 0 || w < 0 || v + w > 1) continue;
        this.set(y * this.side + x, az + v * bz + w * cz, colour);
      }
  }

  /** A line of half width `half` between two vertices, hidden where something is clearly nearer. */
  line(points: Float64Array, from: number, to: number, half: number, colour: Colour): void {
    const [ax, ay, az] = [points[3 * from]!, points[3 * from + 1]!, points[3 * from + 2]!];
    const [dx, dy, dz] = [points[3 * to]! - ax, points[3 * to + 1]! - ay, points[3 * to + 2]! - az];
    const long = dx * dx + dy * dy;
    const [left, right] = this.span(Math.min(ax, ax + dx) - half, Math.max(ax, ax + dx) + half);
    const [top, bottom] = this.span(Math.min(ay, ay + dy) - half, Math.max(ay, ay + dy) + half);
    for (let y = top; y <= bottom; y++)
      for (let x = left; x <= right; x++) {
        const [px, py] = [x + 0.5 - ax, y + 0.5 - ay];
        const along = long > 0 ? Math.min(1, Math.max(0, (px * dx + py * dy) / long)) : 0;
        if ((px - along * dx) ** 2 + (py - along * dy) ** 2 > half * half) continue;
        // The faces on both sides reach nearer than the line by their slope within its width.
        const place = y * this.side + x;
        if (az + along * dz < this.depth[place]! - 3 * half) continue;
        this.colour.set(colour, 3 * place);
        this.depth[place] = Math.max(this.depth[place]!, az + along * dz);
      }
  }

  /** Eight-bit RGBA of `fine` times `fine` samples a pixel; free samples show the ground or are see-through. */
  reduced(fine: number, ground: Colour | undefined): Uint8Array {
    const size = this.side / fine;
    const rgba = new Uint8Array(4 * size * size);
    for (let y = 0; y < size; y++)
      for (let x = 0; x < size; x++) {
        const sum = [0, 0, 0, 0];
        for (let k = 0; k < fine * fine; k++) {
          const place = (y * fine + Math.floor(k / fine)) * this.side + x * fine + (k % fine);
          const filled = this.depth[place]! > -Infinity;
          if (!filled && !ground) continue;
          for (let channel = 0; channel < 3; channel++)
            sum[channel]! += filled ? this.colour[3 * place + channel]! : ground![channel]!;
          sum[3]!++;
        }
        const covered = Math.max(1, sum[3]!);
        const pixel = [sum[0]! / covered, sum[1]! / covered, sum[2]! / covered, sum[3]! / (fine * fine)];
        rgba.set(
          pixel.map((value) => Math.round(255 * value)),
          4 * (y * size + x),
        );
      }
    return rgba;
  }

  private set(place: number, depth: number, colour: Colour): void {
    if (depth <= this.depth[place]!) return;
    this.depth[place] = depth;
    this.colour[3 * place] = colour[0];
    this.colour[3 * place + 1] = colour[1];
    this.colour[3 * place + 2] = colour[2];
  }

  /** Samples whose middles may lie between the least and the greatest of some coordinates. */
  private span(...values: number[]): [number, number] {
    return [
      Math.max(0, Math.floor(Math.min(...values) - 0.5)),
      Math.min(this.side - 1, Math.ceil(Math.max(...values))),
    ];
  }
}
