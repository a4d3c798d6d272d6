/** What can be wrong with the description of a crystal; the closed list of codes that programs may match on. */
export type CrystalErrorCode =
  | 'unknown-group'
  | 'not-crystallographic'
  | 'index-text'
  | 'index-count'
  | 'index-not-integer'
  | 'index-zero'
  | 'index-too-large'
  | 'index-redundant'
  | 'four-index-refused'
  | 'cell-length'
  | 'cell-angle'
  | 'cell-incomplete'
  | 'cell-mismatch'
  | 'cell-open'
  | 'axial-ratio';

/** A fault in a symbol, an index or a cell: `message` says what is wrong, `hint` what would mend it. */
export class CrystalError extends Error {
  readonly code: CrystalErrorCode;
  readonly hint?: string;

  constructor(code: CrystalErrorCode, message: string, hint?: string) {
    super(message);
    this.name = 'CrystalError';
    this.code = code;
    if (hint !== undefined) this.hint = hint;
  }
}
