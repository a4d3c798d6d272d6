import type { Mesh } from '../../print/mesh.ts';
import { FileError } from '../file-error.ts';
import { numberIn } from './number-text.ts';

/**
 * Twelve numbers of a 3MF matrix by rows, m00 m01 m02 m10 … m32, for row vectors: x' = x m00 + y m10 + z m20 + m30,
 * and so on; the last three are a shift (3MF core 1.4.0, section 3.3).
 */
export type Transform = readonly number[];

export const IDENTITY: Transform = [1, 0, 0, 0, 1, 0, 0, 0, 1, 0, 0, 0];

/** @param where names the element in messages @throws FileError `transform` */
export function parseTransform(text: string | undefined, where: string): Transform {
  if (text === undefined) return IDENTITY;
  const numbers = text.trim().split(/\s+/).map(numberIn);
  const hint = 'Twelve numbers are needed, three a row, the last three being the shift.';
  if (numbers.length !== 12 || numbers.includes(Number.NaN))
    throw new FileError('transform', `The transform of ${where} is not twelve numbers: "${text.slice(0, 80)}".`, hint);
  if (!(Math.abs(determinant(numbers)) > 0))
    throw new FileError('transform', `The transform of ${where} flattens the body to nothing: "${text}".`, hint);
  return numbers;
}

/** Positive keeps handedness, negative mirrors; the size is the change of volume. */
export function determinant(m: Transform): number {
  return (
    m[0]! * (m[4]! * m[8]! - m[5]! * m[7]!) -
    m[1]! * (m[3]! * m[8]! - m[5]! * m[6]!) +
    m[2]! * (m[3]! * m[7]! - m[4]! * m[6]!)
  );
}

/** First `inner`, then `outer`. */
export function chain(inner: Transform, outer: Transform): Transform {
  return Array.from({ length: 12 }, (_, at) => {
    const [row, column] = [3 * Math.floor(at / 3), at % 3];
    const sum =
      inner[row]! * outer[column]! + inner[row + 1]! * outer[3 + column]! + inner[row + 2]! * outer[6 + column]!;
    return row === 9 ? sum + outer[9 + column]! : sum;
  });
}

/** The mesh moved; a transform that mirrors also turns every triangle round, so that the outside stays outside. */
export function placed(mesh: Mesh, m: Transform): Mesh {
  const { positions: p, triangles } = mesh;
  const positions = new Float64Array(p.length);
  for (let i = 0; i < p.length; i += 3)
    for (let k = 0; k < 3; k++)
      positions[i + k] = p[i]! * m[k]! + p[i + 1]! * m[3 + k]! + p[i + 2]! * m[6 + k]! + m[9 + k]!;
  if (determinant(m) > 0) return { ...mesh, positions };
  return {
    ...mesh,
    positions,
    triangles: triangles.map((_, i) => triangles[i % 3 === 0 ? i : i + (i % 3 === 1 ? 1 : -1)]!),
  };
}
