import { BufferAttribute, BufferGeometry, Mesh as ThreeMesh } from 'three';
import { STLExporter } from 'three-stdlib';
import { weldFloat32 } from '../../src/files/mesh/weld.ts';
import { writeStl } from '../../src/files/stl/write.ts';
import type { Mesh } from '../../src/print/mesh.ts';
import { median, type Table, times } from './statistics.ts';

const TRIANGLES = 500_000;
const PHASE = 1500;

/**
 * Writing binary STL against the exporter of three-stdlib on the same triangles. Each has a phase of its own: in turns,
 * call by call, both mostly measure how fast the system hands out 25 MB of fresh memory.
 */
export function stl(): Table {
  const mesh = weldFloat32(sphere(TRIANGLES));
  const geometry = new BufferGeometry();
  geometry.setAttribute('position', new BufferAttribute(Float32Array.from(mesh.positions), 3));
  geometry.setIndex(new BufferAttribute(mesh.triangles, 1));
  const theirs = new ThreeMesh(geometry);
  const phases = [0, 1, 2].map(() => ({
    ours: times(() => writeStl(mesh, 'benchmark'), PHASE),
    three: times(() => new STLExporter().parse(theirs, { binary: true }), PHASE),
  }));
  const ours = phases.flatMap((phase) => phase.ours);
  const three = phases.flatMap((phase) => phase.three);
  const row = (name: string, of: (values: number[]) => number): string[] => [
    name,
    of(ours).toFixed(1),
    of(three).toFixed(1),
    (of(three) / of(ours)).toFixed(1),
  ];
  return {
    title: `Binary STL of ${mesh.triangles.length / 3} triangles, milliseconds`,
    head: ['', 'ours', 'three-stdlib', 'times as fast'],
    rows: [row('median', median), row('best', (values) => values.reduce((a, b) => Math.min(a, b)))],
  };
}

/** A ball in bands of longitude and latitude. */
function sphere(triangles: number): Mesh {
  const rings = Math.round(Math.sqrt(triangles / 4)) + 1;
  const around = 2 * (rings - 1);
  const positions: number[] = [0, 0, 20];
  for (let ring = 1; ring < rings; ring++)
    for (let i = 0; i < around; i++) {
      const [polar, turn] = [(Math.PI * ring) / rings, (2 * Math.PI * i) / around];
      positions.push(
        20 * Math.sin(polar) * Math.cos(turn),
        20 * Math.sin(polar) * Math.sin(turn),
        20 * Math.cos(polar),
      );
    }
  positions.push(0, 0, -20);
  const at = (ring: number, i: number): number => 1 + (ring - 1) * around + (i % around);
  const last = positions.length / 3 - 1;
  const found: number[] = [];
  for (let i = 0; i < around; i++) {
    found.push(0, at(1, i), at(1, i + 1), last, at(rings - 1, i + 1), at(rings - 1, i));
    for (let ring = 1; ring < rings - 1; ring++)
      found.push(at(ring, i), at(ring + 1, i), at(ring + 1, i + 1), at(ring, i), at(ring + 1, i + 1), at(ring, i + 1));
  }
  return { positions: Float64Array.from(positions), triangles: Uint32Array.from(found) };
}
