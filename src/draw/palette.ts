/** Colours of the drawings: warm paper, ink lines, softened tints. */
export const PAPER = '#f7f5ef';
export const INK = '#1d2333';
/** Remarks, scale bars, thin lines. */
export const FAINT = '#6b6a66';
/** Lines of a grid that should not be noticed. */
export const RULE = '#dedacd';

/**
 * Tints of the forms, in the recipe's order; after the last they start again. Hues after the colours of Okabe and Ito
 * (Color Universal Design, 2008), which people with any usual colour vision tell apart, mixed with paper; every tint
 * also has a lightness of its own, far from the next one's, so that they stay apart in grey.
 */
export const FORM_TINTS: readonly string[] = [
  '#86a5cd', // blue
  '#edc28b', // orange
  '#7fb99f', // bluish green
  '#f3e7ab', // yellow
  '#d58867', // vermilion
  '#bae1f3', // sky blue
  '#dfb0cd', // reddish purple
  '#f3ede2', // chalk
  '#b9b5ab', // stone
  '#cbd5ab', // moss
];

/** Faces that only close what the form in question leaves open: nearly paper, and no hue. */
export const HELPER_TINT = '#e6e4de';

/** The tint of a form by its number, `HELPER_TINT` for those named helpers. */
export const tintOf = (form: number, helpers: readonly number[] = []): string =>
  helpers.includes(form) ? HELPER_TINT : FORM_TINTS[form % FORM_TINTS.length]!;

const channels = (colour: string): number[] => [1, 3, 5].map((at) => Number.parseInt(colour.slice(at, at + 2), 16));

/** A share of one colour (#rrggbb) in another, channel by channel. */
export function mix(base: string, other: string, share: number): string {
  const [from, to] = [channels(base), channels(other)];
  return `#${from
    .map((value, i) => Math.round(value + (to[i]! - value) * share).toString(16))
    .map((text) => text.padStart(2, '0'))
    .join('')}`;
}

/** How much a face turned into the light gains of white, and one turned away from it of ink. */
const LIGHT = 0.22;
const SHADE = 0.13;

/**
 * A tint on a face that makes an angle with the light.
 * @param cosine of the angle between the face's outward normal and the direction to the light
 */
export function shaded(tint: string, cosine: number): string {
  const light = (cosine - 0.55) / 0.45;
  return light > 0 ? mix(tint, '#ffffff', LIGHT * light) : mix(tint, INK, SHADE * Math.min(1, -light));
}
