import { Command } from 'commander';
import { UsageError } from './failure.ts';
import { result } from './say.ts';

interface DrawFlags {
  out?: string;
  view: string;
  lines?: true;
  hidden: string;
  labels: string;
  axes?: string | true;
  size?: string;
  height?: true;
  bare?: true;
  sheet?: true;
  columns?: string;
  key?: true;
}

export function drawCommand(): Command {
  return new Command('draw')
    .description('Draw crystals as SVG, singly or together on a contact sheet.')
    .argument('[recipe...]', 'presets, YAML files or -; with --sheet also "all", or the name of a set')
    .option('-o, --out <file>', 'where the drawing goes; - for standard output')
    .option(
      '-v, --view <view>',
      'general; c or "[111]" along an axis; "(111)" onto a face; "30 20" turn and tilt',
      'general',
    )
    .option('--labels <what>', 'letters or indices on the faces', 'none')
    .option('--lines', 'lines only, no tints')
    .option('--hidden <how>', 'hidden edges thin, or none', 'thin')
    .option('-a, --axes [which]', 'symmetry axes as rods, chosen as for make')
    .option('-s, --size <size>', 'size of the object, as for make; brings a scale bar')
    .option('--height', 'state the height of the object')
    .option('--bare', 'without title, legend and scale bar')
    .option('--sheet', 'all on one contact sheet')
    .option('--columns <number>', 'of the contact sheet')
    .option('--key', 'the key to the symbols in which rods end')
    .addHelpText(
      'after',
      '\nExamples:\n  goniolith draw quartz --axes --labels letters\n  goniolith draw calcite --view c --lines --out calcite.svg\n  goniolith draw all --sheet',
    )
    .action(draw);
}

async function draw(recipes: string[], flags: DrawFlags): Promise<void> {
  const [{ drawing }, { sheet }, { writeFiles }, path] = await Promise.all([
    import('./draw-one.ts'),
    import('./draw-sheet.ts'),
    import('../disk/write-files.ts'),
    import('node:path'),
  ]);
  refuseMixtures(recipes, flags);
  const drawEach = (): Promise<{ name: string; svg: string }[]> =>
    Promise.all(recipes.map((recipe) => drawing(recipe, flags)));
  const pictures = flags.key ? [await keyPicture()] : flags.sheet ? [await sheet(recipes, flags)] : await drawEach();
  if (flags.out === '-') return result(pictures.map(({ svg }) => svg).join('\n'));
  for (const { name, svg } of pictures) {
    const file = flags.out ?? path.join('out', `${name}.svg`);
    await writeFiles(path.dirname(file), [{ name: path.basename(file), bytes: new TextEncoder().encode(svg) }]);
    result(file);
  }
  return undefined;
}

async function keyPicture(): Promise<{ name: string; svg: string }> {
  const { axisKey } = await import('../draw/axis-key.ts');
  return { name: 'axis-key', svg: axisKey() };
}

/** Options that would say nothing to this drawing are refused rather than passed over. */
function refuseMixtures(recipes: readonly string[], flags: DrawFlags): void {
  const refuse = (message: string): never => {
    throw new UsageError(message);
  };
  if (flags.key && recipes.length > 0) refuse('--key draws the key alone; leave out the recipe.');
  if (recipes.length === 0 && !flags.key) refuse('draw needs a recipe, for instance: goniolith draw quartz');
  if (flags.out !== undefined && flags.out !== '-' && !/\.svg$/i.test(flags.out))
    refuse('drawings are SVG: let --out end in .svg');
  if (flags.sheet) {
    const idle = (['labels', 'axes', 'size', 'height', 'bare'] as const).filter(
      (name) => flags[name] !== undefined && flags[name] !== 'none',
    );
    if (idle.length > 0) refuse(`a contact sheet has no ${idle.map((name) => `--${name}`).join(', ')}.`);
    return;
  }
  if (flags.columns !== undefined) refuse('--columns goes with --sheet.');
  if (recipes.some((recipe) => recipe === 'all' || /^\d+-(groups|forms)$/.test(recipe)))
    refuse('"all" and whole sets go with --sheet.');
  if (flags.out !== undefined && recipes.length > 1)
    refuse('--out takes one drawing; draw several with --sheet, or without --out.');
}
