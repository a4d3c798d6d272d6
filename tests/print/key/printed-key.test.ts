import { describe, expect, it } from 'vitest';
import type { KeyOptions } from '../../../src/print/key/options.ts';
import { KEY_SIZES } from '../../../src/print/key/options.ts';
import { type PrintedKey, printedKey } from '../../../src/print/key/printed-key.ts';
import { ALL_SYMBOLS, hermannMauguin, inOrder, symbolWords } from '../../../src/print/key/words.ts';
import { withSolids } from '../../../src/print/kit.ts';
import { brailleCells } from '../../../src/print/lettering/braille.ts';
import { extentsOf, meshVolume } from '../../../src/print/mesh.ts';
import { terminal } from '../../../src/print/rods/solid.ts';
import { AXIS_SYMBOLS, type RodSymbol } from '../../../src/rods/axis-symbol.ts';
import type { RodPlan } from '../../../src/rods/plan.ts';
import { clean, kit } from '../bodies/samples.ts';
import { bold } from '../lettering/fonts.ts';

const options = (symbols: readonly RodSymbol[], more: Partial<KeyOptions> = {}): KeyOptions => ({
  symbols,
  typeface: bold,
  symbolUnit: 3,
  thickness: 3,
  braille: false,
  ...more,
});
const made = (given: KeyOptions): Promise<PrintedKey> => withSolids((bench) => printedKey(bench, given));

describe('a printed key', () => {
  it.each([
    ['all ten', options(ALL_SYMBOLS)],
    ['two, in braille too,', options(['2/m', '-3'], { braille: true })],
    ['one', options(['-4'])],
    ['small ones', options(['2', '3', '6/m'], { symbolUnit: 1.5, thickness: 2 })],
  ] as const)('of %s symbols is one clean body of the size told', async (_, given) => {
    const { part, width, depth, remarks } = await made(given);
    expect(clean(part.mesh, 'key').bodies.map(({ kind }) => kind)).toEqual(['solid']);
    const [x, y, z] = extentsOf(part.mesh);
    expect([x, y]).toEqual([expect.closeTo(width, 3), expect.closeTo(depth, 3)]);
    expect(z).toBeCloseTo(KEY_SIZES.plaque + given.thickness, 4);
    expect(remarks.join()).toMatch(/703\.2/);
    const names = new Set(part.mesh.surface);
    expect([...names].sort()).toEqual([0, 1, 2]);
  });

  it('has each symbol as it is at the end of a rod, no more and no less', async () => {
    const { solid } = await kit();
    for (const symbol of ALL_SYMBOLS) {
      const { part } = await made(options([symbol]));
      const above = solid(part.mesh).trimByPlane([0, 0, 1], KEY_SIZES.plaque + KEY_SIZES.raise + 0.01);
      const plan: RodPlan = { ends: [], diameter: 3, symbolUnit: 3, thickness: 3, remarks: [] };
      const whole = await withSolids((bench) => bench.mesh(terminal(bench, symbol, plan, 0, 3), 0));
      const expected = solid(whole).trimByPlane([0, 0, 1], KEY_SIZES.raise + 0.01);
      expect(above.volume() / expected.volume(), symbol).toBeCloseTo(1, 4);
      const height = above.boundingBox().max[1] - above.boundingBox().min[1];
      const reach = AXIS_SYMBOLS[symbol].outline.map(([x]) => 3 * x);
      expect(height, symbol).toBeCloseTo(Math.max(...reach) - Math.min(...reach), 3);
    }
  });

  it('keeps symbols, letters and braille apart and within its borders', async () => {
    const { part, width, depth } = await made(options(ALL_SYMBOLS, { braille: true }));
    expect(Math.max(width, depth), 'the usual bed').toBeLessThan(220);
    const { solid } = await kit();
    // ADA 2010 Standards 703.3: braille at least 9.5 mm from raised characters and borders.
    const pieces = solid(part.mesh)
      .trimByPlane([0, 0, 1], KEY_SIZES.plaque + 0.3)
      .decompose();
    const boxes = pieces.map((piece) => piece.boundingBox());
    for (const { min, max } of boxes) {
      expect(Math.min(min[0], min[1])).toBeGreaterThan(9.5 - 1e-3);
      expect(max[0]).toBeLessThan(width - 9.5 + 1e-3);
      expect(max[1]).toBeLessThan(depth - 9.5 + 1e-3);
    }
    const dots = ALL_SYMBOLS.flatMap((symbol) => brailleCells(symbolWords(symbol))).flat().length;
    const isDot = (i: number): boolean => boxes[i]!.max[0] - boxes[i]!.min[0] < 1.6 && boxes[i]!.max[2] < 2.8;
    const others = pieces.filter((_, i) => !isDot(i));
    expect(pieces.length - others.length).toBe(dots);
    const leftDot = Math.min(...boxes.filter((_, i) => isDot(i)).map(({ min }) => min[0]));
    const rightmost = Math.max(...boxes.filter((_, i) => !isDot(i)).map(({ max }) => max[0]));
    expect(leftDot - rightmost).toBeGreaterThan(9.5 - 1e-3);
  });

  it('writes true overbars for rotoinversion axes and names them', () => {
    expect(hermannMauguin('-3')).toBe('3\u0305');
    expect(hermannMauguin('4/m')).toBe('4/m');
    expect(ALL_SYMBOLS).toHaveLength(Object.keys(AXIS_SYMBOLS).length);
    expect(inOrder(['-4', '2', '-4'])).toEqual(['2', '-4']);
    expect(symbolWords('-6')).toBe('6-fold rotoinversion');
    expect(symbolWords('6/m')).toBe('6-fold and mirror');
  });

  it('has a bar over the figure of a rotoinversion axis, as wide as needed', async () => {
    const [plain, barred] = await Promise.all((['3', '-3'] as const).map((symbol) => made(options([symbol]))));
    expect(meshVolume(barred!.part.mesh)).not.toBeCloseTo(meshVolume(plain!.part.mesh), 0);
    expect(barred!.depth).toBeGreaterThan(plain!.depth);
  });

  it('without symbols is refused; at another place it is the same key', async () => {
    await expect(made(options([]))).rejects.toMatchObject({ code: 'text' });
    const { part } = await made(options(['2'], { at: [100, 0, 0] }));
    expect(part.placed[0]!.positions[0]! - part.mesh.positions[0]!).toBeCloseTo(100, 9);
  });
});
