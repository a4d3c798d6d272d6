// The preset files themselves. Outside source for the sets: ../outside/reference/forms.json (International Tables A, from
// memory, checked by computation). What a mineral file must offer is the project's own plan.
import { describe, expect, it } from 'vitest';
import { form } from '../../src/crystal/form.ts';
import { parseFace, readOptions } from '../../src/crystal/indices.ts';
import { pointGroup } from '../../src/crystal/point-group.ts';
import { PRESET_FOLDER } from '../../src/disk/preset-folder.ts';
import type { Crystal } from '../../src/recipe/crystal.ts';
import { read } from '../../src/recipe/read.ts';
import { mineralSchema, printerSchema, recipeSchema, setSchema } from '../../src/recipe/schema.ts';
import { type PresetKind, presetRecipe } from '../../src/recipe/shelf.ts';
import { readText } from '../../src/recipe/text.ts';
import { isClosed, polyhedron } from '../../src/shape/shape.ts';
import { referenceGroups, referenceKinds, standardForms } from '../outside/reference/read.ts';

const LOOKS = 'Distances are chosen for looks, not measured.';
/** The smallest part of the surface that a form of a mineral may have and still be seen and felt. */
const LEAST_SHARE = 0.004;
/** The part of the surface that the form in question keeps beside its helpers. */
const LEAST_MAIN_SHARE = 0.37;

const fileValue = (kind: PresetKind, name: string): unknown =>
  readText(PRESET_FOLDER.read(kind, name)!, `${kind}/${name}`).value;
const crystalOf = (recipe: unknown): Crystal => read(recipe, PRESET_FOLDER).crystal;

/** Part of the surface that each form has; null when the crystal is open. */
function shares(crystal: Crystal): number[] | null {
  const habit = polyhedron(crystal);
  if (!isClosed(habit)) return null;
  const { area, surface } = habit.measures;
  const { form: formOf } = habit.solid.planes;
  return crystal.forms.map((_, place) =>
    area.reduce((sum, part, plane) => sum + (formOf[plane] === place ? part / surface : 0), 0),
  );
}

const sameForm = (faces: readonly (readonly number[])[]): string => faces.map(String).sort().join(' ');

const minerals = PRESET_FOLDER.list('minerals').map((id) => ({
  id,
  mineral: mineralSchema.parse(fileValue('minerals', id)),
}));

describe('the minerals', () => {
  it('are many, in all seven crystal systems and at least twenty point groups', () => {
    const groups = minerals.map(({ mineral }) => pointGroup(mineral.pointGroup));
    expect(minerals.length).toBeGreaterThanOrEqual(55);
    expect(new Set(groups.map(({ system }) => system)).size).toBe(7);
    expect(new Set(groups.map(({ hermannMauguin }) => hermannMauguin)).size).toBeGreaterThanOrEqual(20);
  });

  it.each(minerals)('$id states sources, its group in full and letters for different forms', ({ mineral }) => {
    const group = pointGroup(mineral.pointGroup);
    expect(mineral.pointGroup).toBe(group.key);
    expect(mineral.source).toMatch(/^[A-Z].{20,}\.$/s);
    expect(mineral.note).toContain(LOOKS);
    const lettered = Object.values(mineral.letters).map((face) =>
      sameForm(form(group, parseFace(face, readOptions(group.axes))).faces),
    );
    expect(new Set(lettered).size).toBe(lettered.length);
  });

  it.each(minerals)('$id has one to three habits that close and show every form', ({ id, mineral }) => {
    const habits = Object.entries(mineral.habits);
    expect(habits.length).toBeGreaterThanOrEqual(1);
    expect(habits.length).toBeLessThanOrEqual(3);
    for (const [habit, { about, forms }] of habits) {
      expect(habit).toMatch(/^[a-z]+(-[a-z]+)*$/);
      expect(about).toMatch(/^[A-Z].*\.$/);
      for (const { face } of forms) expect(typeof face, 'indices in quotation marks').toBe('string');
      const crystal = crystalOf(`${id}/${habit}`);
      expect(crystal.forms.map(({ letter }) => letter)).toEqual(
        forms.map(({ face }) => (String(face) in mineral.letters ? face : null)),
      );
      expect(new Set(crystal.forms.map((shown) => sameForm(shown.form.faces))).size, habit).toBe(forms.length);
      expect(Math.min(...(shares(crystal) ?? [0])), habit).toBeGreaterThanOrEqual(LEAST_SHARE);
    }
  });

  it('give pyrite its three plain forms', () => {
    const pyrite = minerals.find(({ id }) => id === 'pyrite')!;
    const names = Object.keys(pyrite.mineral.habits).map((habit) => crystalOf(`pyrite/${habit}`).forms[0]!.form.name);
    expect(Object.keys(pyrite.mineral.habits)).toEqual(['cube', 'pyritohedron', 'octahedron']);
    expect(names).toEqual(['cube', 'pentagon-dodecahedron', 'octahedron']);
  });
});

