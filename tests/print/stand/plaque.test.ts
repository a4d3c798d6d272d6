import qrcode from 'qrcode';
import { describe, expect, it } from 'vitest';
import { withSolids } from '../../../src/print/kit.ts';
import { brailleCells } from '../../../src/print/lettering/braille.ts';
import type { Mesh } from '../../../src/print/mesh.ts';
import { planCode } from '../../../src/print/stand/code.ts';
import { dotMesh } from '../../../src/print/stand/dots.ts';
import { labelLines } from '../../../src/print/stand/label-lines.ts';
import type { StandOptions } from '../../../src/print/stand/options.ts';
import { makeStand } from '../../../src/print/stand/stand.ts';
import { regular } from '../lettering/fonts.ts';
import { sized } from '../lettering/shapes.ts';

const { shape, scale } = sized('quartz', 50);

/** The bodies of the letters' own part, in the stand's frame, each as its points. */
function inkBodies(options: Partial<StandOptions>): Promise<number[][][]> {
  return withSolids((bench) => {
    const { parts } = makeStand(bench, shape, scale, {
      attitude: 'c-up',
      typeface: regular,
      clearance: 0.2,
      wall: 2,
      contrast: true,
      ...options,
    });
    const { positions, triangles } = parts[1]!.mesh;
    return bench
      .solid({ positions, triangles })
      .decompose()
      .map((body) => rows(body.getMesh().vertProperties));
  });
}

const rows = (values: ArrayLike<number>): number[][] =>
  Array.from({ length: values.length / 3 }, (_, i) => [values[3 * i]!, values[3 * i + 1]!, values[3 * i + 2]!]);

function box(points: number[][]) {
  const range = (axis: number) => points.map((point) => point[axis]!);
  const [low, high] = [0, 1, 2].reduce<[number[], number[]]>(
    ([lows, highs], axis) => [
      [...lows, Math.min(...range(axis))],
      [...highs, Math.max(...range(axis))],
    ],
    [[], []],
  );
  return { low, high, size: high.map((value, axis) => value - low[axis]!) };
}

describe('raised letters, measured on the mesh', () => {
  it('have the height, raise and gaps of ADA 2010, 703.2 (16 mm, 0.8 mm, 3.2 mm)', async () => {
    const boxes = (await inkBodies({ lines: ['HEMI'] })).map(box).sort((a, b) => a.low[0]! - b.low[0]!);
    expect(boxes).toHaveLength(4);
    for (const { size } of boxes) {
      expect(size[1]).toBeCloseTo(16, 4);
      expect(size[2]).toBeCloseTo(0.8, 4);
    }
    for (let i = 1; i < boxes.length; i++)
      expect(boxes[i]!.low[0]! - boxes[i - 1]!.high[0]!).toBeGreaterThanOrEqual(3.2 - 1e-4);
    // 9.5 mm from the border, 703.2 and 703.4.
    expect(boxes[0]!.low[0]).toBeCloseTo(9.5, 4);
    expect(boxes[0]!.low[1]).toBeCloseTo(9.5, 4);
  });

  it('have the proportions that the standard asks of a typeface: O 55 to 110 % as wide as I is high', async () => {
    const [oh] = (await inkBodies({ lines: ['O'] })).map(box);
    expect(oh!.size[0]! / 16).toBeGreaterThan(0.55);
    expect(oh!.size[0]! / 16).toBeLessThan(1.1);
    expect(regular.stroke / regular.capital).toBeLessThan(0.15);
  });

  it('stand 9.5 mm above braille, lines 1.35 to 1.7 letter heights apart', async () => {
    const boxes = (await inkBodies({ lines: ['H', 'E'], braille: ['a'] })).map(box);
    const [dot, lower, upper] = boxes.sort((a, b) => a.low[1]! - b.low[1]!);
    // The foot of the cell is two dots below dot 1, and the cell keeps its room when they are not there.
    expect(lower!.low[1]! - dot!.high[1]!).toBeGreaterThanOrEqual(9.5 - 1e-4);
    const pitch = (upper!.low[1]! - lower!.low[1]!) / 16;
    expect(pitch).toBeGreaterThanOrEqual(1.35);
    expect(pitch).toBeLessThanOrEqual(1.7);
  });
});

describe('braille, measured on the mesh', () => {
  it('has the dots of the text at the distances, widths and height of ADA 2010, table 703.3.1', async () => {
    const text = 'Quartz 2/m';
    const bodies = (await inkBodies({ braille: [text, 'a'] })).map(box);
    const cells = [brailleCells(text), brailleCells('a')];
    expect(bodies).toHaveLength(cells.flat(2).length);
    for (const { size } of bodies) {
      expect(size[0]).toBeCloseTo(1.6, 4);
      expect(size[1]).toBeCloseTo(1.6, 4);
      expect(size[2]).toBeCloseTo(0.7, 4);
    }
    const middles = bodies.map(({ low, high }) => [(low[0]! + high[0]!) / 2, (low[1]! + high[1]!) / 2]);
    const left = Math.min(...middles.map(([x]) => x!));
    const top = Math.max(...middles.map(([, y]) => y!));
    const found = middles.map(([x, y]) => `${Math.round((x! - left) * 100)} ${Math.round((top - y!) * 100)}`).sort();
    // The first cell is the capital sign, whose only dot is in the right column and the lowest row.
    const wanted = cells
      .flatMap((line, row) =>
        line.flatMap((dots, column) =>
          dots.map((dot) => [620 * column + (dot > 3 ? 250 : 0), 1000 * row + 250 * ((dot - 1) % 3)]),
        ),
      )
      .map(([x, y]) => `${x} ${y}`)
      .sort();
    expect(found).toEqual(wanted);
  });

  it('is domed: every corner of a dot lies on one sphere', () => {
    const { positions }: Mesh = dotMesh([[0, 0]], { base: 1.6, height: 0.7, dot: 2.5, cell: 6.2, line: 10 }, 2, 2);
    const radius = (0.8 ** 2 + 0.7 ** 2) / 1.4;
    const onSphere = rows(positions).filter(
      ([x, y, z]) => Math.abs(Math.hypot(x!, y!, z! - 2.7 + radius) - radius) < 1e-9,
    );
    expect(onSphere).toHaveLength(positions.length / 3 - 1); // all but the middle of its foot
  });
});

describe('the QR code', () => {
  it('raises exactly the dark modules that the encoder gives, within the quiet zone of four of ISO/IEC 18004', async () => {
    const text = 'https://museum.example/A-1987.12';
    const { outlines, side } = planCode(text, 1.2, 200);
    const { size, data } = qrcode.create(text, { errorCorrectionLevel: 'M' }).modules;
    expect(side).toBeCloseTo((size + 8) * 1.2, 9);
    const isDark = (x: number, y: number): boolean =>
      outlines.some(([from, , to]) => x > from![0] && x < to![0] && y > from![1] && y < to![1]);
    for (let row = 0; row < size; row++)
      for (let column = 0; column < size; column++)
        expect(isDark((column + 4.5) * 1.2, side - (row + 4.5) * 1.2)).toBe(data[row * size + column] === 1);
  });
});

it('writes a label in the usual order', () => {
  expect(labelLines(shape.crystal, ['× 2.5'])).toEqual(['Quartz', 'SiO₂', '32', 'm r z', '× 2.5']);
  const calcite = sized('calcite', 50).shape.crystal;
  expect(labelLines(calcite).slice(0, 3)).toEqual(['Calcite', 'CaCO₃', '3\u0305m']);
});
