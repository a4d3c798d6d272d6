import { ObjectError } from '../../shape/object-error.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { mm, mmAtMost } from '../bodies/body-parts.ts';
import { faceMesh } from '../bodies/face-mesh.ts';
import { largestInset } from '../bodies/hollow.ts';
import { lieOn } from '../bodies/lie.ts';
import { downwards, type Resting } from '../bodies/resting.ts';
import { faceName, fileWord } from '../face-name.ts';
import type { Mesh } from '../mesh.ts';
import { assemble, type Part, type Surface } from '../part.ts';
import { crystalSurfaces } from '../surfaces.ts';
import { type Cells, skinCells } from './cells.ts';
import { outsideOf, soundGroups } from './groups.ts';

export interface SkinsPlan {
  /** How deep the colours go under each face, millimetres. */
  readonly depth: number;
  /** By default the largest face. */
  readonly resting?: Resting;
}

export interface Skins {
  /** `core`, then the skins; they share one place on the bed, because they are printed in one job. */
  readonly parts: readonly Part[];
  readonly remarks: readonly string[];
}

const CORE_COLOUR = '#F3EDE2';

/**
 * The crystal as a core and, for each form, a skin in the form's colour: bodies that fill it exactly and share whole
 * faces. A skin is as deep everywhere; where two meet, they part on the plane of equal depth.
 * @throws ObjectError `wall` when skins this deep leave no core
 */
export function colouredSkins(shape: ClosedShape, scale: number, { depth, resting }: SkinsPlan): Skins {
  const cells = depth > 0 ? skinCells(shape, scale, depth) : null;
  if (!cells) throw tooDeep(shape, scale, depth);
  const { faces } = shape.measures;
  const forms = faces.map((face) => shape.solid.planes.form[face]!);
  const surfaces = crystalSurfaces(shape.crystal, 'core');
  const groups = soundGroups(cells, forms);
  const named = groups.map((group) => {
    const whole = groups.filter((other) => forms[other[0]!] === forms[group[0]!]).length === 1;
    return { group, whole, form: surfaces[forms[group[0]!]!]!, face: faceName(shape, faces[group[0]!]!) };
  });
  const core: Piece = {
    name: 'core',
    purpose: 'the inside of the crystal, under its coloured skins',
    surface: { name: 'core', colour: CORE_COLOUR },
    mesh: coreMesh(cells),
  };
  const skins = named.map(
    ({ group, whole, form, face }): Piece => ({
      name: `skin-${fileWord(face)}`,
      purpose:
        `skin of ${whole ? `the form ${form.name}` : `${face} and ${group.length - 1} more of ${form.name}`}, ${mm(depth)} deep`.replace(
          ' and 0 more',
          '',
        ),
      surface: form,
      mesh: skinMesh(cells, group),
    }),
  );
  return {
    parts: inOnePlace([core, ...skins], downwards(shape, resting)),
    remarks: remarksOn(
      named.filter(({ whole }) => !whole).map(({ form }) => form.name),
      cells,
      faces.map((face) => faceName(shape, face)),
      depth,
    ),
  };
}

interface Piece {
  readonly name: string;
  readonly purpose: string;
  readonly surface: Surface;
  readonly mesh: Mesh;
}

const coreMesh = ({ positions, core }: Cells): Mesh => faceMesh(positions, core.map(steady), () => 0);

const skinMesh = (cells: Cells, group: readonly number[]): Mesh =>
  faceMesh(
    cells.positions,
    outsideOf(cells, group).map(({ corners }) => steady(corners)),
    () => 0,
  );

/** From the corner of least number, so that bodies on both sides cut a common face into the same triangles. */
function steady(corners: readonly number[]): { readonly corners: readonly number[] } {
  const least = corners.indexOf(Math.min(...corners));
  return { corners: [...corners.slice(least), ...corners.slice(0, least)] };
}

/** All bodies turned and moved alike, so that each lies where it belongs beside the others. */
function inOnePlace(pieces: readonly Piece[], down: readonly [number, number, number]): Part[] {
  const parts = pieces.map(
    ({ name, purpose, surface, mesh }): Part => ({
      name,
      purpose,
      surfaces: [surface],
      mesh,
      placed: [mesh],
      ...(name !== 'core' && { with: 'core' }),
    }),
  );
  const lying = lieOn(assemble(parts), down).positions;
  let from = 0;
  return parts.map((part) => {
    const { positions } = part.mesh;
    const mesh = { ...part.mesh, positions: lying.slice(from, from + positions.length) };
    from += positions.length;
    return { ...part, mesh };
  });
}

function remarksOn(split: readonly string[], { skins }: Cells, names: readonly string[], depth: number): string[] {
  const forms = [...new Set(split)];
  const roofs = names.filter((_, cell) => !skins[cell]!.some(({ behind }) => behind === 'core'));
  const remarks: string[] = [];
  if (forms.length > 0)
    remarks.push(
      `The skin of ${forms.join(', ')} comes in several bodies: in one they would touch themselves in an edge or a point.`,
    );
  if (roofs.length > 0)
    remarks.push(
      `Skins of ${mm(depth)} run together under ${roofs.length > 12 ? `${roofs.length} small faces` : roofs.join(', ')}, which are coloured less deep.`,
    );
  return remarks;
}

function tooDeep(shape: ClosedShape, scale: number, depth: number): ObjectError {
  const largest = largestInset(shape, scale);
  return new ObjectError(
    'wall',
    depth > 0
      ? `skins of ${mm(depth)} leave no core: half the crystal's thinnest part is ${mm(largest)}`
      : `a skin of ${mm(depth)} is none`,
    `choose a depth between 0 and ${mmAtMost(largest)}, or a larger crystal`,
  );
}
