import { USUAL_SIZE } from '../recipe/print-plan.ts';
import { millimetresPerUnit as unitFor } from '../shape/scale.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { type FigureOptions, figure, type LineWeights } from './figure.ts';
import { heading } from './heading.ts';
import { heightLine } from './height-line.ts';
import { legend } from './legend.ts';
import { lineText } from './line-text.ts';
import { FAINT, PAPER } from './palette.ts';
import { extentOf, fitInto, place } from './project.ts';
import type { DrawnRods } from './rods.ts';
import { scaleBar } from './scale-bar.ts';
import { svgPage } from './svg.ts';
import type { Point } from './vector.ts';
import type { View } from './view.ts';
import { viewWords } from './view-words.ts';

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
  /** The view in words below the picture, such as "along c"; by default where there is a title. */
  readonly viewCaption?: boolean;
  /**
   * Numbers of the forms that only close what the others leave open, in the crystal's order: drawn without a tint, and
   * called helper faces in the legend. None by default.
   */
  readonly helpers?: readonly number[];
  /** The forms below; true by default. */
  readonly legend?: boolean;
  /** Of the page, pixels; 640 by default. */
  readonly width?: number;
  /** `paper` by default, or transparent. */
  readonly ground?: 'paper' | 'none';
}

const USUAL_WIDTH = 640;
const MARGIN = 40;
/** From the top of the page to the top of a title's first line. */
const ABOVE_TITLE = 27;
/** Strip below the picture for the scale bar and the name of the view. */
const STRIP = 46;
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
  const { width = USUAL_WIDTH, ground = 'paper', style = 'tinted', helpers = [] } = options;
  check(options, width);
  const picture = figure(shape, figureOptions(shape, options));
  const title = options.title === false ? null : heading(shape, width - 2 * MARGIN);
  const left = MARGIN + (options.height ? HEIGHT_COLUMN : 0);
  const top = title ? ABOVE_TITLE + title.height + GAP : MARGIN;
  const room = { width: width - left - MARGIN, height: 0.85 * width };
  const extent = extentOf(picture.bounds);
  const height = Math.min(room.height, (extent.height * room.width) / extent.width);
  const placement = fitInto(picture.bounds, { x: left, y: top, width: room.width, height });

  const scale = options.millimetresPerUnit;
  const bar = scale !== undefined && options.scaleBar !== false;
  const viewCaption = options.viewCaption ?? title !== null;
  const forms = options.legend === false ? null : legend(shape, width - 2 * MARGIN, { style, helpers });
  const underPicture = top + height + (bar || viewCaption ? STRIP : 0);
  const bottom = forms ? underPicture + GAP + forms.height : underPicture;
  const strip = top + height + STRIP - 10;
  const upright = options.height
    ? heightLine(shape, picture.frame, placement, {
        x: place(placement, picture.bounds.low)[0] - 22,
        millimetresPerUnit: scale!,
      })
    : null;
  const page = {
    width,
    height: Math.round(bottom + MARGIN),
    title: spokenTitle(shape),
    ground: ground === 'paper' ? PAPER : null,
  };
  return svgPage(page, [
    title ? title.paint([MARGIN, ABOVE_TITLE]) : '',
    upright?.svg ?? '',
    picture.paint(placement, upright?.onBody),
    viewCaption ? caption(shape, options.view, [MARGIN, strip]) : '',
    bar ? scaleBar([width - MARGIN, strip], placement.scale / scale, 0.28 * width) : '',
    forms ? forms.paint(MARGIN, underPicture + GAP) : '',
  ]);
}

const caption = ({ crystal }: ClosedShape, view: View = 'general', at: Point): string =>
  lineText(viewWords(view, crystal.group.axes), { at, size: 13, fill: FAINT });

const spokenTitle = ({ crystal: { title, group } }: ClosedShape): string =>
  `${title}, point group ${group.hermannMauguin}`;

function check({ height, millimetresPerUnit }: DrawOptions, width: number): void {
  if (!(width >= 200 && width <= 20_000))
    throw new RangeError(`A drawing ${width} pixels wide cannot be made; choose 200 to 20000.`);
  if (millimetresPerUnit === undefined) {
    if (height) throw new RangeError('A height can be stated only for an object with a size: give millimetresPerUnit.');
  } else if (!(millimetresPerUnit > 0 && millimetresPerUnit < Number.POSITIVE_INFINITY))
    throw new RangeError(`millimetresPerUnit is ${millimetresPerUnit}; it must be a positive number.`);
}

function figureOptions(shape: ClosedShape, options: DrawOptions): FigureOptions {
  const { view = 'general', style = 'tinted', hidden = 'thin', labels = 'none', helpers = [], axes } = options;
  const millimetresPerUnit = options.millimetresPerUnit ?? unitFor(shape, USUAL_SIZE);
  const rods = axes ? { laid: axes, millimetresPerUnit } : null;
  return { view, style, hidden, labels, helpers, weights: WEIGHTS, rods };
}
