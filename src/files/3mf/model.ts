import type { Mesh } from '../../print/mesh.ts';
import type { Surface } from '../../print/part.ts';
import type { Point } from '../check/report.ts';

/** One body to print: a mesh object with a name of its own. */
export interface ThreeMfObject {
  /** As slicers show it. */
  readonly name: string;
  /** Names the design, for people and databases; slicers may drop it. */
  readonly partNumber: string;
  /** Millimetres. */
  readonly mesh: Mesh;
  /** What the numbers in the mesh's `surface` mean; without these numbers all is the first surface. Never empty. */
  readonly surfaces: readonly Surface[];
  /** Number of the object before it whose coordinates it shares: both are then one thing on the bed, in bodies. */
  readonly within?: number;
}

/** What a 3MF file is to hold. */
export interface ThreeMfModel {
  readonly title: string;
  readonly description: string;
  /** Program and version, as in `Goniolith 0.1.0`; the name of another program changes how some readers read. */
  readonly application: string;
  /** Further facts under names of letters and digits; written as `goniolith:Name`. */
  readonly metadata: Readonly<Record<string, string>>;
  /** In the order in which they are written; never empty. */
  readonly objects: readonly ThreeMfObject[];
  /**
   * Where they stand on the bed: side by side (the default), as they lie to each other in their own coordinates, or
   * each moved by millimetres; objects within others go along.
   */
  readonly places?: 'sideBySide' | 'inPlace' | readonly Point[];
  /** A PNG picture of the whole. */
  readonly thumbnail?: Uint8Array;
}
