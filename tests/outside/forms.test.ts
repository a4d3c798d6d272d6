// Outside source: reference/forms.json (International Tables A from memory, checked by computation; reference/README.md).
import { describe, expect, it } from 'vitest';
import { type Form, form } from '../../src/crystal/form.ts';
import { FORM_SYNONYMS } from '../../src/crystal/form-kind.ts';
import { parseFace } from '../../src/crystal/indices.ts';
import { pointGroup } from '../../src/crystal/point-group.ts';
import { type Miller, miller } from '../../src/crystal/spaces.ts';
import {
  type ReferenceForm,
  referenceForms,
  referenceGroups,
  referenceKinds,
  standardForms,
} from './reference/read.ts';

type Fits = (face: Miller, hexagonal: boolean) => boolean;

/** The patterns of the reference as conditions on one face, written from its README. */
const PATTERNS: Readonly<Record<string, Fits>> = {
  hkl: () => true,
  h0l: ([, k]) => k === 0,
  '0kl': ([h]) => h === 0,
  hk0: ([, , l]) => l === 0,
  hhl: ([h, k], hexagonal) => (hexagonal ? h === k : Math.abs(h) === Math.abs(k)),
  '100': ([, k, l]) => k === 0 && l === 0,
  '010': ([h, , l]) => h === 0 && l === 0,
  '001': ([h, k]) => h === 0 && k === 0,
  '110': ([h, k, l], hexagonal) => l === 0 && (hexagonal ? h === k : Math.abs(h) === Math.abs(k)),
  '111': ([h, k, l]) => Math.abs(h) === Math.abs(k) && Math.abs(k) === Math.abs(l),
};

const CONDITIONS: Readonly<Record<string, (face: Miller) => boolean>> = {
  '|h| < |l|': ([h, , l]) => Math.abs(h) < Math.abs(l),
  '|h| > |l|': ([h, , l]) => Math.abs(h) > Math.abs(l),
};

const ALWAYS = () => true;

function fits(row: ReferenceForm, faces: readonly Miller[]): boolean {
  const hexagonal = pointGroup(row.group).axes === 'hexagonal';
  const condition = row.condition === undefined ? ALWAYS : CONDITIONS[row.condition]!;
  return faces.some((face) => PATTERNS[row.form]!(face, hexagonal) && condition(face));
}

const has = (faces: readonly Miller[], wanted: readonly number[]) =>
  faces.some((face) => String(face) === String(wanted));

const summary = (built: Form) => ({
  name: built.name,
  synonyms: built.synonyms,
  position: built.position,
  multiplicity: built.multiplicity,
  closed: built.closed,
  face_symmetry: built.faceSymmetry,
  face_symmetry_order: built.faceSymmetryOrder,
  opposite_in_form: has(
    built.faces,
    built.indices.map((index) => 0 - index),
  ),
});

const expected = (row: ReferenceForm): ReturnType<typeof summary> => ({
  name: row.name as Form['name'],
  synonyms: row.synonyms,
  position: row.position as Form['position'],
  multiplicity: row.multiplicity,
  closed: row.closed,
  face_symmetry: row.face_symmetry as Form['faceSymmetry'],
  face_symmetry_order: row.face_symmetry_order,
  opposite_in_form: row.opposite_in_form,
});

function everyFaceUpTo(bound: number): Miller[] {
  const range = Array.from({ length: 2 * bound + 1 }, (_, i) => i - bound);
  const all = range.flatMap((h) => range.flatMap((k) => range.map((l) => miller(h, k, l))));
  return all.filter((face) => face.some((index) => index !== 0));
}

const FACES = everyFaceUpTo(3);
const keys = [...new Set(referenceForms.map(({ group }) => group))];

it('covers the 32 groups and five more settings with 203 rows', () => {
  expect([keys.length, referenceForms.length]).toEqual([37, 203]);
});

describe.each(keys)('forms of %s', (key) => {
  const rows = referenceForms.filter(({ group }) => group === key);

  it.each(rows)('$form $condition is a $name ($position)', (row) => {
    expect(summary(form(key, miller(...row.example)))).toEqual(expected(row));
    if (row.example4) expect(parseFace(row.example4, { fourIndex: 'allowed' })).toEqual(row.example);
  });

  it('puts every face with indices up to 3 in the row whose pattern it fits', () => {
    const met = new Map(rows.map((row) => [row, 0]));
    for (const face of FACES) {
      const built = form(key, face);
      const row = rows.find((candidate) => fits(candidate, built.faces))!;
      met.set(row, met.get(row)! + 1);
      expect({ face, ...summary(built) }).toEqual({ face, ...expected(row) });
    }
    expect([...met.values()].every((count) => count > 1 || key === '1')).toBe(true);
  });
});

it('knows the 48 kinds with their synonyms', () => {
  const reference = Object.fromEntries(referenceKinds.map(({ name, synonyms }) => [name, synonyms]));
  expect(FORM_SYNONYMS).toEqual(reference);
});

it.each(referenceKinds)('$name occurs in the published groups', (kind) => {
  const standard = [...new Set(standardForms.map(({ group }) => group))];
  const groups = standard.filter((key) => FACES.some((face) => form(key, face).name === kind.name));
  expect(groups.sort()).toEqual([...kind.groups].sort());
});

/** Faces on other axes and the same faces in a setting of the reference. */
const SAME_FORMS: Readonly<Record<string, readonly [string, (face: Miller) => Miller]>> = {
  '112': ['2', ([h, k, l]) => miller(k, l, h)],
  '11m': ['m', ([h, k, l]) => miller(k, l, h)],
  '112/m': ['2/m', ([h, k, l]) => miller(k, l, h)],
  '2mm': ['mm2', ([h, k, l]) => miller(k, l, h)],
  m2m: ['mm2', ([h, k, l]) => miller(l, h, k)],
  ...Object.fromEntries(
    referenceGroups.flatMap(({ key, hexagonal_equivalent }) =>
      hexagonal_equivalent === undefined
        ? []
        : [[key, [hexagonal_equivalent, ([h, k, l]: Miller) => miller(h - k, k - l, h + k + l)] as const]],
    ),
  ),
};

it.each(Object.entries(SAME_FORMS))(
  '%s names the forms as the setting that it can be turned into',
  (key, [to, turn]) => {
    for (const face of FACES) {
      expect({ face, ...summary(form(key, face)) }).toEqual({ face, ...summary(form(to, turn(face))) });
    }
  },
);

it('has a reference for every one of the 47 settings', () => {
  expect([...keys, ...Object.keys(SAME_FORMS)].sort()).toEqual(referenceGroups.map(({ key }) => key).sort());
});
