import { symmetryElements } from '../crystal/elements.ts';
import { form } from '../crystal/form.ts';
import { printFace, printZone } from '../crystal/indices.ts';
import type { PointGroup } from '../crystal/point-group.ts';
import { miller } from '../crystal/spaces.ts';
import { printSymbol } from '../crystal/symbol.ts';
import { table } from './say.ts';

/** Faces of low indices whose forms show what a group makes of special and general positions. */
const SAMPLE_FACES = [
  [0, 0, 1],
  [1, 0, 0],
  [0, 1, 0],
  [1, 1, 0],
  [2, 1, 0],
  [1, 0, 1],
  [0, 1, 1],
  [0, 2, 1],
  [1, 0, 2],
  [1, 1, 1],
  [1, 1, 2],
  [2, 2, 1],
  [1, 2, 3],
] as const;

/** A point group for a person at a terminal. */
export function groupText(group: PointGroup, withForms: boolean): string {
  const elements = symmetryElements(group);
  const traits = [
    group.centrosymmetric ? 'with a centre of inversion' : 'without a centre of inversion',
    ...(group.polar ? [group.polarAxis ? `polar along ${printZone(group.polarAxis)}` : 'polar'] : []),
    ...(group.chiral ? ['chiral'] : []),
  ];
  const head = `point group  ${printSymbol(group.hermannMauguin)}  ${group.schoenflies}   ${group.system}, order ${group.order}, ${traits.join(', ')}`;
  const setting =
    group.key === group.hermannMauguin ? [] : [`on these axes  ${printSymbol(group.key)}  (${group.axes})`];
  const bySymbol = new Map<string, string[]>();
  for (const line of elements.lines)
    if (line.symbol !== 'm') {
      const mark = line.polar ? ' (polar)' : '';
      bySymbol.set(line.symbol, [
        ...(bySymbol.get(line.symbol) ?? []),
        printZone(line.direction, { overbar: true }) + mark,
      ]);
    }
  const axes = [...bySymbol].map(
    ([symbol, at]) => `${printSymbol(symbol).padEnd(symbol.startsWith('-') ? 6 : 5)} ${at.join(' ')}`,
  );
  const planes = elements.mirrorPlanes.map(({ plane }) =>
    printFace(plane, group.axes, { brackets: '(', overbar: true }),
  );
  const lines = [head, ...setting, ...axes, ...(planes.length ? [`m     ${planes.join(' ')}`] : [])];
  return withForms ? `${lines.join('\n')}\n\n${formsText(group)}` : lines.join('\n');
}

function formsText(group: PointGroup): string {
  const seen = new Set<string>();
  const rows = SAMPLE_FACES.map(([h, k, l]) => form(group, miller(h, k, l))).flatMap((made) => {
    const id = made.faces.map(String).sort().join(' ');
    if (seen.has(id)) return [];
    seen.add(id);
    const enantiomorph = made.enantiomorph
      ? printFace(made.enantiomorph, group.axes, { brackets: '{', overbar: true })
      : '';
    return [
      [
        printFace(made.indices, group.axes, { brackets: '{', overbar: true }),
        made.name,
        String(made.multiplicity),
        made.closed ? 'closed' : 'open',
        made.position,
        enantiomorph,
      ],
    ];
  });
  return table(['form', 'name', '>faces', '', 'position', 'enantiomorph'], rows);
}

/** The same as data. */
export function groupData(group: PointGroup) {
  const { hermannMauguin, key, schoenflies, system, axes, order, centrosymmetric, polar, polarAxis, chiral } = group;
  return {
    hermannMauguin,
    setting: key,
    schoenflies,
    system,
    axes,
    order,
    centrosymmetric,
    polar,
    polarAxis,
    chiral,
    elements: symmetryElements(group),
    operations: group.operations.map(({ type, axis, sense, matrix }) => ({ type, axis, sense, matrix })),
  };
}
