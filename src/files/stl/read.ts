import type { Mesh } from '../../print/mesh.ts';
import { FileError } from '../file-error.ts';
import { numberRows } from '../mesh/number-rows.ts';
import { STL_FACET_BYTES, STL_FACETS_START, STL_HEADER_BYTES } from './layout.ts';
import { readStlBinary } from './read-binary.ts';
import { readStlText } from './read-text.ts';

/** What an STL file holds. */
export interface StlContents {
  /**
   * One triangle a facet, in the file's order, none left out. Corners with the same bits are one vertex, so 0 and -0
   * are two: what a bit-comparing reader sees. STL has no unit; millimetres are assumed.
   */
  readonly mesh: Mesh;
  readonly format: 'binary' | 'text';
  /** The normals as they are in the file, three numbers a triangle; NaN where a text file has no number. */
  readonly normals: Float32Array;
}

/**
 * Reads an STL file, binary or text. A file whose size fits the count of facets in it is binary, whatever its header
 * says: many binary files begin with the word `solid`.
 * @throws FileError `empty`, `tooShort`, `truncated`, `surplus`, `notStl`, `notFinite`, `syntax`
 */
export function readStl(bytes: Uint8Array): StlContents {
  if (bytes.length === 0)
    throw new FileError(
      'empty',
      'The file is empty: it has no bytes.',
      'Export the model again and copy the file whole.',
    );
  const format = !fitsItsCount(bytes) && looksLikeText(bytes) ? 'text' : 'binary';
  const { normals, corners } = format === 'text' ? readStlText(bytes) : readStlBinary(bytes);
  if (normals.length === 0)
    throw new FileError('empty', 'The STL file has no facets.', 'Export the model again; this file has nothing in it.');
  return { mesh: weld(corners), format, normals };
}

function fitsItsCount(bytes: Uint8Array): boolean {
  if (bytes.length < STL_FACETS_START) return false;
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  return bytes.length === STL_FACETS_START + STL_FACET_BYTES * view.getUint32(STL_HEADER_BYTES, true);
}

/** The word `solid`, and no zero byte in the first lines: those of a binary header give it away. */
function looksLikeText(bytes: Uint8Array): boolean {
  const start = bytes.subarray(0, 1024);
  return /^(\u00ef\u00bb\u00bf)?\s*solid\b/i.test(String.fromCharCode(...start)) && !start.includes(0);
}

function weld(corners: Float32Array): Mesh {
  const { numbers, firsts } = numberRows(new Int32Array(corners.buffer), 3);
  const positions = new Float64Array(3 * firsts.length);
  for (let i = 0; i < firsts.length; i++) {
    for (let axis = 0; axis < 3; axis++) positions[3 * i + axis] = corners[3 * firsts[i]! + axis]!;
  }
  return { positions, triangles: numbers };
}