const set = (name: string) => setSchema.parse(fileValue('sets', name));
const sets = PRESET_FOLDER.list('sets').map((id) => ({ id, ...set(id) }));
const members = sets.flatMap(({ id, recipes }) =>
  Object.entries(recipes).map(([key, recipe]) => ({ id, key, recipe })),
);
/** The form that a recipe of a set is about: its first. */
const mainForms = (name: string) =>
  Object.entries(set(name).recipes).map(([key, recipe]) => {
    const { group, forms } = crystalOf(recipe);
    return { key, group, ...forms[0]!.form };
  });

describe('the sets', () => {
  it.each(sets)('$id says where names and distances come from', ({ source, note }) => {
    expect(source).toMatch(/International Tables.*from memory/);
    expect(note).toContain(LOOKS);
    expect(note).toMatch(/cell proportions .* are invented/);
  });

  it.each(members)(
    '$id/$key closes, shows its form first and foremost, and names its helpers',
    ({ id, key, recipe }) => {
      expect(key).toMatch(/^[a-z0-9_-]+$/);
      expect(recipeSchema.parse(presetRecipe(PRESET_FOLDER, `${id}/${key}`).value)).toMatchObject(recipe);
      const crystal = crystalOf(recipe);
      const [main, ...helpers] = crystal.forms;
      const parts = shares(crystal);
      expect(Math.min(...(parts ?? [0]))).toBeGreaterThan(0);
      expect(parts![0]).toBeGreaterThanOrEqual(LEAST_MAIN_SHARE);
      expect(recipe.title!.toLowerCase().startsWith(`${main!.form.name} {`), recipe.title).toBe(true);
      expect(recipe.title!.endsWith(` ${crystal.group.hermannMauguin}`), recipe.title).toBe(true);
      expect(helpers.length === 0).toBe(main!.form.closed);
      for (const { face } of recipe.forms!.slice(1)) expect(recipe.note).toContain(`{${face}}`);
      for (const helper of helpers) {
        const without = { ...crystal, forms: crystal.forms.filter((other) => other !== helper) };
        expect(shares(without), 'a helper that the crystal needs').toBeNull();
      }
    },
  );

  it('32-groups holds the general form of every point group', () => {
    const expected = standardForms
      .filter(({ position }) => position === 'general')
      .map(({ group, name, multiplicity }) => [pointGroup(group).hermannMauguin, name, multiplicity]);
    const given = mainForms('32-groups');
    expect(given.map(({ group, name, multiplicity }) => [group.hermannMauguin, name, multiplicity]).sort()).toEqual(
      expected.sort(),
    );
    expect(given.map(({ key }) => key).sort()).toEqual(
      [...new Set(referenceGroups.map((group) => group.point_group.replace('/', '_')))].sort(),
    );
    for (const { key, multiplicity, group } of given) expect(multiplicity, key).toBe(group.order);
    expect(given).toHaveLength(32);
  });

  it('47-forms holds every kind of form once, dome and sphenoid apart', () => {
    const names: string[] = mainForms('47-forms').map(({ name }) => name);
    expect(names).toHaveLength(48);
    expect(names.sort()).toEqual(referenceKinds.map(({ name }) => name).sort());
    expect(new Set(names.map((name) => (name === 'dome' || name === 'sphenoid' ? 'dihedron' : name))).size).toBe(47);
  });

  it('146-forms holds every form that differs in group, kind or face symmetry', () => {
    const expected = new Set(standardForms.map((row) => `${row.group} ${row.name} ${row.face_symmetry}`));
    const given = mainForms('146-forms').map(({ group, name, faceSymmetry }) => `${group.key} ${name} ${faceSymmetry}`);
    expect(given).toHaveLength(146);
    expect(new Set(given)).toEqual(expected);
    for (const { key, faceSymmetry, position } of mainForms('146-forms'))
      expect(set('146-forms').recipes[key]!.note, key).toContain(
        `Face symmetry ${faceSymmetry}, ${position} position.`,
      );
  });
});

describe('the printers', () => {
  it.each(PRESET_FOLDER.list('printers'))('%s is a printer profile with a rod that prints', (name) => {
    const { rod } = printerSchema.parse(fileValue('printers', name));
    expect(rod.smallest).toBeLessThanOrEqual(rod.diameter);
  });
});
