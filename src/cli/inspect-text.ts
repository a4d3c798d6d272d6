import { printFace, printZone } from '../crystal/indices.ts';
import type { PointGroup } from '../crystal/point-group.ts';
import { miller, zone } from '../crystal/spaces.ts';
import type { Inspection } from '../inspect.ts';
import { groupText } from './group-text.ts';
import { table } from './say.ts';

/** A crystal's inspection for a person at a terminal. */
export function inspectionText(known: Inspection, group: PointGroup): string {
  const { cell, mineral } = known;
  const head = [
    mineral ? `${mineral.name}  ${mineral.formula}  (${mineral.habit ?? 'own forms'})` : known.title,
    `cell  a ${cell.a}  b ${cell.b}  c ${cell.c} Å   α ${cell.alpha}  β ${cell.beta}  γ ${cell.gamma}°`,
    ...(mineral?.source ? [`cell from  ${mineral.source}`] : []),
  ];
  return [head.join('\n'), groupText(group, false), formsText(known, group), solidText(known, group)].join('\n\n');
}

function formsText({ forms }: Inspection, group: PointGroup): string {
  const rows = forms.map((form) => [
    form.letter ?? '',
    printFace(miller(...form.indices), group.axes, { brackets: '{', overbar: true }),
    form.name,
    form.closed ? 'closed' : 'open',
    String(form.multiplicity),
    String(form.distance),
    form.vanishesAt === null ? 'never' : short(form.vanishesAt, 4),
    form.appears ? String(form.facesShown) : 'none',
    form.appears ? short(form.area, 3) : '',
  ]);
  return table(['', 'form', 'name', '', '>faces', '>distance', '>vanishes at', '>shown', '>area'], rows);
}

function solidText(known: Inspection, group: PointGroup): string {
  const { solid, object } = known;
  if (!solid) {
    const along = (known.openAlong ?? []).map(([u, v, w]) => printZone(zone(u, v, w))).join(', ');
    return `Open along ${along}.\n${known.advice ?? ''}`;
  }
  const angles = solid.angles.map(({ forms, interfacial, dihedral, edges }) => {
    const [a, b] = forms.map((i) => known.forms[i]!);
    const symbol = (form: Inspection['forms'][number]): string =>
      printFace(miller(...form.indices), group.axes, { brackets: '{', overbar: true });
    return [`${symbol(a!)} ∧ ${symbol(b!)}`, short(interfacial, 3), short(dihedral, 3), String(edges)];
  });
  const lines = [
    `solid  ${solid.faces} faces, ${solid.edges} edges, ${solid.vertices} vertices; volume ${short(solid.volume, 4)}, surface ${short(solid.area, 4)} in units of distance`,
    ...(object
      ? [
          `object  ${object.extents.map((value) => short(value, 2)).join(' × ')} mm, ${short(object.volume / 1000, 3)} cm³`,
        ]
      : []),
    '',
    table(['edges between', '>angle between normals', '>dihedral', '>edges'], angles),
  ];
  return lines.join('\n');
}

const short = (value: number, places: number): string => String(Number(value.toFixed(places)));
