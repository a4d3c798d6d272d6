import { commensurateOffsets } from '../../src/polyhedron/offset.ts';
import type { PlaneSet } from '../../src/polyhedron/planes.ts';
// Point groups as matrices, made with spglib 2.0.2 and gemmi 0.5.7.
import reference from '../outside/reference/groups.json' with { type: 'json' };

export interface FormInput {
  readonly hkl: readonly number[];
  /** Offset in index space. */
  readonly D: number;
}

const text = (numbers: readonly number[]): string => numbers.map((value) => value + 0).join();

const multiply = (a: readonly number[], b: readonly number[]): number[] =>
  [0, 3, 6].flatMap((i) => [0, 1, 2].map((j) => a[i]! * b[j]! + a[i + 1]! * b[3 + j]! + a[i + 2]! * b[6 + j]!));

const determinant = ([a, b, c, d, e, f, g, h, i]: number[]): number =>
  a! * (e! * i! - f! * h!) - b! * (d! * i! - f! * g!) + c! * (d! * h! - e! * g!);

/** The planes of some forms of a point group, with the group's action on them. */
export function crystalPlanes(key: string, forms: readonly FormInput[]): PlaneSet {
  const ops = reference.groups.find((group) => group.key === key)!.ops;
  const order = ops.length;
  const number = new Map(ops.map(({ W }, i) => [text(W), i]));
  const product = Uint8Array.from(
    { length: order * order },
    (_, at) => number.get(text(multiply(ops[Math.floor(at / order)]!.W, ops[at % order]!.W)))!,
  );
  const [normals, form, carrier]: [number[], number[], number[]] = [[], [], []];
  const image = forms.map(({ hkl }, f) => {
    const seen = new Map<string, number>();
    return Int32Array.from(ops, ({ Winv: w }, operation) => {
      const h = [0, 1, 2].map((j) => hkl[0]! * w[j]! + hkl[1]! * w[3 + j]! + hkl[2]! * w[6 + j]!);
      const known = seen.get(text(h));
      if (known !== undefined) return known;
      normals.push(...h);
      carrier.push(operation);
      seen.set(text(h), form.push(f) - 1);
      return form.length - 1;
    });
  });
  return {
    normals: Float64Array.from(normals),
    form: Int32Array.from(form),
    offsets: commensurateOffsets(forms.map(({ D }) => D)),
    symmetry: {
      order,
      product,
      improper: Uint8Array.from(ops, ({ W }) => +(determinant(W) < 0)),
      matrices: Int8Array.from(ops.flatMap(({ W }) => W)),
      image,
      carrier: Uint8Array.from(carrier),
    },
  };
}

/** The same planes, each by itself. */
export function withoutSymmetry({ normals, form, offsets }: PlaneSet): PlaneSet {
  return {
    normals,
    form: Int32Array.from(form, (_, p) => p),
    offsets: Array.from(form, (f) => offsets[f]!),
  };
}
