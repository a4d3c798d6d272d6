export interface XmlElement {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  /** Of the element itself, without that of its children. */
  text: string;
}

const TOKEN = /<(\/?)([A-Za-z][\w-]*)((?:\s+[\w:-]+="[^"<]*")*)\s*(\/?)>|([^<]+)|(<)/g;

/** A strict reader for the part of XML that drawings use: it throws on anything not well-formed. */
export function readXml(xml: string): XmlElement[] {
  const all: XmlElement[] = [];
  const open: XmlElement[] = [];
  let roots = 0;
  for (const [whole, closing, name, attributes, empty, text, stray] of xml.matchAll(TOKEN)) {
    if (stray) throw new Error('a < that opens nothing');
    if (text !== undefined) {
      const inside = open.at(-1);
      if (inside) inside.text += decode(text);
      else if (text.trim() !== '') throw new Error(`text outside the root: ${text}`);
    } else if (closing) {
      if (open.pop()?.name !== name) throw new Error(`${whole} closes nothing`);
    } else {
      if (open.length === 0) roots += 1;
      const element = { name: name!, attributes: readAttributes(attributes!), text: '' };
      all.push(element);
      if (!empty) open.push(element);
    }
  }
  if (open.length > 0 || roots !== 1) throw new Error(`${open.length} elements left open, ${roots} roots`);
  return all;
}

function readAttributes(text: string): Record<string, string> {
  const found: Record<string, string> = {};
  for (const [, name, value] of text.matchAll(/([\w:-]+)="([^"]*)"/g)) {
    if (name! in found) throw new Error(`attribute ${name} twice`);
    found[name!] = decode(value!);
  }
  return found;
}

const ENTITIES: Readonly<Record<string, string>> = { '&amp;': '&', '&lt;': '<', '&gt;': '>', '&quot;': '"' };

function decode(text: string): string {
  // biome-ignore lint/suspicious/noControlCharactersInRegex: XML 1.0 has no way to write them
  if (/[\u0000-\u0008\u000b\u000c\u000e-\u001f]/.test(text)) throw new Error('a control character');
  return text.replace(/&[^;\s]*;?/g, (entity) => {
    const character = ENTITIES[entity];
    if (character === undefined) throw new Error(`unknown entity ${entity}`);
    return character;
  });
}

/** Coordinate pairs of path data made of M, L and Z. */
export const pathPoints = (d: string): [number, number][] =>
  [...d.matchAll(/[ML](\S+?) ([^MLZ]+)/g)].map(([, x, y]) => [Number(x), Number(y)]);
