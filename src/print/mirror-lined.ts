import type { Manifold } from 'manifold-3d';
import { normal } from '../crystal/cell.ts';
import { symmetryElements } from '../crystal/elements.ts';
import type { PlanesPlan } from '../recipe/crystal.ts';
import type { PrinterProfile } from '../recipe/schema.ts';
import type { ClosedShape } from '../shape/shape.ts';
import type { Workbench } from './kit.ts';
import type { SurfaceLine } from './lettering/between-lines.ts';
import { mirrorLines } from './planes/mirror-lines.ts';
import type { Step } from './solid-body.ts';

/** Mirror planes on a body, by the printer's figures for letters: a line is a long stroke. @throws ObjectError */
export function mirrorLined(
  bench: Workbench,
  body: Manifold,
  shape: ClosedShape,
  scale: number,
  planes: PlanesPlan,
  printer: PrinterProfile,
): Step {
  const { relief } = planes;
  const plan = { relief, ...lineSize(planes, printer) };
  const { solid, inlay, remarks } = mirrorLines(bench, body, shape, scale, plan);
  const purpose = 'the mirror planes, as strips in a second colour that lie in the body, printed with it in one job';
  return {
    solid,
    word: `with ${relief} mirror planes`,
    inlay: inlay && { name: 'mirror-planes', purpose, solid: inlay },
    remarks,
  };
}

/** The strips that letters must stay off. */
export const stripsOf = ({ crystal }: ClosedShape, planes: PlanesPlan, printer: PrinterProfile): SurfaceLine[] =>
  symmetryElements(crystal.group).mirrorPlanes.map(({ plane }) => ({
    normal: normal(crystal.metric, plane),
    half: lineSize(planes, printer).width / 2,
  }));

function lineSize({ relief, width, depth }: PlanesPlan, { raised, engraved }: PrinterProfile) {
  const { stroke, depth: usual } = relief === 'raised' ? raised : engraved;
  return { width: width ?? WIDTH * stroke, depth: depth ?? usual };
}

/** Of a line to be found by touch, in the thinnest strokes that print. */
const WIDTH = 2;
