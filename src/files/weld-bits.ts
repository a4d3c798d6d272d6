/** Points that were told apart by the bits of their float32 coordinates. */
export interface WeldedPoints {
  /** x, y, z of each different point, in order of first appearance. */
  readonly points: Float32Array;
  /** For each point of the input, its number among the different ones. */
  readonly numbers: Uint32Array;
}

/**
 * Gives equal points one number. Equal means equal bits, as the readers of STL match them: 0 and -0 differ.
 * An open-addressed table of at least twice as many places as points; the order does not depend on the hash.
 */
export function weldBits(coordinates: Float32Array): WeldedPoints {
  const count = coordinates.length / 3;
  const bits = new Int32Array(coordinates.buffer, coordinates.byteOffset, coordinates.length);
  let size = 16;
  while (size < 2 * count) size *= 2;
  const table = new Int32Array(size).fill(-1);
  const numbers = new Uint32Array(count);
  const firsts = new Uint32Array(count);
  let different = 0;
  for (let point = 0; point < count; point++) {
    const x = bits[3 * point]!;
    const y = bits[3 * point + 1]!;
    const z = bits[3 * point + 2]!;
    let slot = hash(x, y, z) & (size - 1);
    let number = table[slot]!;
    while (number >= 0) {
      const other = 3 * firsts[number]!;
      if (bits[other] === x && bits[other + 1] === y && bits[other + 2] === z) break;
      slot = (slot + 1) & (size - 1);
      number = table[slot]!;
    }
    if (number < 0) {
      number = different++;
      table[slot] = number;
      firsts[number] = point;
    }
    numbers[point] = number;
  }
  return { points: pick(coordinates, firsts.subarray(0, different)), numbers };
}

/** Mixes three words; the constants and shifts are those of the MurmurHash3 finaliser (A. Appleby, public domain). */
function hash(x: number, y: number, z: number): number {
  let h = Math.imul(x, 0x85ebca6b) ^ Math.imul(y ^ (y >>> 15), 0xc2b2ae35) ^ Math.imul(z ^ (z >>> 13), 0x27d4eb2f);
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return h ^ (h >>> 16);
}

function pick(coordinates: Float32Array, points: Uint32Array): Float32Array {
  const picked = new Float32Array(3 * points.length);
  for (let i = 0; i < points.length; i++) {
    const from = 3 * points[i]!;
    picked[3 * i] = coordinates[from]!;
    picked[3 * i + 1] = coordinates[from + 1]!;
    picked[3 * i + 2] = coordinates[from + 2]!;
  }
  return picked;
}
