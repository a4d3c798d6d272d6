import { pointGroup } from '../crystal/point-group.ts';
import { printSymbol } from '../crystal/symbol.ts';
import { PRESET_FOLDER } from '../disk/preset-folder.ts';
import { preset, recipeNames } from '../recipe/shelf.ts';

interface Listing {
  readonly heads: string[];
  readonly rows: string[][];
  readonly note?: string;
}

/** What is on the shelf, or the recipes of one set, or what matches some words. */
export function listPresets(words: readonly string[]): Listing {
  const [only] = words;
  const set = only ? preset(PRESET_FOLDER, 'sets', only.toLowerCase()) : null;
  if (set && only) {
    const rows = recipeNames(set).map((name) => {
      const { pointGroup = '', title = '' } = set.recipes[name]!;
      return [`${only.toLowerCase()}/${name}`, printSymbol(String(pointGroup)), title];
    });
    const wanted = rows.filter((row) =>
      words.slice(1).every((word) => row.some((cell) => cell.toLowerCase().includes(word.toLowerCase()))),
    );
    return { heads: ['recipe', 'point group', 'title'], rows: wanted, note: `${set.name}. ${set.note}` };
  }
  const minerals = PRESET_FOLDER.list('minerals').map(mineralRow);
  const matches = minerals.filter((row) =>
    words.every((word) => row.some((cell) => cell.toLowerCase().includes(word.toLowerCase()))),
  );
  const sets = PRESET_FOLDER.list('sets').join(', ');
  const note =
    words.length === 0
      ? `Sets: ${sets}  (goniolith presets 32-groups lists one)\nPrinters: ${PRESET_FOLDER.list('printers').join(', ')}`
      : undefined;
  return {
    heads: ['mineral', 'family', 'formula', 'system', 'point group', 'habits'],
    rows: matches.map(([id, family, formula, system, group, habits]) => [
      id!,
      family!,
      formula!,
      system!,
      printSymbol(group!),
      habits!,
    ]),
    ...(note && { note }),
  };
}

function mineralRow(id: string): string[] {
  const mineral = preset(PRESET_FOLDER, 'minerals', id)!;
  const group = pointGroup(mineral.pointGroup);
  return [
    id,
    mineral.family ?? '',
    mineral.formula,
    group.system,
    group.hermannMauguin,
    Object.keys(mineral.habits).join(', '),
  ];
}
