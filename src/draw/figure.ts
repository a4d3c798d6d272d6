import { faceCorners } from '../polyhedron/measures.ts';
import { convexHull } from '../polyhedron/polygon.ts';
import { facePlanes } from '../shape/face-planes.ts';
import type { ClosedShape } from '../shape/shape.ts';
import { interrupt } from './hidden-lines.ts';
import { type FaceLabel, faceLabels, type LabelKind, labelCorners, labelText } from './labels.ts';
import { INK, PAPER, shaded, tintOf } from './palette.ts';
import { type Bounds, boundsOf, type Placement, place, projectAll } from './project.ts';
import { type DrawnRods, type RodPiece, rodPieces } from './rods.ts';
import { closedPath, element, linePath, openPath } from './svg.ts';
import { dot, type Point, unit, type Vector, vectorAt } from './vector.ts';
import { type View, type ViewFrame, viewFrame } from './view.ts';
import { look, type Sight } from './visible.ts';

/** Line widths in pixels. */
export interface LineWeights {
  readonly outline: number;
  readonly inner: number;
  readonly hidden: number;
}

export interface FigureOptions {
  readonly view: View;
  /** `tinted`: a colour for each form, shaded. `lines`: lines on paper. */
  readonly style: 'tinted' | 'lines';
  /** Edges behind the body: thin and dashed, or left out. */
  readonly hidden: 'thin' | 'none';
  readonly labels: LabelKind | 'none';
  readonly weights: LineWeights;
  /** Numbers of the forms that only close what the others leave open; they get no tint. */
  readonly helpers: readonly number[];
  readonly rods: { readonly laid: DrawnRods; readonly millimetresPerUnit: number } | null;
}

/** A crystal seen from a direction, ready to be put on a page. */
export interface Figure {
  /** Of body and rods, in the crystal's unit of length. */
  readonly bounds: Bounds;
  readonly frame: ViewFrame;
  /** The picture as SVG elements. */
  paint(placement: Placement, onBody?: OnBody): string;
}

/** What is drawn on the body but under rods that stand before it. */
export interface OnBody {
  readonly svg: string;
  /** Convex places on the page that labels keep clear of. */
  readonly places: readonly (readonly Point[])[];
}

/** To the light, in the directions of the page: from the upper left, and from the front. */
const LIGHT: Vector = unit([-0.45, 0.6, 0.75]);

export function figure(shape: ClosedShape, options: FigureOptions): Figure {
  const frame = viewFrame(options.view, shape.crystal.metric);
  const sight = look(shape, frame.toward);
  const vertices = projectAll(frame, shape.measures.positions);
  const rods = piecesInUnits(shape, options.rods, frame);
  return {
    bounds: boundsOf([...vertices, ...rods.flatMap(({ outline }) => outline)]),
    frame,
    paint: (placement, onBody) => {
      const at = vertices.map((point) => place(placement, point));
      const placed = rods.map((piece) => moved(piece, (point) => place(placement, point)));
      const before = placed.filter(({ layer }) => layer === 'before');
      const labels = labelsOf(shape, sight, at, [...obstaclesOf(before), ...(onBody?.places ?? [])], options);
      return [
        ...placed.filter(({ layer }) => layer === 'behind').map(rodPath),
        ...paintFaces(shape, sight, frame, at, options),
        ...paintEdges(sight, at, labels.map(labelCorners), options),
        ...(onBody ? [onBody.svg] : []),
        ...labels.map(labelText),
        ...before.map(rodPath),
      ]
        .filter((part) => part !== '')
        .join('\n');
    },
  };
}

function piecesInUnits(shape: ClosedShape, rods: FigureOptions['rods'], frame: ViewFrame): RodPiece[] {
  if (!rods) return [];
  const unitsPerMillimetre = 1 / rods.millimetresPerUnit;
  return rodPieces(rods.laid, facePlanes(shape, rods.millimetresPerUnit), frame).map((piece) =>
    moved(piece, ([x, y]) => [x * unitsPerMillimetre, y * unitsPerMillimetre]),
  );
}

