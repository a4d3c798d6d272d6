import { CrystalError } from '../crystal/errors.ts';
import { form } from '../crystal/form.ts';
import { parseFace, readOptions } from '../crystal/indices.ts';
import type { PointGroup } from '../crystal/point-group.ts';
import type { Miller } from '../crystal/spaces.ts';
import type { CrystalForm } from './crystal.ts';
import type { Path } from './problem.ts';
import type { ProblemList } from './problem-list.ts';
import type { ChosenMineral } from './read-mineral.ts';
import type { FaceInput, RecipeInput } from './schema.ts';

const DISTANCES = { least: 1e-6, most: 1e6 };

/**
 * The recipe's forms, or its habit's. Without a group (because the recipe's is unknown) indices and distances are
 * looked at all the same, so that what is wrong with them is told too.
 */
export function readForms(
  recipe: RecipeInput,
  mineral: ChosenMineral | null,
  group: PointGroup | undefined,
  problems: ProblemList,
): CrystalForm[] | undefined {
  const own = recipe.forms;
  const given = own ?? mineral?.habits[mineral.habit]?.forms ?? [];
  if (problems.has(['forms'])) return undefined;
  if (given.length === 0) {
    const path = own === undefined ? [] : ['forms'];
    problems.say(
      'missing',
      path,
      'no forms are given',
      'Add forms: with at least one line such as  - { face: "111", distance: 1 }',
    );
    return undefined;
  }
  const letters = group ? lettersByForm(mineral, group) : new Map<string, string>();
  return given.flatMap(({ face: input, distance: value }, place) => {
    const path: Path = own ? ['forms', place] : ['habit'];
    const face = problems.attempt('index', [...path, 'face'], () => readFace(input, mineral, group));
    const distance = readDistance(value, [...path, 'distance'], problems);
    if (!group || !face || distance === undefined) return [];
    const made = form(group, face);
    return [{ form: made, distance, letter: letters.get(nameless(made.faces)) ?? null }];
  });
}

/** Indices, or a letter of the mineral where the recipe keeps its axes. @throws CrystalError */
function readFace(input: FaceInput, mineral: ChosenMineral | null, group: PointGroup | undefined): Miller {
  const options = readOptions(group?.axes ?? 'hexagonal');
  if (Array.isArray(input)) return parseFace(input, options);
  const text = String(input).trim();
  const letters = mineral && (!group || group.key === mineral.pointGroup) ? mineral.letters : {};
  if (Object.hasOwn(letters, text)) return parseFace(letters[text]!, options);
  if (/^\p{L}\p{M}?\d?['′]?$/u.test(text)) throw unknownLetter(text, letters);
  return parseFace(text, options);
}

function unknownLetter(letter: string, letters: Readonly<Record<string, string>>): CrystalError {
  const known = Object.entries(letters).map(([name, face]) => `${name} {${face}}`);
  const hint = known.length
    ? `the letters of this mineral are ${known.join(', ')}`
    : 'letters need a mineral on its own axes; give indices such as "111"';
  return new CrystalError('index-text', `"${letter}" names no face here`, hint);
}

function readDistance(value: number | undefined, path: Path, problems: ProblemList): number | undefined {
  if (value === undefined || problems.has(path)) return undefined;
  const { least, most } = DISTANCES;
  if (value >= least && value <= most) return value;
  const where =
    value < 0
      ? 'puts the face behind the centre'
      : value === 0
        ? 'puts the face through the centre'
        : 'is out of bounds';
  const hint = `Give a number between ${least} and ${most}; only ratios between distances count.`;
  problems.say('distance', path, `a central distance of ${value} ${where}`, hint);
  return undefined;
}

/** A name for a form that does not depend on which of its faces was given. */
const nameless = (faces: readonly Miller[]): string => faces.map(String).sort()[0]!;

function lettersByForm(mineral: ChosenMineral | null, group: PointGroup): Map<string, string> {
  if (!mineral || mineral.pointGroup !== group.key) return new Map();
  const options = readOptions(group.axes);
  return new Map(
    Object.entries(mineral.letters).map(([letter, face]) => [
      nameless(form(group, parseFace(face, options)).faces),
      letter,
    ]),
  );
}
