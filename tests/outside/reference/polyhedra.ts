import { readFileSync } from 'node:fs';

export interface FormResult {
  readonly state: 'present' | 'absent' | 'touches-vertex' | 'touches-edge' | 'coincident';
  readonly planes: number;
  readonly sides?: number;
  readonly face_area?: number;
  readonly total_area?: number;
  readonly gap?: number;
}

export interface PolyhedronCase {
  readonly id: string;
  readonly tags: readonly string[];
  readonly group: string;
  readonly cell: readonly [number, number, number, number, number, number];
  /** `d` is the metric distance, `D` the offset in index space; exact fractions are text. */
  readonly forms: readonly { readonly hkl: readonly number[]; readonly d: number; readonly D: number | string }[];
  readonly expect: {
    readonly result: 'bounded' | 'unbounded' | 'empty' | 'flat';
    readonly volume: number;
    readonly area: number;
    readonly F: number;
    readonly E: number;
    readonly V: number;
    readonly edge_length: number;
    readonly r_max: number;
    readonly vertex_degrees: Readonly<Record<string, number>>;
    readonly forms?: readonly FormResult[];
    readonly vertex_orbits: readonly (readonly [readonly (number | string)[], number])[];
  };
}

const file: { readonly cases: readonly PolyhedronCase[] } = JSON.parse(
  readFileSync(new URL('polyhedra-sample.json', import.meta.url), 'utf8'),
);

export const polyhedraCases = file.cases;

/** A number of the file: a double, or a fraction as text. */
export function decimal(value: number | string): number {
  const [numerator, denominator = 1] = String(value).split('/').map(Number);
  return numerator! / denominator;
}
