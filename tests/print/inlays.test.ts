import { describe, expect, it } from 'vitest';
import { type Made, make } from '../../src/index.ts';
import { type Mesh, meshVolume } from '../../src/print/mesh.ts';
import { cross, dot, length, minus, vectorAt } from '../../src/print/vectors.ts';
import { type FacePlane, facePlanes } from '../../src/shape/face-planes.ts';
import { ObjectError } from '../../src/shape/object-error.ts';
import { type Print, spreadMinerals } from './object-options.ts';

/** GONIOLITH_RUNS makes all presets. */
const MINERALS = spreadMinerals(process.env.GONIOLITH_RUNS === undefined ? 24 : 1000);
const ONE_JOB = /^(body|mirror-planes|face-letters)$/;

const volume = ({ parts }: Made): number =>
  parts.filter(({ name }) => ONE_JOB.test(name)).reduce((sum, { mesh }) => sum + meshVolume(mesh), 0);

/** Null where the crystal has no room for it, which is told by an error. */
async function madeOrNull(mineral: string, print: Print) {
  try {
    return await make({ mineral, print: { size: 70, ...print } });
  } catch (error) {
    if (error instanceof ObjectError && ['rod-too-wide', 'rods-crowded', 'wall', 'plane'].includes(error.code))
      return null;
    throw error;
  }
}

/** With one millimetre of line the crystals that are splinters have room too. */
const INLAID: Print = { letters: { relief: 'inlaid' }, planes: { relief: 'inlaid', width: 1 } };
const KINDS: readonly Print[] = [
  {},
  { axes: true },
  { axes: { fit: 'separate' } },
  { axes: { fit: 'press', diameter: 2 } },
  { axes: { fit: 'slide', diameter: 2, orders: [2] } },
];

describe('letters and mirror planes inlaid in a second colour', () => {
  it('fill what was cut for them exactly, among rods and bores too', async () => {
    let [made, inlaid] = [0, 0];
    for (const [i, mineral] of MINERALS.entries()) {
      const print = KINDS[i % KINDS.length]!;
      const name = `${mineral} ${JSON.stringify(print)}`;
      const [plain, filled] = [await madeOrNull(mineral, print), await madeOrNull(mineral, { ...print, ...INLAID })];
      if (!plain || !filled) continue;
      made++;
      if (filled.parts.some((part) => part.with === 'body')) inlaid++;
      expect(Math.abs(volume(filled) / volume(plain) - 1), name).toBeLessThan(1e-5);
    }
    expect(made).toBeGreaterThan(0.6 * MINERALS.length);
    expect(inlaid).toBeGreaterThan(0.9 * made);
  });

  it('share the place of the body on the bed, and stay there when it is laid flat', async () => {
    for (const flat of [false, true]) {
      const { parts } = await make({ mineral: 'fluorite', print: { size: 50, ...INLAID, flat } });
      const [body, ...others] = parts.map(({ mesh: { positions } }) =>
        [0, 1, 2].map((axis) => {
          const own = positions.filter((_, i) => i % 3 === axis);
          return [own.reduce((a, b) => Math.min(a, b)), own.reduce((a, b) => Math.max(a, b))] as const;
        }),
      );
      expect(others).toHaveLength(2);
      for (const [low, high] of body!) {
        expect(low).toBeCloseTo(0, 4);
        expect(high).toBeCloseTo(50, 4);
      }
      // Letters lie in the faces: from side to side of the cube in each direction.
      for (const one of others)
        for (const [low, high] of one) {
          expect(low).toBeCloseTo(0, 4);
          expect(high).toBeCloseTo(50, 4);
        }
    }
  });
});

describe('text under the resting face', () => {
  it('leaves that face without letters, and is cut out of it', async () => {
    const {
      parts,
      remarks,
      shape,
      millimetresPerUnit: scale,
    } = await make({
      mineral: 'fluorite',
      print: { size: 50, letters: true, base: ['HM-12', '2024'] },
    });
    expect(remarks.join(' ')).toMatch(/Letters on 5 faces.*"HM-12 \/ 2024" stands under \(100\)/s);
    const cut = shape.measures.volume * scale ** 3 - meshVolume(parts[0]!.mesh);
    expect(cut).toBeGreaterThan(10);
  });

  it('that does not fit is refused with the size that it would have', async () => {
    const print = { size: 20, base: 'a long name for a small cube' };
    await expect(make({ mineral: 'fluorite', print })).rejects.toThrow(/room for ".*" in letters of \d\.\d mm only/);
  });
});

describe('letters on a blunted crystal', () => {
  it.each(['quartz', 'calcite', 'topaz', 'fluorite'])(
    'of %s stand wholly on what is left of the faces',
    async (mineral) => {
      for (const blunt of ['1.5 mm', { bevel: 2 }] as const) {
        const { parts, shape, millimetresPerUnit } = await make({
          mineral,
          print: { size: 40, blunt, letters: 'inlaid', printer: 'sla' },
        });
        const letters = parts.find(({ name }) => name === 'face-letters')!.placed[0]!;
        // A straight prism holds its floor times its depth; one that stands half on a rounding holds less.
        const floors = facePlanes(shape, millimetresPerUnit).map((plane) => areaIn(letters, plane, DEPTH));
        const ratio = meshVolume(letters) / (DEPTH * floors.reduce((a, b) => a + b));
        expect(Math.abs(ratio - 1), JSON.stringify(blunt)).toBeLessThan(1e-3);
      }
    },
  );
});

/** Of engraved letters in presets/printers/sla.yaml, millimetres. */
const DEPTH = 0.5;

/** Area of the triangles that lie so far under a face. */
function areaIn({ positions, triangles }: Mesh, { normal, distance }: FacePlane, under: number): number {
  let area = 0;
  for (let t = 0; t < triangles.length; t += 3) {
    const [a, b, c] = [0, 1, 2].map((i) => vectorAt(positions, triangles[t + i]!));
    const isIn = [a!, b!, c!].every((corner) => Math.abs(dot(normal, corner) - distance + under) < 1e-3);
    if (isIn) area += length(cross(minus(b!, a!), minus(c!, a!))) / 2;
  }
  return area;
}
