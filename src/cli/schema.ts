import { Command } from 'commander';
import { json } from './say.ts';

export function schemaCommand(): Command {
  return new Command('schema')
    .description('Print the JSON Schema of recipes, for editors that complete and check YAML.')
    .addHelpText('after', '\nExample:\n  goniolith schema > goniolith-recipe.schema.json')
    .action(async () => {
      const [{ recipeJsonSchema }, { PRESET_FOLDER }, { SETTINGS }] = await Promise.all([
        import('../recipe/schema.ts'),
        import('../disk/preset-folder.ts'),
        import('../crystal/setting.ts'),
      ]);
      const [minerals, printers] = [PRESET_FOLDER.list('minerals'), PRESET_FOLDER.list('printers')];
      json(recipeJsonSchema({ minerals, printers, pointGroups: SETTINGS.map(({ key }) => key) }));
    });
}
