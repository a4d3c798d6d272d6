import type { Manifold } from 'manifold-3d';
import type { AxesPlan, PrintPlan } from '../recipe/crystal.ts';
import type { PrinterProfile } from '../recipe/schema.ts';
import { axisLines } from '../rods/axis-ends.ts';
import { AXIS_SYMBOLS } from '../rods/axis-symbol.ts';
import type { RodPlan } from '../rods/plan.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { crystalMesh } from './body.ts';
import type { BluntBody } from './handling/bevelled.ts';
import type { Workbench } from './kit.ts';
import type { RodExit } from './lettering/face-room.ts';
import { ontoBed, type Part } from './part.ts';
import { rodSolids } from './rods/fused.ts';
import { boreForRods } from './rods/separate.ts';
import { crystalSurfaces, SECOND_COLOUR } from './surfaces.ts';
import type { SolidTools } from './tools.ts';

export interface SolidBody {
  /** `body`, what fills it in a second colour, and rods to push in. */
  readonly parts: readonly Part[];
  readonly blunted: BluntBody | null;
  readonly remarks: readonly string[];
}

/** A body on its way: what is cut into it leaves room for what fills the cuts. */
interface Work {
  readonly solid: Manifold;
  readonly inlays: readonly Inlay[];
  readonly words: readonly string[];
  readonly parts: readonly Part[];
  readonly remarks: readonly string[];
}

interface Inlay {
  readonly name: string;
  readonly purpose: string;
  readonly solid: Manifold;
}

/** The crystal as one solid with all that a recipe wants on it. Blunting comes first, rods last. @throws ObjectError */
export function solidBody(
  bench: Workbench,
  shape: ClosedShape,
  scale: number,
  print: PrintPlan,
  rods: RodPlan | null,
  tools: SolidTools,
): SolidBody {
  const { printer, axes } = print;
  const blunted = print.blunt && tools.blunting ? tools.blunting.bluntedBody(shape, scale, print.blunt) : null;
  const remarks = [...(rods?.remarks ?? []), ...(rods?.ends.length ? thinRods(rods, printer) : [])];
  const solid = bench.solid(blunted?.mesh ?? crystalMesh(shape, scale));
  let work: Work = { solid, inlays: [], words: ['the crystal'], parts: [], remarks };
  const { planes } = print;
  if (planes && tools.planes)
    work = after(work, tools.planes.mirrorLined(bench, work.solid, shape, scale, planes, printer));
  if (tools.letters && tools.typeface) {
    const strips = planes && tools.planes ? tools.planes.stripsOf(shape, planes, printer) : [];
    const lettering = {
      printer,
      typeface: tools.typeface,
      inset: print.blunt && tools.blunting ? tools.blunting.bluntedInset(shape, print.blunt) : 0,
      avoid: axes ? exitsOf(shape, axes) : [],
      strips,
    };
    const { lettered, baseLettered } = tools.letters;
    const { letters, base } = print;
    if (letters) work = after(work, lettered(bench, work.solid, shape, scale, letters, base !== null, lettering));
    if (base) work = after(work, baseLettered(bench, work.solid, shape, scale, base, lettering));
  }
  if (axes && tools.metal) {
    const cut = (one: Manifold) => tools.metal!.boredForMetal(bench, one, shape, scale, axes, printer);
    work = cutAll(work, 'bored for metal rod', cut);
  } else if (axes && rods?.ends.length) {
    work =
      axes.fit === 'separate'
        ? cutAll(work, 'bored for its rods', (one) => {
            const { body, rods: parts, remarks: told } = boreForRods(bench, one, rods, printer.rod.clearance);
            return { solid: body, parts, remarks: told };
          })
        : withRods(bench, work, rods);
  }
  if (blunted) work = { ...work, words: [...work.words, 'blunted'], remarks: [...work.remarks, ...blunted.remarks] };
  return { parts: [...bodyParts(bench, shape, work, print), ...work.parts], blunted, remarks: work.remarks };
}

