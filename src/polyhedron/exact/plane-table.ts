import { doubleOffset, LARGEST_MULTIPLE, type Offset } from '../offset.ts';
import type { PlaneSet } from '../planes.ts';
import { type BigRow, bigRow } from './big.ts';
import { bytes, doubles, withRoom } from './room.ts';

/** Normals of whole numbers up to this are multiplied out exactly in doubles: 6·999³·2^18·4 < 2^53. */
const LARGEST_INTEGER_NORMAL = 999;
/** Numbers kept for a plane: h1, h2, h3, the nearest double to the exact offset, and the largest of |h1|, |h2|, |h3|. */
export const PLANE = 5;

/** Sides of a cube around everything, in the order x, y, z, −x, −y, −z. */
const FRAME = [1, 0, 0, 0, 1, 0, 0, 0, 1, -1, 0, 0, 0, -1, 0, 0, 0, -1];

/** The planes of a set, and after them the frame: six sides of a cube so large that it cuts only what is open. */
export class PlaneTable {
  count = 0;
  rows = doubles(PLANE * 64);
  /** 1 where the integer shortcut holds: whole normals within bounds and a small multiple. */
  whole = bytes(64);
  /** Distance of the nearest plane from the origin, in index space and give or take a factor of √3. */
  nearest = 0;
  private set: PlaneSet | null = null;
  private frame: Offset = doubleOffset(1, -1);
  /** Planes that were needed in whole numbers of any size. */
  private readonly big = new Map<number, BigRow>();

  /** @throws RangeError for numbers that are not finite, or a plane without a normal */
  load(set: PlaneSet): this {
    const { normals, form, offsets } = set;
    const count = form.length;
    this.set = set;
    this.count = count;
    this.rows = withRoom(this.rows, PLANE * (count + 6), doubles);
    this.whole = withRoom(this.whole, count + 6, bytes);
    this.big.clear();
    let largest = 1;
    let farthest = 0;
    let nearest = Number.POSITIVE_INFINITY;
    let allWhole = true;
    for (let p = 0; p < count; p++) {
      const { approximate, multiple } = offsets[form[p]!]!;
      const size = this.put(p, normals[3 * p]!, normals[3 * p + 1]!, normals[3 * p + 2]!, approximate);
      const isWhole = this.hasWholeNormal(p);
      this.whole[p] = isWhole && size <= LARGEST_INTEGER_NORMAL && Math.abs(multiple) <= LARGEST_MULTIPLE ? 1 : 0;
      allWhole &&= isWhole;
      largest = Math.max(largest, size);
      farthest = Math.max(farthest, Math.abs(approximate));
      nearest = Math.min(nearest, approximate / size);
      if (size === 0) throw new RangeError('A plane needs a normal that is not 0, 0, 0.');
    }
    if (!Number.isFinite(largest + farthest)) throw new RangeError('A plane needs finite numbers.');
    this.nearest = nearest;
    // By Cramer's rule with a determinant of at least 1, no coordinate of a corner exceeds 6·largest²·farthest.
    this.putFrame((allWhole ? 12 * largest * largest : 2 ** 40) * (farthest || 1));
    return this;
  }

  /** The exact offset of a plane. */
  offset(p: number): Offset {
    return p < this.count ? this.set!.offsets[this.set!.form[p]!]! : this.frame;
  }

  /** A plane in whole numbers of any size. */
  bigRow(p: number): BigRow {
    const known = this.big.get(p);
    if (known) return known;
    const at = PLANE * p;
    const row = bigRow(this.rows[at]!, this.rows[at + 1]!, this.rows[at + 2]!, this.offset(p).exact);
    this.big.set(p, row);
    return row;
  }

  private putFrame(reach: number): void {
    this.frame = doubleOffset(2 ** Math.ceil(Math.log2(reach)), -1);
    for (let i = 0; i < 6; i++) {
      this.put(this.count + i, FRAME[3 * i]!, FRAME[3 * i + 1]!, FRAME[3 * i + 2]!, this.frame.approximate);
      this.whole[this.count + i] = 1;
    }
  }

  private put(p: number, x: number, y: number, z: number, offset: number): number {
    const { rows } = this;
    const size = Math.max(Math.abs(x), Math.abs(y), Math.abs(z));
    rows[PLANE * p] = x;
    rows[PLANE * p + 1] = y;
    rows[PLANE * p + 2] = z;
    rows[PLANE * p + 3] = offset;
    rows[PLANE * p + 4] = size;
    return size;
  }

  private hasWholeNormal(p: number): boolean {
    const at = PLANE * p;
    const [x, y, z] = [this.rows[at]!, this.rows[at + 1]!, this.rows[at + 2]!];
    return Math.floor(x) === x && Math.floor(y) === y && Math.floor(z) === z;
  }
}
