import { faceCorners } from '../../polyhedron/measures.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { mm } from '../bodies/body-parts.ts';
import { faceName } from '../face-name.ts';
import { dot, vectorAt } from '../vectors.ts';
import type { MirrorLine, MirrorLinesPlan } from './mirror-lines.ts';

const RELIEF = { engraved: 'engraved', raised: 'raised', inlaid: 'inlaid as strips in a colour of their own,' };

/** How many planes are shown, and which faces their lines cover wholly. */
export function mirrorRemarks(
  shape: ClosedShape,
  scale: number,
  lines: readonly MirrorLine[],
  { relief, width, depth }: MirrorLinesPlan,
): string[] {
  const count = lines.length === 1 ? 'The mirror plane is' : `The ${lines.length} mirror planes are`;
  const remarks = [
    `${count} ${RELIEF[relief]} ${mm(width)} wide and ${mm(depth)} ${relief === 'raised' ? 'high' : 'deep'}.`,
  ];
  const covered = shape.measures.faces.filter((face) =>
    lines.some(({ normal }) =>
      faceCorners(shape.solid, face).every(
        (corner) => Math.abs(dot(normal, vectorAt(shape.measures.positions, corner))) * scale <= width / 2,
      ),
    ),
  );
  if (covered.length > 0) {
    const names =
      covered.length > 12 ? `${covered.length} small faces` : covered.map((face) => faceName(shape, face)).join(', ');
    remarks.push(`The lines cover ${names} wholly; narrower lines or a larger crystal would leave them to be seen.`);
  }
  return remarks;
}
