import { CrystalError } from './errors.ts';
import { CHIRAL_FORMS, FORM_SYNONYMS, type FormName } from './form-kind.ts';
import { formName } from './form-name.ts';
import { cross, isZero, opposite, primitive, turnFace } from './integers.ts';
import { hasZeroSum, orbit } from './orbit.ts';
import { type PointGroup, pointGroup } from './point-group.ts';
import { type Miller, miller } from './spaces.ts';

/** `limiting`: face symmetry and multiplicity of a basic form, but a shape that a slight tilt would change. */
export type FormPosition = 'general' | 'special' | 'limiting';

/** Type of the stabiliser of a face, without orientation: one of the ten that a face can have. */
export type FaceSymmetry = '1' | '2' | '3' | '4' | '6' | 'm' | 'mm2' | '3m' | '4mm' | '6mm';

/** A crystal form: all faces that the point group makes of one. */
export interface Form {
  /** The face it was made from, as given. */
  readonly indices: Miller;
  readonly name: FormName;
  readonly synonyms: readonly string[];
  readonly multiplicity: number;
  /** Whether the faces alone enclose a space. */
  readonly closed: boolean;
  /** The given face first. */
  readonly faces: readonly Miller[];
  readonly position: FormPosition;
  readonly faceSymmetry: FaceSymmetry;
  readonly faceSymmetryOrder: number;
  /** For forms that come left and right, a face of the other one; null for all others. */
  readonly enantiomorph: Miller | null;
  /** For each operation of the group the number of the face to which it takes the first one. */
  readonly imageOf: Int32Array;
  /** For each face an operation that takes the first one to it. */
  readonly carrier: Uint8Array;
}

/**
 * The form {hkl} of a point group, after International Tables for Crystallography, volume A.
 * @param indices three integers, not all zero; common factors are kept
 * @throws CrystalError `index-zero`; `unknown-group` when the group is given by an unknown symbol
 */
export function form(group: PointGroup | string, indices: Miller): Form {
  const own = typeof group === 'string' ? pointGroup(group) : group;
  if (isZero(indices)) throw new CrystalError('index-zero', 'indices that are all zero name no form');
  const { faces, imageOf, carrier } = orbit(own, indices);
  const name = formName(own, faces);
  return {
    indices,
    name,
    synonyms: FORM_SYNONYMS[name],
    multiplicity: faces.length,
    closed: isClosed(faces),
    faces,
    position: positionOf(own, indices, imageOf, name),
    faceSymmetry: stabiliserType(own, imageOf),
    faceSymmetryOrder: own.order / faces.length,
    enantiomorph: CHIRAL_FORMS.has(name) ? miller(...opposite(indices)) : null,
    imageOf,
    carrier,
  };
}

/**
 * Closed exactly when the normals span space and add up to zero: the sum is the same for the whole group, so if it is
 * not zero every normal makes the same acute angle with it, and if it is zero their centre lies inside their hull.
 */
const isClosed = (faces: readonly Miller[]): boolean => hasZeroSum(faces) && spansSpace(faces);

function spansSpace(faces: readonly Miller[]): boolean {
  const first = faces[0]!;
  const zone = faces.map((face) => cross(first, face)).find((axis) => !isZero(axis));
  return zone !== undefined && faces.some((face) => face[0] * zone[0] + face[1] * zone[1] + face[2] * zone[2] !== 0);
}

const TYPE_WITHOUT_MIRRORS: Readonly<Record<number, FaceSymmetry>> = { 1: '1', 2: '2', 3: '3', 4: '4', 6: '6' };
const TYPE_WITH_MIRRORS: Readonly<Record<number, FaceSymmetry>> = { 2: 'm', 4: 'mm2', 6: '3m', 8: '4mm', 12: '6mm' };

/** A face can only keep turns about its normal and mirrors through it, so order and mirrors decide. */
function stabiliserType(group: PointGroup, imageOf: Int32Array): FaceSymmetry {
  const kept = group.operations.filter((_, i) => imageOf[i] === 0);
  const types = kept.some(({ improper }) => improper) ? TYPE_WITH_MIRRORS : TYPE_WITHOUT_MIRRORS;
  return types[kept.length]!;
}

/** A row in no simple relation to any symmetry element of any group. */
const ODD_ROW = miller(101, 211, 467);

/** Larger than any sum of 48 images of the odd row, so that the tilt never reaches the next special position. */
const NEARLY_UPRIGHT = 1_000_003;

/** Compares the form with that of the face tilted a little as far as its own symmetry lets it. */
function positionOf(group: PointGroup, face: Miller, imageOf: Int32Array, name: FormName): FormPosition {
  const kept = group.operations.filter((_, i) => imageOf[i] === 0);
  const [h, k, l] = primitive(face);
  const tilted = kept
    .map(({ inverse }) => turnFace(ODD_ROW, inverse))
    .reduce((sum, row) => miller(sum[0] + row[0], sum[1] + row[1], sum[2] + row[2]), miller(0, 0, 0));
  const [p, q, r] = tilted;
  const neighbour = miller(NEARLY_UPRIGHT * h + p, NEARLY_UPRIGHT * k + q, NEARLY_UPRIGHT * l + r);
  if (formName(group, orbit(group, neighbour).faces) !== name) return 'limiting';
  return kept.length === 1 ? 'general' : 'special';
}
