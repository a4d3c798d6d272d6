import { CrystalError } from './errors.ts';
import { type IndexKind, joinIndices, MAX_INDEX, readIndices } from './index-text.ts';
import { type IntegerTriple, isZero, primitive } from './integers.ts';
import type { Axes } from './setting.ts';
import { type Miller, miller, type Zone, zone } from './spaces.ts';

export { MAX_INDEX };

/** Four-index symbols have a meaning on hexagonal axes only. */
export interface ReadOptions {
  readonly fourIndex: 'allowed' | 'refused';
}

/** How symbols for these axes are to be read. */
export const readOptions = (axes: Axes): ReadOptions => ({
  fourIndex: axes === 'hexagonal' ? 'allowed' : 'refused',
});

/**
 * Face indices (hkl) from a Miller or, when allowed, Miller–Bravais symbol (hkil); as written, common factors kept.
 * The bound {@link MAX_INDEX} holds for h, k and l, from which i follows.
 * @throws CrystalError `index-text`, `index-not-integer`, `index-count`, `four-index-refused`, `index-redundant`,
 * `index-zero`, `index-too-large`
 */
export function parseFace(input: string | readonly number[], { fourIndex }: ReadOptions): Miller {
  const indices = readIndices(input, 'face');
  const [h, k, l] = threeIndices(indices, input, fourIndex, 'face');
  return miller(h, k, l);
}

/**
 * Zone symbol [uvw] in lowest terms; when allowed also the four-index symbol [UVTW] of hexagonal axes, which names the
 * direction u = U − T, v = V − T, w = W (International Tables; common practice).
 * @throws CrystalError as `parseFace`
 */
export function parseZone(input: string | readonly number[], { fourIndex }: ReadOptions): Zone {
  const indices = readIndices(input, 'zone');
  const [u, v, w] = threeIndices(indices, input, fourIndex, 'zone');
  const T = indices.length === 4 ? indices[2]! : 0;
  return zone(...primitive([u - T, v - T, w]));
}

/** First, second and last index, after all checks. */
function threeIndices(
  indices: readonly number[],
  input: string | readonly number[],
  fourIndex: ReadOptions['fourIndex'],
  kind: IndexKind,
): IntegerTriple {
  const text = typeof input === 'string' ? input.trim() : input.join(' ');
  if (indices.length < 3 || indices.length > 4) {
    throw new CrystalError(
      'index-count',
      `the ${kind} symbol "${text}" has ${indices.length === 1 ? 'one index' : `${indices.length} indices`}`,
      fourIndex === 'allowed' ? 'give three or four' : 'give three',
    );
  }
  const triple: IntegerTriple = [indices[0]!, indices[1]!, indices.at(-1)!];
  if (indices.length === 4) checkFourIndices(indices, text, fourIndex, kind);
  if (isZero(triple)) {
    throw new CrystalError('index-zero', `the ${kind} symbol "${text}" is all zeros and names no ${kind}`);
  }
  if (triple.some((index) => Math.abs(index) > MAX_INDEX)) {
    throw new CrystalError(
      'index-too-large',
      `the ${kind} symbol "${text}" has an index beyond ±${MAX_INDEX}`,
      'choose a face with simpler indices; faces of crystals seldom pass 20',
    );
  }
  return triple;
}

function checkFourIndices(
  indices: readonly number[],
  text: string,
  fourIndex: ReadOptions['fourIndex'],
  kind: IndexKind,
): void {
  if (fourIndex === 'refused') {
    throw new CrystalError(
      'four-index-refused',
      `the ${kind} symbol "${text}" has four indices, which only hexagonal axes have`,
      'give three indices; numbers of two digits need blanks between them',
    );
  }
  const [first, second, third] = [indices[0]!, indices[1]!, indices[2]!];
  if (first + second + third !== 0) {
    const letters = kind === 'face' ? 'h + k + i' : 'U + V + T';
    throw new CrystalError(
      'index-redundant',
      `in the ${kind} symbol "${text}" the first three indices do not add up to zero (${letters} = 0)`,
      `with these first two the third is ${0 - first - second}`,
    );
  }
}

export interface PrintFaceOptions {
  /** `(` for a face, `{` for its form; none by default. */
  readonly brackets?: '(' | '{' | '';
  /** True overbars, U+0305 after each digit, instead of minus signs. */
  readonly overbar?: boolean;
}

/** Face symbol, (hkil) on hexagonal axes and (hkl) on all others; `parseFace` reads it back. */
export function printFace(face: Miller, axes: Axes, { brackets = '', overbar = false }: PrintFaceOptions = {}): string {
  const [h, k, l] = face;
  return enclose(joinIndices(axes === 'hexagonal' ? [h, k, 0 - h - k, l] : face, overbar), brackets);
}

export interface PrintZoneOptions {
  /** `[` for a zone (the default), `<` for all its symmetry images, or none. */
  readonly brackets?: '[' | '<' | '';
  readonly overbar?: boolean;
  /** The four-index symbol [UVTW] of hexagonal axes; [uvw] by default. */
  readonly fourIndex?: boolean;
}

/** Zone symbol; `parseZone` reads it back. */
export function printZone(axis: Zone, options: PrintZoneOptions = {}): string {
  const { brackets = '[', overbar = false, fourIndex = false } = options;
  return enclose(joinIndices(fourIndex ? fourZoneIndices(axis) : axis, overbar), brackets);
}

/** U = (2u − v)/3, V = (2v − u)/3, T = −(u + v)/3, W = w, times 3 and in lowest terms. */
function fourZoneIndices([u, v, w]: Zone): number[] {
  const [U, V, W] = [2 * u - v, 2 * v - u, 3 * w];
  const [first, second, last] = primitive([U, V, W]);
  return [first, second, 0 - first - second, last];
}

const CLOSING = { '': '', '(': ')', '[': ']', '{': '}', '<': '>' } as const;

const enclose = (text: string, opening: keyof typeof CLOSING): string => `${opening}${text}${CLOSING[opening]}`;
