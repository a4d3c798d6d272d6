import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { make } from '../../src/index.ts';
import type { Made } from '../../src/make.ts';
import { faceCorners } from '../../src/polyhedron/measures.ts';
import { median, type Table } from './statistics.ts';

const RUNS = 3;
const LETTER = { height: 6, depth: 0.6 };
const BORE = 3.2;
/** The axes of 32 with a along x: the 3-fold axis, and three 2-fold axes across it. */
const AXES: readonly (readonly [number, number, number])[] = [
  [0, 0, 0],
  [0, 90, 0],
  [0, 90, 60],
  [0, 90, 120],
];

/**
 * A lettered quartz bored for its rods, 70 mm, against the same written as a script for OpenSCAD, a general-purpose CAD
 * program: a polyhedron, less cylinders and extruded text. Both in turns; OpenSCAD as whole processes, since it has no
 * others, and make both warm and as a whole process.
 */
export async function openscad(): Promise<Table> {
  const head = ['', 'ms', 'times make, warm'];
  const title = 'A lettered, bored quartz of 70 mm as STL';
  const { status, stderr } = spawnSync('openscad', ['--version'], { encoding: 'utf8' });
  if (status !== 0) return { title: `${title} (OpenSCAD is not installed)`, head, rows: [] };
  const recipe = { mineral: 'quartz', print: { size: 70, letters: true, axes: { fit: 'separate' as const } } };
  const folder = mkdtempSync(join(tmpdir(), 'goniolith-openscad-'));
  const [script, file] = [join(folder, 'quartz.scad'), join(folder, 'recipe.json')];
  writeFileSync(script, scad(await make({ mineral: 'quartz', print: { size: 70 } })));
  writeFileSync(file, JSON.stringify(recipe));
  const timed = async (run: () => unknown): Promise<number> => {
    const begin = performance.now();
    await run();
    return performance.now() - begin;
  };
  const runProgram = (program: string, words: string[]): void => {
    const done = spawnSync(program, words, { encoding: 'utf8' });
    if (done.status !== 0) throw new Error(`${program}: ${done.stderr}`);
  };
  const [warm, whole, theirs]: [number[], number[], number[]] = [[], [], []];
  await make(recipe);
  for (let round = 0; round < RUNS; round++) {
    warm.push(await timed(() => make(recipe)));
    const command = [join('dist', 'cli', 'main.js'), 'make', file, '--out', folder];
    whole.push(await timed(() => runProgram(process.execPath, command)));
    theirs.push(await timed(() => runProgram('openscad', ['-o', join(folder, 'quartz.stl'), script])));
  }
  rmSync(folder, { recursive: true, force: true });
  const row = (name: string, values: readonly number[]): string[] => [
    name,
    median(values).toFixed(0),
    (median(values) / median(warm)).toFixed(1),
  ];
  return {
    title,
    head,
    rows: [row('make, warm', warm), row('make, whole process', whole), row(stderr.trim(), theirs)],
  };
}

/** The script: faces run clockwise from outside there. */
function scad({ shape, millimetresPerUnit }: Made): string {
  const { measures, solid, crystal } = shape;
  const scaled = Array.from(measures.positions, (value) => value * millimetresPerUnit);
  const points = Array.from({ length: scaled.length / 3 }, (_, v) => scaled.slice(3 * v, 3 * v + 3));
  const faces = measures.faces.map((face) => [...faceCorners(solid, face)]);
  const letters = measures.faces.map((face, i) => {
    const normal = [...measures.normals.subarray(3 * face, 3 * face + 3)];
    const corners = faces[i]!.map((corner) => points[corner]!);
    const middle = [0, 1, 2].map((axis) => corners.reduce((sum, at) => sum + at[axis]!, 0) / corners.length);
    const [polar, around] = [Math.acos(normal[2]!), Math.atan2(normal[1]!, normal[0]!)].map(
      (angle) => (angle * 180) / Math.PI,
    );
    const letter = crystal.forms[solid.planes.form[face]!]!.letter;
    const text = `text("${letter}", size = ${LETTER.height}, halign = "center", valign = "center")`;
    return `translate(${JSON.stringify(middle)}) rotate([0, ${polar}, ${around}]) translate([0, 0, -${LETTER.depth}]) linear_extrude(2) ${text};`;
  });
  const bores = AXES.map(
    (turn) => `rotate(${JSON.stringify(turn)}) cylinder(d = ${BORE}, h = 200, center = true, $fn = 48);`,
  );
  const crystalText = `polyhedron(${JSON.stringify(points)}, ${JSON.stringify(faces.map((face) => [...face].reverse()))});`;
  return `difference() {\n${[crystalText, ...bores, ...letters].join('\n')}\n}\n`;
}
