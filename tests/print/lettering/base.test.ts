import { describe, expect, it } from 'vitest';
import { checkMesh } from '../../../src/files/check/check.ts';
import { weldFloat32 } from '../../../src/files/mesh/weld.ts';
import { crystalMesh } from '../../../src/print/body.ts';
import { withSolids } from '../../../src/print/kit.ts';
import { letterBase } from '../../../src/print/lettering/base.ts';
import { type FacePlane, facePlanes } from '../../../src/shape/face-planes.ts';
import { type Sized, STYLE, sized } from './shapes.ts';

const cube = (size: number): Sized =>
  sized('pointGroup: m-3m\ncell: { a: 5 }\nforms:\n  - { face: "100", distance: 1 }\n', size);

function based(crystal: Sized, lines: readonly string[], rest?: FacePlane) {
  const planes = facePlanes(crystal.shape, crystal.scale);
  const down = rest ?? planes.find(({ normal }) => normal[2] < -0.999)!;
  return withSolids((bench) => {
    const body = bench.solid(crystalMesh(crystal.shape, crystal.scale));
    const { solid, inlay, height } = letterBase(bench, body, down, { lines, style: STYLE, planes });
    return { mesh: bench.mesh(solid, 0), inlay: bench.mesh(inlay!, 0), height };
  });
}

describe('text under the resting face', () => {
  it('reads from below: the upright of an L is at the left of who looks up, which is at +x', async () => {
    const { inlay, height } = await based(cube(40), ['L']);
    expect(height).toBeCloseTo(9, 9);
    const points = Array.from({ length: inlay.positions.length / 3 }, (_, i) =>
      inlay.positions.subarray(3 * i, 3 * i + 3),
    );
    const top = Math.max(...points.map(([, y]) => y!));
    const right = Math.max(...points.map(([x]) => x!));
    const left = Math.min(...points.map(([x]) => x!));
    const atTop = points.filter(([, y]) => y! > top - 1e-3).map(([x]) => x!);
    expect(Math.max(...atTop)).toBeCloseTo(right, 3);
    expect(Math.min(...atTop)).toBeGreaterThan((left + right) / 2);
    expect(points.every(([, , z]) => z! > -20.001 && z! < -20 + STYLE.depth + 1e-3)).toBe(true);
  });

  it('stands in lines, inside the face, in a sound body', async () => {
    const { mesh, inlay } = await based(cube(60), ['NHMX 1987.12.3/b', '× 2.5']);
    expect(checkMesh(weldFloat32(mesh)).problems).toEqual([]);
    const report = checkMesh(weldFloat32(inlay));
    expect(report.problems).toEqual([]);
    expect(Math.max(...inlay.positions.filter((_, i) => i % 3 !== 2).map(Math.abs))).toBeLessThan(
      30 - STYLE.margin + 1e-4,
    );
  });

  it('keeps away from a drain', async () => {
    const crystal = cube(40);
    const drain = { through: [6, 4, 0], along: [0, 0, -1], radius: 2 } as const;
    const planes = facePlanes(crystal.shape, crystal.scale);
    const rest = planes.find(({ normal }) => normal[2] < -0.999)!;
    await withSolids((bench) => {
      const body = bench.solid(crystalMesh(crystal.shape, crystal.scale));
      const { letters } = letterBase(bench, body, rest, { lines: ['NHM 12'], style: STYLE, planes, avoid: [drain] });
      const { positions } = bench.mesh(letters, 0);
      for (let at = 0; at < positions.length; at += 3)
        expect(Math.hypot(positions[at]! - 6, positions[at + 1]! - 4)).toBeGreaterThan(2 + STYLE.margin - 1e-4);
    });
  });

  it('is refused when it does not fit, when it is blank, and without a flat', async () => {
    await expect(based(cube(12), ['NHMX 1987.12.3/b'])).rejects.toThrow(
      /room for "NHMX 1987.12.3\/b" in letters of .* mm only/,
    );
    await expect(based(cube(40), [' '])).rejects.toThrow(/no text/);
    const tip: FacePlane = { normal: [0, 0, -1], distance: 90 };
    await expect(based(cube(40), ['A 1'], tip)).rejects.toThrow(/not rest on a flat face/);
  });
});
