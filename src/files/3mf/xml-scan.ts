import { FileError } from '../file-error.ts';
import { NAMESPACES } from './names.ts';

/** Attributes by name; those with a prefix under the short name of their namespace: `p:path`. */
export type Attributes = ReadonlyMap<string, string>;

/** What is called while a text is read. Elements are named `core:mesh`, `m:color`; unknown namespaces in braces. */
export interface XmlListener {
  /** @param namespaces short names of the namespaces in force, by prefix; valid during the call */
  open(name: string, attributes: Attributes, namespaces: ReadonlyMap<string, string>): void;
  close(name: string): void;
  text(text: string): void;
}

/** Prefixes in force with the names that they give; kept together so that each raw name is worked out once. */
interface Scope {
  readonly namespaces: ReadonlyMap<string, string>;
  readonly names: Map<string, string>;
}

/** More than any model has; each level costs memory. */
const DEEPEST = 100;

/**
 * Reads XML as 3MF allows it: XML 1.0 with namespaces, in UTF-8, without a document type (3MF core 1.4.0, section
 * 2.3.2), hence without entities of its own. Comments and processing instructions are passed over.
 * @param part names the text in messages
 * @throws FileError `syntax`
 */
export function scanXml(bytes: Uint8Array, part: string, listener: XmlListener): void {
  new XmlScan(decode(bytes, part), part, listener).run();
}

function decode(bytes: Uint8Array, part: string): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    throw new FileError('syntax', `${part} is not UTF-8 text.`, 'Save the model again; 3MF wants XML in UTF-8.');
  }
}

