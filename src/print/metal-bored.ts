import type { Manifold } from 'manifold-3d';
import type { AxesPlan } from '../recipe/crystal.ts';
import type { PrinterProfile } from '../recipe/schema.ts';
import { axisLines } from '../rods/axis-ends.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { boreForMetal } from './bores/metal-rods.ts';
import type { Workbench } from './kit.ts';

/** Bores along the chosen axes for bought metal rod, by the printer's fits. @throws ObjectError */
export function boredForMetal(
  bench: Workbench,
  body: Manifold,
  shape: ClosedShape,
  scale: number,
  { orders, directions, fit, diameter, reach, depth }: AxesPlan,
  { rod: { press, slide }, usualWall }: PrinterProfile,
) {
  const { body: solid, remarks } = boreForMetal(bench, body, shape, scale, {
    lines: axisLines(shape.crystal, { orders, directions }),
    diameter,
    fit: fit === 'slide' ? 'slide' : 'press',
    clearance: { press, slide },
    depth: depth === undefined ? 'through' : { blind: depth },
    wall: usualWall,
    reach,
  });
  return { solid, parts: [], remarks };
}
