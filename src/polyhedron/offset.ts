/**
 * Exact plane offsets. An offset is an integer multiple of its family's unit, and units of different families are
 * unrelated exact numbers. Offsets of one family can therefore be added and compared in plain integers; that is what
 * lets the meetings which symmetry forces cancel to exact zeros at full speed.
 */
export interface Offset {
  /** The nearest double to the exact value. */
  readonly approximate: number;
  readonly family: number;
  /** Exact value = `multiple` × unit of the family. */
  readonly multiple: number;
  /** The unit's nearest double. */
  readonly unit: number;
  /** The exact value as a fraction, worked out when asked for. */
  readonly exact: Fraction;
}

/** An exact rational number; the denominator is positive. */
export interface Fraction {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

/** Two offsets whose ratio is this close to a fraction of whole numbers up to `LARGEST_TERM` stand in that ratio. */
export const RATIO_TOLERANCE = 1e-12;
const LARGEST_TERM = 10_000;

/** Multiples stay below this so that integer sums of cofactors stay below 2^53 (see `side.ts`). */
export const LARGEST_MULTIPLE = 2 ** 18;

/** The exact value of a double. @throws RangeError for NaN and infinities. */
export function fractionOf(value: number): Fraction {
  if (!Number.isFinite(value)) throw new RangeError(`A plane needs finite numbers, not ${value}.`);
  let exponent = 0;
  let mantissa = value;
  while (!Number.isInteger(mantissa)) {
    mantissa *= 2;
    exponent += 1;
  }
  return { numerator: BigInt(mantissa), denominator: 1n << BigInt(exponent) };
}

/** The fraction p/q with p, q ≤ 10,000 within 1e-12 of `ratio` (relative), by its continued fraction; else null. */
export function smallRatio(ratio: number): readonly [number, number] | null {
  let [p0, q0, p1, q1] = [0, 1, 1, 0];
  let rest = ratio;
  for (;;) {
    const whole = Math.floor(rest);
    [p0, q0, p1, q1] = [p1, q1, whole * p1 + p0, whole * q1 + q0];
    if (p1 > LARGEST_TERM || q1 > LARGEST_TERM) return null;
    if (p1 > 0 && Math.abs(ratio - p1 / q1) <= RATIO_TOLERANCE * ratio) return [p1, q1];
    if (rest === whole) return null;
    rest = 1 / (rest - whole);
  }
}

/** Offsets taken at their exact double values; equal values share a family. */
export function exactOffsets(values: readonly number[]): Offset[] {
  const families = new Map<number, number>();
  return values.map((value) => {
    if (value === 0) return ZERO;
    const family = families.get(value) ?? families.size + 1;
    families.set(value, family);
    return doubleOffset(value, family);
  });
}

/** A double at its exact value, as a family of its own. */
export function doubleOffset(value: number, family: number): Offset {
  return {
    approximate: value,
    family,
    multiple: 1,
    unit: value,
    get exact() {
      return fractionOf(value);
    },
  };
}

const ZERO: Offset = { approximate: 0, family: 0, multiple: 0, unit: 0, exact: { numerator: 0n, denominator: 1n } };

interface Family {
  readonly base: number;
  readonly members: { readonly place: number; readonly p: number; readonly q: number }[];
  common: number;
  largest: number;
}

/**
 * Offsets of faces that are meant to meet: where the ratio of two values is within 1e-12 of a fraction of small whole
 * numbers, it is that fraction. Distances typed with a limited number of digits thereby give true common corners.
 * @param values one offset a form, any finite numbers
 */
export function commensurateOffsets(values: readonly number[]): Offset[] {
  const families: Family[] = [];
  values.forEach((value, place) => {
    if (value !== 0 && !families.some((family) => joins(family, value, place)))
      families.push({ base: value, members: [{ place, p: 1, q: 1 }], common: 1, largest: 1 });
  });
  const offsets: Offset[] = values.map(() => ZERO);
  families.forEach((family, index) => {
    for (const member of family.members) offsets[member.place] = offsetIn(family, index + 1, member);
  });
  return offsets;
}

function joins(family: Family, value: number, place: number): boolean {
  const ratio = smallRatio(value / family.base);
  if (!ratio) return false;
  const [p, q] = ratio;
  const common = (family.common / greatestDivisor(family.common, q)) * q;
  const largest = Math.max(family.largest, p / q);
  if (common * largest >= LARGEST_MULTIPLE) return false;
  family.members.push({ place, p, q });
  family.common = common;
  family.largest = largest;
  return true;
}

function offsetIn(family: Family, index: number, { p, q }: { p: number; q: number }): Offset {
  return {
    approximate: (family.base * p) / q,
    family: index,
    multiple: (family.common / q) * p,
    unit: family.base / family.common,
    get exact() {
      const base = fractionOf(family.base);
      return { numerator: base.numerator * BigInt(p), denominator: base.denominator * BigInt(q) };
    },
  };
}

function greatestDivisor(a: number, b: number): number {
  return b === 0 ? a : greatestDivisor(b, a % b);
}
