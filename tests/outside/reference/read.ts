import { readFileSync } from 'node:fs';

export interface ReferenceOperation {
  readonly t: string;
  readonly axis: readonly number[] | null;
  readonly W: readonly number[];
  readonly Winv: readonly number[];
}

export interface ReferenceGroup {
  readonly key: string;
  readonly point_group: string;
  readonly standard: boolean;
  readonly schoenflies: string;
  readonly system: string;
  readonly axes: string;
  readonly order: number;
  readonly centrosymmetric: boolean;
  readonly polar: boolean;
  readonly polar_axis?: readonly number[];
  readonly chiral: boolean;
  readonly laue_key: string;
  readonly hexagonal_equivalent?: string;
  readonly counts: Readonly<Record<string, number>>;
  readonly rotation_axes: Readonly<Record<string, readonly (readonly number[])[]>>;
  readonly rotoinversion_axes: Readonly<Record<string, readonly (readonly number[])[]>>;
  readonly mirror_planes: readonly { readonly hkl: readonly number[]; readonly normal: readonly number[] }[];
  readonly axis_symbols: Readonly<Record<string, readonly (readonly number[])[]>>;
  readonly generic_orbit_size: number;
  readonly ops: readonly ReferenceOperation[];
}

export interface ReferenceForm {
  readonly group: string;
  readonly form: string;
  readonly condition?: string;
  readonly name: string;
  readonly synonyms: readonly string[];
  readonly position: string;
  readonly example: readonly [number, number, number];
  readonly example4?: readonly number[];
  readonly multiplicity: number;
  readonly closed: boolean;
  readonly face_symmetry: string;
  readonly face_symmetry_order: number;
  readonly opposite_in_form: boolean;
}

export interface ReferenceKind {
  readonly name: string;
  readonly synonyms: readonly string[];
  readonly faces: number;
  readonly closed: boolean;
  readonly groups: readonly string[];
}

const read = (name: string): string => readFileSync(new URL(name, import.meta.url), 'utf8');

const groupFile: { readonly groups: readonly ReferenceGroup[] } = JSON.parse(read('groups.json'));

const formFile: {
  readonly forms: readonly ReferenceForm[];
  readonly alternative_settings: readonly ReferenceForm[];
  readonly kinds: readonly ReferenceKind[];
} = JSON.parse(read('forms.json'));

export const referenceGroups = groupFile.groups;
export const referenceForms = [...formFile.forms, ...formFile.alternative_settings];
export const standardForms = formFile.forms;
export const referenceKinds = formFile.kinds;
