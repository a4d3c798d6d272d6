import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { weldFloat32 } from '../../src/files/mesh/weld.ts';
import { writeStl, writeStlText } from '../../src/files/stl/write.ts';
import type { Mesh } from '../../src/print/mesh.ts';
import { cube, octahedron, together, torus, turned, unwelded } from '../files/shapes.ts';
import { ADMESH_ZEROS, canRun } from './programs.ts';

/** What admesh says about a file; it repairs by default and reports what it had to do. */
function report(bytes: Uint8Array): string {
  const folder = mkdtempSync(join(tmpdir(), 'goniolith-admesh-'));
  try {
    const file = join(folder, 'part.stl');
    writeFileSync(file, bytes);
    return execFileSync('admesh', [file], { encoding: 'utf8', timeout: 60_000 });
  } finally {
    rmSync(folder, { recursive: true });
  }
}

const number = (text: string, label: string): number => {
  const found = new RegExp(`${label}\\s*:\\s*(-?[\\d.]+)`).exec(text)?.[1];
  return found === undefined ? Number.NaN : Number(found);
};

describe.runIf(canRun('admesh'))('admesh', () => {
  const hollow = together(cube(10), turned(cube(6, [2, 2, 2])));
  const ring = torus(30.1, 9.7, 60, 40);
  const shapes: [string, Mesh, number, number][] = [
    ['a cube', cube(), 1, 1000],
    ['a cube whose triangles were loose', unwelded(cube(10, [-5, -5, -5])), 1, 1000],
    ['an octahedron (4r³/3)', octahedron(9), 1, 972],
    ['two cubes', together(cube(), cube(5, [20, 0, 0])), 2, 1125],
    ['a hollow cube', hollow, 2, 1000 - 216],
    // the ring's cross-section is a 40-gon of area 20 r² sin 9°; of its 60 turns each is a frustum
    ['a ring', ring, 1, Number.NaN],
  ];
  it.each(shapes)('has nothing to mend in %s, binary and text', (_, mesh, parts, volume) => {
    const welded = weldFloat32(mesh);
    for (const bytes of [writeStl(welded, 'part'), new TextEncoder().encode(writeStlText(welded, 'part'))]) {
      const text = report(bytes);
      for (const label of ADMESH_ZEROS) expect(number(text, label), `${label} in\n${text}`).toBe(0);
      expect(number(text, 'Number of facets')).toBe(welded.triangles.length / 3);
      expect(number(text, 'Number of parts')).toBe(parts);
      if (!Number.isNaN(volume)) expect(number(text, 'Volume') / volume).toBeCloseTo(1, 5);
    }
  });

  it('does find fault with a cube that has a hole, so that the zeros mean something', () => {
    const mesh = cube();
    const text = report(writeStl({ ...mesh, triangles: mesh.triangles.slice(3) }, 'hole'));
    expect(number(text, 'Total disconnected facets')).toBeGreaterThan(0);
  });
});
