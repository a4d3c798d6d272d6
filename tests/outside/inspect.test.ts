import { describe, expect, it } from 'vitest';
import { inspect } from '../../src/index.ts';
import { decimal, polyhedraCases } from './reference/polyhedra.ts';

/**
 * The library's front door against polyhedra-sample.json, whose results come from exact rational clipping and from Qhull
 * through scipy (see reference/README.md). The input is the metric distance `d`, a double, also in degenerate cases.
 */
const WITHIN = 1e-9;

const close = (value: number, expected: number, size = expected): void =>
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(WITHIN * Math.abs(size));

describe.each(polyhedraCases.filter(({ tags }) => !tags.includes('nonpositive-distance')))('$id', (example) => {
  const [a, b, c, alpha, beta, gamma] = example.cell;
  const found = inspect({
    pointGroup: example.group,
    cell: { a, b, c, alpha, beta, gamma },
    forms: example.forms.map(({ hkl, d }) => ({ face: [...hkl], distance: d })),
  });
  const { expect: wanted } = example;

  it('closes or stays open', () => {
    expect(found.bounded).toBe(wanted.result === 'bounded');
    expect(found.openAlong === undefined).toBe(found.bounded);
  });

  it('has the faces, edges, vertices, volume and area', () => {
    if (wanted.result !== 'bounded') return expect(found.solid).toBeUndefined();
    expect([found.solid?.faces, found.solid?.edges, found.solid?.vertices]).toEqual([wanted.F, wanted.E, wanted.V]);
    close(found.solid?.volume ?? 0, wanted.volume);
    close(found.solid?.area ?? 0, wanted.area);
    return undefined;
  });

  it('shows and hides the forms', () => {
    wanted.forms?.forEach((form, i) => {
      const own = found.forms[i]!;
      expect(own.multiplicity, `multiplicity of form ${i}`).toBe(form.planes);
      expect(own.appears, `form ${i}, ${form.state}`).toBe(form.state === 'present');
      if (form.state === 'present') close(own.area, form.total_area!, wanted.area);
      else expect(own.area).toBe(0);
      if (form.state === 'absent') close(own.distance - own.vanishesAt!, form.gap!, own.distance);
      if (form.state.startsWith('touches')) close(own.vanishesAt!, own.distance);
      const sides = found.faces.filter((face) => face.form === i).map(({ corners }) => corners.length);
      if (form.state === 'present') expect(new Set(sides)).toEqual(new Set([form.sides]));
    });
  });

  it('has its vertices on the right hand', () => {
    if (wanted.result !== 'bounded') return;
    const size = Math.max(...found.vertices.flat().map(Math.abs));
    for (const [corner] of wanted.vertex_orbits) {
      const target = corner.map(decimal);
      const nearest = Math.min(
        ...found.vertices.map((v) => Math.max(...v.map((value, axis) => Math.abs(value - target[axis]!)))),
      );
      expect(nearest / size).toBeLessThan(WITHIN);
    }
  });
});

it('refuses distances that are not positive', () => {
  const example = polyhedraCases.find(({ tags }) => tags.includes('nonpositive-distance'))!;
  const [a, b, c] = example.cell;
  const forms = example.forms.map(({ hkl, d }) => ({ face: [...hkl], distance: d }));
  expect(() => inspect({ pointGroup: example.group, cell: { a, b, c }, forms })).toThrow(/through the centre/);
});
