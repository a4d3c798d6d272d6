import { either } from '../recipe/either.ts';
/** Exit codes of the command line. */
export const EXIT = { done: 0, atFault: 1, wrongUse: 2 } as const;

/** Errors whose message is meant for the person; everything else is a fault of the program. */
const FOR_PEOPLE = new Set([
  'RecipeError',
  'ObjectError',
  'CrystalError',
  'QuantityError',
  'FileError',
  'DiskError',
  'UsageError',
]);

/** A command line that asks for something that does not exist or does not go together. */
export class UsageError extends Error {
  override readonly name = 'UsageError';
}

/** Tells an error on stderr and answers with the exit code. */
export function report(error: unknown): number {
  if (!(error instanceof Error) || !FOR_PEOPLE.has(error.name)) {
    const trace = error instanceof Error ? error.stack : String(error);
    process.stderr.write(`goniolith: this should not have happened; please report it with the recipe.\n${trace}\n`);
    return EXIT.atFault;
  }
  const hint = 'hint' in error && typeof error.hint === 'string' ? `\n  ${sentence(error.hint)}` : '';
  process.stderr.write(`goniolith: ${sentence(error.message, false)}${hint}\n`);
  const wrongUse = error instanceof UsageError || ('isElsewhere' in error && error.isElsewhere === true);
  return wrongUse ? EXIT.wrongUse : EXIT.atFault;
}

function sentence(text: string, capital = true): string {
  const ended = /[.?!)]$|\s{2}/.test(text) ? text : `${text}.`;
  return capital ? ended.charAt(0).toUpperCase() + ended.slice(1) : ended;
}

/** Runs a step and names what it was about in the errors that do not say it themselves. */
export async function naming<T>(what: string, step: () => Promise<T> | T): Promise<T> {
  try {
    return await step();
  } catch (error) {
    if (error instanceof Error && (error.name === 'ObjectError' || error.name === 'FileError'))
      error.message = `${what === '-' ? 'standard input' : what}: ${error.message}`;
    throw error;
  }
}

/** @throws UsageError unless the word is one of those that the flag knows */
export function oneOf<T extends string>(flag: string, word: string, known: readonly T[]): T {
  const found = known.find((one) => one === word);
  if (found === undefined) throw new UsageError(`${flag} is ${either(known)}, not "${word}".`);
  return found;
}
