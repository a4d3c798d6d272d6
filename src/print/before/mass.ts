import { type Mesh, meshVolume } from '../mesh.ts';
import { cross, dot, length, minus, plus, times, type Vector, vectorAt } from '../vectors.ts';
import type { PrintingProfile } from './profile.ts';

/** Centre of mass of a closed mesh of even density. */
export function centreOfMass({ positions, triangles }: Mesh): Vector {
  const zero = vectorAt(positions, 0);
  let [sum, sixfold]: [Vector, number] = [[0, 0, 0], 0];
  for (let t = 0; t < triangles.length; t += 3) {
    const a = minus(vectorAt(positions, triangles[t]!), zero);
    const b = minus(vectorAt(positions, triangles[t + 1]!), zero);
    const c = minus(vectorAt(positions, triangles[t + 2]!), zero);
    const pyramid = dot(a, cross(b, c));
    sum = plus(sum, plus(plus(a, b), c), pyramid / 4);
    sixfold += pyramid;
  }
  return plus(zero, times(sum, 1 / sixfold));
}

export function surfaceArea({ positions, triangles }: Mesh): number {
  let twice = 0;
  for (let t = 0; t < triangles.length; t += 3) {
    const a = vectorAt(positions, triangles[t]!);
    const [b, c] = [vectorAt(positions, triangles[t + 1]!), vectorAt(positions, triangles[t + 2]!)];
    twice += length(cross(minus(b, a), minus(c, a)));
  }
  return twice / 2;
}

export interface Amount {
  /** mm³ of the model, and of the material that is laid down. */
  readonly volume: number;
  readonly deposited: number;
  /** Share of the volume that is solid shell. */
  readonly shellShare: number;
  /** Grams, as printed and if it were filled. */
  readonly grams: number;
  readonly solidGrams: number;
}

/**
 * What a part weighs: `V (w + f (1 − w))` with the infill f, and for w the share that a shell takes, surface times
 * thickness over volume, at most 1 (common practice).
 */
export function amountOf(mesh: Mesh, { density, shell, infill }: PrintingProfile['material']): Amount {
  const volume = meshVolume(mesh);
  const shellShare = Math.min(1, (surfaceArea(mesh) * shell) / volume);
  const deposited = volume * (shellShare + infill * (1 - shellShare));
  const grams = (density * deposited) / 1000;
  return { volume, deposited, shellShare, grams, solidGrams: (density * volume) / 1000 };
}

/** Rough time: material over flow, and so much for each layer (common practice); seconds. */
export function printingSeconds(
  deposited: number,
  height: number,
  { layer, perLayer, flow }: PrintingProfile['speed'],
) {
  const layers = Math.ceil(height / layer - 1e-9);
  return { layers, seconds: layers * perLayer + (flow === null ? 0 : deposited / flow) };
}
