/** A crystal that cannot be printed as asked. */
export class PrintError extends Error {
  override readonly name = 'PrintError';

  constructor(
    readonly code: 'open' | 'no-axis' | 'rod-too-wide' | 'rods-crowded' | 'not-sound',
    message: string,
    readonly hint: string,
  ) {
    super(message);
  }
}
