import { join } from 'node:path';
import { printFace } from '../crystal/indices.ts';
import { printSymbol } from '../crystal/symbol.ts';
import type { Made } from '../make.ts';
import { extentsOf } from '../print/mesh.ts';
import { assemble } from '../print/part.ts';
import type { Resolved } from '../recipe/crystal.ts';
import { shownForms, vanishesAt } from '../shape/presence.ts';

/** What was made, as words and as data. */
export function makeReport({ crystal, print }: Resolved, made: Made, folder: string) {
  const { measures, solid } = made.shape;
  const scale = made.millimetresPerUnit;
  const extents = [0, 1, 2].map((axis) => round((measures.high[axis]! - measures.low[axis]!) * scale, 2));
  const volume = round((measures.volume * scale ** 3) / 1000, 2);
  const shown = shownForms(solid);
  const forms = crystal.forms.map(({ form, distance, letter }, i) => ({
    symbol: printFace(form.indices, crystal.group.axes, { brackets: '{' }),
    letter,
    name: form.name,
    distance,
    appears: shown[i]!,
  }));
  const absent = crystal.forms.flatMap(({ form, distance }, i) => {
    if (shown[i]) return [];
    const limit = vanishesAt(crystal, i);
    const symbol = printFace(form.indices, crystal.group.axes, { brackets: '{' });
    return [
      `${symbol} does not appear: at distance ${distance} it misses the crystal; below ${round(limit ?? 0, 4)} it would cut it.`,
    ];
  });
  const names = forms
    .filter(({ appears }) => appears)
    .map(({ letter, symbol, name }) => `${letter ? `${letter} ` : ''}${symbol} ${name}`);
  const group = printSymbol(crystal.group.hermannMauguin);
  const whole = extentsOf(assemble(made.parts)).map((extent) => round(extent, 2));
  const larger = whole.some((extent, i) => Math.abs(extent - extents[i]!) > 0.01);
  const inAll = larger ? `, the whole object ${whole.join(' × ')} mm` : '';
  return {
    title: crystal.title,
    pointGroup: crystal.group.hermannMauguin,
    cell: crystal.cell,
    forms,
    faces: measures.faces.length,
    millimetresPerUnit: scale,
    /** Of the crystal alone, and of the whole object, millimetres. */
    extents,
    wholeExtents: whole,
    /** Of the crystal alone, mm³. */
    volume: measures.volume * scale ** 3,
    files: made.files.map(({ name, holds, copies, bytes, checks }) => ({
      path: join(folder, name),
      holds,
      /** How many to print. */
      copies,
      bytes: bytes.length,
      triangles: sum(checks, ({ triangles }) => triangles),
      bodies: sum(checks, ({ bodies }) => bodies.length),
      watertight: checks.every(({ watertight }) => watertight),
      volume: sum(checks, ({ volume }) => volume),
    })),
    hasRods: print.axes !== null || print.pair,
    warnings: made.warnings,
    findings: made.findings,
    remarks: [
      ...made.files
        .filter(({ holds }, i) => i > 0 || holds !== 'the crystal')
        .map(({ name, holds, copies }) => `${name}: ${holds}${copies > 1 ? `; print ${copies}` : ''}.`),
      ...absent,
      ...made.remarks,
    ],
    summary: `${crystal.title}: point group ${group}, ${measures.faces.length} faces (${names.join(', ')}); crystal ${extents.join(' × ')} mm, ${volume} cm³${inAll}; closed, checked.`,
  };
}

const round = (value: number, places: number): number => Number(value.toFixed(places));

const sum = <T>(all: readonly T[], of: (one: T) => number): number => all.reduce((total, one) => total + of(one), 0);
