import { printFace } from '../../crystal/indices.ts';
import { printSymbol } from '../../crystal/symbol.ts';
import type { Crystal } from '../../recipe/crystal.ts';
import { formulaText } from '../lettering/marks.ts';

/** A label's lines: name, formula with figures below the line, point group with overbars, forms, and what else is given. */
export function labelLines({ mineral, title, group, forms }: Crystal, more: readonly string[] = []): string[] {
  const letters = forms.map(
    ({ form, letter }) => letter ?? printFace(form.indices, group.axes, { brackets: '{', overbar: true }),
  );
  return [
    nameOf(mineral?.name ?? title),
    ...(mineral ? [formulaText(mineral.formula)] : []),
    printSymbol(group.hermannMauguin),
    [...new Set(letters)].join(' '),
    ...more,
  ];
}

/** What of it can be said in braille: the name and the point group, with a minus for an overbar. */
export const brailleLines = ({ mineral, title, group }: Crystal): string[] => [
  nameOf(mineral?.name ?? title),
  group.hermannMauguin.replaceAll('-', '\u2212'),
];

/** Without a remark in brackets at its end, which a label has no room for. */
const nameOf = (title: string): string => title.replace(/\s*\([^)]*\)$/, '') || title;
