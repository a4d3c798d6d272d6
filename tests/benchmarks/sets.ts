import { exactOffsets } from '../../src/polyhedron/offset.ts';
import { loosePlanes, type PlaneSet } from '../../src/polyhedron/planes.ts';
import { crystalPlanes } from '../polyhedron/crystal-planes.ts';
import { randomPlanes } from '../polyhedron/random-planes.ts';

export interface BenchmarkSet {
  readonly name: string;
  /** Sets of one family differ in size only: the growth of the cost is fitted over them. */
  readonly family: string;
  readonly planes: PlaneSet;
}

const divisor = (a: number, b: number): number => (b === 0 ? a : divisor(b, a % b));

/** Forms of m-3m in the order of their largest index, until they have at least so many faces; all touch the unit sphere. */
function cubicPlanes(atLeast: number): PlaneSet {
  const forms: { hkl: number[]; D: number }[] = [];
  for (let h = 1; ; h++)
    for (let k = 0; k <= h; k++)
      for (let l = 0; l <= k; l++) {
        if (divisor(divisor(h, k), l) !== 1) continue;
        forms.push({ hkl: [h, k, l], D: Math.hypot(h, k, l) });
        const planes = crystalPlanes('m-3m', forms);
        if (planes.form.length >= atLeast) return planes;
      }
}

function loose(n: number, whole: boolean, spread: number): PlaneSet {
  const list = randomPlanes(n, { seed: n, whole, spread });
  return loosePlanes(
    Float64Array.from(list.flatMap((plane) => plane.slice(0, 3))),
    exactOffsets(list.map(([, , , d]) => d)),
  );
}

const SIZES = [50, 100, 200, 500, 1000];

export const benchmarkSets = (): BenchmarkSet[] => [
  ...[26, 122, 266, 1000].map((n) => {
    const planes = cubicPlanes(n);
    return { name: `m-3m, ${planes.form.length} planes`, family: 'm-3m', planes };
  }),
  ...SIZES.map((n) => ({ name: `random, ${n} whole`, family: 'random whole', planes: loose(n, true, 0.1) })),
  ...SIZES.map((n) => ({ name: `random, ${n} double`, family: 'random double', planes: loose(n, false, 0.1) })),
  ...SIZES.map((n) => ({ name: `sphere, ${n} double`, family: 'sphere double', planes: loose(n, false, 0) })),
];