/** Wider than XML allows beyond ASCII, which does no harm: names are only compared. */
const NAME = /[A-Za-z_:\u00b7-\uffff][\w:.\u00b7-\uffff-]*/y;
const ATTRIBUTE = /\s+([A-Za-z_:\u00b7-\uffff][\w:.\u00b7-\uffff-]*)\s*=\s*(?:"([^"<]*)"|'([^'<]*)')/y;
const TAG_END = /\s*(\/?)>/y;
const CLOSE = /\s*>/y;
/** What stands for a character: one of five names or a number; any other "&" is a fault. */
const REFERENCE = /&(?:(lt|gt|amp|quot|apos)|#(\d{1,7})|#x([\da-fA-F]{1,6}));|&/g;
const PREDEFINED: Readonly<Record<string, string>> = { lt: '<', gt: '>', amp: '&', quot: '"', apos: "'" };

class XmlScan {
  private at = 0;
  private readonly open: { raw: string; name: string; scope: Scope }[] = [];
  private scope: Scope = { namespaces: new Map([['xml', 'xml']]), names: new Map() };
  private rooted = false;
  /** The element in hand has declarations or attributes with a prefix. */
  private prefixed = false;

  constructor(
    private readonly source: string,
    private readonly part: string,
    private readonly listener: XmlListener,
  ) {}

  run(): void {
    this.declaration();
    while (this.at < this.source.length) {
      const next = this.source.indexOf('<', this.at);
      this.characters(next < 0 ? this.source.length : next);
      if (next < 0) break;
      this.markup();
    }
    if (this.open.length > 0) throw this.fault(`<${this.open.at(-1)!.raw}> is not closed: the text ends too early`);
    if (!this.rooted) throw this.fault('there is no element');
  }

  private declaration(): void {
    const found = /^<\?xml\s[^>]*?\?>/.exec(this.source)?.[0];
    const encoding = found && /encoding\s*=\s*["']([^"']*)/.exec(found)?.[1];
    if (encoding && !/^utf-?8$/i.test(encoding)) throw this.fault(`its encoding is ${encoding}, not UTF-8`);
    this.at = found?.length ?? 0;
  }

  private characters(end: number): void {
    if (end === this.at) return;
    const text = this.source.slice(this.at, end);
    if (this.open.length > 0) this.listener.text(this.plain(text));
    else if (text.trim() !== '') throw this.fault('there is text outside the outermost element');
    this.at = end;
  }

  private markup(): void {
    const { source } = this;
    const second = source[this.at + 1];
    if (second === '/') this.endTag();
    else if (second === '?') this.skip('?>');
    else if (source.startsWith('<!--', this.at)) this.skip('-->');
    else if (source.startsWith('<![CDATA[', this.at)) {
      const start = this.at + 9;
      this.skip(']]>');
      if (this.open.length === 0) throw this.fault('there is text outside the outermost element');
      this.listener.text(source.slice(start, this.at - 3));
    } else if (second === '!') throw this.fault('it has a document type or entities, which 3MF forbids');
    else this.startTag();
  }

  private skip(end: string): void {
    const found = this.source.indexOf(end, this.at + 2);
    if (found < 0) throw this.fault(`"${end}" is missing`);
    this.at = found + end.length;
  }

  private startTag(): void {
    if (this.open.length === 0 && this.rooted) throw this.fault('there is a second outermost element');
    if (this.open.length >= DEEPEST) throw this.fault(`elements are nested more than ${DEEPEST} deep`);
    const raw = this.match(NAME, this.at + 1)?.[0];
    if (raw === undefined) throw this.fault('a "<" begins no element');
    const written = this.attributes();
    const end = this.match(TAG_END, this.at);
    if (!end) throw this.fault(`the tag <${raw}> does not end or has an attribute that cannot be read`);
    const outer = this.scope;
    if (this.prefixed) this.scope = inner(outer, written);
    const name = this.resolve(raw, true);
    this.rooted = true;
    this.listener.open(name, this.named(written), this.scope.namespaces);
    if (end[1] === '/') {
      this.listener.close(name);
      this.scope = outer;
    } else this.open.push({ raw, name, scope: outer });
  }

  private attributes(): Map<string, string> {
    const written = new Map<string, string>();
    this.prefixed = false;
    for (let found = this.match(ATTRIBUTE, this.at); found; found = this.match(ATTRIBUTE, this.at)) {
      const [, name, double, single] = found;
      if (written.has(name!)) throw this.fault(`the attribute "${name}" stands twice in one element`);
      written.set(name!, this.plain(double ?? single!));
      if (name === 'xmlns' || name!.includes(':')) this.prefixed = true;
    }
    return written;
  }

  private endTag(): void {
    const raw = this.match(NAME, this.at + 2)?.[0];
    const opened = this.open.pop();
    if (raw === undefined || !opened || opened.raw !== raw || !this.match(CLOSE, this.at))
      throw this.fault(`</${raw ?? ''}> closes ${opened ? `<${opened.raw}>` : 'nothing'}`);
    this.listener.close(opened.name);
    this.scope = opened.scope;
  }

  /** Attributes other than declarations, under their short names. */
  private named(written: Map<string, string>): Attributes {
    if (!this.prefixed) return written;
    for (const raw of [...written.keys()].filter((name) => name.includes(':') || name === 'xmlns')) {
      const value = written.get(raw)!;
      written.delete(raw);
      if (raw !== 'xmlns' && !raw.startsWith('xmlns:')) written.set(this.resolve(raw, false), value);
    }
    return written;
  }

  private resolve(raw: string, element: boolean): string {
    const known = this.scope.names.get(raw);
    if (known !== undefined) return known;
    const colon = raw.indexOf(':');
    const namespace = this.scope.namespaces.get(raw.slice(0, Math.max(colon, 0)));
    if (namespace === undefined && colon >= 0) throw this.fault(`the prefix of "${raw}" is not declared`);
    const name = element || colon >= 0 ? `${namespace ?? '{}'}:${raw.slice(colon + 1)}` : raw;
    this.scope.names.set(raw, name);
    return name;
  }

  private plain(text: string): string {
    if (!text.includes('&')) return text;
    return text.replace(REFERENCE, (whole, name?: string, decimal?: string, hex?: string) => {
      if (name) return PREDEFINED[name]!;
      const code = decimal ? Number.parseInt(decimal, 10) : Number.parseInt(hex ?? '', 16);
      if (code > 0 && code <= 0x10ffff) return String.fromCodePoint(code);
      throw this.fault(`"${whole}" stands for nothing: 3MF has no entities but the five of XML`);
    });
  }

  private match(pattern: RegExp, at: number): RegExpExecArray | null {
    pattern.lastIndex = at;
    const found = pattern.exec(this.source);
    if (found) this.at = pattern.lastIndex;
    return found;
  }

  private fault(what: string): FileError {
    const line = this.source.slice(0, this.at).split('\n').length;
    const message = `${this.part} is not sound XML: ${what} (line ${line}).`;
    return new FileError('syntax', message, 'Save the model again; if another program made the file, report it there.');
  }
}

/** The scope within an element. */
function inner(outer: Scope, written: ReadonlyMap<string, string>): Scope {
  const own = [...written].filter(([name]) => name === 'xmlns' || name.startsWith('xmlns:'));
  if (own.length === 0) return outer;
  const namespaces = new Map(outer.namespaces);
  for (const [name, address] of own) namespaces.set(name.slice(6), SHORT.get(address) ?? `{${address}}`);
  return { namespaces, names: new Map() };
}

const SHORT = new Map<string, string>(Object.entries(NAMESPACES).map(([short, address]) => [address, short]));
