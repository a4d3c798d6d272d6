import { inflateSync } from 'fflate';
import { FileError } from '../file-error.ts';
import { crc32 } from '../picture/crc32.ts';

/** An entry of a zip archive's list of contents. */
export interface ZipEntry {
  readonly path: string;
  readonly method: number;
  readonly encrypted: boolean;
  readonly crc: number;
  readonly packed: number;
  readonly size: number;
  readonly start: number;
}

/** Bytes a part may unpack to; a model of this size has about three million triangles. */
const LARGEST_PART = 2 ** 28;
/** More than any model has; a longer list only costs time. */
const MOST_ENTRIES = 10_000;

const END = 0x06054b50;
const END_BYTES = 22;
const END64 = 0x06064b50;
const LOCATOR64 = 0x07064b50;
const LOCATOR64_BYTES = 20;
const ENTRY = 0x02014b50;
const ENTRY_BYTES = 46;
const LOCAL = 0x04034b50;
const LOCAL_BYTES = 30;
const FULL_16 = 0xffff;
const FULL_32 = 0xffffffff;

/**
 * The contents of a zip archive by path, with large-file fields (PKWARE APPNOTE 6.3.10, sections 4.3 and 4.5.3).
 * @throws FileError `notZip`, `damaged`
 */
export function zipEntries(bytes: Uint8Array): Map<string, ZipEntry> {
  const view = viewOf(bytes);
  const { count, start } = listOf(view);
  if (count > MOST_ENTRIES) throw damaged(`it lists ${count} parts`);
  const entries = new Map<string, ZipEntry>();
  let at = start;
  for (let i = 0; i < count; i++) {
    if (at + ENTRY_BYTES > bytes.length || view.getUint32(at, true) !== ENTRY)
      throw damaged('its list of parts is cut');
    const [name, extra, comment] = [28, 30, 32].map((offset) => view.getUint16(at + offset, true));
    const path = new TextDecoder().decode(bytes.subarray(at + ENTRY_BYTES, at + ENTRY_BYTES + name!));
    if (entries.has(path)) throw damaged(`it holds two parts called "${path}"`);
    const [size, packed, local] = sizesOf(view, at, at + ENTRY_BYTES + name!, extra!);
    entries.set(path, {
      path,
      method: view.getUint16(at + 10, true),
      encrypted: (view.getUint16(at + 8, true) & 1) === 1,
      crc: view.getUint32(at + 16, true),
      packed: packed!,
      size: size!,
      start: local!,
    });
    at += ENTRY_BYTES + name! + extra! + comment!;
  }
  return entries;
}

/**
 * An entry's bytes, unpacked. Memory is bounded by the size that the list states, and that by a limit.
 * @throws FileError `tooLarge`, `unsupported`, `damaged`
 */
export function unpack(bytes: Uint8Array, { path, method, encrypted, crc, packed, size, start }: ZipEntry): Uint8Array {
  const part = `The part "${path}"`;
  if (encrypted)
    throw new FileError('unsupported', `${part} is encrypted.`, 'Save the model again without a password.');
  if (size > LARGEST_PART)
    throw new FileError(
      'tooLarge',
      `${part} unpacks to ${Math.ceil(size / 2 ** 20)} MB; at most ${LARGEST_PART / 2 ** 20} MB are read.`,
      'Save the model with fewer triangles, or in several files.',
    );
  if (method !== 0 && method !== 8)
    throw new FileError(
      'unsupported',
      `${part} is packed by method ${method}; 3MF knows only "stored" (0) and "deflate" (8).`,
      'Save the model again as 3MF, or pack it as an ordinary zip file.',
    );
  const view = viewOf(bytes);
  if (start + LOCAL_BYTES > bytes.length || view.getUint32(start, true) !== LOCAL)
    throw damaged(`"${path}" is not where the list says`);
  const from = start + LOCAL_BYTES + view.getUint16(start + 26, true) + view.getUint16(start + 28, true);
  if (from + packed > bytes.length) throw damaged(`"${path}" is cut off`);
  const content = inflated(bytes.subarray(from, from + packed), method, size, path);
  if (content.length !== size || crc32(content) !== crc) throw damaged(`the check sum of "${path}" is wrong`);
  return content;
}

function inflated(packed: Uint8Array, method: number, size: number, path: string): Uint8Array {
  if (method === 0) return packed;
  try {
    return inflateSync(packed, { out: new Uint8Array(size) });
  } catch {
    throw damaged(`"${path}" does not unpack`);
  }
}

function listOf(view: DataView): { count: number; start: number } {
  const end = findEnd(view);
  const [count, start] = [view.getUint16(end + 10, true), view.getUint32(end + 16, true)];
  if (count !== FULL_16 && start !== FULL_32) return { count, start };
  const locator = end - LOCATOR64_BYTES;
  if (locator < 0 || view.getUint32(locator, true) !== LOCATOR64) return { count, start };
  const end64 = long(view, locator + 8);
  if (end64 + 56 > view.byteLength || view.getUint32(end64, true) !== END64) throw damaged('its end record is lost');
  return { count: long(view, end64 + 32), start: long(view, end64 + 48) };
}

/** The end record is the last thing in the file but for a comment of up to 65,535 bytes. */
function findEnd(view: DataView): number {
  const first = Math.max(0, view.byteLength - END_BYTES - FULL_16);
  for (let at = view.byteLength - END_BYTES; at >= first; at--) {
    if (view.getUint32(at, true) === END && at + END_BYTES + view.getUint16(at + 20, true) === view.byteLength)
      return at;
  }
  if (view.byteLength >= 4 && view.getUint32(0, true) === LOCAL) throw damaged('its end is missing');
  throw new FileError(
    'notZip',
    'This is not a 3MF file: it is no zip archive.',
    'Give a file that was saved as 3MF; renaming another format does not make one.',
  );
}

/** Size, packed size and start; where a field is full, the large-file extra field (number 1) has the next of them. */
function sizesOf(view: DataView, entry: number, from: number, length: number): number[] {
  const fields = [24, 20, 42].map((offset) => view.getUint32(entry + offset, true));
  if (!fields.includes(FULL_32)) return fields;
  for (let at = from; at + 4 <= Math.min(from + length, view.byteLength); ) {
    const size = view.getUint16(at + 2, true);
    if (view.getUint16(at, true) === 1) {
      let next = at + 4;
      return fields.map((field) => {
        if (field !== FULL_32) return field;
        if (next + 8 > at + 4 + size || next + 8 > view.byteLength) throw damaged('a size in its list is cut');
        next += 8;
        return long(view, next - 8);
      });
    }
    at += 4 + size;
  }
  return fields;
}

const long = (view: DataView, at: number): number => Number(view.getBigUint64(at, true));

const viewOf = (bytes: Uint8Array): DataView => new DataView(bytes.buffer, bytes.byteOffset, bytes.length);

const damaged = (why: string): FileError =>
  new FileError('damaged', `The 3MF file is damaged: ${why}.`, 'Copy or download it again, or save it anew.');
