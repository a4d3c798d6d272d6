import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { normal } from '../../src/crystal/cell.ts';
import { miller, zone } from '../../src/crystal/spaces.ts';
import { cross, dot, type Vector } from '../../src/draw/vector.ts';
import { type View, viewFrame } from '../../src/draw/view.ts';
import { anyView, cube, monoclinic, quartz, triclinic } from './crystals.ts';

const near = (actual: Vector, expected: readonly number[]): void =>
  actual.forEach((value, i) => {
    expect(value, `${actual} for ${expected}`).toBeCloseTo(expected[i]!, 12);
  });

describe('directions of the page', () => {
  const { metric } = cube.crystal;

  it('looking along c from above: x points down, y to the right', () => {
    const { right, up, toward } = viewFrame({ along: zone(0, 0, 1) }, metric);
    near(toward, [0, 0, 1]);
    near(right, [0, 1, 0]);
    near(up, [-1, 0, 0]);
  });

  it('looking along c from below: x points up, y still to the right', () => {
    const { right, up } = viewFrame({ along: zone(0, 0, -1) }, metric);
    near(right, [0, 1, 0]);
    near(up, [1, 0, 0]);
  });

  it('looking along x: y to the right, c upright', () => {
    const { right, up } = viewFrame({ turn: 0, tilt: 0 }, metric);
    near(right, [0, 1, 0]);
    near(up, [0, 0, 1]);
  });

  it('in the general view a points at the viewer and down to the left, b to the right and back', () => {
    const { right, up, toward } = viewFrame('general', metric);
    expect([right[0] < 0, up[0] < 0, toward[0] > 0.8]).toEqual([true, true, true]);
    expect([right[1] > 0.8, toward[1] > 0]).toEqual([true, true]);
  });

  it('onto a face its normal points at the viewer, in oblique axes too', () => {
    for (const { crystal } of [monoclinic, triclinic, quartz])
      for (const face of [miller(1, 1, 1), miller(0, 0, 1), miller(-1, 2, 0)])
        near(viewFrame({ onto: face }, crystal.metric).toward, normal(crystal.metric, face));
  });

  it('is a right-handed frame with c upright, from everywhere', () => {
    fc.assert(
      fc.property(anyView, (view) => {
        const { right, up, toward } = viewFrame(view, metric);
        near(cross(right, up), toward);
        for (const v of [right, up, toward]) expect(dot(v, v)).toBeCloseTo(1, 12);
        expect(up[2]).toBeGreaterThanOrEqual(-1e-12);
        expect(right[2]).toBe(0);
      }),
    );
  });

  it('refuses angles that are no numbers', () => {
    const view: View = { turn: Number.NaN, tilt: 0 };
    expect(() => viewFrame(view, metric)).toThrow('turn and a tilt in degrees');
  });

  it('shows no common face within 5° of edge-on in the general view', () => {
    const { toward } = viewFrame('general', metric);
    const indices = [-1, 0, 1].flatMap((h) => [-1, 0, 1].flatMap((k) => [-1, 0, 1].map((l) => miller(h, k, l))));
    const cubic = indices.filter((face) => face.some((i) => i !== 0)).map((face) => normal(metric, face));
    const hexagonal = [
      [1, 0, 0],
      [0, 1, 0],
      [-1, 1, 0],
      [1, 1, 0],
      [-1, 2, 0],
      [-2, 1, 0],
    ].map(([h, k, l]) => normal(quartz.crystal.metric, miller(h!, k!, l!)));
    for (const n of [...cubic, ...hexagonal])
      expect(Math.abs(dot(n, toward)), `normal ${n}`).toBeGreaterThan(Math.sin((5 * Math.PI) / 180));
  });
});