const moved = (piece: RodPiece, by: (point: Point) => Point): RodPiece => ({
  ...piece,
  outline: piece.outline.map(by),
  rims: piece.rims.map((rim) => rim.map(by)),
});

const outlineOf = ({ solid }: ClosedShape, face: number, at: readonly Point[]): Point[] =>
  faceCorners(solid, face).map((vertex) => at[vertex]!);

function colourOf(
  { solid, measures }: ClosedShape,
  face: number,
  frame: ViewFrame,
  { style, helpers }: FigureOptions,
): string {
  if (style === 'lines') return PAPER;
  const normal = vectorAt(measures.normals, face);
  const seen: Vector = [dot(frame.right, normal), dot(frame.up, normal), dot(frame.toward, normal)];
  return shaded(tintOf(solid.planes.form[face]!, helpers), dot(seen, LIGHT));
}

/** Faces of a convex body do not overlap, so their order does not matter. */
function paintFaces(
  shape: ClosedShape,
  { front }: Sight,
  frame: ViewFrame,
  at: readonly Point[],
  options: FigureOptions,
): string[] {
  return front.map((face) =>
    element('path', { d: closedPath(outlineOf(shape, face, at)), fill: colourOf(shape, face, frame, options) }),
  );
}

/** @param gaps where labels stand: edges behind the body are interrupted there, those in front do not come near */
function paintEdges(
  { edges, silhouette }: Sight,
  at: readonly Point[],
  gaps: readonly (readonly Point[])[],
  { hidden, weights }: FigureOptions,
): string[] {
  const linesOf = (kind: string) =>
    edges.filter((edge) => edge.kind === kind).map(({ vertices: [p, q] }) => [at[p]!, at[q]!] as const);
  const stroke = { fill: 'none', stroke: INK, 'stroke-linejoin': 'round', 'stroke-linecap': 'round' };
  const behind = hidden === 'thin' ? linePath(interrupt(linesOf('hidden'), gaps)) : '';
  const inner = linePath(linesOf('inner'));
  const dash = {
    'stroke-linecap': 'butt',
    'stroke-width': weights.hidden,
    'stroke-dasharray': `${4 * weights.hidden} ${4 * weights.hidden}`,
    'stroke-opacity': 0.6,
  };
  return [
    behind === '' ? '' : element('path', { d: behind, ...stroke, ...dash }),
    inner === '' ? '' : element('path', { d: inner, ...stroke, 'stroke-width': weights.inner }),
    element('path', { d: closedPath(silhouette.map((v) => at[v]!)), ...stroke, 'stroke-width': weights.outline }),
  ];
}

const obstaclesOf = (rods: readonly RodPiece[]): Point[][] =>
  rods.filter(({ kind }) => kind === 'rod' || kind === 'side').map(({ outline }) => convexHull(outline));

function labelsOf(
  shape: ClosedShape,
  { front }: Sight,
  at: readonly Point[],
  obstacles: readonly (readonly Point[])[],
  { labels }: FigureOptions,
): FaceLabel[] {
  if (labels === 'none') return [];
  const faces = front.map((face) => ({ face, outline: outlineOf(shape, face, at) }));
  return faceLabels(shape, labels, faces, obstacles);
}

const ROD_COLOURS: Readonly<Record<RodPiece['kind'], string>> = {
  rod: '#4a5165',
  side: '#5d6478',
  symbol: INK,
  hollow: PAPER,
};

/** Rods and plates get an ink rim, so that a plate seen edge-on stays a line. */
function rodPath({ kind, outline, rims }: RodPiece): string {
  const fill = ROD_COLOURS[kind];
  // A stroke of the filling's own colour closes the hairline between two parts of one rod.
  const part = element('path', { d: closedPath(outline), fill, stroke: fill, 'stroke-width': 0.5 });
  if (rims.length === 0) return part;
  const d = rims.map(openPath).join('');
  return part + element('path', { d, fill: 'none', stroke: INK, 'stroke-linejoin': 'round' });
}
