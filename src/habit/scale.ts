import { normal, toCartesian } from '../crystal/cell.ts';
import { reach } from '../polyhedron/measures.ts';
import type { Size } from '../recipe/crystal.ts';
import type { ClosedHabit } from './habit.ts';

/** Millimetres for each unit of distance that give a crystal the wanted size. */
export function millimetresPerUnit(habit: ClosedHabit, size: Size): number {
  const { crystal, measures } = habit;
  switch (size.kind) {
    case 'longest': {
      const { low, high } = measures;
      return size.length / Math.max(high[0] - low[0], high[1] - low[1], high[2] - low[2]);
    }
    case 'along':
      return size.length / extent(measures.positions, toCartesian(crystal.metric, size.zone));
    case 'between':
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
