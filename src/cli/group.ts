import { Command } from 'commander';
import { json, result, table } from './say.ts';

export function groupCommand(): Command {
  return new Command('group')
    .description('Tell the symmetry elements and forms of a point group; without a symbol, list all 32.')
    .argument('[symbol]', 'Hermann–Mauguin or Schoenflies symbol: -43m, "6/mmm", D3d, 321, 3m:R')
    .option('--json', 'as JSON, with all operations')
    .allowUnknownOption(false)
    .addHelpText('after', '\nExamples:\n  goniolith group m-3m\n  goniolith group -43m')
    .action(async (symbol: string | undefined, flags: { json?: true }) => {
      const { pointGroup } = await import('../crystal/point-group.ts');
      if (symbol === undefined) return listGroups(flags.json === true);
      const group = pointGroup(symbol);
      const { groupData, groupText } = await import('./group-text.ts');
      return flags.json ? json(groupData(group)) : result(groupText(group, true));
    });
}

async function listGroups(asJson: boolean): Promise<void> {
  const [{ SETTINGS }, { printSymbol }] = await Promise.all([
    import('../crystal/setting.ts'),
    import('../crystal/symbol.ts'),
  ]);
  const rows = SETTINGS.map(({ key, pointGroup, schoenflies, system, axes }) => ({
    key,
    pointGroup,
    schoenflies,
    system,
    axes,
  }));
  if (asJson) return json(rows);
  return result(
    table(
      ['point group', 'Schoenflies', 'system', 'setting', 'axes'],
      rows.map((row) => [printSymbol(row.pointGroup), row.schoenflies, row.system, row.key, row.axes]),
    ),
  );
}
