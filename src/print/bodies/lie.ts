import type { Mesh } from '../mesh.ts';
import { ontoBed } from '../part.ts';
import { across, dot, type Vector, vectorAt } from '../vectors.ts';

/** The mesh turned so that a direction points down, and moved to the corner of the bed. */
export function lieOn(mesh: Mesh, down: Vector): Mesh {
  const up: Vector = [-down[0], -down[1], -down[2]];
  const [x, y] = across(up);
  return ontoBed([moved(mesh, [x, y, up])])[0]!;
}

/** The mesh under a linear map, its rows given; a map that turns a left hand into a right one turns the triangles too. */
export function moved(mesh: Mesh, rows: readonly [Vector, Vector, Vector], improper = false): Mesh {
  const positions = new Float64Array(mesh.positions.length);
  for (let at = 0; at < positions.length; at += 3) {
    const point = vectorAt(mesh.positions, at / 3);
    rows.forEach((row, axis) => {
      positions[at + axis] = dot(row, point);
    });
  }
  const triangles = improper
    ? mesh.triangles.map((_, i, all) => all[i % 3 === 0 ? i : i % 3 === 1 ? i + 1 : i - 1]!)
    : mesh.triangles;
  return { ...mesh, positions, triangles };
}
