import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { orient2d, orient3d } from '../../../src/files/mesh/orient.ts';

describe('orient3d', () => {
  const at = (...values: number[]): Float64Array => Float64Array.from(values);

  it('is positive on the side of the right-hand normal', () => {
    const p = at(0, 0, 0, 1, 0, 0, 0, 1, 0, 0.2, 0.2, 3, 0.2, 0.2, -1e-30, 5, 5, 0);
    expect(orient3d(p, 0, 1, 2, 3)).toBe(1);
    expect(orient3d(p, 0, 1, 2, 4)).toBe(-1);
    expect(orient3d(p, 0, 1, 2, 5)).toBe(0);
  });

  // The published hard case: points nearly in one plane, where plain double arithmetic gives the wrong sign
  // (J. R. Shewchuk 1997, section 1). The exact answer is by construction: d = c + (b - a) + one step along z.
  it('decides one float step off a slanted plane', () => {
    const step = 2 ** -20;
    const [a, b, c] = [
      [1000, 1000, 1000],
      [1001, 1000, 999],
      [1000, 1001, 999],
    ] as const; // x + y + z = 3000
    const p = at(...a, ...b, ...c, 900, 900, 1200, 900, 900, 1200 + step, 900 - 2 ** -43, 900, 1200);
    expect(orient3d(p, 0, 1, 2, 3)).toBe(0);
    expect(orient3d(p, 0, 1, 2, 4)).toBe(1);
    expect(orient3d(p, 0, 1, 2, 5)).toBe(-1);
  });

  const whole = fc.integer({ min: -3, max: 3 });
  const point = fc.tuple(whole, whole, whole);

  it('agrees with whole-number arithmetic at any scale', () => {
    fc.assert(
      fc.property(point, point, point, point, fc.integer({ min: -320, max: 300 }), (a, b, c, d, power) => {
        const [u, v, w] = [b, c, d].map((q) => q.map((value, i) => value - a[i]!)) as [number[], number[], number[]];
        const volume =
          w[0]! * (u[1]! * v[2]! - u[2]! * v[1]!) +
          w[1]! * (u[2]! * v[0]! - u[0]! * v[2]!) +
          w[2]! * (u[0]! * v[1]! - u[1]! * v[0]!);
        const p = Float64Array.from([...a, ...b, ...c, ...d].map((value) => value * 2 ** power));
        expect(orient3d(p, 0, 1, 2, 3)).toBe(Math.sign(volume) + 0);
        for (const axis of [0, 1, 2]) {
          const [i, j] = [(axis + 1) % 3, (axis + 2) % 3] as const;
          const area = u[i]! * v[j]! - u[j]! * v[i]!;
          expect(orient2d(p, axis, 0, 1, 2), `along axis ${axis}`).toBe(Math.sign(area) + 0);
        }
      }),
    );
  });

  it('changes its sign with every exchange of two points, also where doubles cannot tell', () => {
    const near = fc.integer({ min: -2, max: 2 }).map((steps) => 0.1 + steps * 2 ** -56);
    const close = fc.tuple(near, near, near);
    fc.assert(
      fc.property(close, close, close, close, (a, b, c, d) => {
        const p = Float64Array.from([...a, ...b, ...c, ...d]);
        const sign = orient3d(p, 0, 1, 2, 3);
        expect(orient3d(p, 1, 0, 2, 3) + sign).toBe(0);
        expect(orient3d(p, 0, 1, 3, 2) + sign).toBe(0);
        expect(orient3d(p, 3, 1, 2, 0) + sign).toBe(0);
        expect(orient3d(p, 1, 2, 3, 0) + sign).toBe(0);
      }),
    );
  });
});
