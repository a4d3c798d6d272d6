import { FileError } from '../file-error.ts';
import { type Facets, STL_FACET_BYTES, STL_FACETS_START, STL_HEADER_BYTES } from './layout.ts';
import { otherKindOfFile } from './other-files.ts';

/** How many facets are looked at to see whether a file of the wrong size is an STL at all. */
const LOOKED_AT = 64;
/** No STL file is as large as this many facets make it (5 GB). */
const MOST_FACETS = 100_000_000;

/**
 * The facets of a binary STL file.
 * @throws FileError `tooShort`, `truncated`, `surplus`, `notStl`, `notFinite`
 */
export function readStlBinary(bytes: Uint8Array): Facets {
  const facets = countFacets(bytes);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const normals = new Float32Array(3 * facets);
  const corners = new Float32Array(9 * facets);
  for (let facet = 0; facet < facets; facet++) {
    const at = STL_FACETS_START + STL_FACET_BYTES * facet;
    for (let i = 0; i < 3; i++) normals[3 * facet + i] = view.getFloat32(at + 4 * i, true);
    for (let i = 0; i < 9; i++) {
      const value = view.getFloat32(at + 12 + 4 * i, true);
      if (!Number.isFinite(value)) throw notFinite(facet, i, value);
      corners[9 * facet + i] = value;
    }
  }
  return { normals, corners };
}

/** The number of facets, which the file's size must bear out. */
function countFacets(bytes: Uint8Array): number {
  const other = otherKindOfFile(bytes);
  if (bytes.length < STL_FACETS_START) {
    if (other !== undefined) throw notStl(other);
    const what = `The file has only ${bytes.length} bytes; a binary STL file has at least ${STL_FACETS_START}`;
    throw new FileError('tooShort', `${what}, and a text one begins with the word solid.`, 'Copy or export it again.');
  }
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const promised = view.getUint32(STL_HEADER_BYTES, true);
  const expected = STL_FACETS_START + STL_FACET_BYTES * promised;
  if (bytes.length === expected) return promised;

  if (other !== undefined || !hasSensibleFacets(view, promised)) throw notStl(other);
  const held = Math.floor((bytes.length - STL_FACETS_START) / STL_FACET_BYTES);
  if (bytes.length < expected)
    throw new FileError(
      'truncated',
      `The STL file promises ${promised} facets but breaks off after ${held}: ` +
        `${expected - bytes.length} bytes are missing.`,
      'Copy or export the file again; the end of it was lost.',
    );
  throw new FileError(
    'surplus',
    `The STL file promises ${promised} facets but has ${bytes.length - expected} bytes after the last of them.`,
    'Export the file again; its count of facets does not fit its size, so something in it is wrong.',
  );
}

/**
 * Whether the first facets have finite corners and normals that are unit vectors or zero; if there is not even one
 * whole facet, whether the count is one that a file could have.
 */
function hasSensibleFacets(view: DataView, promised: number): boolean {
  const whole = Math.floor((view.byteLength - STL_FACETS_START) / STL_FACET_BYTES);
  if (whole === 0) return promised > 0 && promised < MOST_FACETS;
  const facets = Math.min(whole, promised, LOOKED_AT);
  for (let facet = 0; facet < facets; facet++) {
    const number = (i: number): number => view.getFloat32(STL_FACETS_START + STL_FACET_BYTES * facet + 4 * i, true);
    const length = Math.hypot(number(0), number(1), number(2));
    if (!(length === 0 || Math.abs(length - 1) < 0.01)) return false;
    for (let i = 3; i < 12; i++) if (!Number.isFinite(number(i))) return false;
  }
  return facets > 0;
}

function notStl(other: string | undefined): FileError {
  const what = other === undefined ? 'Its size does not fit its count of facets, nor does it begin with solid' : other;
  return new FileError('notStl', `This is not an STL file. ${what}.`, 'Give an STL file, binary or text.');
}

function notFinite(facet: number, i: number, value: number): FileError {
  const where = `the ${'xyz'[i % 3]} coordinate of corner ${Math.floor(i / 3) + 1} of facet ${facet + 1}`;
  return new FileError(
    'notFinite',
    `In the STL file, ${where} (counted from 1) is ${Number.isNaN(value) ? 'not a number' : 'infinite'}.`,
    'Export the model again; the program that wrote the file had no position for this corner.',
  );
}
