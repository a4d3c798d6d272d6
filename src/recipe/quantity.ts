/** Millimetres; kept apart from cell lengths (ångström) and recipe distances (no unit). */
declare const millimetres: unique symbol;
export type Millimetres = number & { readonly [millimetres]: true };
export const mm = (value: number): Millimetres => value as Millimetres;

/** A quantity could not be read; the message says why. */
export class QuantityError extends Error {
  override readonly name = 'QuantityError';

  constructor(
    message: string,
    readonly hint: string,
    /** The key, below the one being read, whose value is at fault. */
    readonly key?: string,
  ) {
    super(message);
  }
}

const LENGTH_UNITS: Readonly<Record<string, number>> = { mm: 1, cm: 10, m: 1000, in: 25.4, '"': 25.4 };
const VOLUME_UNITS: Readonly<Record<string, number>> = { mm3: 1, 'mm³': 1, cm3: 1000, 'cm³': 1000, ml: 1000 };

/** A length: a number is millimetres, text may carry mm, cm, m or in. @throws QuantityError */
export function readLength(value: number | string): Millimetres {
  return mm(read(value, LENGTH_UNITS, 'a length', 'mm, cm, m or in'));
}

/** A volume in mm³: a number is mm³, text may carry mm3, cm3 or ml. @throws QuantityError */
export function readVolume(value: number | string): number {
  return read(value, VOLUME_UNITS, 'a volume', 'mm3, cm3 or ml');
}

function read(value: number | string, units: Readonly<Record<string, number>>, what: string, known: string): number {
  if (typeof value === 'number') return value;
  const match = /^\s*([+-]?\d+(?:\.\d+)?(?:e[+-]?\d+)?|[+-]?\.\d+)\s*(.*?)\s*$/iu.exec(value);
  if (/^\s*[+-]?\d*,\d/u.test(value))
    throw new QuantityError(`"${value}" has a decimal comma.`, `Write a point: ${value.trim().replace(',', '.')}`);
  if (!match) throw new QuantityError(`"${value}" is not ${what}.`, `Give a number, with ${known} if you like.`);
  const unit = match[2] ?? '';
  const factor = unit === '' ? 1 : units[unit.toLowerCase()];
  if (factor === undefined) throw new QuantityError(`"${unit}" is not a unit of ${what} known here.`, `Use ${known}.`);
  return Number(match[1]) * factor;
}
