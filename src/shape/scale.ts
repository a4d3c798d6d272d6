import { normal, toCartesian } from '../crystal/cell.ts';
import { printFace } from '../crystal/indices.ts';
import { keyOf, opposite, primitive } from '../crystal/integers.ts';
import { type Miller, miller } from '../crystal/spaces.ts';
import { reach } from '../polyhedron/measures.ts';
import type { Size } from '../recipe/crystal.ts';
import { ObjectError } from './object-error.ts';
import type { ClosedShape } from './shape.ts';

/**
 * Millimetres for each unit of distance that give a crystal the wanted size.
 * @throws ObjectError for a distance between two faces that the crystal does not show
 */
export function millimetresPerUnit(shape: ClosedShape, size: Size): number {
  const { crystal, measures } = shape;
  switch (size.kind) {
    case 'longest': {
      const { low, high } = measures;
      return size.length / Math.max(high[0] - low[0], high[1] - low[1], high[2] - low[2]);
    }
    case 'along':
      return size.length / extent(measures.positions, toCartesian(crystal.metric, size.zone));
    case 'between':
      assertPair(shape, size.face);
      return size.length / extent(measures.positions, normal(crystal.metric, size.face));
    case 'volume':
      return Math.cbrt(size.cubicMillimetres / measures.volume);
    case 'scale':
      return size.millimetresPerUnit;
  }
}

/** Length of the solid's shadow on a line. */
function extent(positions: Float64Array, [x, y, z]: readonly [number, number, number]): number {
  const length = Math.hypot(x, y, z);
  return (reach(positions, [x, y, z]) + reach(positions, [-x, -y, -z])) / length;
}

function assertPair({ crystal, measures, solid }: ClosedShape, face: Miller): void {
  const shown = new Set(
    measures.faces.map((plane) => {
      const [h, k, l] = solid.planes.normals.subarray(3 * plane, 3 * plane + 3);
      return keyOf(primitive([h!, k!, l!]));
    }),
  );
  const pair = [primitive(face), primitive(opposite(face))];
  if (pair.every((one) => shown.has(keyOf(one)))) return;
  const [one, other] = pair.map(([h, k, l]) => printFace(miller(h, k, l), crystal.group.axes, { brackets: '(' }));
  throw new ObjectError(
    'size',
    `the crystal does not show both ${one} and ${other}, so they have no distance`,
    'name a pair of parallel faces that it shows, or give the size along a direction',
  );
}
