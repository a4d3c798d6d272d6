import { join } from 'node:path';
import { Command } from 'commander';
import { naming, UsageError } from './failure.ts';
import type { PrintFlags } from './print-flags.ts';
import { json, remark, result } from './say.ts';

interface MakeFlags extends PrintFlags {
  out: string;
  beds?: true;
  json?: true;
}

/** How findings are marked: what cannot be printed, what to change or decide, a measurement. */
const MARKS = { refuse: 'CANNOT PRINT', warning: 'To decide:', note: 'Measured:' } as const;

/** What every print needs said. */
const CAUTION = 'Edges and points are sharp as printed';
const CAUTION_RODS = ', and rods and caps are small parts';
const CAUTION_END =
  ': not a toy, not tested for children. Check with your safety officer and local rules before others handle it.';

export function makeCommand(): Command {
  return new Command('make')
    .description('Make the files for printing a crystal.')
    .argument('<recipe...>', 'presets (quartz, pyrite/pyritohedron), YAML files, or - for standard input')
    .option('-o, --out <folder>', 'where the files go', 'out')
    .option('-s, --size <size>', 'longest extent in mm; or "90 mm along c", "20 mm between 100", "50 cm3", "scale 12"')
    .option('-a, --axes [which]', 'symmetry axes as rods: all, orders (3,2 or -4) or directions ("[001],[110]")')
    .option('--rods <fit>', 'fused to the crystal; separate, to push in; press or slide: bores for bought metal rod')
    .option('--rod-diameter <length>', 'thickness of the rods')
    .option('--reach <length>', 'how far rods stand out of the crystal')
    .option('-p, --printer <profile>', 'printer profile: fdm-0.4, fdm-0.25, sla')
    .option('-b, --body <kind>', 'solid, hollow, frame, halves, sectors, units or skins')
    .option('-l, --letters [relief]', 'letters on the faces: engraved, raised or inlaid')
    .option('--blunt [radius]', 'blunt edges and corners')
    .option('--stand', 'a stand with a label in raised letters and braille')
    .option('--base <text>', 'text under the resting face; lines are parted by |')
    .option('--planes [relief]', 'mirror planes as lines on the surface: engraved, raised or inlaid')
    .option('--key', 'a printed key of what the symbols at the rods mean')
    .option('--pair', 'two copies: one plain, one with axes and lettered faces')
    .option('--flat', 'parts lie on the face on which they print best')
    .option('--checks', 'what to know before printing and handling, measured')
    .option('--beds', 'also all parts of this run laid out on printing beds, as 3MF')
    .option('-f, --files <kinds>', 'stl, 3mf, glb, png (a picture), or several: stl,3mf')
    .option('--text', 'write STL as text instead of binary')
    .option('-n, --name <name>', 'file name without ending')
    .option('--json', 'print a report for machines')
    .addHelpText(
      'after',
      '\nExamples:\n  goniolith make quartz --axes 3,2 --size "90 mm along c"\n  goniolith make my-crystal.yaml --out prints/',
    )
    .action(make);
}

async function make(recipes: string[], flags: MakeFlags): Promise<void> {
  const [{ recipeFrom }, { makeModel }, { writeFiles }, { printFlags }, { makeReport }, { SUPPLIES }, { bedFiles }] =
    await Promise.all([
      import('./recipe-input.ts'),
      import('../make.ts'),
      import('../disk/write-files.ts'),
      import('./print-flags.ts'),
      import('./make-report.ts'),
      import('../disk/supplies.ts'),
      import('../bed-files.ts'),
    ]);
  const print = printFlags(flags);
  if (flags.name !== undefined && recipes.length > 1) throw new UsageError('--name takes one recipe.');
  const models = [];
  for (const recipe of recipes) {
    const resolved = await recipeFrom(recipe, print);
    models.push({ resolved, made: await naming(recipe, () => makeModel(resolved, SUPPLIES)) });
  }
  const beds = flags.beds ? await bedFiles(models, SUPPLIES) : [];
  await writeFiles(flags.out, [...models.flatMap(({ made }) => made.files), ...beds]);
  const reports = models.map(({ resolved, made }) => makeReport(resolved, made, flags.out));
  if (flags.json) return json(recipes.length === 1 ? reports[0] : reports);
  for (const { name, holds } of beds) {
    result(join(flags.out, name));
    remark(`  ${name}: ${holds}.`);
  }
  for (const report of reports) {
    remark(report.summary);
    for (const file of report.files) result(file.path);
    for (const sentence of report.remarks) remark(`  ${sentence}`);
    for (const { severity, text } of report.findings) remark(`  ${MARKS[severity]} ${text}`);
    for (const sentence of report.warnings) remark(`  Warning: ${sentence}`);
  }
  return remark(`  ${CAUTION}${reports.some(({ hasRods }) => hasRods) ? CAUTION_RODS : ''}${CAUTION_END}`);
}
