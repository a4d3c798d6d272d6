import type { Mesh } from '../../print/mesh.ts';
import { STL_FACETS_CODE } from './facets-code.ts';
import { STL_FACET_BYTES, STL_FACETS_START } from './layout.ts';

/** What `facets.wat` exports; the meaning of the parameters stands there. */
interface StlFacets {
  readonly memory: { readonly buffer: ArrayBuffer; readonly grow: (pages: number) => number };
  readonly round: (from: number, end: number, to: number) => number;
  readonly facets: (tri: number, end: number, pos: number, count: number, out: number) => number;
}

/** The part of the WebAssembly interface that is used here; browsers and Node both have it. */
declare const WebAssembly: {
  readonly Module: new (code: Uint8Array) => object;
  readonly Instance: new (module: object) => { readonly exports: StlFacets };
};

const PAGE = 65536;
/** Facets, or vertices, that go through the memory at a time: 200 kB, which stays in the second cache. */
const BLOCK = 4096;
const DOUBLES_AT = 0;
const NUMBERS_AT = DOUBLES_AT + 24 * BLOCK;
const FACETS_AT = NUMBERS_AT + 12 * BLOCK;
const POSITIONS_AT = FACETS_AT + STL_FACET_BYTES * BLOCK;
/** Meshes with more vertices are left to `fillFacets`, because the memory stays in use: 60 MB. */
const MOST_VERTICES = 5_000_000;

let started: StlFacets | undefined;

/**
 * Does what `fillFacets` does, twice as fast, and says whether it did: not where WebAssembly is missing or forbidden,
 * and not for a mesh that is unsound or very large, whose bytes it may leave half written.
 */
export function fillFacetsAssembled(bytes: Uint8Array, { positions, triangles }: Mesh): boolean {
  const vertices = positions.length / 3;
  if (!Number.isInteger(vertices) || triangles.length % 3 !== 0 || vertices > MOST_VERTICES) return false;
  try {
    started ??= start();
    const missing = POSITIONS_AT + 12 * vertices - started.memory.buffer.byteLength;
    if (missing > 0) started.memory.grow(Math.ceil(missing / PAGE));
  } catch {
    return false; // forbidden by the page's security policy, or no memory to be had
  }
  return roundPositions(started, positions) && writeBlocks(started, bytes, triangles, vertices);
}

function start(): StlFacets {
  const code = Uint8Array.from(atob(STL_FACETS_CODE), (char) => char.charCodeAt(0));
  return new WebAssembly.Instance(new WebAssembly.Module(code)).exports;
}

/** Whether all were finite. */
function roundPositions({ memory, round }: StlFacets, positions: Float64Array): boolean {
  const doubles = new Float64Array(memory.buffer, DOUBLES_AT, 3 * BLOCK);
  for (let from = 0; from < positions.length; from += doubles.length) {
    const block = positions.subarray(from, from + doubles.length);
    doubles.set(block);
    if (round(DOUBLES_AT, DOUBLES_AT + 8 * block.length, POSITIONS_AT + 4 * from) !== 0) return false;
  }
  return true;
}

/** Whether all vertex numbers were known. */
function writeBlocks({ memory, facets }: StlFacets, bytes: Uint8Array, triangles: Uint32Array, vertices: number) {
  const numbers = new Uint32Array(memory.buffer, NUMBERS_AT, 3 * BLOCK);
  const written = new Uint8Array(memory.buffer, FACETS_AT, STL_FACET_BYTES * BLOCK);
  for (let from = 0; from < triangles.length; from += numbers.length) {
    const block = triangles.subarray(from, from + numbers.length);
    numbers.set(block);
    if (facets(NUMBERS_AT, NUMBERS_AT + 4 * block.length, POSITIONS_AT, vertices, FACETS_AT) !== 0) return false;
    const length = (STL_FACET_BYTES * block.length) / 3;
    bytes.set(written.subarray(0, length), STL_FACETS_START + (STL_FACET_BYTES * from) / 3);
  }
  return true;
}
