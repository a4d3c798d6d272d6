import { Command, CommanderError } from 'commander';
import { VERSION } from '../disk/supplies.ts';
import { checkCommand } from './check.ts';
import { drawCommand } from './draw.ts';
import { EXIT, report } from './failure.ts';
import { groupCommand } from './group.ts';
import { inspectCommand } from './inspect.ts';
import { makeCommand } from './make.ts';
import { presetsCommand } from './presets.ts';
import { schemaCommand } from './schema.ts';

/** The command line. Each verb loads what it needs only when it runs, so that help and small answers come at once. */
function program(): Command {
  const goniolith = new Command('goniolith')
    .description('Exact crystal models for printing, from a mineral or a point group and a few faces.')
    .version(VERSION, '-V, --version', 'print the version')
    .helpOption('-h, --help', 'show help')
    .helpCommand('help [verb]', 'show help for a verb')
    .showSuggestionAfterError()
    .addHelpText(
      'after',
      `
A recipe is the name of a preset (quartz, pyrite/pyritohedron), a YAML file, or - for standard input.

Examples:
  goniolith make quartz --axes            print files into out/
  goniolith inspect pyrite/pyritohedron   everything known about the crystal
  goniolith presets garnet                what is on the shelf`,
    );
  for (const command of [
    makeCommand,
    inspectCommand,
    drawCommand,
    groupCommand,
    presetsCommand,
    checkCommand,
    schemaCommand,
  ])
    goniolith.addCommand(command());
  const settle = (command: Command): void => {
    command.exitOverride().configureOutput({
      outputError: (text, write) => write(text.replace(/^error: /, 'goniolith: ')),
    });
    for (const verb of command.commands) settle(verb);
  };
  settle(goniolith);
  return goniolith;
}

/** Runs one command line and sets the exit code: 0 done, 1 the crystal or file is at fault, 2 wrong use. */
export async function runCommandLine(words: readonly string[]): Promise<void> {
  cleanUpOnSignals();
  try {
    await program().parseAsync(shielded(words), { from: 'user' });
  } catch (error) {
    if (error instanceof CommanderError && error.code === 'commander.unknownCommand') await suggestMake(words[0]!);
    if (error instanceof CommanderError) process.exitCode = error.exitCode === 0 ? EXIT.done : EXIT.wrongUse;
    else process.exitCode = report(error);
  }
}

const IS_AXES = /^(all|[-−]?\d(\/m)?([\s,]+[-−]?\d(\/m)?)*|\[.*|[abc](,.*)?)$/iu;

/**
 * Symbols such as -43m and choices such as --axes -4 look like options, and a recipe after a bare --axes looks like its
 * value; this keeps each what it is.
 */
function shielded(words: readonly string[]): string[] {
  const joined: string[] = [];
  for (let i = 0; i < words.length; i++) {
    const [word, next] = [words[i]!, words[i + 1]];
    if (word !== '--axes' && word !== '-a') joined.push(word);
    else if (next !== undefined && IS_AXES.test(next)) {
      joined.push(`--axes=${next}`);
      i += 1;
    } else joined.push('--axes=all');
  }
  if (joined[0] !== 'group') return joined;
  const symbols = joined.filter((word) => /^-\d/.test(word));
  return symbols.length === 0 ? joined : [...joined.filter((word) => !symbols.includes(word)), '--', ...symbols];
}

/** An interrupted run leaves no half-written file behind. */
function cleanUpOnSignals(): void {
  for (const [signal, number] of [
    ['SIGINT', 2],
    ['SIGTERM', 15],
    ['SIGHUP', 1],
  ] as const)
    process.once(signal, async () => {
      const { removeTemporaries } = await import('../disk/write-files.ts');
      removeTemporaries();
      process.exit(128 + number);
    });
  process.stdout.on('error', (error: NodeJS.ErrnoException) => {
    if (error.code === 'EPIPE') process.exit(EXIT.done);
    process.stderr.write(`goniolith: standard output takes no more (${error.code}).\n`);
    process.exit(EXIT.atFault);
  });
}

/** `goniolith quartz` most likely means `goniolith make quartz`. */
async function suggestMake(word: string): Promise<void> {
  const { PRESET_FOLDER } = await import('../disk/preset-folder.ts');
  if (PRESET_FOLDER.list('minerals').includes(word.split('/')[0]!.toLowerCase()))
    process.stderr.write(`  To make it: goniolith make ${word}\n`);
}
