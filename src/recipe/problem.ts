/** Something wrong in a recipe, told so that the person who wrote it can mend it. */
export interface Problem {
  /** A stable word for machines. */
  readonly code: ProblemCode;
  /** What is wrong, in the trade's words. */
  readonly message: string;
  /** What would mend it. */
  readonly hint?: string;
  /** Where in the recipe: keys and list places from the top. */
  readonly path: Path;
}

export type ProblemCode =
  | 'syntax'
  | 'too-large'
  | 'missing'
  | 'unknown-key'
  | 'wrong-kind'
  | 'unknown-mineral'
  | 'unknown-habit'
  | 'unknown-group'
  | 'unknown-letter'
  | 'unknown-printer'
  | 'unit'
  | 'index'
  | 'cell'
  | 'distance'
  | 'size'
  | 'axes'
  | 'object'
  | 'file-name';

export type Path = readonly (string | number)[];

/** Where a value stands in the text: counted from 1, except `offset`. */
export interface Place {
  readonly offset: number;
  readonly length: number;
  readonly line: number;
  readonly column: number;
}

/** The text a recipe came from. Recipes given as objects have none. */
export interface Origin {
  /** File name, preset name or "standard input". */
  readonly name: string;
  readonly text?: string;
  place?(path: Path): Place | undefined;
  /** Where a value comes from that is not in the text, for instance a flag. */
  elsewhere?(path: Path): string | undefined;
}

/** All problems of one recipe. The message shows each with its line, underlined. */
export class RecipeError extends Error {
  override readonly name = 'RecipeError';

  /** In the order in which they stand in the text. */
  readonly problems: readonly Problem[];
  /** All of them lie outside the recipe's text, for instance in flags. */
  readonly isElsewhere: boolean;

  constructor(
    readonly origin: Origin,
    problems: readonly Problem[],
  ) {
    const offset = ({ path }: Problem): number => origin.place?.(path)?.offset ?? 0;
    const sorted = [...problems].sort((a, b) => offset(a) - offset(b));
    super(sorted.map((problem) => describe(origin, problem)).join('\n\n'));
    this.problems = sorted;
    this.isElsewhere = problems.length > 0 && problems.every(({ path }) => origin.elsewhere?.(path) !== undefined);
  }
}

/** One problem as a paragraph: place, sentence, the line with the text underlined, the mend. */
export function describe(origin: Origin, problem: Problem): string {
  const elsewhere = origin.elsewhere?.(problem.path);
  if (elsewhere) return [`${elsewhere}: ${problem.message}`, ...(problem.hint ? [`  ${problem.hint}`] : [])].join('\n');
  const place = origin.place?.(problem.path);
  const spot = place ? `${origin.name}:${place.line}:${place.column}` : [origin.name, ...keys(problem.path)].join(', ');
  const lines = [`${spot}: ${problem.message}`];
  if (place && origin.text !== undefined) lines.push(...underline(origin.text, place));
  if (problem.hint) lines.push(`  ${problem.hint}`);
  return lines.join('\n');
}

function keys(path: Path): string[] {
  return path.length ? [path.map((key) => (typeof key === 'number' ? `[${key + 1}]` : key)).join(' › ')] : [];
}

const WIDEST_LINE = 100;

function underline(text: string, { line, column, length }: Place): string[] {
  const whole = text.split(/\r?\n/)[line - 1] ?? '';
  const from = column > WIDEST_LINE ? column - WIDEST_LINE / 2 : 0;
  const shown = whole.slice(from, from + WIDEST_LINE).replaceAll('\t', ' ');
  const before = column - 1 - from;
  const marks = Math.max(1, Math.min(length, shown.length - before));
  const gutter = `${line}`;
  return [`  ${gutter} │ ${shown}`, `  ${' '.repeat(gutter.length)} │ ${' '.repeat(before)}${'^'.repeat(marks)}`];
}
