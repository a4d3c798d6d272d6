import { Command } from 'commander';
import { json, result } from './say.ts';

export function inspectCommand(): Command {
  return new Command('inspect')
    .description('Tell everything known about a crystal; nothing is written.')
    .argument('<recipe>', 'a preset (quartz, pyrite/pyritohedron), a YAML file, or - for standard input')
    .option('-s, --size <size>', 'size of the object, as for make')
    .option('--json', 'all of it as JSON')
    .addHelpText(
      'after',
      '\nExamples:\n  goniolith inspect pyrite/pyritohedron\n  goniolith inspect my-crystal.yaml --json',
    )
    .action(async (recipe: string, flags: { size?: string; json?: true }) => {
      const [{ recipeFrom }, { polyhedron }, { inspection }] = await Promise.all([
        import('./recipe-input.ts'),
        import('../shape/shape.ts'),
        import('../inspect.ts'),
      ]);
      const resolved = await recipeFrom(recipe, flags.size === undefined ? {} : { size: flags.size });
      const known = inspection(resolved, polyhedron(resolved.crystal));
      if (flags.json) return json(known);
      const { inspectionText } = await import('./inspect-text.ts');
      return result(inspectionText(known, resolved.crystal.group));
    });
}
