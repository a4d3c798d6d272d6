import { MaxRectsPacker } from 'maxrects-packer';
import { ObjectError } from '../../shape/object-error.ts';
import { extentsOf, type Mesh } from '../mesh.ts';

/** A part to lay out, as it lies, its box starting at the origin. */
export interface Laid {
  readonly name: string;
  readonly mesh: Mesh;
}

/** A part on a bed. Millimetres. */
export interface Place<T extends Laid = Laid> {
  readonly item: T;
  /** Where the corner of its box goes. */
  readonly x: number;
  readonly y: number;
  /** Turned by 90° counter-clockwise first. */
  readonly turned: boolean;
  /** The part there. */
  readonly mesh: Mesh;
}

/** Millimetres between parts. */
export const USUAL_GAP = 5;

/**
 * Lays parts on as few beds as a greedy packing finds, the largest first, by the maximal-rectangles method (Jylänki
 * 2010), with and without turning them; the same parts always come out the same.
 * @throws ObjectError for a part that is larger than the bed
 */
export function layOut<T extends Laid>(items: readonly T[], bed: Bed, gap = USUAL_GAP): Place<T>[][] {
  const sized = items.map((item): Sized<T> => {
    const extents = extentsOf(item.mesh);
    refuseLarger(item.name, extents, bed);
    // The packer takes what does not fit as it lies for too large, without trying to turn it.
    return { item, extents, first: extents[0] > bed[0] || extents[1] > bed[1] };
  });
  const order = sized.sort((a, b) => longer(b.extents) - longer(a.extents));
  const [straight, turned] = [pack(order, bed, gap, false), pack(order, bed, gap, true)];
  return turned.length < straight.length ? turned : straight;
}

type Bed = readonly [width: number, depth: number, height: number];

interface Sized<T extends Laid> {
  readonly item: T;
  readonly extents: readonly [number, number, number];
  /** Turned before it is packed. */
  readonly first: boolean;
}

function pack<T extends Laid>(order: readonly Sized<T>[], bed: Bed, gap: number, allowRotation: boolean): Place<T>[][] {
  const packer = new MaxRectsPacker(bed[0], bed[1], gap, { smart: false, pot: false, square: false, allowRotation });
  order.forEach(({ extents: [w, d], first }, place) => {
    packer.add(first ? d : w, first ? w : d, place);
  });
  return packer.bins.map((bin) =>
    bin.rects.map(({ x, y, rot, data }) => {
      const place: number = data;
      const { item, extents, first } = order[place]!;
      const turned = rot !== first;
      return { item, x, y, turned, mesh: moved(item.mesh, x, y, turned ? extents[1] : null) };
    }),
  );
}

const longer = ([width, depth]: readonly [number, number, number]): number => Math.max(width, depth);

/** @param depth of the part, when it is to be turned by 90°, so that its box starts at the origin again */
function moved(mesh: Mesh, x: number, y: number, depth: number | null): Mesh {
  const positions = mesh.positions.map((value, i, all) => {
    if (i % 3 === 0) return x + (depth === null ? value : depth - all[i + 1]!);
    if (i % 3 === 1) return y + (depth === null ? value : all[i - 1]!);
    return value;
  });
  return { ...mesh, positions };
}

function refuseLarger(name: string, part: readonly number[], bed: Bed): void {
  const [long, short] = [Math.max(part[0]!, part[1]!), Math.min(part[0]!, part[1]!)];
  if (long <= Math.max(bed[0], bed[1]) && short <= Math.min(bed[0], bed[1]) && part[2]! <= bed[2]) return;
  const size = (values: readonly number[]): string => values.map((value) => value.toFixed(1)).join(' × ');
  throw new ObjectError(
    'size',
    `the part "${name}", ${size(part)} mm, is larger than the bed, ${size(bed)} mm`,
    'make the model smaller, turn the part, cut it into halves, or choose another printer',
  );
}
