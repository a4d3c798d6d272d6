import type { PrintPlan } from '../recipe/crystal.ts';
import type { Typeface } from './lettering/typeface.ts';
import type { Mesh } from './mesh.ts';

/** What making a model needs besides the crystal. */
export interface Supplies {
  /** Bytes of the typeface for letters, in WOFF, TrueType or OpenType; asked for when letters are. */
  readonly typeface: () => Promise<Uint8Array>;
  /** Whether a mesh survives being written. */
  readonly isSound: (mesh: Mesh) => boolean;
}

/** Loads what this model needs and nothing else: letters, stands and bodies take longer to load than a crystal to make. */
export async function toolsFor(print: PrintPlan, supplies: Supplies) {
  const { body, letters, blunt, stand, base, planes, key, axes } = print;
  const written = letters || base;
  const [bodies, stands, lettering, typefaces, blunting, mirrors, metal, keys] = await Promise.all([
    body.kind === 'solid' ? null : import('./bodies.ts'),
    stand && import('./standing.ts'),
    written ? import('./lettered.ts') : null,
    written || stand || key ? import('./lettering/typeface.ts') : null,
    blunt && import('./blunted.ts'),
    planes && import('./mirror-lined.ts'),
    forMetal(axes) ? import('./metal-bored.ts') : null,
    key ? import('./keyed.ts') : null,
  ]);
  const typeface: Typeface | null = typefaces ? typefaces.readTypeface(await supplies.typeface()) : null;
  return { bodies, stands, letters: lettering, typeface, blunting, planes: mirrors, metal, keys };
}

export type Tools = Awaited<ReturnType<typeof toolsFor>>;
export type SolidTools = Pick<Tools, 'letters' | 'typeface' | 'blunting' | 'planes' | 'metal'>;

/** Whether axes are bores for bought rod, without printed rods. */
export const forMetal = (axes: PrintPlan['axes']): boolean => axes?.fit === 'press' || axes?.fit === 'slide';
