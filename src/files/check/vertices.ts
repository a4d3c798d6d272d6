import type { Mesh } from '../../print/mesh.ts';
import { numberRows } from '../mesh/number-rows.ts';
import { Findings, pointOf } from './findings.ts';

/** Which vertices lie at one place. */
export interface VertexFacts {
  /** For each vertex the first one at its place; 0 and -0 are one place. */
  readonly same: Uint32Array;
  readonly coincident: Findings;
  /** Coincident vertices that differ from the first one in the sign of a zero. */
  readonly negativeZeros: number;
}

export function examineVertices(mesh: Mesh): VertexFacts {
  const plain = mesh.positions.map((value) => value + 0); // -0 + 0 is 0
  const { numbers, firsts } = numberRows(new Int32Array(plain.buffer), 6);
  const same = numbers.map((number) => firsts[number]!);
  const coincident = new Findings();
  let negativeZeros = 0;
  for (let vertex = 0; vertex < same.length; vertex++) {
    const first = same[vertex]!;
    if (first === vertex) continue;
    coincident.add(() => ({ points: [pointOf(mesh, vertex)], triangles: [] }));
    if (pointOf(mesh, vertex).some((value, axis) => !Object.is(value, mesh.positions[3 * first + axis])))
      negativeZeros++;
  }
  return { same, coincident, negativeZeros };
}
