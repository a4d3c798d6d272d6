import { Command } from 'commander';
import { json, result, table } from './say.ts';

export function presetsCommand(): Command {
  return new Command('presets')
    .description('List the minerals, sets and printers on the shelf; with words, those that match all of them.')
    .argument(
      '[words...]',
      'parts of a name, family, formula, crystal system, point group or habit; or the name of a set',
    )
    .option('--json', 'as JSON')
    .addHelpText(
      'after',
      '\nExamples:\n  goniolith presets garnet\n  goniolith presets trigonal\n  goniolith presets 32-groups',
    )
    .action(async (words: string[], flags: { json?: true }) => {
      const { listPresets } = await import('./presets-list.ts');
      const { heads, rows, note } = listPresets(words);
      if (flags.json) return json(rows.map((row) => Object.fromEntries(heads.map((head, i) => [head, row[i]]))));
      result(rows.length ? table(heads, rows) : 'Nothing on the shelf matches.');
      if (note) result(`\n${note}`);
      if (rows.length === 0) process.exitCode = 1;
      return undefined;
    });
}
