import type { Manifold } from 'manifold-3d';
import type { BodyPlan, PrintPlan } from '../recipe/crystal.ts';
import type { PrinterProfile } from '../recipe/schema.ts';
import { AXIS_SYMBOLS } from '../rods/axis-symbol.ts';
import { planRods, type RodPlan } from '../rods/plan.ts';
import { ObjectError } from '../shape/object-error.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { crystalMesh } from './body.ts';
import type { BluntBody } from './handling/bevelled.ts';
import { type Workbench, withSolids } from './kit.ts';
import type { Typeface } from './lettering/typeface.ts';
import type { Mesh } from './mesh.ts';
import { ontoBed, type Part, type Surface } from './part.ts';
import { fuseRods } from './rods/fused.ts';
import { boreForRods } from './rods/separate.ts';
import { crystalSurfaces } from './surfaces.ts';

export interface PrintedModel {
  readonly parts: readonly Part[];
  /** The blunted body, where it was blunted. */
  readonly blunted: BluntBody | null;
  /** Sentences about what was decided on the way. */
  readonly remarks: readonly string[];
  /** Sentences about what could do harm. */
  readonly warnings: readonly string[];
}

/** What making a model needs besides the crystal. */
export interface Supplies {
  /** Bytes of the typeface for letters, in WOFF, TrueType or OpenType; asked for when letters are. */
  readonly typeface: () => Promise<Uint8Array>;
  /** Whether a mesh survives being written. */
  readonly isSound: (mesh: Mesh) => boolean;
}

/** Makes the printable parts of a crystal at its size. @throws ObjectError */
export async function printedParts(
  shape: ClosedShape,
  scale: number,
  print: PrintPlan,
  supplies: Supplies,
): Promise<PrintedModel> {
  refuseMixtures(print);
  const rods = print.axes ? planRods(shape, scale, print.axes) : null;
  if (isPlain(print, rods)) return plainCrystal(shape, scale, rods?.remarks ?? []);
  const tools = await toolsFor(print, supplies);
  return withSolids((bench) => {
    const { body, printer } = print;
    const base =
      body.kind === 'solid'
        ? solidParts(bench, shape, scale, print, rods, tools)
        : {
            blunted: null,
            ...tools.bodies!.bodyParts(bench, shape, scale, { ...print, body }, rods, supplies.isSound),
          };
    if (!print.stand) return base;
    const stand = tools.stands!.standing(bench, shape, scale, print.stand, {
      printer,
      typeface: tools.typeface!,
      rods,
    });
    return { ...base, parts: [...base.parts, ...stand.parts], remarks: [...base.remarks, ...stand.remarks] };
  });
}

/** Loads what this model needs and nothing else: letters, stands and bodies take longer to load than a crystal to make. */
async function toolsFor({ body, letters, blunt, stand }: PrintPlan, supplies: Supplies) {
  const [bodies, stands, letterTools, typefaces, bluntTools] = await Promise.all([
    body.kind === 'solid' ? null : import('./bodies.ts'),
    stand && import('./standing.ts'),
    letters && import('./lettered.ts'),
    letters || stand ? import('./lettering/typeface.ts') : null,
    blunt && import('./blunted.ts'),
  ]);
  const typeface: Typeface | null = typefaces ? typefaces.readTypeface(await supplies.typeface()) : null;
  return { bodies, stands, letterTools, typeface, bluntTools };
}

type Tools = Awaited<ReturnType<typeof toolsFor>>;

/** Nothing that needs the boolean library, whose loading takes longer than all else. */
const isPlain = ({ body, letters, blunt, stand }: PrintPlan, rods: RodPlan | null): boolean =>
  body.kind === 'solid' && !letters && !blunt && !stand && !rods?.ends.length;

function plainCrystal(shape: ClosedShape, scale: number, remarks: readonly string[]): PrintedModel {
  const part = bodyPart('the crystal', crystalMesh(shape, scale), crystalSurfaces(shape.crystal, 'rods'));
  return { parts: [part], blunted: null, remarks, warnings: [] };
}

function solidParts(
  bench: Workbench,
  shape: ClosedShape,
  scale: number,
  { axes, letters, blunt, printer }: PrintPlan,
  rods: RodPlan | null,
  { letterTools, typeface, bluntTools }: Tools,
): PrintedModel {
  const blunted = blunt && bluntTools ? bluntTools.bluntedBody(shape, scale, blunt) : null;
  const surfaces = crystalSurfaces(shape.crystal, blunted ? 'no crystal face' : 'rods and letters');
  const other = surfaces.length - 1;
  const remarks: string[] = [...(rods?.remarks ?? []), ...(rods?.ends.length ? thinRods(rods, printer) : [])];
  const parts: Part[] = [];
  let solid: Manifold = bench.solid(blunted?.mesh ?? crystalMesh(shape, scale));
  const words = ['the crystal'];
  if (letters && letterTools && typeface) {
    const done = letterTools.lettered(bench, solid, shape, scale, letters, { printer, typeface, rods });
    solid = done.solid;
    remarks.push(...done.remarks);
    words.push(`with ${letters.relief} ${letters.text}`);
  }
  if (rods?.ends.length && axes?.fit === 'separate') {
    const bored = boreForRods(bench, solid, rods, printer.rod.clearance);
    solid = bored.body;
    parts.push(...bored.rods);
    remarks.push(...bored.remarks);
    words.push('bored for its rods');
  } else if (rods?.ends.length) {
    solid = fuseRods(bench, solid, rods);
    words.push('with its symmetry axes');
  }
  if (blunted) words.push('blunted');
  const body = bodyPart(words.join(', '), bench.mesh(solid, other), surfaces);
  return {
    parts: [body, ...parts],
    blunted,
    remarks: [...remarks, ...(blunted?.remarks ?? [])],
    warnings: [],
  };
}

/** What cannot be had together yet is refused rather than left out. */
function refuseMixtures({ body, axes, letters, blunt, stand }: PrintPlan): void {
  if (body.kind === 'solid') return;
  const apart: BodyPlan['kind'][] = ['halves', 'sectors', 'units', 'hollow'];
  const with_ = [
    ...(axes && apart.includes(body.kind) ? ['axes'] : []),
    ...(letters ? ['letters'] : []),
    ...(blunt ? ['blunting'] : []),
    ...(stand && body.kind !== 'hollow' ? ['a stand'] : []),
  ];
  if (with_.length === 0) return;
  const message = `a body of kind ${body.kind} is not made together with ${with_.join(' and ')}`;
  throw new ObjectError('not-together', message, 'make two models: one with body solid, one with this body');
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

function bodyPart(purpose: string, mesh: Mesh, surfaces: readonly Surface[]): Part {
  return { name: 'body', purpose, surfaces, mesh: ontoBed([mesh])[0]!, placed: [mesh] };
}
