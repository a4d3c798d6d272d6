/** The arrays that the kernel works in are kept from one call to the next: making them costs more than filling them. */
type Numbers = Int8Array<ArrayBuffer> | Uint8Array<ArrayBuffer> | Int32Array<ArrayBuffer> | Float64Array<ArrayBuffer>;

/** The same array if it has room for so many numbers; else a wider one of its kind that begins with its content. */
export function withRoom<T extends Numbers>(old: T, length: number, make: (length: number) => T): T {
  if (old.length >= length) return old;
  const wider = make(2 * length);
  wider.set(old);
  return wider;
}

export const bytes = (length: number): Uint8Array<ArrayBuffer> => new Uint8Array(length);
export const signs = (length: number): Int8Array<ArrayBuffer> => new Int8Array(length);
export const integers = (length: number): Int32Array<ArrayBuffer> => new Int32Array(length);
export const doubles = (length: number): Float64Array<ArrayBuffer> => new Float64Array(length);
