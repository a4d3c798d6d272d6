/** Nine significant digits tell any two float32 numbers apart (IEEE 754-2019, 5.12.2). */
const MOST_DIGITS = 9;
/** Any decimal of up to six digits survives in a float32 and back, if the number is not below the normal range. */
const SAFE_DIGITS = 6;
const LEAST_NORMAL = 2 ** -126;

/**
 * The decimal with the fewest digits that reads back as the same float32: a point, never an exponent, never `-0`.
 * The value must be finite and is rounded to float32 first.
 */
export function decimalFloat32(value: number): string {
  const single = Math.fround(value);
  if (single === 0) return '0';
  if (Number.isInteger(single) && Math.abs(single) < 1e6) return String(single);
  for (let digits = Math.abs(single) < LEAST_NORMAL ? 1 : SAFE_DIGITS; digits < MOST_DIGITS; digits++) {
    const text = single.toPrecision(digits);
    if (Math.fround(Number(text)) === single) return plain(text);
  }
  return plain(single.toPrecision(MOST_DIGITS));
}

/** Writes `-1.250e-7` as `-0.000000125`, `1.5e+8` as `150000000` and `0.500` as `0.5`. */
function plain(text: string): string {
  const parts = /^(-?)(\d)(?:\.(\d+))?e([+-]\d+)$/.exec(text);
  if (!parts) return text.includes('.') ? text.replace(/\.?0+$/, '') : text;
  const [, sign = '', first = '', rest = '', power = '0'] = parts;
  const digits = first + rest.replace(/0+$/, '');
  const point = 1 + Number(power);
  if (point <= 0) return `${sign}0.${'0'.repeat(-point)}${digits}`;
  if (point >= digits.length) return sign + digits + '0'.repeat(point - digits.length);
  return `${sign}${digits.slice(0, point)}.${digits.slice(point)}`;
}
