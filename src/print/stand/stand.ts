import type { Manifold, Mat4 } from 'manifold-3d';
import type { Outline } from '../../rods/axis-symbol.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import type { Workbench } from '../kit.ts';
import type { Point } from '../lettering/field.ts';
import { textOutlines } from '../lettering/outlines.ts';
import { ROOT } from '../lettering/solids.ts';
import type { Mesh } from '../mesh.ts';
import type { Part, Surface } from '../part.ts';
import { type Arrangement, arrange } from './arrange.ts';
import { type CodePlan, planCode } from './code.ts';
import { type Cradle, cradleFor, stanceMatrix } from './cradle.ts';
import { dotMesh } from './dots.ts';
import { STAND_SIZES, type StandOptions, type StandSizes } from './options.ts';
import { type BrailleText, brailleText, type RaisedText, raisedText } from './plaque-text.ts';
import { standRemarks } from './remarks.ts';

export interface Stand {
  /** `stand`, and with contrast `stand-letters` and `stand-code` that lie on it without gap or overlap. */
  readonly parts: readonly Part[];
  /** Takes the crystal's frame to the stand's: plaque from z = 0 upwards, its front left corner at the origin. */
  readonly toStand: Mat4;
  readonly remarks: readonly string[];
}

const COLOURS = { stand: '#DDDAD2', letters: '#33384A' };

/**
 * A plaque with raised text and a cradle that holds the crystal in its attitude by the negative of its lower faces, with
 * clearance everywhere; the crystal lifts out straight upwards. Parts are placed in the crystal's own frame.
 * @param scale millimetres for each unit of distance
 * @throws ObjectError `stand` when the crystal would tip over; `text` when text does not fit or cannot be written
 */
export function makeStand(bench: Workbench, shape: ClosedShape, scale: number, options: StandOptions): Stand {
  const sizes: StandSizes = { ...STAND_SIZES, ...options.sizes };
  const widest = sizes.widest - 2 * sizes.border;
  const text = raisedText(options, sizes, widest);
  const braille = brailleText(options, sizes.braille, widest);
  const code = options.code === undefined ? null : planCode(options.code, sizes.module, widest);
  const cradle = cradleFor(bench, shape, scale, options);
  const layout = arrange({ cradle, text, braille, code }, sizes);
  const lift = sizes.plaque - cradle.floor;
  const at: Mat4 = [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0, ...layout.centre, lift, 1];
  const ground = bench.subtract(
    bench.union([plaque(bench, layout, sizes), pedestal(bench, cradle, layout.centre, cradle.rim + lift)]),
    cradle.rooms.map((room) => bench.place(room, at)),
  );
  const foot = options.contrast ? sizes.plaque : sizes.plaque - ROOT;
  const letters = [
    ...(text ? [letterSolid(bench, options, sizes, text, layout, foot)] : []),
    ...(braille ? [dotSolid(bench, braille, layout, sizes, foot)] : []),
  ];
  const codes = code ? [codeSolid(bench, code, layout, sizes, foot)] : [];
  const toStand = compose(cradle, layout.centre, lift);
  return {
    parts: partsOf(bench, ground, letters, codes, options.contrast ?? false, toStand),
    toStand,
    remarks: standRemarks({ options, sizes, layout, text, braille, code, cradle }),
  };
}

function plaque(bench: Workbench, { width, depth }: Arrangement, { plaque: thick, corner }: StandSizes): Manifold {
  const corners: Point[] = [
    [width - corner, depth - corner],
    [corner, depth - corner],
    [corner, corner],
    [width - corner, corner],
  ];
  const outline = corners.flatMap((middle, quarter) =>
    Array.from({ length: 9 }, (_, i): Point => {
      const angle = ((quarter + i / 8) * Math.PI) / 2;
      return [middle[0] + corner * Math.cos(angle), middle[1] + corner * Math.sin(angle)];
    }),
  );
  return bench.prism([outline], 0, thick);
}

const shifted = (outlines: readonly Outline[], [x, y]: Point): Outline[] =>
  outlines.map((outline) => outline.map(([px, py]) => [px + x, py + y] as const));

const pedestal = (bench: Workbench, { outline }: Cradle, centre: Point, rim: number): Manifold =>
  bench.prism(shifted([outline], centre), 0, rim);

function letterSolid(
  bench: Workbench,
  { typeface }: StandOptions,
  sizes: StandSizes,
  { layout, size }: RaisedText,
  { text: [x, y] }: Arrangement,
  foot: number,
): Manifold {
  const shift: Point = [x - size * layout.box.left, y - size * layout.box.bottom];
  return bench.prism(textOutlines(typeface, layout, size, shift), foot, sizes.plaque + sizes.raise);
}

function dotSolid(
  bench: Workbench,
  { dots }: BrailleText,
  { braille: [x, y] }: Arrangement,
  sizes: StandSizes,
  foot: number,
): Manifold {
  const at = dots.map(([dx, dy]): Point => [x + dx, y + dy]);
  return bench.solid(dotMesh(at, sizes.braille, sizes.plaque, foot));
}

const codeSolid = (
  bench: Workbench,
  { outlines }: CodePlan,
  { code }: Arrangement,
  sizes: StandSizes,
  foot: number,
): Manifold => bench.prism(shifted(outlines, code), foot, sizes.plaque + sizes.codeHeight);

function partsOf(
  bench: Workbench,
  ground: Manifold,
  letters: readonly Manifold[],
  codes: readonly Manifold[],
  contrast: boolean,
  toStand: Mat4,
): Part[] {
  const stand: Surface = { name: 'stand', colour: COLOURS.stand };
  const ink: Surface = { name: 'letters', colour: COLOURS.letters };
  const part = (name: string, purpose: string, mesh: Mesh, surfaces: readonly Surface[]): Part => ({
    name,
    purpose,
    surfaces,
    mesh,
    placed: [backFrom(mesh, toStand)],
  });
  const purpose = 'the stand that holds the crystal';
  if (!contrast) {
    const inked = [...letters, ...codes].map((solid) => bench.solid(bench.mesh(solid, 1)));
    return [part('stand', purpose, bench.mesh(bench.union([ground, ...inked]), 0), [stand, ink])];
  }
  const own = (name: string, what: string, solids: readonly Manifold[]): Part[] =>
    solids.length === 0 ? [] : [{ ...part(name, what, bench.mesh(bench.union(solids), 0), [ink]), with: 'stand' }];
  return [
    part('stand', purpose, bench.mesh(ground, 0), [stand]),
    ...own('stand-letters', "the stand's letters and braille, in a second colour, printed on it in one job", letters),
    ...own('stand-code', "the stand's QR code, in a dark colour, printed on it in one job", codes),
  ];
}

/** First to the stance, then to the place on the plaque. */
function compose({ stance }: Cradle, [x, y]: Point, lift: number): Mat4 {
  const m = [...stanceMatrix(stance)] as Mat4;
  [m[12], m[13], m[14]] = [x, y, lift];
  return m;
}

/** A mesh on the stand taken to the crystal's frame. */
function backFrom(mesh: Mesh, m: Mat4): Mesh {
  const positions = new Float64Array(mesh.positions.length);
  for (let at = 0; at < positions.length; at += 3) {
    const from = [0, 1, 2].map((i) => mesh.positions[at + i]! - m[12 + i]!);
    for (let axis = 0; axis < 3; axis++)
      positions[at + axis] = m[4 * axis]! * from[0]! + m[4 * axis + 1]! * from[1]! + m[4 * axis + 2]! * from[2]!;
  }
  return { ...mesh, positions };
}
