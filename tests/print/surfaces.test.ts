import { describe, expect, it } from 'vitest';
import { make } from '../../src/index.ts';
import type { Mesh } from '../../src/print/mesh.ts';

/** Unit normal of a triangle by the right-hand rule. */
function normalOf({ positions: p, triangles }: Mesh, t: number): number[] {
  const [a, b, c] = [0, 1, 2].map((k) => [...p.subarray(3 * triangles[3 * t + k]!, 3 * triangles[3 * t + k]! + 3)]);
  const [u, v] = [b!, c!].map((q) => q.map((value, i) => value - a![i]!));
  const n = [u![1]! * v![2]! - u![2]! * v![1]!, u![2]! * v![0]! - u![0]! * v![2]!, u![0]! * v![1]! - u![1]! * v![0]!];
  const length = Math.hypot(...n);
  return n.map((value) => value / length);
}

describe('the surfaces of a part', () => {
  it.each([
    ['bare', '{}'],
    ['with fused rods', '{ axes: all }'],
    ['bored', '{ axes: { fit: separate } }'],
  ])('%s: every triangle of a form lies on one of its faces, and all of a form are there', async (_, print) => {
    const { parts, shape, millimetresPerUnit } = await make(`mineral: quartz\nprint: ${print}\n`);
    const { mesh, surfaces } = parts[0]!;
    expect(surfaces).toHaveLength(shape.crystal.forms.length + 1);
    expect(mesh.surface).toHaveLength(mesh.triangles.length / 3);
    const { normals } = shape.measures;
    const seen = new Set<number>();
    mesh.surface!.forEach((surface, t) => {
      seen.add(surface);
      if (surface >= shape.crystal.forms.length) return;
      const n = normalOf(mesh, t);
      const planes = [...shape.solid.planes.form.keys()].filter((plane) => shape.solid.planes.form[plane] === surface);
      const best = Math.max(
        ...planes.map((plane) => [0, 1, 2].reduce((sum, i) => sum + n[i]! * normals[3 * plane + i]!, 0)),
      );
      expect(best).toBeGreaterThan(0.9999);
    });
    for (const form of shape.crystal.forms.keys()) expect(seen).toContain(form);
    expect(seen.has(surfaces.length - 1)).toBe(print !== '{}');
    expect(millimetresPerUnit).toBeGreaterThan(0);
  });
});
