import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { betweenLines } from '../../../src/print/lettering/between-lines.ts';
import { fieldOf, type Point } from '../../../src/print/lettering/field.ts';
import { dot, times, unit, type Vector } from '../../../src/print/vectors.ts';

const area = (polygon: readonly Point[]): number =>
  polygon.reduce((sum, [x, y], i) => {
    const [u, v] = polygon[(i + 1) % polygon.length]!;
    return sum + (x * v - u * y) / 2;
  }, 0);

const FIELD = fieldOf(unit([1, 2, 3]), 10);
const plus = (a: Vector, b: Vector): Vector => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
const inSpace = ([x, y]: Point): Vector => plus(plus(FIELD.origin, times(FIELD.right, x)), times(FIELD.up, y));

const polygon = fc
  .tuple(
    fc.integer({ min: 3, max: 8 }),
    fc.double({ min: 5, max: 30, noNaN: true }),
    fc.double({ min: 0, max: 6, noNaN: true }),
  )
  .map(([corners, radius, from]) =>
    Array.from({ length: corners }, (_, i): Point => {
      const angle = from + (2 * Math.PI * i) / corners;
      return [radius * Math.cos(angle), radius * Math.sin(angle)];
    }),
  );
const component = fc.double({ min: -1, max: 1, noNaN: true });
const line = fc
  .tuple(component, component, component)
  .filter((n) => Math.hypot(...n) > 0.1)
  .map((n) => ({ normal: unit(n) }));

describe('the pieces of a face between lines', () => {
  it('keep half a width from every line', () => {
    fc.assert(
      fc.property(
        polygon,
        fc.array(line, { maxLength: 4 }),
        fc.double({ min: 0, max: 2, noNaN: true }),
        (face, lines, half) => {
          for (const piece of betweenLines(
            face,
            FIELD,
            lines.map(({ normal }) => ({ normal, half })),
          ))
            for (const corner of piece)
              for (const { normal } of lines)
                expect(Math.abs(dot(normal, inSpace(corner)))).toBeGreaterThan(half - 1e-9);
        },
      ),
    );
  });

  it('make up the whole face when lines have no width', () => {
    fc.assert(
      fc.property(polygon, fc.array(line, { maxLength: 4 }), (face, lines) => {
        const pieces = betweenLines(
          face,
          FIELD,
          lines.map(({ normal }) => ({ normal, half: 0 })),
        );
        expect(pieces.reduce((sum, piece) => sum + area(piece), 0)).toBeCloseTo(area(face), 6);
      }),
    );
  });
});
