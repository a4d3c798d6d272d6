import { decimalOf } from './decimals.ts';

const ZERO = 48;
const POINT = 46;
const MINUS = 45;
/** Longest number written digit by digit: more than 10^9 mm are refused by readers anyway. */
const LARGEST = 1e9;

/** UTF-8 text that grows; numbers are written digit by digit because a model has hundreds of thousands of them. */
export class XmlBytes {
  private bytes = new Uint8Array(1 << 16);
  private length = 0;

  finish(): Uint8Array {
    return this.bytes.slice(0, this.length);
  }

  /** Any text, as it stands. */
  text(text: string): this {
    this.reserve(3 * text.length);
    this.length += new TextEncoder().encodeInto(text, this.bytes.subarray(this.length)).written;
    return this;
  }

  /** Short ASCII text, as it stands. */
  ascii(text: string): this {
    this.reserve(text.length);
    for (let i = 0; i < text.length; i++) this.bytes[this.length++] = text.charCodeAt(i);
    return this;
  }

  /** A whole number from 0 on. */
  whole(value: number): this {
    this.reserve(24);
    this.digits(value, 1);
    return this;
  }

  /** A plain decimal of at most six places: see `decimalOf`, which writes the same. */
  decimal(value: number): this {
    if (!(Math.abs(value) < LARGEST)) return this.ascii(decimalOf(value));
    this.reserve(24);
    const steps = Math.round(Math.abs(value) * 1e6);
    if (value < 0 && steps > 0) this.bytes[this.length++] = MINUS;
    const whole = Math.floor(steps / 1e6);
    this.digits(whole, 1);
    let places = steps - whole * 1e6;
    if (places === 0) return this;
    this.bytes[this.length++] = POINT;
    let count = 6;
    for (; places % 10 === 0; count--) places /= 10;
    this.digits(places, count);
    return this;
  }

  private digits(value: number, least: number): void {
    let count = least;
    for (let limit = 10 ** least; value >= limit; limit *= 10) count++;
    let rest = value;
    for (let at = this.length + count - 1; at >= this.length; at--) {
      const next = Math.floor(rest / 10);
      this.bytes[at] = ZERO + rest - 10 * next;
      rest = next;
    }
    this.length += count;
  }

  private reserve(more: number): void {
    if (this.length + more <= this.bytes.length) return;
    const larger = new Uint8Array(2 * (this.length + more));
    larger.set(this.bytes.subarray(0, this.length));
    this.bytes = larger;
  }
}

const ESCAPES: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };

/**
 * Text fit for an element or a quoted attribute: markup escaped, line breaks and tabs made blanks, and what XML 1.0
 * cannot hold (its section 2.2: control characters) replaced by U+FFFD; lone surrogates become that in UTF-8.
 */
export const escaped = (text: string): string =>
  text
    .replace(/[\t\n\r]+/g, ' ')
    // biome-ignore lint/suspicious/noControlCharactersInRegex: these are what is looked for
    .replace(/[\u0000-\u001f\ufffe\uffff]/g, '\ufffd')
    .replace(/[&<>"]/g, (mark) => ESCAPES[mark]!);
