import type { FormName } from './form-kind.ts';
import { keyOf, turnFace } from './integers.ts';
import { hasZeroSum } from './orbit.ts';
import type { PointGroup } from './point-group.ts';
import { type Miller, miller } from './spaces.ts';

/**
 * Name of the form that these faces make, decided from the faces themselves and not from a table of index patterns,
 * so that every setting of a group is served.
 * @param faces a whole orbit of the group
 */
export function formName(group: PointGroup, faces: readonly Miller[]): FormName {
  if (group.axes === 'cubic') return cubicName(faces);
  if (group.axes === 'tetragonal' || group.axes === 'hexagonal') return uniaxialName(group.axes, faces);
  if (group.axes === 'rhombohedral') return uniaxialName('hexagonal', faces.map(onHexagonalAxes));
  return lowName(group, faces);
}

/** Indices on hexagonal axes in obverse relation: a_h = a − b, b_h = b − c, c_h = a + b + c. */
export const onHexagonalAxes = ([h, k, l]: Miller): Miller => miller(h - k, k - l, h + k + l);

const contains = (faces: readonly Miller[], h: number, k: number, l: number): boolean =>
  faces.some((face) => face[0] === h && face[1] === k && face[2] === l);

const hasOpposite = (faces: readonly Miller[], [h, k, l]: Miller): boolean => contains(faces, -h, -k, -l);

function cubicName(faces: readonly Miller[]): FormName {
  const face = faces[0]!;
  const [small, middle, large] = face.map(Math.abs).sort((p, q) => p - q) as [number, number, number];
  const count = faces.length;
  if (middle === 0) return 'cube';
  if (small === large) return count === 8 ? 'octahedron' : 'tetrahedron';
  if (small === 0) {
    if (middle === large) return 'rhomb-dodecahedron';
    return count === 24 ? 'tetrahexahedron' : 'pentagon-dodecahedron';
  }
  if (small === middle) return count === 24 ? 'tetragon-trioctahedron' : 'trigon-tritetrahedron';
  if (middle === large) return count === 24 ? 'trigon-trioctahedron' : 'tetragon-tritetrahedron';
  if (count !== 24) return count === 48 ? 'hexaoctahedron' : 'pentagon-tritetrahedron';
  if (hasOpposite(faces, face)) return 'didodecahedron';
  const [h, k, l] = face;
  return contains(faces, k, h, l) ? 'hexatetrahedron' : 'pentagon-trioctahedron'; // (khl): across a diagonal mirror
}

/** Forms about one principal axis, which is c. */
function uniaxialName(axes: 'tetragonal' | 'hexagonal', faces: readonly Miller[]): FormName {
  const [h, k, l] = faces[0]!;
  const turned = contains(faces, -h, -k, l); // by 180° about the axis
  if (h === 0 && k === 0) return faces.length === 1 ? 'pedion' : 'pinacoid';
  if (l === 0) return `${sectionName(axes, faces.length, turned)} prism`;
  if (faces.every((face) => face[2] === l)) return `${sectionName(axes, faces.length, turned)} pyramid`;
  if (contains(faces, h, k, -l)) return `${sectionName(axes, faces.length / 2, turned)} dipyramid`;
  if (axes === 'tetragonal') {
    if (faces.length === 4) return 'tetragonal disphenoid';
    return contains(faces, -k, h, l) ? 'tetragonal trapezohedron' : 'tetragonal scalenohedron'; // turned by 90°
  }
  if (faces.length === 6) return contains(faces, -h, -k, -l) ? 'rhombohedron' : 'trigonal trapezohedron';
  return turned ? 'hexagonal trapezohedron' : 'ditrigonal scalenohedron';
}

type Section = 'tetragonal' | 'ditetragonal' | 'trigonal' | 'ditrigonal' | 'hexagonal' | 'dihexagonal';

/** Cross-section of a prism or pyramid with this many faces round the axis. */
function sectionName(axes: 'tetragonal' | 'hexagonal', count: number, turned: boolean): Section {
  if (axes === 'tetragonal') return count === 4 ? 'tetragonal' : 'ditetragonal';
  if (count === 3) return 'trigonal';
  if (count === 12) return 'dihexagonal';
  return turned ? 'hexagonal' : 'ditrigonal';
}

/** Triclinic, monoclinic and orthorhombic forms. */
function lowName(group: PointGroup, faces: readonly Miller[]): FormName {
  const [first, second, third] = faces;
  if (!first || !second) return 'pedion';
  if (faces.length === 8) return 'rhombic dipyramid';
  if (!third) {
    if (hasOpposite(faces, first)) return 'pinacoid';
    return mirrored(group, first, second) ? 'dome' : 'sphenoid';
  }
  if (!hasZeroSum(faces)) return 'rhombic pyramid';
  return hasOpposite(faces, first) ? 'rhombic prism' : 'rhombic disphenoid';
}

/** Whether a mirror plane of the group takes one face to the other. */
function mirrored(group: PointGroup, from: Miller, to: Miller): boolean {
  return group.operations.some(({ type, inverse }) => type === 'm' && keyOf(turnFace(from, inverse)) === keyOf(to));
}
