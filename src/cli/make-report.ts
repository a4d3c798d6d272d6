import { join } from 'node:path';
import { printFace } from '../crystal/indices.ts';
import { printSymbol } from '../crystal/symbol.ts';
import { shownForms, vanishesAt } from '../habit/presence.ts';
import type { Made } from '../make.ts';
import type { Resolved } from '../recipe/crystal.ts';

/** What was made, as words and as data. */
export function makeReport({ crystal }: Resolved, made: Made, folder: string) {
  const { measures, solid } = made.habit;
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
  return {
    title: crystal.title,
    pointGroup: crystal.group.hermannMauguin,
    forms,
    millimetresPerUnit: scale,
    extents,
    volumeCubicCentimetres: volume,
    faces: measures.faces.length,
    files: made.files.map(({ name, holds, bytes, check }) => ({
      path: join(folder, name),
      holds,
      bytes: bytes.length,
      triangles: check.triangles,
      bodies: check.bodies.length,
      watertight: check.watertight,
      volume: check.volume,
    })),
    remarks: [...made.files.slice(1).map(({ name, holds }) => `${name}: ${holds}.`), ...absent, ...made.remarks],
    summary: `${crystal.title}: point group ${group}, ${measures.faces.length} faces (${names.join(', ')}); crystal ${extents.join(' × ')} mm, ${volume} cm³; closed, checked.`,
  };
}

const round = (value: number, places: number): number => Number(value.toFixed(places));
