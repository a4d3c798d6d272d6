import type { Manifold } from 'manifold-3d';
import type { RodPlan } from '../../rods/plan.ts';
import type { Workbench } from '../kit.ts';
import type { Mesh } from '../mesh.ts';
import { rodOutline, terminal, toEnd } from '../rods/solid.ts';
import { apart, length, minus, times, unit, type Vector } from '../vectors.ts';
import { faceMesh } from './face-mesh.ts';
import { frameAlong } from './place.ts';
import type { Skeleton } from './skeleton.ts';

/** Bodies of a frame belong to its first surface. */
const FRAME = 0;

/**
 * A round bar between two points.
 * @param layout which of several ways its facets are to lie
 */
export function strut(bench: Workbench, from: Vector, to: Vector, diameter: number, layout: number): Manifold {
  return laid(bench.solid(barMesh(diameter)), bench, from, to, layout);
}

/** Bars along all edges but those that lie within the balls at their ends. */
export function struts(
  bench: Workbench,
  { edges }: Skeleton,
  { strut: diameter, joint }: { strut: number; joint: number },
  layout: number,
): Manifold[] {
  const bar = bench.solid(barMesh(diameter));
  return edges
    .filter(([a, b]) => Math.hypot(apart(a, b), diameter) > 0.9 * joint)
    .map(([a, b], i) => laid(bar, bench, a, b, i + layout / LAYOUTS));
}

/**
 * A bar of length 1 stretched from point to point. Each bar is turned about itself by another angle: where bars lay
 * alike by symmetry, their sides would meet in the same points but for rounding, which leaves slivers.
 */
function laid(bar: Manifold, bench: Workbench, from: Vector, to: Vector, number: number): Manifold {
  const along = minus(to, from);
  const size = length(along);
  const [cos, sin] = [Math.cos(number + ODD_ANGLE), Math.sin(number + ODD_ANGLE)];
  const stretched = bench.place(bar, [cos, sin, 0, 0, -sin, cos, 0, 0, 0, 0, size, 0, 0, 0, 0, 1]);
  return bench.place(stretched, frameAlong(times(along, 1 / size), from));
}

export function ball(bench: Workbench, at: Vector, diameter: number): Manifold {
  return bench.place(bench.solid(ballMesh(diameter)), frameAlong(poleOf(0), at));
}

/** Balls at the corners; corners that lie almost together share one. */
export function balls(bench: Workbench, corners: readonly Vector[], diameter: number, layout: number): Manifold[] {
  const kept: Vector[] = [];
  for (const corner of corners)
    if (kept.every((other) => apart(other, corner) > SAME_BALL * diameter)) kept.push(corner);
  const one = bench.solid(ballMesh(diameter));
  return kept.map((corner, i) => bench.place(one, frameAlong(poleOf(i + layout / LAYOUTS), corner)));
}

/** In no relation to any symmetry, radians. */
const ODD_ANGLE = 0.11;
/** Layouts turn bars by this part of a radian against each other. */
const LAYOUTS = 7.3;
/** Where the poles of balls point: each elsewhere and off all axes, for the same reason. */
const poleOf = (number: number): Vector =>
  unit([0.4 * Math.cos(number + ODD_ANGLE), 0.4 * Math.sin(number + ODD_ANGLE), 0.94]);

/** In ball diameters: two balls nearer than this are one to the eye, and their seam would be all slivers. */
const SAME_BALL = 0.05;

/** Rods that pass the centre, with their terminals. */
export function throughRods(bench: Workbench, plan: RodPlan): Manifold[] {
  return plan.ends.flatMap(([near, far]) => {
    const shaft = bench.prism([rodOutline(plan.diameter)], -(far.base + far.tip) / 2, (near.base + near.tip) / 2);
    return [
      bench.place(shaft, toEnd(near.end)),
      ...[near, far].map((end) =>
        bench.place(terminal(bench, end.line.symbol, plan, end.base, end.tip), toEnd(end.end)),
      ),
    ];
  });
}

function barMesh(diameter: number): Mesh {
  const ring = girthOf(diameter);
  const count = ring.length;
  const positions = [...ring.map(([x, y]) => [x, y, 0]), ...ring.map(([x, y]) => [x, y, 1])].flat();
  const bottom = ring.map((_, i) => count - 1 - i);
  const top = ring.map((_, i) => count + i);
  const sides = ring.map((_, i) => {
    const next = (i + 1) % count;
    return [i, next, count + next, count + i];
  });
  const faces = [bottom, top, ...sides].map((corners) => ({ corners }));
  return faceMesh(positions, faces, () => FRAME);
}

/** Flat sides may lie this far inside their circle, millimetres; finer ones would take most of the time of a frame. */
const CHORD_ERROR = 0.05;

/** The corners that stand for a circle. */
function girthOf(diameter: number): (readonly [number, number])[] {
  const count = Math.max(16, 4 * Math.ceil(Math.PI / Math.acos(1 - (2 * CHORD_ERROR) / diameter) / 4));
  return Array.from({ length: count }, (_, i) => {
    const angle = (2 * Math.PI * i) / count;
    return [(diameter / 2) * Math.cos(angle), (diameter / 2) * Math.sin(angle)] as const;
  });
}

/** A ball from pole to pole in as many steps as half its girth has; its corners lie on the sphere. */
function ballMesh(diameter: number): Mesh {
  const girth = girthOf(diameter);
  const around = girth.length;
  const rings = around / 2 - 1;
  const positions: number[] = [];
  for (let ring = 1; ring <= rings; ring++) {
    const angle = (Math.PI * ring) / (rings + 1);
    for (const [x, y] of girth)
      positions.push(x * Math.sin(angle), y * Math.sin(angle), (diameter / 2) * Math.cos(angle));
  }
  positions.push(0, 0, diameter / 2, 0, 0, -diameter / 2);
  const [north, south] = [rings * around, rings * around + 1];
  const faces = girth.flatMap((_, i) => {
    const next = (i + 1) % around;
    const bands = Array.from({ length: rings - 1 }, (_, ring) => {
      const [upper, lower] = [ring * around, (ring + 1) * around];
      return [upper + i, lower + i, lower + next, upper + next];
    });
    const last = (rings - 1) * around;
    return [[north, i, next], [south, last + next, last + i], ...bands];
  });
  return faceMesh(
    positions,
    faces.map((corners) => ({ corners })),
    () => FRAME,
  );
}
