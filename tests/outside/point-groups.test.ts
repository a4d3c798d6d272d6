// Outside source: reference/groups.json (spglib 2.0.2 and gemmi 0.5.7, see reference/README.md).
import { describe, expect, it } from 'vitest';
import { type SymmetryAxis, symmetryElements } from '../../src/crystal/elements.ts';
import { matrixTimesColumn, opposite } from '../../src/crystal/integers.ts';
import type { Operation } from '../../src/crystal/operation.ts';
import { pointGroup } from '../../src/crystal/point-group.ts';
import { SETTINGS } from '../../src/crystal/setting.ts';
import { printSymbol } from '../../src/crystal/symbol.ts';
import { type ReferenceOperation, referenceGroups } from './reference/read.ts';

const line = (...parts: readonly unknown[]): string => parts.map(String).join(' | ');

const ours = ({ type, axis, matrix, inverse }: Operation): string => line(type, axis, matrix.flat(), inverse.flat());

const theirs = ({ t, axis, W, Winv }: ReferenceOperation): string => line(t, axis, W, Winv);

/** Directions by a key, each list sorted: { '2': ['0,1,0', '1,0,0'] }. */
function byKey<T>(items: readonly T[], key: (item: T) => string, direction: (item: T) => readonly number[]) {
  const lists: Record<string, string[]> = {};
  for (const item of items) lists[key(item)] = [...(lists[key(item)] ?? []), String(direction(item))].sort();
  return lists;
}

const sorted = (lists: Readonly<Record<string, readonly (readonly number[])[]>>) =>
  Object.fromEntries(Object.entries(lists).map(([key, list]) => [key, list.map(String).sort()]));

const direction = (axis: SymmetryAxis) => axis.direction;

it('knows the same 47 settings and no others', () => {
  expect(SETTINGS.map(({ key }) => key).sort()).toEqual(referenceGroups.map(({ key }) => key).sort());
});

it('takes the standard setting for the plain and for the Schoenflies symbol', () => {
  for (const { key, point_group, schoenflies } of referenceGroups.filter(({ standard }) => standard)) {
    expect([point_group, pointGroup(point_group).key]).toEqual([point_group, key]);
    expect([schoenflies, pointGroup(schoenflies).key]).toEqual([schoenflies, key]);
  }
});

describe.each(referenceGroups)('$key', (reference) => {
  const group = pointGroup(reference.key);
  const elements = symmetryElements(group);

  it('has the published operations, types and axes', () => {
    expect(group.operations.map(ours).sort()).toEqual(reference.ops.map(theirs).sort());
  });

  it('has the published names and properties', () => {
    expect({ ...group, operations: null, product: null, inverseOf: null }).toEqual({
      key: reference.key,
      hermannMauguin: reference.point_group,
      schoenflies: reference.schoenflies,
      system: reference.system,
      axes: reference.axes,
      order: reference.order,
      centrosymmetric: reference.centrosymmetric,
      polar: reference.polar,
      polarAxis: reference.polar_axis ?? null,
      chiral: reference.chiral,
      laueKey: reference.laue_key,
      operations: null,
      product: null,
      inverseOf: null,
    });
  });

  it('has the published axes', () => {
    const rotations = elements.axes.filter(({ rotoinversion }) => !rotoinversion);
    const rotoinversions = elements.axes.filter(({ rotoinversion }) => rotoinversion);
    expect(byKey(rotations, ({ order }) => `${order}`, direction)).toEqual(sorted(reference.rotation_axes));
    expect(byKey(rotoinversions, ({ order }) => `-${order}`, direction)).toEqual(sorted(reference.rotoinversion_axes));
  });

  it('has the published element counts', () => {
    const count = (order: number, inverting: boolean) =>
      elements.axes.filter((axis) => axis.order === order && axis.rotoinversion === inverting).length;
    expect({
      '2': count(2, false),
      '3': count(3, false),
      '4': count(4, false),
      '6': count(6, false),
      m: elements.mirrorPlanes.length,
      '-3': count(3, true),
      '-4': count(4, true),
      '-6': count(6, true),
      '-1': elements.centre ? 1 : 0,
    }).toEqual(reference.counts);
  });

  it('has the published mirror planes and line symbols', () => {
    expect(elements.mirrorPlanes.map(({ plane, normal }) => line(plane, normal)).sort()).toEqual(
      reference.mirror_planes.map(({ hkl, normal }) => line(hkl, normal)).sort(),
    );
    const lines = byKey(
      elements.lines,
      ({ symbol }) => symbol,
      (element) => element.direction,
    );
    expect(lines).toEqual(sorted(reference.axis_symbols));
  });

  it('calls a line polar when no published operation turns it round', () => {
    for (const { direction: axis, polar } of elements.lines) {
      const images = reference.ops.map(({ W }) =>
        matrixTimesColumn(
          [
            [W[0]!, W[1]!, W[2]!],
            [W[3]!, W[4]!, W[5]!],
            [W[6]!, W[7]!, W[8]!],
          ],
          axis,
        ),
      );
      expect([axis, polar]).toEqual([axis, !images.some((image) => String(image) === String(opposite(axis)))]);
    }
  });

  it('is read back from its symbol in print', () => {
    expect(pointGroup(printSymbol(reference.key))).toBe(group);
  });
});
