import type { PrintPlan } from '../recipe/crystal.ts';
import { planRods, type RodPlan } from '../rods/plan.ts';
import { ObjectError } from '../shape/object-error.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { crystalMesh } from './body.ts';
import type { BluntBody } from './handling/bevelled.ts';
import { withSolids } from './kit.ts';
import { ontoBed, type Part } from './part.ts';
import { solidBody } from './solid-body.ts';
import { crystalSurfaces } from './surfaces.ts';
import { forMetal, type Supplies, toolsFor } from './tools.ts';

export interface PrintedModel {
  readonly parts: readonly Part[];
  /** The blunted body, where it was blunted. */
  readonly blunted: BluntBody | null;
  /** Sentences about what was decided on the way. */
  readonly remarks: readonly string[];
  /** Sentences about what could do harm. */
  readonly warnings: readonly string[];
}

/** Makes the printable parts of a crystal at its size. @throws ObjectError */
export async function printedParts(
  shape: ClosedShape,
  scale: number,
  print: PrintPlan,
  supplies: Supplies,
): Promise<PrintedModel> {
  refuseMixtures(print);
  const rods = print.axes && !forMetal(print.axes) ? planRods(shape, scale, print.axes) : null;
  if (isPlain(print, rods)) return plainCrystal(shape, scale, rods?.remarks ?? []);
  const tools = await toolsFor(print, supplies);
  return withSolids((bench) => {
    const { body, printer, stand } = print;
    const first: PrintedModel =
      body.kind === 'solid'
        ? { ...solidBody(bench, shape, scale, print, rods, tools), warnings: [] }
        : {
            blunted: null,
            ...tools.bodies!.bodyParts(bench, shape, scale, { ...print, body }, rods, supplies.isSound),
          };
    const typeface = tools.typeface;
    const more = [
      stand && typeface && tools.stands?.standing(bench, shape, scale, stand, { printer, typeface, rods }),
      rods?.ends.length && typeface && tools.keys?.keyed(bench, shape, scale, typeface, rods),
    ];
    const all = [first, ...more.filter((one) => !!one)];
    return {
      ...first,
      parts: all.flatMap(({ parts }) => parts),
      remarks: all.flatMap(({ remarks }) => remarks),
    };
  });
}

/** Nothing that needs the boolean library, whose loading takes longer than all else. */
const isPlain = (print: PrintPlan, rods: RodPlan | null): boolean => {
  const { body, letters, blunt, stand, base, planes, key, axes } = print;
  const wanted = [letters, blunt, stand, base, planes, key, forMetal(axes), rods?.ends.length];
  return body.kind === 'solid' && !wanted.some(Boolean);
};

function plainCrystal(shape: ClosedShape, scale: number, remarks: readonly string[]): PrintedModel {
  const mesh = crystalMesh(shape, scale);
  const body: Part = {
    name: 'body',
    purpose: 'the crystal',
    surfaces: crystalSurfaces(shape.crystal, 'rods'),
    mesh: ontoBed([mesh])[0]!,
    placed: [mesh],
  };
  return { parts: [body], blunted: null, remarks, warnings: [] };
}

/** What cannot be had together yet is refused rather than left out. */
function refuseMixtures({ body, axes, letters, blunt, stand, base, planes, key }: PrintPlan): void {
  if (key && (!axes || forMetal(axes)))
    throw new ObjectError(
      'not-together',
      'a key explains the symbols at the ends of printed rods, and this model has none',
      'choose axes, fused or separate, or leave the key away',
    );
  if (body.kind === 'solid') return;
  const apart = body.kind !== 'frame';
  const besides = [
    ...(axes && (apart || forMetal(axes)) ? ['axes'] : []),
    ...(letters ? ['letters'] : []),
    ...(base ? ['text under it'] : []),
    ...(planes ? ['mirror planes'] : []),
    ...(blunt ? ['blunting'] : []),
    ...(stand && body.kind !== 'hollow' && body.kind !== 'skins' ? ['a stand'] : []),
  ];
  if (besides.length === 0) return;
  const message = `a body of kind ${body.kind} is not made together with ${besides.join(' and ')}`;
  throw new ObjectError('not-together', message, 'make two models: one with body solid, one with this body');
}
