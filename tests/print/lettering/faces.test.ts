import { describe, expect, it } from 'vitest';
import { checkMesh } from '../../../src/files/check/check.ts';
import { weldFloat32 } from '../../../src/files/mesh/weld.ts';
import { crystalMesh } from '../../../src/print/body.ts';
import { withSolids } from '../../../src/print/kit.ts';
import { type FaceText, letterFaces } from '../../../src/print/lettering/faces.ts';
import type { LetterStyle } from '../../../src/print/lettering/style.ts';
import type { Mesh } from '../../../src/print/mesh.ts';
import { mm } from '../../../src/recipe/quantity.ts';
import { planRods } from '../../../src/rods/plan.ts';
import { facePlanes } from '../../../src/shape/face-planes.ts';
import { type Sized, SOME_MINERALS, STYLE, sized } from './shapes.ts';

type Vector = readonly [number, number, number];
const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const cross = (a: Vector, b: Vector): Vector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

const pointsOf = ({ positions: p }: Mesh): Vector[] =>
  Array.from({ length: p.length / 3 }, (_, i): Vector => [p[3 * i]!, p[3 * i + 1]!, p[3 * i + 2]!]);

/** Letters a crystal and hands out what can be measured. */
function lettered({ shape, scale }: Sized, text: FaceText, style: LetterStyle) {
  return withSolids((bench) => {
    const body = bench.solid(crystalMesh(shape, scale));
    const made = letterFaces(bench, body, shape, scale, { text, style });
    const { lettered, tooSmall, remarks, solid, inlay } = made;
    return {
      lettered,
      tooSmall,
      remarks,
      mesh: bench.mesh(solid, 0),
      inlay: inlay && bench.mesh(inlay, 0),
      volumes: { body: body.volume(), solid: solid.volume(), inlay: inlay?.volume() ?? 0 },
      overlap: inlay ? inlay.intersect(solid).volume() : 0,
      faces: made.faces.map(({ letters, ...face }) => ({ ...face, points: pointsOf(bench.mesh(letters, 0)) })),
    };
  });
}

describe.each(SOME_MINERALS)('letters on %s', (mineral) => {
  it.each(['letters', 'indices'] as const)(
    '%s lie wholly inside their faces, upright, in a sound body',
    async (text) => {
      const crystal = sized(mineral, 80);
      const planes = facePlanes(crystal.shape, crystal.scale);
      const made = await lettered(crystal, text, STYLE);
      expect(made.lettered + made.tooSmall.length).toBe(planes.length);
      expect(made.lettered).toBeGreaterThan(0);
      for (const { face, points, field, height, turned } of made.faces) {
        const own = planes[crystal.shape.measures.faces.indexOf(face)]!;
        let [spill, thinnest] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
        for (const point of points) {
          const out = dot(own.normal, point) - own.distance;
          const [nx, ny, nz] = own.normal;
          const at: Vector = [point[0] - out * nx, point[1] - out * ny, point[2] - out * nz];
          for (const other of planes) {
            // A point of the face's plane is inside its polygon when it is behind all other planes.
            if (other !== own) spill = Math.max(spill, dot(other.normal, at) - other.distance);
            // The ground keeps its wall to every face behind it.
            if (out < 0 && dot(other.normal, own.normal) < 0)
              thinnest = Math.min(thinnest, other.distance - dot(other.normal, point));
          }
        }
        expect(spill, `letters of face ${face}`).toBeLessThan(0);
        expect(thinnest, `ground of face ${face}`).toBeGreaterThan(STYLE.wall - 1e-4);
        expect(height).toBeGreaterThanOrEqual(STYLE.height.smallest - 1e-9);
        expect(dot(cross(field.right, field.up), own.normal)).toBeCloseTo(1, 9);
        const upright = turned ? field.right : field.up;
        const level = Math.abs(own.normal[2]) > 1 - 1e-12;
        expect(level ? upright[1] : upright[2]).toBeGreaterThan(0);
        if (!level) expect((turned ? field.up : field.right)[2]).toBeCloseTo(0, 9);
      }
      const bodies = text === 'indices' ? [made.mesh, made.inlay!] : [made.mesh];
      for (const mesh of bodies) expect(checkMesh(weldFloat32(mesh)).problems).toEqual([]);
    },
  );
});

