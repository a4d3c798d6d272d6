import type { Manifold, Mat4 } from 'manifold-3d';
import type { Workbench } from '../kit.ts';

/** Which way letters stand: sunk into the surface, or proud of it. */
export type Relief = 'engraved' | 'raised';

/** How far a cutter stands out of the surface it cuts, so that nothing of the surface is left over it, millimetres. */
export const OVERSHOOT = 0.2;
/** How far raised letters reach into the body that carries them, millimetres. */
export const ROOT = 0.3;

const IDENTITY: Mat4 = [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1];

/** What two solids have in common, freed with the bench like everything made on it. */
export function common(bench: Workbench, one: Manifold, other: Manifold): Manifold {
  const raw = one.intersect(other);
  const kept = bench.place(raw, IDENTITY);
  raw.delete();
  return kept;
}

/** The smallest convex solid about another. */
export function hullOf(bench: Workbench, solid: Manifold): Manifold {
  const raw = solid.hull();
  const kept = bench.place(raw, IDENTITY);
  raw.delete();
  return kept;
}

/** A body with letters, and for printers with two materials the letters as what exactly fills their engraving. */
export interface Lettered {
  readonly solid: Manifold;
  /** Null where nothing was engraved. */
  readonly inlay: Manifold | null;
}

/** Cuts or adds letters. @param letters their solids, made for this relief */
export function applyLetters(bench: Workbench, body: Manifold, letters: readonly Manifold[], relief: Relief): Lettered {
  if (letters.length === 0) return { solid: body, inlay: null };
  if (relief === 'raised') return { solid: bench.union([body, ...letters]), inlay: null };
  return { solid: bench.subtract(body, letters), inlay: common(bench, body, bench.union(letters)) };
}
