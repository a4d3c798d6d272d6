import { choiceOf } from '../recipe/print-plan.ts';
import { BODY_KINDS, RELIEFS, type RecipeInput } from '../recipe/schema.ts';
import { oneOf, UsageError } from './failure.ts';

type PrintInput = NonNullable<RecipeInput['print']>;

export interface PrintFlags {
  size?: string;
  axes?: string | true;
  rods?: string;
  rodDiameter?: string;
  reach?: string;
  printer?: string;
  text?: true;
  name?: string;
  body?: string;
  letters?: string | true;
  blunt?: string | true;
  stand?: true;
  base?: string;
  planes?: string | true;
  key?: true;
  pair?: true;
  flat?: true;
  checks?: true;
  files?: string;
}

const FITS = ['fused', 'separate', 'press', 'slide'] as const;
const FILES = ['stl', '3mf', 'glb', 'png'] as const;

/** Flags as the part of a recipe that they stand for. @throws UsageError where they do not go together */
export function printFlags(flags: PrintFlags): PrintInput {
  const axes = axesFrom(flags);
  if (flags.name !== undefined && /\.(stl|svg|3mf)$/i.test(flags.name))
    throw new UsageError(`--name takes no ending: ${flags.name.replace(/\.\w+$/, '')}.`);
  return {
    ...(flags.size !== undefined && { size: flags.size }),
    ...(axes !== undefined && { axes }),
    ...(flags.printer !== undefined && { printer: flags.printer }),
    ...(flags.body !== undefined && { body: oneOf('--body', flags.body, BODY_KINDS) }),
    ...(flags.letters !== undefined && {
      letters: flags.letters === true || oneOf('--letters', flags.letters, RELIEFS),
    }),
    ...(flags.blunt !== undefined && { blunt: flags.blunt }),
    ...(flags.stand && { stand: true }),
    ...(flags.base !== undefined && { base: flags.base.split('|').map((line) => line.trim()) }),
    ...(flags.planes !== undefined && {
      planes: flags.planes === true || oneOf('--planes', flags.planes, RELIEFS),
    }),
    ...(flags.key && { key: true }),
    ...(flags.pair && { pair: true }),
    ...(flags.flat && { flat: true }),
    ...(flags.checks && { checks: true }),
    ...(flags.files !== undefined && {
      files: flags.files.split(',').map((kind) => oneOf('--files', kind.trim(), FILES)),
    }),
    ...(flags.text && { stl: 'text' as const }),
    ...(flags.name !== undefined && { file: flags.name }),
  };
}

function axesFrom({ axes, rods, rodDiameter, reach }: PrintFlags): PrintInput['axes'] | undefined {
  const details = {
    ...(rodDiameter !== undefined && { diameter: rodDiameter }),
    ...(reach !== undefined && { reach }),
  };
  const more = { ...details, ...(rods !== undefined && { fit: oneOf('--rods', rods, FITS) }) };
  if (axes === undefined) {
    if (Object.keys(more).length > 0) throw new UsageError('--rods, --rod-diameter and --reach go with --axes.');
    return undefined;
  }
  return Object.keys(more).length === 0 ? (axes === true ? 'all' : axes) : { ...choiceOf(axes), ...more };
}
