const NEWLINE = 10;
const isSpace = (byte: number): boolean => byte === 32 || (byte >= 9 && byte <= 13);

/** The words of a text file one after the other, and the line that each is in (counted from 1). */
export class StlTokens {
  /** The line of the word that was read last. */
  line = 1;
  private at = 0;
  private readonly bytes: Uint8Array;

  constructor(bytes: Uint8Array) {
    this.bytes = bytes;
    if (bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf) this.at = 3; // a byte order mark
  }

  /** The next word, or an empty text at the end. */
  next(): string {
    while (this.at < this.bytes.length && isSpace(this.bytes[this.at]!)) {
      if (this.bytes[this.at] === NEWLINE) this.line++;
      this.at++;
    }
    let word = '';
    while (this.at < this.bytes.length && !isSpace(this.bytes[this.at]!)) {
      word += String.fromCharCode(this.bytes[this.at++]!);
    }
    return word;
  }

  /** Passes over the rest of the line: the name of a solid, which may hold anything. */
  skipLine(): void {
    while (this.at < this.bytes.length && this.bytes[this.at] !== NEWLINE) this.at++;
  }
}
