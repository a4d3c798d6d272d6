import { printSymbol } from '../crystal/symbol.ts';
import { USUAL_SIZE } from '../recipe/print-plan.ts';
import { millimetresPerUnit as unitFor } from '../shape/scale.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { type Figure, type FigureOptions, figure, type LineWeights } from './figure.ts';
import { legend } from './legend.ts';
import { FAINT, PAPER } from './palette.ts';
import { extentOf, fitInto, type Placement, place, project } from './project.ts';
import type { DrawnRods } from './rods.ts';
import { heightLine, scaleBar } from './scale-bar.ts';
import { svgPage } from './svg.ts';
import { layOutSymbol, symbolText, words } from './symbol-text.ts';
import type { View } from './view.ts';

export interface DrawOptions {
  /** `general` by default. */
  readonly view?: View;
  /** `tinted` by default: a colour for each form, shaded; or lines on paper. */
  readonly style?: 'tinted' | 'lines';
  /** Edges behind the body: `thin` and dashed by default, or left out. */
  readonly hidden?: 'thin' | 'none';
  /** On every face that has room: `none` by default. */
  readonly labels?: 'none' | 'letters' | 'indices';
  /** Symmetry axes as rods, laid out for this size; without a size, for a crystal 70 mm long. */
  readonly axes?: DrawnRods;
  /** The object's size; brings a scale bar. */
  readonly millimetresPerUnit?: number;
  /** True by default where there is a size. */
  readonly scaleBar?: boolean;
  /** A line that states the object's height along c; false by default. */
  readonly height?: boolean;
  /** Name, point group and habit above; true by default. */
  readonly title?: boolean;
  /** The forms below; true by default. */
  readonly legend?: boolean;
  /** Of the page, pixels; 640 by default. */
  readonly width?: number;
  /** `paper` by default, or transparent. */
  readonly ground?: 'paper' | 'none';
}

const USUAL_WIDTH = 640;
const MARGIN = 40;
const HEADER = 84;
/** Strip below the picture for the scale bar. */
const BAR_STRIP = 46;
/** Column at the left for the height. */
const HEIGHT_COLUMN = 96;
const GAP = 22;
const WEIGHTS: LineWeights = { outline: 2.4, inner: 1.5, hidden: 0.9 };

/**
 * A crystal as a complete SVG file: orthographic, edges strong or thin by whether they are seen, forms named below.
 * The same crystal and options give the same text.
 * @throws RangeError for a height without a size, a size or width that is not positive, or a view that is no direction
 */
export function drawCrystal(shape: ClosedShape, options: DrawOptions = {}): string {
  const { width = USUAL_WIDTH, ground = 'paper', style = 'tinted' } = options;
  check(options, width);
  const picture = figure(shape, figureOptions(shape, options));
  const left = MARGIN + (options.height ? HEIGHT_COLUMN : 0);
  const top = options.title === false ? MARGIN : HEADER + GAP;
  const room = { width: width - left - MARGIN, height: 0.85 * width };
  const extent = extentOf(picture.bounds);
  const height = Math.min(room.height, (extent.height * room.width) / extent.width);
  const placement = fitInto(picture.bounds, { x: left, y: top, width: room.width, height });

  const bar = options.millimetresPerUnit !== undefined && options.scaleBar !== false;
  const forms = options.legend === false ? null : legend(shape, width - 2 * MARGIN, style);
  const underPicture = top + height + (bar ? BAR_STRIP : 0);
  const bottom = forms ? underPicture + GAP + forms.height : underPicture;
  const page = {
    width,
    height: Math.round(bottom + MARGIN),
    title: spokenTitle(shape),
    ground: ground === 'paper' ? PAPER : null,
  };
  return svgPage(page, [
    options.title === false ? '' : heading(shape),
    picture.paint(placement),
    options.height ? heightOf(shape, picture, placement, options.millimetresPerUnit!) : '',
    bar
      ? scaleBar(
          [width - MARGIN, top + height + BAR_STRIP - 10],
          placement.scale / options.millimetresPerUnit!,
          0.28 * width,
        )
      : '',
    forms ? forms.paint(MARGIN, underPicture + GAP) : '',
  ]);
}

function check({ height, millimetresPerUnit }: DrawOptions, width: number): void {
  if (!(width >= 200 && width <= 20_000))
    throw new RangeError(`A drawing ${width} pixels wide cannot be made; choose 200 to 20000.`);
  if (millimetresPerUnit === undefined) {
    if (height) throw new RangeError('A height can be stated only for an object with a size: give millimetresPerUnit.');
  } else if (!(millimetresPerUnit > 0 && millimetresPerUnit < Number.POSITIVE_INFINITY))
    throw new RangeError(`millimetresPerUnit is ${millimetresPerUnit}; it must be a positive number.`);
}

function figureOptions(shape: ClosedShape, options: DrawOptions): FigureOptions {
  const { view = 'general', style = 'tinted', hidden = 'thin', labels = 'none', axes } = options;
  const millimetresPerUnit = options.millimetresPerUnit ?? unitFor(shape, USUAL_SIZE);
  return { view, style, hidden, labels, weights: WEIGHTS, rods: axes ? { laid: axes, millimetresPerUnit } : null };
}

/** The name, and under it the point group with overbars and what is known besides. */
function heading({ crystal }: ClosedShape): string {
  const { mineral, group } = crystal;
  const symbol = layOutSymbol(printSymbol(group.hermannMauguin));
  const name = nameOf(crystal);
  const rest = mineral ? [...(mineral.habit ? [mineral.habit] : []), subscripts(mineral.formula)] : [group.system];
  const under = { at: [MARGIN, HEADER] as const, size: 17, fill: FAINT };
  if (name === null) {
    return symbolText(symbol, { start: [MARGIN, 52], size: 27 }) + words(rest.join(' · '), under);
  }
  const after = MARGIN + symbol.width * under.size + 7;
  return [
    words(name, { at: [MARGIN, 52], size: 27 }),
    symbolText(symbol, { start: under.at, size: under.size }),
    words(`· ${rest.join(' · ')}`, { ...under, at: [after, HEADER] }),
  ].join('\n');
}

/** Null for a crystal that is known by its point group only. */
function nameOf({ title, mineral, group }: ClosedShape['crystal']): string | null {
  if (mineral && title === `${mineral.name}, ${mineral.habit}`) return mineral.name;
  return title === `Crystal of point group ${group.hermannMauguin}` ? null : title;
}

const spokenTitle = ({ crystal: { title, group } }: ClosedShape): string =>
  `${title}, point group ${group.hermannMauguin}`;

/** Figures after a chemical symbol or a bracket go below the line. */
const subscripts = (formula: string): string =>
  formula.replace(/(?<=[\p{L})\]])\d+/gu, (figures) =>
    figures.replace(/\d/g, (figure) => String.fromCodePoint(0x2080 + Number(figure))),
  );

/** The height along c, at the crystal's left; it is as much foreshortened as c is. */
function heightOf(
  { measures }: ClosedShape,
  { frame, bounds }: Figure,
  placement: Placement,
  millimetresPerUnit: number,
): string {
  const [low, high] = [measures.low[2], measures.high[2]];
  const [x] = place(placement, bounds.low);
  const level = (z: number): number => place(placement, project(frame, [0, 0, z]))[1];
  if (Math.abs(frame.up[2]) < 1e-9) return ''; // seen along c
  return heightLine(x - 22, [level(high), level(low)], (high - low) * millimetresPerUnit);
}
