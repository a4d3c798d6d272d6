import { Command } from 'commander';
import { EXIT, naming, report } from './failure.ts';
import { json, remark, result } from './say.ts';

/** Larger files are not read into memory: some five million triangles of STL. */
const LARGEST_FILE = 256 * 1024 * 1024;

export function checkCommand(): Command {
  return new Command('check')
    .description('Check any STL or 3MF file: is it watertight, consistently turned, without touching triangles?')
    .argument('<file...>', 'STL or 3MF files, or - for standard input')
    .option('--json', 'as JSON')
    .addHelpText('after', '\nExample:\n  goniolith check out/quartz.stl')
    .action(async (paths: string[], flags: { json?: true }) => {
      const [{ readInput }, { checkedBodies }, { checkText }] = await Promise.all([
        import('../disk/read-input.ts'),
        import('./check-bodies.ts'),
        import('./check-text.ts'),
      ]);
      const reports: unknown[] = [];
      for (const path of paths) {
        const name = path === '-' ? 'standard input' : path;
        try {
          const { format, bodies, remarks } = await checkedBodies(await readInput(path, { limit: LARGEST_FILE }));
          for (const { body, found } of bodies) {
            if (!found.ok) process.exitCode = EXIT.atFault;
            if (flags.json) reports.push({ file: name, format, ...(body && { object: body }), ...found });
            else result(checkText(body ? `${name}, ${body}` : name, format, found));
          }
          for (const sentence of remarks) remark(`  ${sentence}`);
        } catch (error) {
          process.exitCode = await naming(path, () => Promise.reject(error)).catch(report);
          reports.push({ file: name, ok: false, error: error instanceof Error ? error.message : String(error) });
        }
      }
      if (flags.json) json(reports.length === 1 ? reports[0] : reports);
    });
}
