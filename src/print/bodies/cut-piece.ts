import { reciprocalLength } from '../../crystal/cell.ts';
import { commensurateOffsets, doubleOffset, type Offset } from '../../polyhedron/offset.ts';
import { loosePlanes } from '../../polyhedron/planes.ts';
import { intersect } from '../../polyhedron/solid.ts';
import type { ClosedShape } from '../../shape/shape.ts';
import { dot, type Vector, vectorAt } from '../vectors.ts';
import { type FacePolygon, faceMesh } from './face-mesh.ts';

/** A half-space `normal · x ≤ distance`: Cartesian unit normal, millimetres. */
export interface Cut {
  readonly normal: Vector;
  readonly distance: number;
}

/** A convex piece of a crystal: its corners in millimetres, and its faces as cycles of them, seen from outside. */
export interface Piece {
  readonly corners: Float64Array;
  readonly faces: readonly PieceFace[];
}

export interface PieceFace extends FacePolygon {
  /** Plane number of a face of the crystal; for the i-th cut the number of planes plus i. */
  readonly plane: number;
}

/**
 * What some half-spaces leave of a crystal, by the exact kernel in the crystal's own indices, so that cuts through
 * corners and edges which symmetry prescribes meet them truly. Null when nothing is left.
 * @param only these faces of the crystal bound the piece; by default all that appear
 */
export function cutPiece(
  shape: ClosedShape,
  scale: number,
  cuts: readonly Cut[],
  only: readonly number[] = shape.measures.faces,
): Piece | null {
  const { planes } = shape.solid;
  const rows = [
    ...only.map((plane) => vectorAt(planes.normals, plane)),
    ...cuts.map(({ normal }) => indexRow(shape, normal)),
  ];
  const families = Math.max(0, ...planes.offsets.map(({ family }) => family));
  const offsets: Offset[] = [
    ...only.map((plane) => planes.offsets[planes.form[plane]!]!),
    ...cuts.map(({ distance, normal }, i) =>
      cutOffset(shape, normal, rows[only.length + i]!, distance / scale, families + 1 + i),
    ),
  ];
  return solve(shape, scale, rows, offsets, [...only, ...cuts.map((_, i) => planes.form.length + i)]);
}

/**
 * What remains of a crystal when every face that it shows is moved in, millimetres. A face that does not show cannot
 * come to show: its normal is a sum of the normals at the corner it passes, with weights that add up to 1 or more, so it
 * gains on that corner. Null when nothing remains.
 */
export function insetPiece(shape: ClosedShape, scale: number, by: number): Piece | null {
  const { crystal, solid, measures } = shape;
  const offsets = commensurateOffsets(
    crystal.forms.map(({ form, distance }) => (distance - by / scale) * reciprocalLength(crystal.metric, form.indices)),
  );
  return solve(
    shape,
    scale,
    measures.faces.map((plane) => vectorAt(solid.planes.normals, plane)),
    measures.faces.map((plane) => offsets[solid.planes.form[plane]!]!),
    measures.faces,
  );
}

/** @param numbers what each plane is to be called */
function solve(
  shape: ClosedShape,
  scale: number,
  rows: readonly Vector[],
  offsets: readonly Offset[],
  numbers: readonly number[],
): Piece | null {
  const solid = intersect(loosePlanes(Float64Array.from(rows.flat()), offsets));
  if (solid.state !== 'bounded') return null;
  const faces = numbers.flatMap((plane, at): PieceFace[] => {
    const corners = Array.from(solid.corner.subarray(solid.start[at], solid.start[at + 1]));
    return corners.length === 0 ? [] : [{ plane, corners }];
  });
  return tidy({ corners: toMillimetres(shape, solid.vertices, scale), faces });
}

/** The same piece as a mesh; `surfaceOf` gives each plane's surface. */
export const pieceMesh = ({ corners, faces }: Piece, surfaceOf: (plane: number) => number) =>
  faceMesh(corners, faces, (face) => surfaceOf(face.plane));

