import { edges } from '../../polyhedron/measures.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import type { Finding } from '../handling/finding.ts';
import type { Workbench } from '../kit.ts';
import { extentsOf } from '../mesh.ts';
import type { Part } from '../part.ts';
import { fitOnBed } from './bed-fit.ts';
import { narrowestFace } from './face-width.ts';
import { amountOf, printingSeconds } from './mass.ts';
import { overhangArea } from './overhang.ts';
import type { PrintingProfile } from './profile.ts';
import { CONVEX_WIDTH, thinnestWall } from './thickness.ts';

export type PrintingCode = 'bed' | 'overhang' | 'thin-wall' | 'short-edge' | 'narrow-face' | 'material' | 'time';
export type PrintingFinding = Finding<PrintingCode>;

/**
 * What to know before printing: every part, as it lies on the bed, against the printer's profile, and the crystal's
 * smallest edge and face at its size. Only what cannot be printed at all is `refuse`.
 */
export function beforePrinting(
  bench: Workbench,
  parts: readonly Part[],
  shape: ClosedShape,
  scale: number,
  profile: PrintingProfile,
): PrintingFinding[] {
  const ofParts = parts.flatMap((part) => [
    bedFinding(part, profile),
    overhangFinding(part, profile),
    wallFinding(bench, part, profile),
    ...amountFindings(part, profile),
  ]);
  return [...ofParts, edgeFinding(shape, scale, profile), faceFinding(shape, scale, profile)];
}

const DESIGN_GUIDES = 'start value inside the range of published design guides, from the printer profile';

const sizeOf = (values: readonly number[]): string => values.map((value) => value.toFixed(1)).join(' × ');

function bedFinding({ name, mesh }: Part, { bed, name: printer }: PrintingProfile): PrintingFinding {
  const extents = extentsOf(mesh);
  const fit = fitOnBed(mesh, bed);
  const size = `The part "${name}" measures ${sizeOf(extents)} mm`;
  const turned = (): string => {
    if (!fit || (fit.upright === 2 && fit.turn === 0)) return '.';
    const side = fit.upright === 2 ? '' : ` with its ${'xyz'[fit.upright]} axis upright`;
    const turn = fit.turn === 0 ? '' : ` turned by ${fit.turn.toFixed(0)}°`;
    return ` only${side}${turn}: turn it so in the slicer.`;
  };
  return {
    code: 'bed',
    severity: fit ? (turned() === '.' ? 'note' : 'warning') : 'refuse',
    part: name,
    measured: Math.max(...extents),
    figure: Math.max(...bed),
    unit: 'mm',
    source: 'the printer profile; right-angle turns, each with every turn on the bed',
    text: fit
      ? `${size} and fits the ${sizeOf(bed)} mm of "${printer}"${turned()}`
      : `${size} and does not fit the ${sizeOf(bed)} mm of "${printer}" however it is turned: ` +
        'make it smaller, cut it into halves, or choose another printer.',
  };
}

/** Overhangs of less than this in all, mm², as under letters, bridge by themselves (common practice). */
const SPECKS = 25;

function overhangFinding({ name, mesh }: Part, { overhang }: PrintingProfile): PrintingFinding {
  const level = -mesh.positions.reduce((low, v, i) => (i % 3 === 2 ? Math.min(low, v) : low), Number.POSITIVE_INFINITY);
  const area = overhangArea(mesh, [0, 0, -1], level, overhang);
  return {
    code: 'overhang',
    severity: area > SPECKS ? 'warning' : 'note',
    part: name,
    measured: area,
    figure: overhang,
    unit: 'mm²',
    source: `faces that lean more than ${overhang}° from the vertical; ${DESIGN_GUIDES}`,
    text:
      area > SPECKS
        ? `${(area / 100).toFixed(1)} cm² of the part "${name}" lean more than ${overhang}° from the vertical: ` +
          'print it with support, or cut it into halves that lie flat.'
        : `${area > 0 ? 'No more than specks' : 'Nothing'} of the part "${name}" leans more than ${overhang}° from the vertical: it prints without support.`,
  };
}