describe('engraved letters', () => {
  it('leave room that the inlay fills exactly', async () => {
    const { volumes, overlap } = await lettered(sized('quartz', 80), 'letters', STYLE);
    expect(volumes.inlay).toBeGreaterThan(50);
    expect(Math.abs(volumes.solid + volumes.inlay - volumes.body)).toBeLessThan(1e-3);
    expect(overlap).toBeLessThan(1e-6);
  });

  it('are as deep as stated', async () => {
    const crystal = sized('quartz', 80);
    const planes = facePlanes(crystal.shape, crystal.scale);
    const { inlay } = await lettered(crystal, 'letters', STYLE);
    const depths = pointsOf(inlay!).map((point) =>
      Math.min(...planes.map(({ normal, distance }) => distance - dot(normal, point))),
    );
    expect(Math.max(...depths)).toBeCloseTo(STYLE.depth, 3);
    expect(Math.min(...depths)).toBeCloseTo(0, 3);
  });
});

describe('raised letters', () => {
  it('stand out as stated and are one with the body', async () => {
    const crystal = sized('pyrite/pyritohedron', 70);
    const planes = facePlanes(crystal.shape, crystal.scale);
    const made = await lettered(crystal, 'indices', { ...STYLE, relief: 'raised', depth: 0.8 });
    const out = pointsOf(made.mesh).map((point) =>
      Math.max(...planes.map(({ normal, distance }) => dot(normal, point) - distance)),
    );
    expect(Math.max(...out)).toBeCloseTo(0.8, 3);
    const report = checkMesh(weldFloat32(made.mesh));
    expect(report.problems).toEqual([]);
    expect(report.bodies).toHaveLength(1);
  });
});

describe('faces without room', () => {
  it('are named, all of them when the crystal is small', async () => {
    const { lettered: count, tooSmall, remarks } = await lettered(sized('quartz', 10), 'letters', STYLE);
    expect(count).toBe(0);
    expect(tooSmall).toHaveLength(18);
    expect(tooSmall).toContain('(10-11) r');
    expect(remarks.join(' ')).toMatch(/Too small for letters of 3 mm .* \(10-11\) r/);
  });

  it('depend on the thinnest stroke too', async () => {
    const crystal = sized('quartz', 40);
    const fine = await lettered(crystal, 'indices', { ...STYLE, stroke: 0.1, height: { smallest: 1, largest: 9 } });
    const coarse = await lettered(crystal, 'indices', { ...STYLE, stroke: 1, height: { smallest: 1, largest: 9 } });
    expect(fine.lettered).toBe(18);
    expect(coarse.lettered).toBe(0);
  });

  it('are those that are too thin to be engraved', async () => {
    const slab = sized(
      'pointGroup: mmm\ncell: { a: 5, b: 6, c: 7 }\nforms:\n  - { face: "001", distance: 0.4 }\n  - { face: "100", distance: 20 }\n  - { face: "010", distance: 20 }\n',
      40,
    );
    const { tooSmall } = await lettered(slab, 'indices', STYLE);
    expect(tooSmall).toEqual(expect.arrayContaining(['(001)', '(00-1)']));
  });
});

describe('rods', () => {
  it('keep letters away from where they come out', async () => {
    const crystal = sized('pointGroup: m-3m\ncell: { a: 5 }\nforms:\n  - { face: "100", distance: 1 }\n', 50);
    const axes = { orders: [4], directions: null, fit: 'fused', diameter: mm(6), reach: mm(12) } as const;
    const { ends } = planRods(crystal.shape, crystal.scale, axes);
    const avoid = ends.flat().map(({ end: { along } }) => ({ along, radius: 3 }));
    await withSolids((bench) => {
      const body = bench.solid(crystalMesh(crystal.shape, crystal.scale));
      const made = letterFaces(bench, body, crystal.shape, crystal.scale, { text: 'indices', style: STYLE, avoid });
      expect(made.lettered).toBe(6);
      for (const { letters } of made.faces)
        for (const point of pointsOf(bench.mesh(letters, 0))) {
          const nearest = Math.min(...avoid.map(({ along }) => Math.hypot(...cross(point, along))));
          expect(nearest).toBeGreaterThan(3 + STYLE.margin - 1e-4);
        }
    });
  });
});

it('is the same every time', async () => {
  const [one, two] = [
    await lettered(sized('topaz', 70), 'indices', STYLE),
    await lettered(sized('topaz', 70), 'indices', STYLE),
  ];
  expect(one.mesh.positions).toEqual(two.mesh.positions);
  expect(one.mesh.triangles).toEqual(two.mesh.triangles);
});