/** Volume of a convex piece, mm³. */
export function pieceVolume({ corners, faces }: Piece): number {
  let sixfold = 0;
  for (const { corners: cycle } of faces)
    for (let i = 1; i + 1 < cycle.length; i++) {
      const [a, b, c] = [cycle[0]!, cycle[i]!, cycle[i + 1]!].map((v) => vectorAt(corners, v)) as [
        Vector,
        Vector,
        Vector,
      ];
      sixfold +=
        a[0] * (b[1] * c[2] - b[2] * c[1]) + a[1] * (b[2] * c[0] - b[0] * c[2]) + a[2] * (b[0] * c[1] - b[1] * c[0]);
    }
  return sixfold / 6;
}

/** A plane's row in the basis of the face indices: `row · x = |row|* distance`. */
function indexRow({ crystal: { metric } }: ClosedShape, normal: Vector): Vector {
  const [r0, r1, r2] = metric.frame;
  const row = ([0, 1, 2] as const).map((j) => r0[j] * normal[0] + r1[j] * normal[1] + r2[j] * normal[2]);
  return simplified([row[0]!, row[1]!, row[2]!]);
}

/** Rounding is no reason to lie beside a lattice plane or a zone: ratios near whole numbers are made so. */
function simplified(row: Vector): Vector {
  const largest = Math.max(...row.map(Math.abs));
  for (let multiple = 1; multiple <= LARGEST_INDEX; multiple++) {
    const scaled = row.map((value) => (value / largest) * multiple);
    if (scaled.every((value) => Math.abs(value - Math.round(value)) < NEAR)) {
      const [h, k, l] = scaled.map((value) => Math.round(value) + 0);
      return [h!, k!, l!];
    }
  }
  const out = row.map((value) => (Math.abs(value) < NEAR * largest ? 0 : value));
  for (let i = 1; i < 3; i++)
    for (let j = 0; j < i; j++)
      for (const factor of [1, -1, 2, -2, 0.5, -0.5])
        if (out[j] !== 0 && Math.abs(out[i]! - factor * out[j]!) < NEAR * largest) out[i] = factor * out[j]!;
  return [out[0]!, out[1]!, out[2]!];
}

const NEAR = 1e-12;
const LARGEST_INDEX = 24;

function cutOffset({ crystal }: ClosedShape, normal: Vector, row: Vector, distance: number, family: number): Offset {
  if (distance === 0) return { ...doubleOffset(0, 0), multiple: 0 };
  const { reciprocalFrame: m } = crystal.metric;
  const cartesian: Vector = [dot(m[0], row), dot(m[1], row), dot(m[2], row)];
  return doubleOffset(distance * dot(cartesian, normal), family);
}

function toMillimetres({ crystal: { metric } }: ClosedShape, points: Float64Array, scale: number): Float64Array {
  const out = new Float64Array(points.length);
  for (let at = 0; at < points.length; at += 3) {
    const x = vectorAt(points, at / 3);
    out.set(
      metric.frame.map((row) => dot(row, x) * scale),
      at,
    );
  }
  return out;
}

/** Corners closer than this, millimetres, are one: a file in single precision could not keep them apart. */
const ONE_CORNER = 1e-4;

/** Draws corners together that rounding alone has parted, and drops faces that have no width left. */
function tidy({ corners, faces }: Piece): Piece | null {
  const one = new Map<number, number>();
  const find = (v: number): number => (one.has(v) ? find(one.get(v)!) : v);
  for (const { corners: cycle } of faces)
    cycle.forEach((v, i) => {
      const [a, b] = [find(v), find(cycle[(i + 1) % cycle.length]!)];
      const [p, q] = [vectorAt(corners, a), vectorAt(corners, b)];
      if (a !== b && Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]) < ONE_CORNER)
        one.set(Math.max(a, b), Math.min(a, b));
    });
  const kept = faces
    .map(({ plane, corners: cycle }) => ({
      plane,
      corners: cycle.map(find).filter((v, i, all) => v !== all[(i + 1) % all.length]),
    }))
    .filter(({ corners: cycle }) => cycle.length > 2);
  return kept.length < 4 ? null : { corners, faces: kept };
}
