import type { Point } from './vector.ts';

/** A number in hundredths of a pixel, without trailing zeros and never −0. @throws RangeError when it is not finite */
export function num(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`A drawing cannot place anything at ${value}.`);
  const text = value.toFixed(2).replace(/\.?0+$/, '');
  return text === '-0' ? '0' : text;
}

/** Text for content or attribute values. Control characters, which XML 1.0 has no way to write, are left out. */
export const escapeText = (text: string): string =>
  text
    // biome-ignore lint/suspicious/noControlCharactersInRegex: these are the ones to remove
    .replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, '')
    .replace(/[\ud800-\udfff]/gu, '\ufffd') // with the flag u: halves of a pair that stand alone
    .replace(/&/g, '&amp;')
    .replace(/</g, '&lt;')
    .replace(/>/g, '&gt;')
    .replace(/"/g, '&quot;');

export type Attributes = Readonly<Record<string, string | number | undefined>>;

/** An element with its attributes in the order given; content is taken as it is, so escape text first. */
export function element(name: string, attributes: Attributes, ...content: readonly string[]): string {
  const written = Object.entries(attributes)
    .flatMap(([key, value]) =>
      value === undefined ? [] : [` ${key}="${typeof value === 'number' ? num(value) : escapeText(value)}"`],
    )
    .join('');
  return content.length === 0 ? `<${name}${written}/>` : `<${name}${written}>${content.join('')}</${name}>`;
}

/** Path data through points. */
export const openPath = (points: readonly Point[]): string =>
  `M${points.map(([x, y]) => `${num(x)} ${num(y)}`).join('L')}`;

/** Path data of a closed polygon. */
export const closedPath = (points: readonly Point[]): string => `${openPath(points)}Z`;

/** Path data of separate straight lines. */
export const linePath = (lines: readonly (readonly [Point, Point])[]): string =>
  lines.map(([p, q]) => `M${num(p[0])} ${num(p[1])}L${num(q[0])} ${num(q[1])}`).join('');

export interface Page {
  readonly width: number;
  readonly height: number;
  /** Read aloud in place of the picture. */
  readonly title: string;
  /** Colour of the ground; null leaves it transparent. */
  readonly ground: string | null;
}

/** A complete SVG file. */
export function svgPage({ width, height, title, ground }: Page, content: readonly string[]): string {
  const lines = [
    element('title', {}, escapeText(title)),
    ...(ground === null ? [] : [element('rect', { width, height, fill: ground })]),
    ...content,
  ];
  return `${element(
    'svg',
    {
      xmlns: 'http://www.w3.org/2000/svg',
      width,
      height,
      viewBox: `0 0 ${num(width)} ${num(height)}`,
      role: 'img',
    },
    `\n${lines.filter((line) => line !== '').join('\n')}\n`,
  )}\n`;
}
