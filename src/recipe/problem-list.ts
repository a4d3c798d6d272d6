import { CrystalError } from '../crystal/errors.ts';
import type { Path, Problem, ProblemCode } from './problem.ts';
import { QuantityError } from './quantity.ts';

/** Problems gathered while a recipe is read, so that a person hears of all of them at once. */
export class ProblemList {
  readonly all: Problem[];

  constructor(faults: readonly Problem[]) {
    this.all = [...faults];
  }

  say(code: ProblemCode, path: Path, message: string, hint?: string): void {
    const sentence = message.endsWith('.') ? message : `${message}.`;
    this.all.push({ code, message: sentence, ...(hint && { hint: asSentence(hint) }), path });
  }

  /** Whether something is known to be wrong at this place, or around it. */
  has(path: Path): boolean {
    return this.all.some(
      (known) =>
        known.path.length <= path.length &&
        known.path.length > 0 &&
        known.path.every((key, i) => key === path[i] || key === `?${path[i]}`),
    );
  }

  /** Runs one reading step; a fault in the person's input becomes a problem at `path`. Skipped where one is known. */
  attempt<T>(code: ProblemCode, path: Path, step: () => T): T | undefined {
    if (this.has(path)) return undefined;
    try {
      return step();
    } catch (error) {
      if (!(error instanceof CrystalError || error instanceof QuantityError)) throw error;
      const place = error instanceof QuantityError && error.key ? [...path, error.key] : path;
      this.say(code, place, error.message, error.hint);
      return undefined;
    }
  }
}

/** Hints that end in a line to copy, set off by two blanks, get no full stop that would be copied too. */
function asSentence(text: string): string {
  const ended = /[.?!]$/.test(text) || text.includes('  ') ? text : `${text}.`;
  return ended.charAt(0).toUpperCase() + ended.slice(1);
}
