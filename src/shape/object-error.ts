/** What stands in the way, for programs. */
export type ObjectErrorCode =
  | 'open'
  | 'size'
  | 'no-axis'
  | 'rod-too-wide'
  | 'rods-crowded'
  | 'not-sound'
  | 'not-together'
  | 'wall'
  | 'drain'
  | 'struts'
  | 'no-centre'
  | 'plane'
  | 'dowel'
  | 'magnet'
  | 'gap'
  | 'direction'
  | 'text'
  | 'stand';

/** A crystal that cannot become the object that was asked for. */
export class ObjectError extends Error {
  override readonly name = 'ObjectError';

  constructor(
    readonly code: ObjectErrorCode,
    message: string,
    readonly hint: string,
  ) {
    super(message);
  }
}
