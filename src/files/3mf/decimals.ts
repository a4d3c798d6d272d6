import type { Mesh } from '../../print/mesh.ts';
import { weldFloat32 } from '../mesh/weld.ts';

/** Millionths of a millimetre: six decimal places. */
const STEPS = 1e6;

/**
 * The mesh as a 3MF file holds it and its readers keep it: six decimal places, in single precision, welded anew. Done
 * twice it changes nothing, and writing such a position with `decimalOf` and reading it as a float gives the same bits:
 * where steps of single precision are wider than a millionth (from 16 mm on) rounding to six places stays nearer to its
 * own float than to the next; below 8 mm every millionth has a float of its own; between, both hold.
 * @throws FileError `badMesh`, `notFinite`
 */
export function weldDecimals(mesh: Mesh): Mesh {
  const positions = mesh.positions.map((value) => Math.round(value * STEPS) / STEPS);
  return weldFloat32({ ...mesh, positions });
}

/** A plain decimal: at most six places, no exponent, no trailing zeros, no minus before zero. */
export function decimalOf(value: number): string {
  const text = value.toFixed(6).replace(/\.?0+$/, '');
  return text === '-0' ? '0' : text;
}
