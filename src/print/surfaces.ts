import { printFace } from '../crystal/indices.ts';
import type { Crystal } from '../recipe/crystal.ts';
import type { Surface } from './part.ts';

/**
 * Colours after Okabe and Ito (Color Universal Design, 2008), which people with any usual colour vision tell apart, mixed
 * with white as printed plastics come.
 */
const FORM_COLOURS = [
  '#86A5CD',
  '#EDC28B',
  '#7FB99F',
  '#F3E7AB',
  '#D58867',
  '#BAE1F3',
  '#DFB0CD',
  '#F3EDE2',
  '#B9B5AB',
  '#CBD5AB',
];
export const ROD_COLOUR = '#33384A';
/** Okabe and Ito's vermilion (Color Universal Design, 2008), unmixed: it must stand out from every form's colour. */
export const SECOND_COLOUR = '#D55E00';

/** One surface a form, in the recipe's order, and after them one for everything that is no crystal face. */
export function crystalSurfaces({ forms, group }: Crystal, other: string): Surface[] {
  const faces = forms.map(({ form, letter }, i): Surface => {
    const symbol = printFace(form.indices, group.axes, { brackets: '{' });
    return { name: letter ? `${letter} ${symbol}` : symbol, colour: FORM_COLOURS[i % FORM_COLOURS.length]! };
  });
  return [...faces, { name: other, colour: ROD_COLOUR, curved: true }];
}
