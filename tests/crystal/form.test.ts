// Outside source: orbit and stabiliser (group theory), textbook forms and their faces (common practice, from memory).
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { form } from '../../src/crystal/form.ts';
import { CHIRAL_FORMS } from '../../src/crystal/form-kind.ts';
import { turnFace } from '../../src/crystal/integers.ts';
import { pointGroup } from '../../src/crystal/point-group.ts';
import { SETTINGS } from '../../src/crystal/setting.ts';
import { miller } from '../../src/crystal/spaces.ts';
import { thrown } from './thrown.ts';

const index = fc.oneof(fc.integer({ min: -3, max: 3 }), fc.integer({ min: -999, max: 999 }));
const face = fc
  .tuple(index, index, index)
  .filter((triple) => triple.some((value) => value !== 0))
  .map((triple) => miller(...triple));
const key = fc.constantFrom(...SETTINGS.map((setting) => setting.key));

const names = (faces: readonly (readonly number[])[]): string[] => faces.map(String).sort();

describe('a form of any group', () => {
  it('is an orbit: first the given face, each once, and the operations lead to them', () => {
    fc.assert(
      fc.property(key, face, (symbol, given) => {
        const group = pointGroup(symbol);
        const { faces, imageOf, carrier, multiplicity, faceSymmetryOrder } = form(group, given);
        expect(faces[0]).toEqual(given);
        expect(new Set(names(faces)).size).toBe(multiplicity);
        expect(multiplicity * faceSymmetryOrder).toBe(group.order);
        for (const [i, { inverse }] of group.operations.entries()) {
          expect(faces[imageOf[i]!]).toEqual(turnFace(given, inverse));
        }
        for (const [i, wanted] of faces.entries()) {
          expect(turnFace(given, group.operations[carrier[i]!]!.inverse)).toEqual(wanted);
        }
        expect(carrier[0]).toBe(0);
      }),
    );
  });

  it('is the same whichever of its faces it is made from, and for multiples of the indices', () => {
    fc.assert(
      fc.property(key, face, fc.nat(), (symbol, given, pick) => {
        const first = form(symbol, given);
        const second = form(symbol, first.faces[pick % first.multiplicity]!);
        const [h, k, l] = given;
        const doubled = form(symbol, miller(2 * h, 2 * k, 2 * l));
        expect(names(second.faces)).toEqual(names(first.faces));
        for (const other of [second, doubled]) {
          expect([other.name, other.position, other.faceSymmetry, other.closed]).toEqual([
            first.name,
            first.position,
            first.faceSymmetry,
            first.closed,
          ]);
        }
      }),
    );
  });

  it('has a left and a right one exactly when its kind has no mirror image in itself', () => {
    fc.assert(
      fc.property(key, face, (symbol, given) => {
        const { enantiomorph, name, faces } = form(symbol, given);
        expect(enantiomorph !== null).toBe(CHIRAL_FORMS.has(name));
        if (enantiomorph === null) return;
        expect(pointGroup(symbol).chiral).toBe(true);
        expect(form(symbol, enantiomorph).name).toBe(name);
        expect(names(faces)).not.toContain(String(enantiomorph));
      }),
    );
  });
});

it('lists the faces of the positive and the negative rhombohedron of quartz', () => {
  expect(names(form('321', miller(1, 0, 1)).faces)).toEqual(
    names([
      [1, 0, 1],
      [-1, 1, 1],
      [0, -1, 1],
      [-1, 0, -1],
      [1, -1, -1],
      [0, 1, -1],
    ]),
  );
});

it('refuses a face 000 and an unknown group', () => {
  expect(thrown(() => form('m-3m', miller(0, 0, 0))).code).toBe('index-zero');
  expect(thrown(() => form('5', miller(1, 0, 0))).code).toBe('unknown-group');
});
