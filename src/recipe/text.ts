import { type Document, isMap, isNode, isScalar, LineCounter, type Pair, parseDocument, visit } from 'yaml';
import { type Origin, type Path, type Place, type Problem, RecipeError } from './problem.ts';

/** A recipe is a label's worth of text; more than this is somebody's mistake. */
export const LARGEST_RECIPE = 1_000_000;
const MOST_ALIASES = 50;

/** A recipe's text, parsed but not yet understood, that can say where each value stands. */
export interface Written {
  readonly value: unknown;
  readonly origin: Origin;
}

/** Parses YAML (and so JSON). @throws RecipeError for text that is too long or not YAML */
export function readText(text: string, name: string): Written {
  const plain: Origin = { name, text };
  const refuse = (code: Problem['code'], message: string, hint?: string): never => {
    throw new RecipeError({ name }, [{ code, message, ...(hint && { hint }), path: [] }]);
  };
  if (text.length > LARGEST_RECIPE)
    return refuse('too-large', `this is ${text.length} characters long; a recipe has at most ${LARGEST_RECIPE}.`);
  const lines = new LineCounter();
  const document = parseDocument(text, { lineCounter: lines, uniqueKeys: true, prettyErrors: false });
  const origin: Origin = { ...plain, place: (path) => placeOf(document, lines, path) };
  const [first] = document.errors;
  if (first) {
    const syntax = { ...plain, place: () => spot(lines, first.pos[0], Math.max(1, first.pos[1] - first.pos[0])) };
    throw new RecipeError(syntax, [
      {
        code: 'syntax',
        message: `this is not YAML: ${YAML_FAULTS[first.code] ?? 'it cannot be read from here on'}.`,
        hint: mend(first.code),
        path: [],
      },
    ]);
  }
  keepLeadingZeros(document);
  try {
    return { value: document.toJS({ maxAliasCount: MOST_ALIASES }), origin };
  } catch {
    return refuse(
      'syntax',
      `aliases (*name) repeat too much here.`,
      `Write the values out; at most ${MOST_ALIASES} aliases are read.`,
    );
  }
}

/** YAML takes 010 for the number 10; in a recipe it is the face (010). Such scalars stay text. */
function keepLeadingZeros(document: Document): void {
  visit(document, {
    Scalar(_, node) {
      if (typeof node.value === 'number' && node.source && /^[+-]?0\d/.test(node.source)) node.value = node.source;
    },
  });
}

/** The library's error codes in our words. */
const YAML_FAULTS: Readonly<Record<string, string>> = {
  BAD_INDENT: 'the indentation does not fit, or a bracket is not closed',
  BLOCK_AS_IMPLICIT_KEY: 'there are two colons in one line',
  BLOCK_IN_FLOW: 'a list with dashes stands inside brackets',
  DUPLICATE_KEY: 'a key is given twice',
  MISSING_CHAR: 'a bracket, a quote or a comma is missing',
  MULTILINE_IMPLICIT_KEY: 'a colon is missing, or a text runs over two lines',
  MULTIPLE_DOCS: 'the file holds several recipes, separated by ---',
  TAB_AS_INDENT: 'a line is indented with a tab',
  UNEXPECTED_TOKEN: 'something stands here that does not belong',
};

function mend(code: string): string {
  if (code === 'TAB_AS_INDENT') return 'Indent with blanks, not with tabs.';
  if (code === 'DUPLICATE_KEY') return 'Give each key once.';
  if (code === 'MULTIPLE_DOCS') return 'Put each recipe into a file of its own.';
  if (code === 'BLOCK_AS_IMPLICIT_KEY') return 'Put text that holds a colon in quotes.';
  return 'Check the indentation, the colons and the brackets; put text with : or # in quotes.';
}

/** The place of a value, or of the nearest thing around it that was written. */
function placeOf(document: Document, lines: LineCounter, path: Path): Place | undefined {
  for (let depth = path.length; depth > 0; depth--) {
    const place = exactPlace(document, lines, path.slice(0, depth));
    if (place) return place;
  }
  return spot(lines, 0, 1);
}

/** A last key that starts with `?` asks for the place of the key itself. */
function exactPlace(document: Document, lines: LineCounter, path: Path): Place | undefined {
  const last = path.at(-1);
  if (typeof last === 'string' && last.startsWith('?')) {
    const parent = path.length > 1 ? document.getIn(path.slice(0, -1), true) : document.contents;
    if (!isMap(parent)) return undefined;
    const pair = parent.items.find((item: Pair) => isScalar(item.key) && String(item.key.value) === last.slice(1));
    return pair && isNode(pair.key) ? ranged(lines, pair.key.range) : undefined;
  }
  const node = document.getIn(path, true);
  return isNode(node) ? ranged(lines, node.range) : undefined;
}

function ranged(lines: LineCounter, range: readonly number[] | null | undefined): Place | undefined {
  const [from, to] = range ?? [];
  return from === undefined || to === undefined ? undefined : spot(lines, from, Math.max(1, to - from));
}

function spot(lines: LineCounter, offset: number, length: number): Place {
  const { line, col } = lines.linePos(offset);
  return { offset, length, line: Math.max(1, line), column: Math.max(1, col) };
}
