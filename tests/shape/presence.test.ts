import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { crystal, inspect } from '../../src/index.ts';
import type { RecipeInput } from '../../src/recipe/schema.ts';
import { distanceRange, vanishesAt } from '../../src/shape/presence.ts';
import { crystals, runs } from './random-crystals.ts';

const cubic = (...forms: [string, number][]): RecipeInput => ({
  pointGroup: 'm-3m',
  forms: forms.map(([face, distance]) => ({ face, distance })),
});

/** Worked by hand: corners of the unit cube lie √3 from its centre, edge middles √2. */
describe('known ranges', () => {
  it('an octahedron vanishes off a cube at √3 and swallows it at 1/√3', () => {
    const own = crystal(cubic(['100', 1], ['111', 1.2]));
    const range = distanceRange(own, 1);
    expect(range.vanishesAt).toBeCloseTo(Math.sqrt(3), 12);
    expect(range.swallowsAt).toBeCloseTo(1 / Math.sqrt(3), 11);
  });

  it('a dodecahedron vanishes off a cube at √2 and swallows it at 1/√2', () => {
    const own = crystal(cubic(['100', 1], ['110', 1.3]));
    const range = distanceRange(own, 1);
    expect(range.vanishesAt).toBeCloseTo(Math.SQRT2, 12);
    expect(range.swallowsAt).toBeCloseTo(Math.SQRT1_2, 11);
  });

  it('a form that only just touches has vanished', () => {
    const known = inspect(cubic(['100', 1], ['111', Math.sqrt(3)]));
    expect(known.forms[1]).toMatchObject({ appears: false, facesShown: 0, area: 0 });
    expect(known.solid).toMatchObject({ faces: 6, edges: 12, vertices: 8 });
  });

  it('a form alone never vanishes, nor does a prism between two ends that only it closes', () => {
    expect(vanishesAt(crystal(cubic(['111', 1])), 0)).toBeNull();
    const prism: RecipeInput = {
      pointGroup: '4/mmm',
      cell: { a: 1, c: 1 },
      forms: [
        { face: '001', distance: 1 },
        { face: '100', distance: 1 },
        { face: '110', distance: 1.2 },
      ],
    };
    expect(vanishesAt(crystal(prism), 0)).toBeNull();
    expect(vanishesAt(crystal(prism), 2)).toBeCloseTo(Math.SQRT2, 12);
  });

  it('directions in which the other forms are open but that are bounded all the same', () => {
    const wedge: RecipeInput = {
      pointGroup: '4/mmm',
      cell: { a: 1, c: 1 },
      forms: [
        { face: '100', distance: 1 },
        { face: '110', distance: 1.3 },
      ],
    };
    expect(inspect(wedge).bounded).toBe(false);
    expect(inspect(wedge).forms[1]!.vanishesAt).toBeCloseTo(Math.SQRT2, 9);
  });
});

describe('every crystal', () => {
  it('shows a form just below the distance at which it vanishes, and not at it or above', () => {
    fc.assert(
      fc.property(crystals, fc.nat(), (recipe, pick) => {
        const forms = recipe.forms ?? [];
        const place = pick % forms.length;
        const limit = vanishesAt(crystal(recipe), place);
        if (limit === null || limit <= 1e-6) return;
        const shows = (distance: number): boolean =>
          inspect({ ...recipe, forms: forms.with(place, { ...forms[place]!, distance }) }).forms[place]!.appears;
        expect(shows(limit * (1 - 1e-9))).toBe(true);
        expect(shows(limit * (1 + 1e-9))).toBe(false);
      }),
      { numRuns: runs(150) },
    );
  });
});
