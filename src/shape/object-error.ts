/** A crystal that cannot become the object that was asked for. */
export class ObjectError extends Error {
  override readonly name = 'ObjectError';

  constructor(
    readonly code: 'open' | 'size' | 'no-axis' | 'rod-too-wide' | 'rods-crowded' | 'not-sound',
    message: string,
    readonly hint: string,
  ) {
    super(message);
  }
}
