import fc from 'fast-check';
import { expect, it } from 'vitest';
import { checkMesh } from '../../../src/files/check/check.ts';
import { weldFloat32 } from '../../../src/files/mesh/weld.ts';
import { crystal } from '../../../src/index.ts';
import { crystalMesh } from '../../../src/print/body.ts';
import { withSolids } from '../../../src/print/kit.ts';
import { letterFaces } from '../../../src/print/lettering/faces.ts';
import { makeStand } from '../../../src/print/stand/stand.ts';
import { mm } from '../../../src/recipe/quantity.ts';
import { ObjectError } from '../../../src/shape/object-error.ts';
import { millimetresPerUnit } from '../../../src/shape/scale.ts';
import { isClosed, polyhedron } from '../../../src/shape/shape.ts';
import { crystals, runs } from '../../shape/random-crystals.ts';
import { regular } from '../lettering/fonts.ts';
import { STYLE } from '../lettering/shapes.ts';

it('random crystals are lettered and stand soundly, or would tip over and are told so', {
  timeout: 600_000,
}, async () => {
  await fc.assert(
    fc.asyncProperty(crystals, async (recipe) => {
      const shape = polyhedron(crystal(recipe));
      fc.pre(isClosed(shape));
      if (!isClosed(shape)) return;
      const scale = millimetresPerUnit(shape, { kind: 'longest', length: mm(70) });
      await withSolids((bench) => {
        const body = bench.solid(crystalMesh(shape, scale));
        const { solid } = letterFaces(bench, body, shape, scale, { text: 'indices', style: STYLE });
        expect(checkMesh(weldFloat32(bench.mesh(solid, 0))).problems).toEqual([]);
        try {
          const stand = makeStand(bench, shape, scale, {
            attitude: 'c-up',
            typeface: regular,
            clearance: 0.2,
            wall: 2,
          });
          const { positions, triangles } = stand.parts[0]!.placed[0]!;
          expect(checkMesh(weldFloat32(stand.parts[0]!.mesh)).problems).toEqual([]);
          const cradle = bench.solid({ positions, triangles });
          expect(Math.abs(cradle.minGap(body, 2) - 0.2)).toBeLessThan(1e-3);
          for (const up of [0, 0.1, 5, 40]) expect(cradle.intersect(body.translate(0, 0, up)).volume()).toBe(0);
        } catch (error) {
          if (!(error instanceof ObjectError)) throw error;
          expect(error.message).toMatch(/would tip over/);
        }
      });
    }),
    { numRuns: runs(15), endOnFailure: true },
  );
});
