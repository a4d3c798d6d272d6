import { Vector3 } from 'three';
import { ConvexHull } from 'three/examples/jsm/math/ConvexHull.js';
import { intersect } from '../../src/polyhedron/solid.ts';
import { Scipy } from './scipy.ts';
import { type BenchmarkSet, benchmarkSets } from './sets.ts';
import { exponent, median, type Table, times } from './statistics.ts';

const ROUNDS = 9;
/** Milliseconds that each side gets in each round. */
const BATCH = 25;

interface Result {
  readonly set: BenchmarkSet;
  readonly faces: number;
  readonly vertices: number;
  readonly ours: number;
  readonly three: number;
  readonly bare: number | null;
  readonly ordered: number | null;
}

/**
 * `intersect` on prepared planes, which gives the full topology, against two others on the same half-spaces, measured in
 * turns in one run, medians: three's ConvexHull of the dual points h/D, and scipy's HalfspaceIntersection (qhull).
 * scipy's bare result lists vertices and the planes through each; the last column adds the ordered corners of each face.
 */
export async function kernel(script: string): Promise<Table[]> {
  const scipy = await Scipy.start(script);
  const results: Result[] = [];
  for (const set of benchmarkSets()) results.push(await measure(set, scipy));
  scipy?.stop();
  const note = scipy ? `scipy ${scipy.version}` : 'scipy is not installed';
  return [speeds(results, note), growth(results)];
}

async function measure(set: BenchmarkSet, scipy: Scipy | null): Promise<Result> {
  const { planes } = set;
  const halfspaces = Array.from(planes.form, (form, p) => [
    ...planes.normals.subarray(3 * p, 3 * p + 3),
    -planes.offsets[form]!.approximate,
  ]);
  const points = halfspaces.map(([h, k, l, d]) => new Vector3(h, k, l).divideScalar(-d!));
  const ours: number[] = [];
  const three: number[] = [];
  const bare: number[] = [];
  const ordered: number[] = [];
  for (let round = 0; round <= ROUNDS; round++) {
    const mine = times(() => intersect(planes), BATCH);
    const hull = times(() => new ConvexHull().setFromPoints(points), BATCH);
    const theirs = await scipy?.time(set.name, mine.length > 400 ? 100 : 30, round === 0 ? halfspaces : undefined);
    // The first round warms all of them up.
    if (round === 0) continue;
    ours.push(...mine);
    three.push(...hull);
    bare.push(...(theirs?.bare ?? []));
    ordered.push(...(theirs?.ordered ?? []));
  }
  const solid = intersect(planes);
  return {
    set,
    faces: planes.form.filter((_, p) => solid.start[p + 1]! > solid.start[p]!).length,
    vertices: solid.vertices.length / 3,
    ours: median(ours),
    three: median(three),
    bare: scipy ? median(bare) : null,
    ordered: scipy ? median(ordered) : null,
  };
}

function speeds(results: readonly Result[], note: string): Table {
  const ratio = (other: number | null, ours: number): string =>
    other === null ? '–' : `${(other / ours).toFixed(1)}×`;
  const ms = (value: number | null): string => (value === null ? '–' : value.toFixed(3));
  return {
    title: `Half-space intersection, milliseconds (medians), and how many times as long the others take (${note})`,
    head: ['planes', 'F', 'V', 'ours', 'three', '', 'scipy', '', 'scipy + faces', ''],
    rows: results.map(({ set, faces, vertices, ours, three, bare, ordered }) => [
      set.name,
      String(faces),
      String(vertices),
      ms(ours),
      ms(three),
      ratio(three, ours),
      ms(bare),
      ratio(bare, ours),
      ms(ordered),
      ratio(ordered, ours),
    ]),
  };
}

function growth(results: readonly Result[]): Table {
  const families = [...new Set(results.map(({ set }) => set.family))];
  return {
    title: 'Growth: cost ~ (number of planes)^exponent, fitted over the sizes above',
    head: ['planes', 'ours', 'three', 'scipy'],
    rows: families.map((family) => {
      const members = results.filter(({ set }) => set.family === family);
      const fit = (cost: (result: Result) => number | null): string =>
        exponent(members.map((member) => [member.set.planes.form.length, cost(member) ?? 0])).toFixed(2);
      return [
        family,
        fit(({ ours }) => ours),
        fit(({ three }) => three),
        members[0]!.bare === null ? '–' : fit(({ bare }) => bare),
      ];
    }),
  };
}
