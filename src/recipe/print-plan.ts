import { parseFace, parseZone, readOptions } from '../crystal/indices.ts';
import type { PointGroup } from '../crystal/point-group.ts';
import { type Zone, zone } from '../crystal/spaces.ts';
import type { AxesPlan, Size } from './crystal.ts';
import { type Millimetres, mm, QuantityError, readLength, readVolume } from './quantity.ts';
import type { AxesInput, PrinterProfile, SizeInput, ZoneInput } from './schema.ts';

/** Longest extent of a model whose recipe states no size, millimetres: within the usual hand size of 60 to 80 mm. */
export const USUAL_SIZE: Size = { kind: 'longest', length: mm(70) };
export const LARGEST_SIZE = 10_000;
const USUAL_REACH = 12;

/** A direction: an edge of the cell by its letter, or a zone symbol. @throws CrystalError */
export function readDirection(input: ZoneInput, group: PointGroup | undefined): Zone {
  const edge = { a: zone(1, 0, 0), b: zone(0, 1, 0), c: zone(0, 0, 1) }[String(input).trim().toLowerCase()];
  return edge ?? parseZone(Array.isArray(input) ? input : String(input), readOptions(group?.axes ?? 'hexagonal'));
}

/** Size as a recipe or a flag states it. @throws CrystalError, QuantityError */
export function readSize(input: SizeInput, group: PointGroup | undefined): Size {
  if (typeof input === 'string') return readSizeText(input, group);
  if (typeof input === 'number') return { kind: 'longest', length: bounded(readLength(input)) };
  if ('longest' in input) return { kind: 'longest', length: bounded(readLength(input.longest)) };
  if ('along' in input)
    return { kind: 'along', zone: readDirection(input.along, group), length: bounded(readLength(input.length)) };
  if ('between' in input) {
    const options = readOptions(group?.axes ?? 'hexagonal');
    const face = parseFace(Array.isArray(input.between) ? input.between : String(input.between), options);
    return { kind: 'between', face, length: bounded(readLength(input.length)) };
  }
  if ('volume' in input) return { kind: 'volume', cubicMillimetres: positive(readVolume(input.volume), 'a volume') };
  return { kind: 'scale', millimetresPerUnit: positive(input.scale, 'a scale') };
}

/** "70", "9 cm along c", "20 mm between 100", "50 cm3", "scale 12". */
function readSizeText(text: string, group: PointGroup | undefined): Size {
  const [, length = text, word, target = ''] = /^(.*?)\s+(along|between)\s+(.+)$/.exec(text.trim()) ?? [];
  if (word === 'along') return readSize({ along: target, length }, group);
  if (word === 'between') return readSize({ between: target, length }, group);
  const scale = /^scale\s+(\S+)$/.exec(text.trim());
  if (scale) return readSize({ scale: Number(scale[1]) }, group);
  return /[mc]m\s*[3³]\s*$|ml\s*$/i.test(text)
    ? readSize({ volume: text }, group)
    : { kind: 'longest', length: bounded(readLength(text)) };
}

function positive(value: number, what: string): number {
  if (value > 0 && Number.isFinite(value)) return value;
  throw new QuantityError(`${what} of ${value} leaves nothing to print.`, 'Give a positive number.');
}

/** @throws QuantityError for a length that is not positive or beyond the largest size */
export function bounded(length: Millimetres, what = 'a size'): Millimetres {
  positive(length, what);
  if (length <= LARGEST_SIZE) return length;
  throw new QuantityError(
    `${length} mm is larger than ${LARGEST_SIZE} mm (10 m).`,
    'Sizes are in millimetres; models for the hand are 50 to 100.',
  );
}

/** Axes as a recipe or a flag states them; null for none. @throws CrystalError, QuantityError */
export function readAxes(input: AxesInput, group: PointGroup | undefined, usualDiameter: number): AxesPlan | null {
  if (input === false) return null;
  const given: AxesObject = typeof input === 'object' && !Array.isArray(input) ? input : choiceOf(input);
  const { depth } = given;
  if (depth !== undefined && given.fit !== 'press' && given.fit !== 'slide')
    throw new QuantityError(
      'a depth is that of bores for bought metal rod, and these rods are printed.',
      'Add fit: press or fit: slide, or leave the depth out.',
      'depth',
    );
  const unknown = given.orders?.find((order) => ![2, 3, 4, 6, -3, -4, -6].includes(order));
  if (unknown !== undefined)
    throw new QuantityError(
      `no crystal has an axis of order ${unknown}.`,
      'Orders are 2, 3, 4 and 6; -3, -4 and -6 choose rotoinversion axes only.',
      typeof input === 'object' && !Array.isArray(input) ? 'orders' : undefined,
    );
  return {
    orders: given.orders ?? null,
    directions: given.directions?.map((direction) => readDirection(direction, group)) ?? null,
    fit: given.fit ?? 'fused',
    diameter: under('diameter', () => bounded(readLength(given.diameter ?? usualDiameter), 'a diameter')),
    reach: under('reach', () => bounded(readLength(given.reach ?? USUAL_REACH), 'a reach')),
    ...(depth !== undefined && { depth: under('depth', () => bounded(readLength(depth), 'a depth')) }),
  };
}

/** Every axis, as fused rods of the printer's usual thickness. */
export const allAxes = ({ rod }: PrinterProfile): AxesPlan => ({
  orders: null,
  directions: null,
  fit: 'fused',
  diameter: mm(rod.diameter),
  reach: mm(USUAL_REACH),
});

type AxesObject = Exclude<AxesInput, boolean | string | number | readonly unknown[]>;

/** true, "all", 3, [3, 2], "3,2", "-4", "2/m", "[001],[110]", "c". */
export function choiceOf(
  input: boolean | string | number | readonly number[],
): Pick<AxesObject, 'orders' | 'directions'> {
  if (typeof input === 'number') return { orders: [input] };
  if (typeof input === 'object') return { orders: [...input] };
  if (input === true || input === false || input.trim() === 'all') return {};
  const words = input.match(/\[[^\]]*\]|[^\s,]+/g) ?? [];
  if (words.length === 0) throw new QuantityError('no axes are named.', CHOICES);
  const isOrder = (word: string): boolean => /^[-−]?\d(\/m)?$/u.test(word);
  const orders = words.filter(isOrder).map((word) => Number(word.replace('−', '-').replace('/m', '')));
  const directions = words.filter((word) => !isOrder(word));
  const strange = directions.find((word) => !/^\[.*\]$|^[abc]$/i.test(word));
  if (strange !== undefined) throw new QuantityError(`"${strange}" names no axes.`, CHOICES);
  return { ...(orders.length > 0 && { orders }), ...(directions.length > 0 && { directions }) };
}

const CHOICES = 'Write all, orders such as 3,2 or -4, or directions such as "[001],[110]".';

/** Names the key whose value is being read in the error about it. */
export function under<T>(key: string, step: () => T): T {
  try {
    return step();
  } catch (error) {
    if (error instanceof QuantityError) throw new QuantityError(error.message, error.hint, key);
    throw error;
  }
}
