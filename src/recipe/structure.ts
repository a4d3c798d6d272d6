import type { z } from 'zod';
import { nearest } from '../crystal/nearest.ts';
import { either } from './either.ts';
import type { Path, Problem } from './problem.ts';
import { KNOWN_KEYS, LONGEST_TITLE, MOST_FORMS, recipeSchema } from './schema.ts';

type Issue = z.core.$ZodIssue;

/** What in a recipe is not of the shape that a recipe has: unknown keys, words where numbers belong, missing parts. */
export function structureProblems(value: unknown): Problem[] {
  const read = recipeSchema.safeParse(value);
  return read.success ? [] : read.error.issues.flatMap((issue) => toProblems(issue, value));
}

function toProblems(issue: Issue, root: unknown): Problem[] {
  const path = issue.path.filter((key): key is string | number => typeof key !== 'symbol');
  switch (issue.code) {
    case 'unrecognized_keys':
      return issue.keys.map((key) => unknownKey(path, key));
    case 'invalid_union':
      return [bestOfUnion(issue.errors, path, root)];
    case 'too_big':
      return [tooBig(path, root)];
    case 'invalid_value':
      return [
        {
          code: 'wrong-kind',
          message: `${told(valueAt(root, path))} is not one of the words known here.`,
          hint: `Use ${either(issue.values.map(String))}.`,
          path,
        },
      ];
    default:
      return [wrongKind(path, root)];
  }
}

function unknownKey(path: Path, key: string): Problem {
  if (/^\d+$/.test(key))
    return {
      code: 'unknown-key',
      message: `"${key}" stands alone here, perhaps after a decimal comma.`,
      hint: 'Write the decimal sign as a point, for instance 1.62.',
      path: [...path, `?${key}`],
    };
  const known = keysAt(path);
  const [guess] = nearest(key, known, 1);
  const place = path.length ? `in ${path.filter((part) => typeof part === 'string').join(' › ')}` : 'in a recipe';
  return {
    code: 'unknown-key',
    message: `"${key}" means nothing ${place}.`,
    hint: `${guess ? `Did you mean ${guess}? ` : ''}Known here: ${known.join(', ')}.`,
    path: [...path, `?${key}`],
  };
}

/** Whether this way to write a value is for values of another type, or for keys under another `kind`. */
const isAnotherKind = ({ code, path }: Issue): boolean =>
  (code === 'invalid_type' || code === 'invalid_value') && (path.length === 0 || path.join() === 'kind');

/** Of the ways to write a value, the one that its own keys point at; for plain values a general sentence. */
function bestOfUnion(errors: readonly (readonly Issue[])[], path: Path, root: unknown): Problem {
  const ofItsKind = errors
    .filter((issues) => !issues.some((issue) => isAnotherKind(issue)))
    .sort((a, b) => a.length - b.length);
  const issue = ofItsKind[0]?.[0];
  if (issue && typeof valueAt(root, path) === 'object') {
    const inner = toProblems({ ...issue, path: [...path, ...issue.path] }, root)[0];
    if (inner && (inner.code !== 'wrong-kind' || ofItsKind.length === 1)) return inner;
  }
  return wrongKind(path, root);
}

function tooBig(path: Path, root: unknown): Problem {
  const value = valueAt(root, path);
  if (path[0] === 'title')
    return {
      code: 'wrong-kind',
      message: 'the title is too long.',
      hint: `Use at most ${LONGEST_TITLE} characters.`,
      path,
    };
  if (path[0] === 'forms' && path.length === 1 && Array.isArray(value))
    return {
      code: 'too-large',
      message: `${value.length} forms are more than the ${MOST_FORMS} that a recipe may have.`,
      hint: 'Keep the forms that show on the crystal.',
      path,
    };
  return { code: 'wrong-kind', message: `${told(value)} is too long here.`, path };
}

