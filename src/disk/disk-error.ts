/** Why a file or folder could not be read or written. */
export type DiskErrorCode =
  | 'badName'
  | 'notFound'
  | 'isFolder'
  | 'notFolder'
  | 'notFile'
  | 'noPermission'
  | 'noSpace'
  | 'readOnly'
  | 'tooLarge'
  | 'tooManyOpen'
  | 'nameTooLong'
  | 'notAsWritten'
  | 'notText'
  | 'failed';

/** A fault of the disk in plain words: where, what, what mends it. */
export class DiskError extends Error {
  readonly code: DiskErrorCode;

  constructor(code: DiskErrorCode, message: string, cause?: unknown) {
    super(message, cause === undefined ? {} : { cause });
    this.name = 'DiskError';
    this.code = code;
  }
}

/** The system's codes (POSIX errno names as Node reports them) in our words. */
const WORDS: Readonly<Record<string, readonly [DiskErrorCode, string]>> = {
  ENOENT: ['notFound', 'it does not exist. Check the spelling of the path.'],
  ENOTDIR: ['notFolder', 'a part of the path is a file, not a folder. Choose another folder.'],
  EEXIST: ['notFolder', 'there is a file of that name. Choose another folder, or move the file away.'],
  EISDIR: ['isFolder', 'it is a folder. Choose another name, or move the folder away.'],
  EACCES: ['noPermission', 'permission was denied. Choose a place of your own, or change its permissions.'],
  EPERM: ['noPermission', 'permission was denied. Choose a place of your own, or change its permissions.'],
  EROFS: ['readOnly', 'the disk can only be read. Choose a folder on another disk.'],
  ENOSPC: ['noSpace', 'the disk is full. Free some space, or choose a folder on another disk.'],
  EDQUOT: ['noSpace', 'your share of the disk is used up. Free some space, or choose a folder on another disk.'],
  EFBIG: ['noSpace', 'the file is larger than this disk allows. Choose a folder on another disk.'],
  EMFILE: ['tooManyOpen', 'too many files are open. Close other programs and try again.'],
  ENFILE: ['tooManyOpen', 'too many files are open. Close other programs and try again.'],
  ENAMETOOLONG: ['nameTooLong', 'the name is too long. Choose a shorter one.'],
  ELOOP: ['notFound', 'its links lead round in a circle. Check where they point to.'],
  EBUSY: ['noPermission', 'another program is using it. Close that program and try again.'],
  EIO: ['failed', 'the disk reported a fault. Choose another disk and check this one.'],
};

/** Turns an error of the file system into a `DiskError`; `doing` reads like `Cannot write out/quartz.stl`. */
export function diskErrorOf(error: unknown, doing: string): DiskError {
  if (error instanceof DiskError) return error;
  const [code, words] = WORDS[systemCode(error)] ?? ['failed', `${String(error)}. Try another place.`];
  return new DiskError(code, `${doing}: ${words}`, error);
}

/** The system's name for an error, such as `ENOENT`; empty for other errors. */
export function systemCode(error: unknown): string {
  return error instanceof Error && 'code' in error && typeof error.code === 'string' ? error.code : '';
}
