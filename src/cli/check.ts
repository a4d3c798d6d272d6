import { Command } from 'commander';
import { EXIT, naming, report } from './failure.ts';
import { json, result } from './say.ts';

/** Larger files are not read into memory: some five million triangles. */
const LARGEST_STL = 256 * 1024 * 1024;

export function checkCommand(): Command {
  return new Command('check')
    .description('Check any STL file: is it watertight, consistently turned, without touching triangles?')
    .argument('<file...>', 'STL files, binary or text, or - for standard input')
    .option('--json', 'as JSON')
    .addHelpText('after', '\nExample:\n  goniolith check out/quartz.stl')
    .action(async (paths: string[], flags: { json?: true }) => {
      const [{ readInput }, { readStl }, { checkMesh }, { checkText }] = await Promise.all([
        import('../disk/read-input.ts'),
        import('../files/stl/read.ts'),
        import('../files/check/check.ts'),
        import('./check-text.ts'),
      ]);
      const reports: unknown[] = [];
      for (const path of paths) {
        const name = path === '-' ? 'standard input' : path;
        try {
          const { mesh, format, normals } = readStl(await readInput(path, { limit: LARGEST_STL }));
          const found = checkMesh(mesh, normals);
          if (!found.ok) process.exitCode = EXIT.atFault;
          if (flags.json) reports.push({ file: name, format, ...found });
          else result(checkText(name, format, found));
        } catch (error) {
          process.exitCode = await naming(path, () => Promise.reject(error)).catch(report);
          reports.push({ file: name, ok: false, error: error instanceof Error ? error.message : String(error) });
        }
      }
      if (flags.json) json(paths.length === 1 ? reports[0] : reports);
    });
}
