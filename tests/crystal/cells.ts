import fc from 'fast-check';
import { completeCell } from '../../src/crystal/complete-cell.ts';
import type { Axes } from '../../src/crystal/setting.ts';

const edge = fc.double({ min: 1, max: 40, noNaN: true });
const angle = fc.double({ min: 70, max: 109, noNaN: true });

/** A cell that fits its axes; any three angles from 70° to 109° close a cell. */
export const cellOnAxes = fc
  .record({ a: edge, b: edge, c: edge, alpha: angle, beta: angle, gamma: angle })
  .chain(({ a, b, c, alpha, beta, gamma }) =>
    fc.constantFrom(
      ...([
        ['triclinic', { a, b, c, alpha, beta, gamma }],
        ['monoclinic-b', { a, b, c, beta }],
        ['monoclinic-c', { a, b, c, gamma }],
        ['orthorhombic', { a, b, c }],
        ['tetragonal', { a, c }],
        ['hexagonal', { a, c }],
        ['rhombohedral', { a, alpha }],
        ['cubic', { a }],
      ] as const),
    ),
  )
  .map(([axes, given]) => ({ axes: axes as Axes, cell: completeCell(given, axes) }));
