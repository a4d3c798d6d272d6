import { edges } from '../../polyhedron/measures.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { crystalMesh } from '../body.ts';
import type { Workbench } from '../kit.ts';
import type { Part } from '../part.ts';
import type { BevelledBody, BluntBody } from './bevelled.ts';
import { cornerAxes } from './corner-axis.ts';
import { DEFERRAL, MAGNET, POINT_GAUGE, SHARP_EDGE } from './figures.ts';
import type { Finding } from './finding.ts';
import { fluxIndex, type Magnet, poleFieldOf } from './magnet.ts';
import { GAUGE_LIMIT, pointReach, TRIPS } from './point-gauge.ts';
import { smallPartFindings } from './small-part-findings.ts';

export type HandlingCode = 'blunted' | 'sharp-edges' | 'points' | 'small-part' | 'magnet' | 'defer';
export type HandlingFinding = Finding<HandlingCode>;

export interface HandlingOptions {
  /** The blunted crystal, when it was blunted; else the ideal one is measured. */
  readonly body?: BluntBody | BevelledBody;
  readonly magnets?: readonly Magnet[];
}

/**
 * What a person who hands the model to others should know: measured values beside the standards' figures, never a
 * verdict on safety. Edges and points are those of the crystal's body, small parts those of every connected solid.
 */
export function handlingReport(
  bench: Workbench,
  parts: readonly Part[],
  shape: ClosedShape,
  scale: number,
  { body, magnets = [] }: HandlingOptions = {},
): HandlingFinding[] {
  return [
    ...(body?.remarks ?? []).map(bluntedFinding),
    edgeFinding(shape, body),
    pointFinding(shape, scale, body),
    ...smallPartFindings(bench, parts),
    ...magnets.map(magnetFinding),
    { code: 'defer', severity: 'note', part: null, ...NO_FIGURE, source: 'common practice', text: DEFERRAL },
  ];
}

const NO_FIGURE = { measured: 0, figure: null, unit: '' } as const;

const bluntedFinding = (text: string): HandlingFinding => ({
  code: 'blunted',
  severity: 'note',
  part: 'body',
  ...NO_FIGURE,
  source: 'what was asked for',
  text,
});

const isBevelled = (body: BluntBody | BevelledBody | undefined): body is BevelledBody =>
  body !== undefined && 'solid' in body;

function edgeFinding(shape: ClosedShape, body: BluntBody | undefined): HandlingFinding {
  const measured = isBevelled(body) ? body : shape;
  const angles = edges(measured.solid, measured.measures).map(({ dihedral }) => dihedral);
  const least = angles.reduce((low, angle) => Math.min(low, angle), 180);
  const below = (limit: number): number => angles.filter((angle) => angle < limit - ROUNDING).length;
  const acute = below(SHARP_EDGE.acute);
  const rounded = body && !isBevelled(body) ? ' before they are rounded' : '';
  const advice =
    acute > 0 && !rounded ? ' Edges this acute chip and cut: blunt them, or make no copy for handling.' : '';
  return {
    code: 'sharp-edges',
    severity: advice ? 'warning' : 'note',
    part: 'body',
    measured: least,
    figure: SHARP_EDGE.acute,
    unit: '°',
    source: SHARP_EDGE.source,
    text:
      `The least dihedral angle of the ${angles.length} edges${rounded} is ${least.toFixed(1)}°; ` +
      `${below(SHARP_EDGE.right)} are below ${SHARP_EDGE.right}°, ${acute} below ${SHARP_EDGE.acute}°.${advice}`,
  };
}

/** Degrees; right angles come out of the solver within this. */
const ROUNDING = 1e-6;

function pointFinding(shape: ClosedShape, scale: number, body: BluntBody | undefined): HandlingFinding {
  const own = isBevelled(body) ? cornerAxes(body.measures, body.solid) : [];
  const axes = [...cornerAxes(shape.measures, shape.solid), ...own];
  const { farthest, beyond } = pointReach(body?.mesh ?? crystalMesh(shape, scale), axes);
  const far = farthest >= GAUGE_LIMIT ? `${GAUGE_LIMIT} mm or more` : `${farthest.toFixed(2)} mm`;
  const [first, second] = POINT_GAUGE.slot;
  const advice =
    beyond > 0
      ? ` ${beyond} ${beyond === 1 ? 'corner reaches' : 'corners reach'} beyond that: blunt or round them.`
      : '';
  return {
    code: 'points',
    severity: beyond > 0 ? 'warning' : 'note',
    part: 'body',
    measured: farthest,
    figure: TRIPS,
    unit: 'mm',
    source: `${POINT_GAUGE.source}; calculated for ideal corners held straight in, no substitute for the test`,
    text:
      `The sharpest corner reaches ${far} into the ${first} × ${second} mm slot of the sharp-point gauge, ` +
      `whose feeler is met at ${POINT_GAUGE.setBack} mm and works at ${TRIPS.toFixed(2)} mm.${advice}`,
  };
}

function magnetFinding(magnet: Magnet): HandlingFinding {
  const index = fluxIndex(magnet);
  const field = poleFieldOf(magnet);
  const assumed = magnet.poleField === undefined ? 'assumed' : 'stated';
  return {
    code: 'magnet',
    severity: 'warning',
    part: null,
    measured: index,
    figure: MAGNET.most,
    unit: 'kG²mm²',
    source: MAGNET.source,
    text:
      `A magnet of ${magnet.diameter} × ${magnet.thickness} mm with ${field.toFixed(2)} T (${assumed}) on its pole ` +
      `has a flux index of ${index.toFixed(0)} kG²mm²; the figure for loose or separable magnets is below ` +
      `${MAGNET.most}. Two magnets, or one and a piece of metal, pull together through the bowel wall: after ` +
      'swallowing seek medical help at once. Use a pin, dovetail or bayonet joint instead, or close the pocket with ' +
      'printed plastic; glue alone does not hold a magnet.',
  };
}
