import { Command } from 'commander';
import { json } from './say.ts';

export function schemaCommand(): Command {
  return new Command('schema')
    .description('Print the JSON Schema of recipes, for editors that complete and check YAML.')
    .addHelpText('after', '\nExample:\n  goniolith schema > goniolith-recipe.schema.json')
    .action(async () => {
      const { recipeJsonSchema } = await import('../recipe/schema.ts');
      json(recipeJsonSchema());
    });
}
