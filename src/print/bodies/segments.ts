import { dot, length, minus, plus, times, type Vector } from '../vectors.ts';

const within = (t: number): number => Math.min(1, Math.max(0, t));

/** Distance between two pieces of straight lines, neither a point (C. Ericson, Real-Time Collision Detection, 5.1.9). */
export function segmentDistance([a, b]: readonly [Vector, Vector], [c, d]: readonly [Vector, Vector]): number {
  const [u, v, w] = [minus(b, a), minus(d, c), minus(a, c)];
  const [uu, vv, uv, uw, vw] = [dot(u, u), dot(v, v), dot(u, v), dot(u, w), dot(v, w)];
  const det = uu * vv - uv * uv;
  const s = det > 1e-12 * uu * vv ? within((uv * vw - uw * vv) / det) : 0;
  const t = (uv * s + vw) / vv;
  const [s1, t1] = t < 0 ? [within(-uw / uu), 0] : t > 1 ? [within((uv - uw) / uu), 1] : [s, t];
  return length(minus(plus(a, times(u, s1)), plus(c, times(v, t1))));
}
