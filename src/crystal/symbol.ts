import { CrystalError } from './errors.ts';
import { OVERBAR, overbarsToMinus, plainMarks } from './marks.ts';
import { nearest } from './nearest.ts';
import { SETTINGS, type Setting } from './setting.ts';

/** Full, older and unoriented spellings beside the keys themselves; orientation as in International Tables A. */
const OTHER_SPELLINGS: Readonly<Record<string, string>> = {
  '121': '2',
  '1m1': 'm',
  '1/m': 'm',
  '-2': 'm',
  '12/m1': '2/m',
  mm: 'mm2',
  '2/m2/m2/m': 'mmm',
  '42': '422',
  '4/m2/m2/m': '4/mmm',
  '-3m': '-3m1',
  '-32/m': '-3m1',
  '-32/m1': '-3m1',
  '-312/m': '-31m',
  '-32/m:r': '-3m:R',
  '3/m': '-6',
  '62': '622',
  '3/m2m': '-62m',
  '3/mm2': '-6m2',
  '6/m2/m2/m': '6/mmm',
  m3: 'm-3',
  '2/m3': 'm-3',
  '2/m-3': 'm-3',
  '43': '432',
  m3m: 'm-3m',
  '4/m32/m': 'm-3m',
  '4/m-32/m': 'm-3m',
};

const OTHER_SCHOENFLIES: Readonly<Record<string, string>> = {
  s1: 'Cs',
  s2: 'Ci',
  s3: 'C3h',
  s6: 'C3i',
  c1h: 'Cs',
  c1v: 'Cs',
  v: 'D2',
  vh: 'D2h',
  vd: 'D2d',
};

function spellings(): ReadonlyMap<string, Setting> {
  const known = new Map(SETTINGS.map((setting) => [setting.key.toLowerCase(), setting]));
  const add = (spelling: string, setting: Setting | undefined) => {
    if (setting && !known.has(spelling)) known.set(spelling, setting);
  };
  for (const [spelling, key] of Object.entries(OTHER_SPELLINGS)) add(spelling, known.get(key.toLowerCase()));
  for (const setting of SETTINGS) {
    add(setting.pointGroup, setting);
    add(setting.schoenflies.toLowerCase(), setting);
  }
  for (const [spelling, symbol] of Object.entries(OTHER_SCHOENFLIES)) add(spelling, known.get(symbol.toLowerCase()));
  return known;
}

const KNOWN = spellings();

/**
 * Setting meant by a person's point-group symbol: Hermann–Mauguin in short, full or older spelling, with minus signs
 * before or combining overbars after the digits, `:R` for rhombohedral axes; or Schoenflies, in either case, which
 * means the standard setting. Blanks do not count.
 * @throws CrystalError `unknown-group`, with the nearest symbols as hint
 */
export function readSymbol(text: string): Setting {
  const spelling = overbarsToMinus(plainMarks(text)).replace(/\s+/g, '').toLowerCase();
  const setting = KNOWN.get(spelling);
  if (setting) return setting;
  const close = nearest(spelling, KNOWN.keys()).map((known) => KNOWN.get(known)?.key ?? known);
  throw new CrystalError(
    'unknown-group',
    `"${text.trim()}" is not one of the 32 point groups`,
    `nearest: ${[...new Set(close)].join(', ')}`,
  );
}

/** A Hermann–Mauguin symbol with true overbars: U+0305 after the digit in place of the minus sign before it. */
export const printSymbol = (symbol: string): string => symbol.replace(/-(\d)/g, `$1${OVERBAR}`);
