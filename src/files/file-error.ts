/** What can be wrong with a model file or with a mesh that is to become one. */
export type FileErrorCode =
  | 'empty'
  | 'tooShort'
  | 'truncated'
  | 'surplus'
  | 'notStl'
  | 'notFinite'
  | 'syntax'
  | 'badMesh'
  | 'notZip'
  | 'damaged'
  | 'tooLarge'
  | 'missingPart'
  | 'contentType'
  | 'unit'
  | 'index'
  | 'transform'
  | 'unsupported'
  | 'metadata';

/** A fault in a model file: `message` says where and what, `hint` says what mends it. */
export class FileError extends Error {
  readonly code: FileErrorCode;
  readonly hint: string;

  constructor(code: FileErrorCode, message: string, hint: string) {
    super(message);
    this.name = 'FileError';
    this.code = code;
    this.hint = hint;
  }
}
