import type { Cell, Metric } from '../crystal/cell.ts';
import type { Form } from '../crystal/form.ts';
import type { PointGroup } from '../crystal/point-group.ts';
import type { Miller, Zone } from '../crystal/spaces.ts';
import type { Millimetres } from './quantity.ts';
import type { PrinterProfile } from './schema.ts';

/** A recipe understood: everything that decides the crystal's shape, checked and complete. */
export interface Crystal {
  readonly title: string;
  readonly mineral: MineralFacts | null;
  readonly group: PointGroup;
  readonly cell: Cell;
  readonly metric: Metric;
  /** In the recipe's order. */
  readonly forms: readonly CrystalForm[];
}

export interface MineralFacts {
  /** Name of the preset, for instance `quartz`. */
  readonly id: string;
  readonly name: string;
  readonly formula: string;
  /** The preset's habit; null when the recipe gives forms of its own. */
  readonly habit: string | null;
  /** Whether it is the habit that the mineral's name alone stands for. */
  readonly isFirstHabit: boolean;
  /** Where the cell comes from; null when the recipe gives a cell or group of its own. */
  readonly source: string | null;
}

/** A form at its central distance, in the recipe's own unit of length. */
export interface CrystalForm {
  readonly form: Form;
  readonly distance: number;
  /** The mineral's letter for the form, where it has one. */
  readonly letter: string | null;
}

/** How large the object is to be. */
export type Size =
  | { readonly kind: 'longest'; readonly length: Millimetres }
  | { readonly kind: 'along'; readonly zone: Zone; readonly length: Millimetres }
  | { readonly kind: 'between'; readonly face: Miller; readonly length: Millimetres }
  | { readonly kind: 'volume'; readonly cubicMillimetres: number }
  | { readonly kind: 'scale'; readonly millimetresPerUnit: number };

/** Which symmetry axes are to be rods, and how. */
export interface AxesPlan {
  readonly orders: readonly number[] | null;
  readonly directions: readonly Zone[] | null;
  /** Printed rods, fused or pushed in; or bores for bought metal rod, pressed or sliding. */
  readonly fit: 'fused' | 'separate' | 'press' | 'slide';
  readonly diameter: Millimetres;
  /** How far a rod stands out of the crystal, its terminal included. */
  readonly reach: Millimetres;
  /** Of bores for metal rod, from the surface; without it the first axis right through, the others as deep as can be. */
  readonly depth?: Millimetres;
}

/** What the crystal's body is to be; null leaves a figure to the printer's profile. */
export type BodyPlan =
  | { readonly kind: 'solid' }
  | { readonly kind: 'hollow'; readonly wall: Millimetres | null; readonly drains: boolean | null }
  | { readonly kind: 'frame'; readonly strut: Millimetres | null; readonly bead: boolean }
  | {
      readonly kind: 'halves';
      readonly plane: Miller | null;
      /** Of the cut from the centre, millimetres. */
      readonly offset: number;
      readonly join: 'dowels' | 'magnets' | 'none';
    }
  | { readonly kind: 'sectors'; readonly by: 'face' | 'form'; readonly gap: Millimetres | null }
  | { readonly kind: 'units'; readonly gap: Millimetres | null }
  | { readonly kind: 'skins'; readonly depth: Millimetres | null };

/** How something stands on a face: sunk, proud, or sunk and filled with a second colour. */
export type ReliefPlan = 'engraved' | 'raised' | 'inlaid';

export interface LettersPlan {
  readonly relief: ReliefPlan;
  readonly text: 'letters' | 'indices';
}

export type BluntPlan =
  | { readonly kind: 'round'; readonly radius: Millimetres }
  | { readonly kind: 'bevel'; readonly width: Millimetres };

export interface StandPlan {
  /** Null: name, formula, point group, forms and scale. */
  readonly text: readonly string[] | null;
  readonly braille: boolean;
  readonly qr: string | null;
  /** The face on which the crystal rests; null: c stands upright. */
  readonly down: Miller | null;
  /** Letters and code are parts of their own. */
  readonly contrast: boolean;
}

/** Mirror planes as lines on the surface; null leaves a figure to the printer's profile. */
export interface PlanesPlan {
  readonly relief: ReliefPlan;
  readonly width: Millimetres | null;
  readonly depth: Millimetres | null;
}

export type FileKind = 'stl' | '3mf' | 'glb' | 'png';

export interface PrintPlan {
  /** Null when the recipe states none; `make` then takes `USUAL_SIZE`. */
  readonly size: Size | null;
  readonly axes: AxesPlan | null;
  readonly body: BodyPlan;
  readonly letters: LettersPlan | null;
  readonly blunt: BluntPlan | null;
  readonly stand: StandPlan | null;
  /** Lines under the resting face. */
  readonly base: readonly string[] | null;
  readonly planes: PlanesPlan | null;
  /** A printed key of the axis symbols is wanted. */
  readonly key: boolean;
  readonly pair: boolean;
  /** Parts are turned onto the face on which they print best. */
  readonly flat: boolean;
  /** Findings before printing and handling are wanted. */
  readonly checks: boolean;
  readonly printer: PrinterProfile;
  readonly files: readonly FileKind[];
  readonly stl: 'binary' | 'text';
  readonly file: string | null;
}

/** What one recipe says, in full. */
export interface Resolved {
  readonly crystal: Crystal;
  readonly print: PrintPlan;
}
