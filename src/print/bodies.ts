import { normal as faceNormal } from '../crystal/cell.ts';
import { symmetryElements } from '../crystal/elements.ts';
import type { BodyPlan, PrintPlan } from '../recipe/crystal.ts';
import type { PrinterProfile } from '../recipe/schema.ts';
import type { RodPlan } from '../rods/plan.ts';
import { facePlanes } from '../shape/face-planes.ts';
import type { ClosedShape } from '../shape/shape.ts';
import type { BodyParts } from './bodies/body-parts.ts';
import { frameBody } from './bodies/frame.ts';
import { halves } from './bodies/halves.ts';
import { hollowBody } from './bodies/hollow.ts';
import { growthSectors } from './bodies/sectors.ts';
import { asymmetricUnits } from './bodies/units.ts';
import type { Workbench } from './kit.ts';
import type { Mesh } from './mesh.ts';
import { colouredSkins } from './skins/skins.ts';

/** Pins that hold pieces together: thickness and length in millimetres, and plastic left around their holes. */
const PIN = { diameter: 4, length: 12 };
/** Balls at a frame's corners, in strut diameters. */
const JOINT = 1.5;
/** Bought disc magnets: a common size (common practice). */
const MAGNET = { diameter: 6, thickness: 2 };
/** Of a magnet in its pocket, across and in depth: design guides give 0.2 to 0.3 mm. */
const MAGNET_CLEARANCE = 0.3;

/** Whether a mesh survives single precision; rooms below cannot ask the files' check themselves. */
export type IsSound = (mesh: Mesh) => boolean;

/** Bodies other than solid ones. @throws ObjectError */
export function bodyParts(
  bench: Workbench,
  shape: ClosedShape,
  scale: number,
  { body, printer }: PrintPlan & { readonly body: Exclude<BodyPlan, { kind: 'solid' }> },
  rods: RodPlan | null,
  isSound: IsSound,
): BodyParts {
  switch (body.kind) {
    case 'hollow': {
      const drains = body.drains === false ? null : (printer.drains ?? (body.drains ? USUAL_DRAINS : null));
      return hollowBody(bench, shape, scale, { wall: body.wall ?? printer.hollowWall, drains });
    }
    case 'frame': {
      const strut = body.strut ?? printer.rod.diameter;
      const bead = body.bead ? 3 * strut : null;
      return frameBody(bench, shape, scale, { strut, joint: JOINT * strut, bead, rods }, isSound);
    }
    case 'halves':
      return halves(bench, shape, scale, {
        plane: { normal: cutNormal(shape, body.plane), offset: body.offset },
        dowel: body.join === 'dowels' ? { ...PIN, clearance: printer.rod.clearance, count: 2 } : null,
        magnets: body.join === 'magnets' ? { ...MAGNET, clearance: MAGNET_CLEARANCE } : null,
        wall: printer.usualWall,
      });
    case 'sectors':
      return growthSectors(bench, shape, scale, { by: body.by, gap: body.gap ?? printer.freeClearance }, isSound);
    case 'skins': {
      const { parts, remarks } = colouredSkins(shape, scale, { depth: body.depth ?? printer.usualWall });
      return { parts, remarks, warnings: [] };
    }
    case 'units': {
      const pins = { ...PIN, clearance: printer.rod.clearance, wall: printer.usualWall };
      return asymmetricUnits(bench, shape, scale, { gap: body.gap ?? printer.freeClearance, pins });
    }
  }
}

/** Where a filament print asks for drain holes all the same. */
const USUAL_DRAINS: PrinterProfile['drains'] = { diameter: 3.5, count: 2 };

/** The asked face's plane through the centre; else a mirror plane, else the plane of the largest face. */
function cutNormal(shape: ClosedShape, face: (BodyPlan & { kind: 'halves' })['plane']) {
  const { metric, group } = shape.crystal;
  if (face) return faceNormal(metric, face);
  const [mirror] = symmetryElements(group).mirrorPlanes;
  if (mirror) return faceNormal(metric, mirror.plane);
  const { faces, area } = shape.measures;
  const largest = faces.reduce((best, plane, i) => (area[plane]! > area[faces[best]!]! ? i : best), 0);
  return facePlanes(shape, 1)[largest]!.normal;
}
