import { parseFace, readOptions } from '../crystal/indices.ts';
import type { PointGroup } from '../crystal/point-group.ts';
import type { BluntPlan, BodyPlan, LettersPlan, PlanesPlan, StandPlan } from './crystal.ts';
import { bounded, under } from './print-plan.ts';
import { type Millimetres, mm, readLength } from './quantity.ts';
import type { BaseInput, BluntInput, BodyInput, FaceInput, LettersInput, PlanesInput, StandInput } from './schema.ts';

/** Rounding when blunting is asked for without a figure: ideal corners then reach at most 0.20 mm into the gauge. */
const USUAL_RADIUS = mm(0.75);

/** @param key of the value, for the error about it; the value may also stand without one */
const lengthOr = <T>(value: number | string | undefined, otherwise: T, key?: string): Millimetres | T => {
  if (value === undefined) return otherwise;
  const read = (): Millimetres => bounded(readLength(value), 'a length');
  return key === undefined ? read() : under(key, read);
};

/** @throws CrystalError, QuantityError */
export function readBody(input: BodyInput, group: PointGroup | undefined): BodyPlan {
  const given = typeof input === 'string' ? { kind: input } : input;
  switch (given.kind) {
    case 'solid':
      return { kind: 'solid' };
    case 'hollow': {
      const { wall, drains = null } = 'wall' in given || 'drains' in given ? given : {};
      return { kind: 'hollow', wall: lengthOr(wall, null, 'wall'), drains };
    }
    case 'frame': {
      const { strut, bead = false } = 'strut' in given || 'bead' in given ? given : {};
      return { kind: 'frame', strut: lengthOr(strut, null, 'strut'), bead };
    }
    case 'halves': {
      const {
        plane,
        offset = 0,
        join = 'dowels',
      } = 'plane' in given || 'offset' in given || 'join' in given ? given : {};
      return { kind: 'halves', plane: plane === undefined ? null : faceOf(plane, group), offset, join };
    }
    case 'sectors': {
      const { by = 'face', gap } = 'by' in given || 'gap' in given ? given : {};
      return { kind: 'sectors', by, gap: gapOf(gap) };
    }
    case 'skins': {
      const { depth } = 'depth' in given ? given : {};
      return { kind: 'skins', depth: lengthOr(depth, null, 'depth') };
    }
    case 'units': {
      const { gap } = 'gap' in given ? given : {};
      return { kind: 'units', gap: gapOf(gap) };
    }
  }
}

/** A gap may be nothing: pieces then fill the crystal exactly. */
const gapOf = (value: number | string | undefined): Millimetres | null =>
  value !== undefined && readLength(value) === 0 ? mm(0) : lengthOr(value, null, 'gap');

const faceOf = (input: FaceInput, group: PointGroup | undefined) =>
  parseFace(Array.isArray(input) ? input : String(input), readOptions(group?.axes ?? 'hexagonal'));

export function readLetters(input: LettersInput): LettersPlan | null {
  if (input === false) return null;
  const { relief = 'engraved', text = 'letters' } = typeof input === 'object' ? input : {};
  return { relief: typeof input === 'string' ? input : relief, text };
}

/** @throws QuantityError */
export function readBlunt(input: BluntInput): BluntPlan | null {
  if (input === false) return null;
  if (typeof input !== 'object')
    return { kind: 'round', radius: lengthOr(input === true ? undefined : input, USUAL_RADIUS) };
  if (input.bevel !== undefined) return { kind: 'bevel', width: lengthOr(input.bevel, USUAL_RADIUS, 'bevel') };
  return { kind: 'round', radius: lengthOr(input.radius, USUAL_RADIUS, 'radius') };
}

/** @throws CrystalError */
export function readStand(input: StandInput, group: PointGroup | undefined): StandPlan | null {
  if (input === false) return null;
  const { text = null, braille = true, qr = null, down, contrast = false } = typeof input === 'object' ? input : {};
  return { text, braille, qr, down: down === undefined ? null : faceOf(down, group), contrast };
}

export const readBase = (input: BaseInput): readonly string[] => (typeof input === 'string' ? [input] : input);

/** @throws QuantityError */
export function readPlanes(input: PlanesInput): PlanesPlan | null {
  if (input === false) return null;
  const { relief = 'engraved', width, depth } = typeof input === 'object' ? input : {};
  return {
    relief: typeof input === 'string' ? input : relief,
    width: lengthOr(width, null, 'width'),
    depth: lengthOr(depth, null, 'depth'),
  };
}
