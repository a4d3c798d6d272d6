import type { HalfSpace } from './hand-planes.ts';

/** Numbers in [0, 1) from a seed (mulberry32, public domain): the same everywhere, so that a failure repeats. */
export function numbersFrom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

/**
 * Planes evenly spread over all directions, at distances between 1 and 1 + `spread` from the origin.
 * `whole`: normals of whole numbers of about 200, otherwise of length 1 as far as doubles allow.
 */
export function randomPlanes(
  n: number,
  { seed, whole, spread }: { seed: number; whole: boolean; spread: number },
): HalfSpace[] {
  const next = numbersFrom(seed);
  return Array.from({ length: n }, (): HalfSpace => {
    const z = 2 * next() - 1;
    const turn = 2 * Math.PI * next();
    const r = Math.sqrt(1 - z * z);
    const unit = [r * Math.cos(turn), r * Math.sin(turn), z];
    const [h, k, l] = whole ? unit.map((value) => Math.round(200 * value)) : unit;
    return [h!, k!, l!, (1 + spread * next()) * Math.hypot(h!, k!, l!)];
  });
}