/** Where axes leave the body, for letters to stay clear of. */
const exitsOf = (shape: ClosedShape, axes: AxesPlan): RodExit[] =>
  axisLines(shape.crystal, axes).flatMap(({ ends }) =>
    ends.map(({ along }) => ({ along, radius: axes.diameter / 2 + 1 })),
  );

/** What a step made of the body. */
export interface Step {
  readonly solid: Manifold;
  readonly word: string;
  readonly inlay: Inlay | null;
  readonly remarks: readonly string[];
}

const after = (work: Work, { solid, word, inlay, remarks }: Step): Work => ({
  ...work,
  solid,
  inlays: inlay ? [...work.inlays, inlay] : work.inlays,
  words: [...work.words, word],
  remarks: [...work.remarks, ...remarks],
});

/** Bores go through what fills the body as well. */
function cutAll(
  work: Work,
  word: string,
  cut: (one: Manifold) => { solid: Manifold; parts: readonly Part[]; remarks: readonly string[] },
): Work {
  const { solid, parts, remarks } = cut(work.solid);
  return {
    solid,
    inlays: work.inlays.map((inlay) => ({ ...inlay, solid: cut(inlay.solid).solid })),
    words: [...work.words, word],
    parts: [...work.parts, ...parts],
    remarks: [...work.remarks, ...remarks],
  };
}

function withRods(bench: Workbench, work: Work, rods: RodPlan): Work {
  const joined = rodSolids(bench, rods);
  const solid = bench.union([work.solid, ...joined]);
  const inlays = work.inlays.map((inlay) => ({ ...inlay, solid: bench.subtract(inlay.solid, joined) }));
  return { ...work, solid, inlays, words: [...work.words, 'with its symmetry axes'] };
}

/** The body, and in the same place on the bed what fills it. */
function bodyParts(
  bench: Workbench,
  shape: ClosedShape,
  work: Work,
  { blunt, letters, base, planes }: PrintPlan,
): Part[] {
  const faces = crystalSurfaces(shape.crystal, blunt ? 'no crystal face' : 'rods and letters');
  const surfaces = letters || base || planes ? [...faces.slice(0, -1), { ...faces.at(-1)!, fine: true }] : faces;
  const mesh = bench.mesh(work.solid, surfaces.length - 1);
  const inlays = work.inlays.flatMap(({ name, purpose, solid }): Part[] => {
    if (solid.isEmpty()) return [];
    const { positions, triangles } = bench.mesh(solid, 0);
    const own = { positions, triangles };
    return [
      {
        name,
        purpose,
        surfaces: [{ name, colour: SECOND_COLOUR, fine: true }],
        mesh: own,
        placed: [own],
        with: 'body',
      },
    ];
  });
  const body = { name: 'body', purpose: work.words.join(', '), surfaces, mesh, placed: [mesh] };
  return ontoBedInOneJob([body, ...inlays]);
}

/** Where bores took corners away, the strips beside them may reach lower than the body. */
function ontoBedInOneJob(parts: readonly Part[]): Part[] {
  const meshes = ontoBed(parts.map(({ mesh }) => mesh));
  return parts.map((part, i) => ({ ...part, mesh: meshes[i]! }));
}

function thinRods({ ends, diameter, symbolUnit }: RodPlan, { name, rod, wall }: PrinterProfile): string[] {
  const remarks: string[] = [];
  if (diameter < rod.smallest)
    remarks.push(`Rods of ${diameter} mm are thinner than the ${rod.smallest} mm that "${name}" prints reliably.`);
  const rim = symbolUnit * Math.min(...ends.flat().map(({ line }) => AXIS_SYMBOLS[line.symbol].rim));
  if (rim < wall)
    remarks.push(
      `The rims of the hollow symbols are ${rim.toFixed(2)} mm, thinner than the ${wall} mm that "${name}" prints.`,
    );
  return remarks;
}
