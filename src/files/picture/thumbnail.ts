import type { Mesh } from '../../print/mesh.ts';
import { channels } from './colour.ts';
import { drawnEdges, flatFaces, type SeenSurface } from './flat-faces.ts';
import { encodePng } from './png.ts';
import { Raster } from './raster.ts';

export interface PictureObject {
  /** Millimetres, Z up. */
  readonly mesh: Mesh;
  readonly surfaces: readonly SeenSurface[];
}

export interface ThumbnailOptions {
  /** From the object at the viewer, who sees by parallel rays and has z upright; any length. */
  readonly toward: readonly [number, number, number];
  /** Pixels of a side; 256 unless told. */
  readonly size?: number;
  /** Colour of the ground, #RRGGBB; see-through unless told. */
  readonly ground?: string;
  /** Colour of the edges, #RRGGBB. */
  readonly ink?: string;
}

const INK = '#1D2333';
/** Samples a pixel in each direction. */
const FINE = 2;
/** Share of the picture left free on each side. */
const MARGIN = 0.05;
/** Half the width of an edge line in a picture of 256 pixels; in larger ones it grows with the square root. */
const LINE = 0.8;
/** Where the light comes from, in the viewer's frame: right, up, toward. */
const LIGHT = [-0.42, 0.56, 0.71] as const;

type Vector = readonly [number, number, number];

/** A square PNG picture of the objects, filling it, with faces in their colours and edges as lines. Deterministic. */
export function thumbnailPng(objects: readonly PictureObject[], options: ThumbnailOptions): Uint8Array {
  const { size = 256, ground, ink = INK } = options;
  const frame = frameToward(options.toward);
  const seen = objects.map(({ mesh }) => project(mesh.positions, frame));
  const side = FINE * size;
  const fit = fitInto(seen, side);
  const raster = new Raster(side);
  const faces = objects.map(({ mesh }) => flatFaces(mesh));
  objects.forEach(({ mesh, surfaces }, i) => {
    const points = seen[i]!.map(fit);
    const { order, faceOf, normals } = faces[i]!;
    for (const t of order) {
      const n = 3 * faceOf[t]!;
      const normal: Vector = [normals[n]!, normals[n + 1]!, normals[n + 2]!];
      if (dot(normal, frame.toward) <= 0) continue;
      const colour = surfaces[mesh.surface?.[t] ?? 0]?.colour ?? INK;
      raster.triangle(points, mesh.triangles, 3 * t, shade(channels(colour), normal, frame));
    }
  });
  const line = channels(ink);
  objects.forEach(({ surfaces }, i) => {
    const points = seen[i]!.map(fit);
    const { creases, sides } = drawnEdges(faces[i]!, surfaces);
    const { normals } = faces[i]!;
    const away = (face: number): boolean =>
      dot([normals[3 * face]!, normals[3 * face + 1]!, normals[3 * face + 2]!], frame.toward) <= 0;
    for (let k = 0; k < creases.length; k += 2)
      if (!away(sides[k]!) || !away(sides[k + 1]!))
        raster.line(points, creases[k]!, creases[k + 1]!, FINE * LINE * Math.sqrt(size / 256), line);
  });
  return encodePng(raster.reduced(FINE, ground === undefined ? undefined : channels(ground)), size, size);
}

interface Frame {
  readonly right: Vector;
  readonly up: Vector;
  readonly toward: Vector;
}

function frameToward(direction: Vector): Frame {
  const toward = unit(direction);
  const upright = Math.hypot(toward[0], toward[1]) > 1e-9;
  const right: Vector = upright ? unit([-toward[1], toward[0], 0]) : [0, 1, 0];
  const [a, b] = [toward, right];
  const up: Vector = [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
  return { right, up, toward };
}

/** To the right, upwards and toward the viewer, millimetres, three numbers a vertex. */
function project(p: Float64Array, { right, up, toward }: Frame): Float64Array {
  const seen = new Float64Array(p.length);
  for (let i = 0; i < p.length; i += 3) {
    const at: Vector = [p[i]!, p[i + 1]!, p[i + 2]!];
    seen[i] = dot(at, right);
    seen[i + 1] = dot(at, up);
    seen[i + 2] = dot(at, toward);
  }
  return seen;
}

/** Maps projected coordinates, by their index, to samples: x to the right, y downwards, depth greater when nearer. */
function fitInto(seen: readonly Float64Array[], side: number): (value: number, index: number) => number {
  const low: [number, number] = [Infinity, Infinity];
  const high: [number, number] = [-Infinity, -Infinity];
  for (const points of seen)
    for (let i = 0; i < points.length; i++) {
      const axis = i % 3;
      if (axis !== 0 && axis !== 1) continue;
      low[axis] = Math.min(low[axis], points[i]!);
      high[axis] = Math.max(high[axis], points[i]!);
    }
  const scale = (side * (1 - 2 * MARGIN)) / Math.max(high[0] - low[0], high[1] - low[1], 1e-9);
  const [x, y] = [(low[0] + high[0]) / 2, (low[1] + high[1]) / 2];
  return (value, index) => {
    if (index % 3 === 0) return side / 2 + scale * (value - x);
    return index % 3 === 1 ? side / 2 - scale * (value - y) : scale * value;
  };
}

/** Lighter where turned into the light, darker where turned away; gentle, so that colours stay themselves. */
function shade(colour: Vector, normal: Vector, { right, up, toward }: Frame): Vector {
  const lit = dot([dot(normal, right), dot(normal, up), dot(normal, toward)], LIGHT);
  const change = (value: number): number =>
    lit > 0.6 ? value + (1 - value) * 0.55 * (lit - 0.6) : value * (1 - 0.3 * (0.6 - lit));
  return [change(colour[0]), change(colour[1]), change(colour[2])];
}

const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

function unit(v: Vector): Vector {
  const length = Math.hypot(...v);
  return [v[0] / length, v[1] / length, v[2] / length];
}
