/** Signs of labels that Unicode does not take apart by itself. */
const SPELLINGS: Readonly<Record<string, string>> = {
  '\u00b7': '.', // the dot of hydrates
  '\u22c5': '.',
  '\u2022': '.',
  '\u00d7': 'x',
  '\u2044': '/', // the fraction slash that the compatibility form of a half contains
  '\u00b0': ' deg',
  '\u2010': '-',
  '\u2011': '-',
  '\u2012': '-',
  '\u2013': '-',
  '\u2014': '-',
  '\u2212': '-',
  '\u2018': "'",
  '\u2019': "'",
  '\u201c': '"',
  '\u201d': '"',
  '\u00df': 'ss',
  '\u00e6': 'ae',
  '\u00c6': 'AE',
  '\u00f8': 'o',
  '\u00d8': 'O',
  '\u0142': 'l',
  '\u0141': 'L',
  '\u03b1': 'alpha',
  '\u03b2': 'beta',
  '\u03b3': 'gamma',
};

/**
 * A title in printable ASCII on one line: accents are dropped, subscripts become digits, an overbarred digit gets a
 * minus sign before it (4 with an overbar becomes -4), what has no spelling becomes `?`.
 */
export function asciiTitle(title: string): string {
  return title
    .normalize('NFKD')
    .replace(/(\d)[\u0304\u0305]/gu, '-$1')
    .replace(/\p{M}/gu, '')
    .replace(/[\s\p{Cc}]+/gu, ' ')
    .replace(/[^ -~]/gu, (sign) => SPELLINGS[sign] ?? '?')
    .trim();
}
