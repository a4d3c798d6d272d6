import load, { type Manifold, type ManifoldToplevel, type Mat4, type Polygons } from 'manifold-3d';
import { ObjectError } from '../shape/object-error.ts';
import { type Mesh, meshVolume } from './mesh.ts';
import { withoutShortEdges } from './short-edges.ts';

let loading: Promise<ManifoldToplevel> | undefined;

/** The boolean library, loaded once. */
function library(): Promise<ManifoldToplevel> {
  loading ??= load().then((kit) => {
    kit.setup();
    return kit;
  });
  return loading;
}

/**
 * Runs work on solids and afterwards frees all that it made; the library's memory is not swept by JavaScript.
 * Only meshes may leave.
 */
export async function withSolids<T>(work: (bench: Workbench) => T): Promise<T> {
  const bench = new Workbench(await library());
  try {
    return work(bench);
  } finally {
    bench.clear();
  }
}

/** The few solid operations that printable parts need. Lengths in millimetres. */
export class Workbench {
  private readonly made: { delete(): void }[] = [];
  /** Surface numbers by the identities that the library carries through its operations. */
  private readonly surfaceOf = new Map<number, number>();

  constructor(private readonly kit: ManifoldToplevel) {}

  clear(): void {
    for (const thing of this.made.splice(0)) thing.delete();
  }

  private keep<T extends { delete(): void }>(thing: T): T {
    this.made.push(thing);
    return thing;
  }

  /** Surfaces of the mesh are remembered through all later operations. @throws Error when it is no closed solid */
  solid({ positions, triangles, surface }: Mesh): Manifold {
    const options = { numProp: 3, vertProperties: Float32Array.from(positions) };
    if (!surface) return this.keep(new this.kit.Manifold(new this.kit.Mesh({ ...options, triVerts: triangles })));
    const count = surface.reduce((most, one) => Math.max(most, one), 0) + 1;
    const first = this.kit.Manifold.reserveIDs(count);
    const order = Array.from(surface.keys()).sort((s, t) => surface[s]! - surface[t]!);
    const runs = Array.from({ length: count }, (_, run) => run).filter((run) => surface.includes(run));
    for (const run of runs) this.surfaceOf.set(first + run, run);
    const mesh = new this.kit.Mesh({
      ...options,
      triVerts: Uint32Array.from(order.flatMap((t) => [...triangles.subarray(3 * t, 3 * t + 3)])),
      runIndex: Uint32Array.from([...runs, count].map((run) => 3 * order.filter((t) => surface[t]! < run).length)),
      runOriginalID: Uint32Array.from(runs, (run) => first + run),
    });
    return this.keep(new this.kit.Manifold(mesh));
  }

  /** A straight prism over outlines (counter-clockwise, holes clockwise), from z = `from` to z = `to`. */
  prism(outlines: readonly (readonly (readonly [number, number])[])[], from: number, to: number): Manifold {
    const contours: Polygons = outlines.map((outline) => outline.map(([x, y]): [number, number] => [x, y]));
    const upright = this.keep(this.kit.Manifold.extrude(contours, to - from));
    return this.keep(upright.translate(0, 0, from));
  }

  union(solids: readonly Manifold[]): Manifold {
    return solids.length === 1 ? solids[0]! : this.keep(this.kit.Manifold.union(solids));
  }

  subtract(body: Manifold, tools: readonly Manifold[]): Manifold {
    return tools.length === 0 ? body : this.keep(this.kit.Manifold.difference([body, ...tools]));
  }

  /** `matrix` by columns, the fourth being the shift. */
  place(solid: Manifold, matrix: Mat4): Manifold {
    return this.keep(solid.transform(matrix));
  }

  /**
   * The finished mesh, without edges that are too short for single precision.
   * @param other the surface of what came from no mesh with surfaces: rods, the insides of bores
   */
  mesh(solid: Manifold, other: number): Mesh {
    const { vertProperties, triVerts, numProp, runIndex, runOriginalID } = this.keep(
      solid.simplify(SHORTEST_EDGE),
    ).getMesh();
    const positions = new Float64Array((vertProperties.length / numProp) * 3);
    for (let v = 0; v * 3 < positions.length; v++)
      positions.set(vertProperties.subarray(v * numProp, v * numProp + 3), 3 * v);
    const surface = new Uint16Array(triVerts.length / 3).fill(other);
    runOriginalID.forEach((id, run) => {
      surface.fill(this.surfaceOf.get(id) ?? other, runIndex[run]! / 3, runIndex[run + 1]! / 3);
    });
    const mesh = withoutShortEdges({ positions, triangles: Uint32Array.from(triVerts), surface }, SHORTEST_EDGE);
    const off = Math.abs(meshVolume(mesh) - solid.volume());
    if (!(off < VOLUME_TOLERANCE * solid.volume() + SHIFT * solid.surfaceArea()))
      throw new ObjectError(
        'not-sound',
        `a part lost ${off} mm³ of its volume while its mesh was tidied`,
        'try a slightly different size, and please report the recipe',
      );
    return mesh;
  }
}

/** Relative; single precision and drawn-together edges take far less. */
const VOLUME_TOLERANCE = 1e-5;
/** How far, in millimetres, a surface moves in single precision: what counts for slivers. */
const SHIFT = 1e-5;

/** Millimetres; far below what any printer resolves. */
const SHORTEST_EDGE = 0.001;