function wallFinding(
  bench: Workbench,
  { name, mesh, surfaces }: Part,
  { wall, usualWall, feature }: PrintingProfile,
): PrintingFinding {
  const fine = surfaces.findIndex((surface) => surface.fine);
  const { thinnest, how } = thinnestWall(bench, mesh, fine);
  const base = {
    code: 'thin-wall',
    part: name,
    measured: thinnest,
    unit: 'mm',
    source: `${how}; ${DESIGN_GUIDES}`,
  } as const;
  const told = `The thinnest place of the part "${name}" is about ${thinnest.toFixed(2)} mm`;
  if (thinnest < wall - ROUNDING)
    return {
      ...base,
      // Rays measure at samples and may meet a wedge near its edge; a convex body's width is exact.
      severity: thinnest < feature && how === CONVEX_WIDTH ? 'refuse' : 'warning',
      figure: wall,
      text: `${told}, below the ${wall} mm that print at all: make the wall, the rod or the model thicker.`,
    };
  if (thinnest < usualWall - ROUNDING)
    return {
      ...base,
      severity: 'warning',
      figure: usualWall,
      text: `${told}, below the ${usualWall} mm that are advised: it may break; make it thicker.`,
    };
  return { ...base, severity: 'note', figure: usualWall, text: `${told}; ${usualWall} mm are advised.` };
}

/** Millimetres; single precision of the library. */
const ROUNDING = 1e-3;

function amountFindings({ name, mesh, placed }: Part, { material, speed }: PrintingProfile): PrintingFinding[] {
  const { grams, solidGrams, shellShare, deposited } = amountOf(mesh, material);
  const { layers, seconds } = printingSeconds(deposited, extentsOf(mesh)[2], speed);
  const each = placed.length > 1 ? ` each, ${placed.length} of them` : '';
  const percent = (share: number): string => `${Math.round(100 * share)} %`;
  const shares = `the shell's share w = ${percent(shellShare)} and infill f = ${percent(material.infill)}`;
  const share = `V·(w + f·(1 − w)) with ${shares}`;
  const flow = speed.flow === null ? '' : `${(deposited / 1000).toFixed(1)} cm³ at ${speed.flow} mm³/s and `;
  return [
    {
      code: 'material',
      severity: 'note',
      part: name,
      measured: grams,
      figure: null,
      unit: 'g',
      source: `volume × ${material.density} g/cm³; ${share} (common practice)`,
      text:
        `The part "${name}" takes about ${grams.toFixed(1)} g of ${material.name}${each}, ` +
        `${solidGrams.toFixed(1)} g if filled; ${share}.`,
    },
    {
      code: 'time',
      severity: 'note',
      part: name,
      measured: seconds / 60,
      figure: null,
      unit: 'min',
      source: 'material over flow plus time per layer (common practice); without heating, supports and washing',
      text:
        `The part "${name}" prints in roughly ${durationOf(seconds)}${each}: ${flow}` +
        `${layers} layers of ${speed.layer} mm at ${speed.perLayer} s. Only the slicer knows better.`,
    },
  ];
}

function durationOf(seconds: number): string {
  const minutes = Math.max(1, Math.round(seconds / 60));
  if (minutes < 60) return `${minutes} min`;
  return `${Math.floor(minutes / 60)} h ${minutes % 60} min`;
}

function edgeFinding({ solid, measures }: ClosedShape, scale: number, profile: PrintingProfile): PrintingFinding {
  const lengths = edges(solid, measures).map(({ length }) => length * scale);
  return featureFinding('short-edge', lengths, profile, (least, below, feature) => {
    return `The crystal's shortest edge is ${least} mm${lost(below, 'edge', feature)}`;
  });
}

function faceFinding(shape: ClosedShape, scale: number, profile: PrintingProfile): PrintingFinding {
  const widths = shape.measures.faces.map((face) => narrowestFace(shape, face) * scale);
  return featureFinding('narrow-face', widths, profile, (least, below, feature) => {
    return `The crystal's narrowest face is ${least} mm wide${lost(below, 'face', feature)}`;
  });
}

/** The least of some sizes, and how many do not come out in print. */
function featureFinding(
  code: 'short-edge' | 'narrow-face',
  sizes: readonly number[],
  { feature }: PrintingProfile,
  text: (least: string, below: number, feature: number) => string,
): PrintingFinding {
  const least = sizes.reduce((low, size) => Math.min(low, size), Number.POSITIVE_INFINITY);
  const below = sizes.filter((size) => size < feature).length;
  return {
    code,
    severity: below > 0 ? 'warning' : 'note',
    part: null,
    measured: least,
    figure: feature,
    unit: 'mm',
    source: DESIGN_GUIDES,
    text: text(least.toFixed(2), below, feature),
  };
}

function lost(below: number, what: string, feature: number): string {
  if (below === 0) return `; ${feature} mm come out in print.`;
  const which = `${below} ${what}${below === 1 ? ' is' : 's are'} below the ${feature} mm`;
  return `; ${which} that come out in print: make the model larger, or move the face's distance.`;
}