function wrongKind(path: Path, root: unknown): Problem {
  const value = valueAt(root, path);
  const what = EXPECTED[String(path.filter((key) => typeof key === 'string').at(-1) ?? '')];
  if (value === undefined || value === null) {
    const key = String(path.at(-1));
    const owner = path.length > 1 ? ` here` : '';
    return {
      code: key === 'distance' ? 'distance' : 'missing',
      message: `${key === 'undefined' ? 'the recipe' : key} is missing${owner}.`,
      hint: `Give ${what ?? 'it'}.`,
      path,
    };
  }
  const message =
    path.length === 0
      ? `a recipe is a list of keys and values, not ${told(value)}.`
      : `${told(value)} cannot be read as ${spoken(path.at(-1))}.`;
  return {
    code: path.at(-1) === 'distance' ? 'distance' : 'wrong-kind',
    message,
    hint: `Give ${what ?? 'keys such as mineral, pointGroup, cell, forms, print'}.`,
    path,
  };
}

const EXPECTED: Readonly<Record<string, string>> = {
  title: 'a line of text without control characters, in quotes if it is a number',
  distance: 'a positive number, the central distance relative to the other forms',
  face: 'face indices such as "111", "10-11" or [1, 0, -1, 1], in quotes',
  forms: 'a list such as  - { face: "111", distance: 1 }',
  cell: 'a, b, c in ångström and alpha, beta, gamma in degrees, as far as the system leaves them free',
  pointGroup: 'a symbol such as m-3m, "321" or D3d',
  size: 'a length (70, "7 cm"), or one of longest; along and length; between and length; volume; scale',
  axes: 'all, "3,2", "[001]", or keys such as { orders: [3, 2], fit: separate, diameter: 3, reach: 12 }',
  body: 'solid, hollow, frame, halves, sectors, units or skins, or keys such as { kind: hollow, wall: 2 }',
  letters: 'engraved, raised or inlaid, or { relief: raised, text: indices }',
  blunt: 'a radius such as 0.75, or { bevel: 1 }',
  base: 'a line of text, or a list of lines',
  planes: 'engraved, raised or inlaid, or { relief: raised, width: 1.2, depth: 0.6 }',
  stand: 'true, or keys such as { text: [Quartz, SiO2], braille: true }',
  files: 'a list of stl, 3mf, glb, png',
  depth: 'a length such as 0.6 or "2 mm"',
  width: 'a length such as 0.6 or "2 mm"',
  wall: 'a length such as 2 or "2 mm"',
  strut: 'a length such as 2 or "2 mm"',
  gap: 'a length such as 0.4 or "0.4 mm"',
  offset: 'a number of millimetres, negative for the far side of the centre',
  orders: 'a list of 2, 3, 4, 6 (negative: only rotoinversion axes)',
  directions: 'a list such as ["[001]", "[110]"]',
  fit: 'fused, separate, or press or slide for bought metal rod',
  mineral: 'the name of a mineral preset',
  habit: "one of the mineral's habits",
  printer: 'the name of a printer profile, such as fdm-0.4',
  print: 'keys such as size, axes, printer, stl, file',
  a: 'a length in ångström',
  b: 'a length in ångström',
  c: 'a length in ångström',
  alpha: 'an angle in degrees',
  beta: 'an angle in degrees',
  gamma: 'an angle in degrees',
  ratios: 'axial ratios such as "0.5:1:0.7"',
  scale: 'a number: millimetres for each unit of distance',
};

/** A key, or a place in a list counted from 1. */
const spoken = (key: string | number | undefined): string =>
  typeof key === 'number' ? `entry ${key + 1} of the list` : String(key);

function keysAt(path: Path): readonly string[] {
  return KNOWN_KEYS[path.filter((key) => typeof key === 'string').join('.')] ?? [];
}

function valueAt(root: unknown, path: Path): unknown {
  return path.reduce<unknown>((value, key) => {
    if (typeof value !== 'object' || value === null) return undefined;
    return Object.entries(value).find(([name]) => name === String(key))?.[1];
  }, root);
}

function told(value: unknown): string {
  const text = typeof value === 'number' ? String(value) : (JSON.stringify(value) ?? String(value));
  return text.length > 40 ? `${text.slice(0, 37)}…` : text;
}
