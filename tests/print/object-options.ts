import { PRESET_FOLDER } from '../../src/disk/preset-folder.ts';
import type { RecipeInput } from '../../src/recipe/schema.ts';
import { preset } from '../../src/recipe/shelf.ts';

export type Print = NonNullable<RecipeInput['print']>;

/** Objects of one kind: the options that ask for it, in turns, and the reasons for which some crystals cannot be one. */
export interface ObjectKind {
  readonly variants: readonly Print[];
  /** Codes of an ObjectError that are an answer here and not a fault. */
  readonly refusals: readonly string[];
}

/** Every kind of body and every option, with its defaults and with something else. */
export const KINDS = {
  hollow: {
    variants: [
      { body: 'hollow' },
      { body: { kind: 'hollow', wall: 3, drains: true } },
      { body: 'hollow', printer: 'sla' },
      { body: 'hollow', stand: { text: ['Hollow'], braille: false } },
    ],
    refusals: ['wall', 'drain', 'stand'],
  },
  frame: {
    variants: [
      { body: 'frame' },
      { body: { kind: 'frame', strut: '2 mm', bead: true } },
      { body: { kind: 'frame', strut: 2.4 } },
      { body: 'frame', axes: true },
    ],
    refusals: ['struts', 'no-centre'],
  },
  halves: {
    variants: [
      { body: 'halves' },
      { body: { kind: 'halves', join: 'magnets' } },
      { body: { kind: 'halves', join: 'none' } },
      { body: { kind: 'halves', plane: '111' } },
      { body: { kind: 'halves', plane: '111', offset: 4 } },
    ],
    refusals: ['dowel', 'magnet'],
  },
  sectors: {
    variants: [
      { body: 'sectors' },
      { body: { kind: 'sectors', by: 'form', gap: 0.4 } },
      { body: { kind: 'sectors', by: 'form' } },
    ],
    refusals: ['gap'],
  },
  units: {
    variants: [{ body: 'units' }, { body: { kind: 'units', gap: 0.5 } }],
    refusals: ['gap'],
  },
  letters: {
    variants: [
      { letters: true },
      { letters: 'raised' },
      { letters: { text: 'indices' }, axes: true },
      { letters: { relief: 'raised', text: 'indices' } },
    ],
    refusals: ['rod-too-wide', 'rods-crowded'],
  },
  blunt: {
    variants: [{ blunt: true }, { blunt: { bevel: 1 } }, { blunt: '1.2 mm', letters: true }, { blunt: { bevel: 0.6 } }],
    refusals: ['size'],
  },
  stand: {
    variants: [
      { stand: true },
      { stand: { text: ['No braille'], braille: false }, letters: true },
      { stand: { text: ['A code'], qr: 'https://example.org/a1' } },
      { stand: { text: ['With rods'], braille: false }, axes: true, letters: true },
    ],
    refusals: ['stand', 'rod-too-wide', 'rods-crowded'],
  },
  axes: {
    variants: [{ axes: true }, { axes: { fit: 'separate' } }, { axes: { fit: 'separate', diameter: 2 } }],
    refusals: ['rod-too-wide', 'rods-crowded'],
  },
  bores: {
    variants: [
      { axes: { fit: 'press', diameter: 2 } },
      { axes: { fit: 'slide', diameter: 2, depth: 8 }, letters: true },
      { axes: { fit: 'press', diameter: 3 }, planes: { relief: 'inlaid', width: 1 } },
    ],
    refusals: ['rod-too-wide', 'rods-crowded', 'plane', 'wall'],
  },
  planes: {
    variants: [
      { planes: true },
      { planes: 'raised', letters: 'raised' },
      { planes: { relief: 'inlaid', width: 1, depth: 0.8 }, letters: 'inlaid' },
      { planes: 'inlaid', axes: true },
    ],
    refusals: ['plane', 'wall', 'rod-too-wide'],
  },
  skins: {
    variants: [{ body: 'skins' }, { body: { kind: 'skins', depth: 2 }, stand: true }],
    refusals: ['wall', 'stand'],
  },
  key: { variants: [{ axes: true, key: true }], refusals: ['rod-too-wide'] },
  base: { variants: [{ base: 'HM-12' }, { base: ['HM 7', '2024'], letters: true }], refusals: ['text'] },
} as const satisfies Record<string, ObjectKind>;

export type KindName = keyof typeof KINDS;

export const KIND_NAMES = Object.keys(KINDS) as KindName[];

/** Which files are asked for, in turns: all three for every second object. */
export const FILES: readonly NonNullable<Print['files']>[] = [['stl'], ['stl', '3mf', 'glb'], ['stl', '3mf']];

const POINT_GROUPS = Object.fromEntries(
  PRESET_FOLDER.list('minerals').map((name) => [name, preset(PRESET_FOLDER, 'minerals', name)!.pointGroup]),
);

/** So many minerals, spread evenly over the list sorted by point group: no group is left out that several share. */
export function spreadMinerals(count: number): string[] {
  const sorted = Object.keys(POINT_GROUPS).sort((a, b) => POINT_GROUPS[a]!.localeCompare(POINT_GROUPS[b]!));
  return Array.from({ length: Math.min(count, sorted.length) }, (_, i) => {
    return sorted[Math.floor((i * sorted.length) / Math.min(count, sorted.length))]!;
  });
}
