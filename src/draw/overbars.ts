import { OVERBAR } from '../crystal/marks.ts';
import { type Axes, SETTINGS } from '../crystal/setting.ts';
import { printSymbol } from '../crystal/symbol.ts';

/** Symbols with a minus that stands for an overbar; a number alone could mean anything, so it needs a word before it. */
const GROUPS: ReadonlySet<string> = new Set(
  SETTINGS.flatMap(({ key, pointGroup }) => [key, pointGroup]).filter((symbol) => symbol.includes('-')),
);
const NUMBER = /^-\d$/;
const BEFORE_GROUP = /(?:^|\s)(?:of|in|group|class)\s+$/i;

const barred = (symbol: string): string => symbol.replace(/-(\d)/g, `$1${OVERBAR}`);

/**
 * A title with overbars in the symbols of faces, forms and zones, and of point groups, that it holds; a minus or hyphen
 * anywhere else stays as it is.
 */
export function withOverbars(title: string, axes: Axes): string {
  const faces = title.replace(/([({[])((?:-?\d){3,4})([)}\]])/g, (text, open: string, inside: string, close: string) =>
    isSymbol(inside, axes) ? open + barred(inside) + close : text,
  );
  return faces.replace(/(?<=^|\s)[-\dm/]*-\d[\dm/:R]*(?=$|[\s,;.)])/g, (symbol: string, place: number) =>
    GROUPS.has(symbol) && (!NUMBER.test(symbol) || BEFORE_GROUP.test(faces.slice(0, place)))
      ? printSymbol(symbol)
      : symbol,
  );
}

/** Three indices, or four whose first three add up to nothing. */
function isSymbol(text: string, axes: Axes): boolean {
  const indices = (text.match(/-?\d/g) ?? []).map(Number);
  if (indices.length === 3) return true;
  return axes === 'hexagonal' && indices[0]! + indices[1]! + indices[2]! === 0;
}
