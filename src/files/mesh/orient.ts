/**
 * Exact signs of the two determinants that decide how triangles lie. Floating point decides when the value exceeds the
 * bound of its rounding error (J. R. Shewchuk, Adaptive precision floating-point arithmetic and fast robust geometric
 * predicates, Discrete Comput. Geom. 18, 1997, sections 4.2 and 4.3); exact integers decide the rest.
 */

/** Half a unit in the last place of 1: Shewchuk's epsilon. */
const EPSILON = 2 ** -53;
const BOUND_2D = (3 + 16 * EPSILON) * EPSILON;
const BOUND_3D = (7 + 56 * EPSILON) * EPSILON;
/** Below this, products may have lost digits to underflow and the bounds do not hold. */
const TOO_SMALL = 1e-250;

export type Sign = -1 | 0 | 1;

/**
 * The side of the plane through a, b, c on which d lies: 1 where the right-hand normal of a, b, c points to (the
 * tetrahedron a, b, c, d has positive volume), -1 opposite, 0 exactly in the plane.
 * @param p x, y, z of each vertex, finite; a, b, c, d are vertex numbers.
 */
export function orient3d(p: Float64Array, a: number, b: number, c: number, d: number): Sign {
  const [i, j, k, l] = [3 * a, 3 * b, 3 * c, 3 * d];
  const bx = p[j]! - p[i]!;
  const by = p[j + 1]! - p[i + 1]!;
  const bz = p[j + 2]! - p[i + 2]!;
  const cx = p[k]! - p[i]!;
  const cy = p[k + 1]! - p[i + 1]!;
  const cz = p[k + 2]! - p[i + 2]!;
  const dx = p[l]! - p[i]!;
  const dy = p[l + 1]! - p[i + 1]!;
  const dz = p[l + 2]! - p[i + 2]!;
  if ((bx === 0 && cx === 0 && dx === 0) || (by === 0 && cy === 0 && dy === 0) || (bz === 0 && cz === 0 && dz === 0))
    return 0; // all in one plane of the axes; a difference is zero only where it is exactly zero

  const bxcy = bx * cy;
  const bycx = by * cx;
  const cxdy = cx * dy;
  const cydx = cy * dx;
  const dxby = dx * by;
  const dybx = dy * bx;
  const determinant = dz * (bxcy - bycx) + bz * (cxdy - cydx) + cz * (dxby - dybx);
  const size =
    Math.abs(dz) * (Math.abs(bxcy) + Math.abs(bycx)) +
    Math.abs(bz) * (Math.abs(cxdy) + Math.abs(cydx)) +
    Math.abs(cz) * (Math.abs(dxby) + Math.abs(dybx));
  if (size > TOO_SMALL && Math.abs(determinant) > BOUND_3D * size) return determinant > 0 ? 1 : -1;
  return exactOrient3d(p, i, j, k, l);
}

/**
 * The sign of the area of a, b, c seen along an axis, from its positive end: 1 counter-clockwise, 0 exactly in line.
 * @param axis the axis to look along: 0, 1 or 2 for x, y or z.
 */
export function orient2d(p: Float64Array, axis: number, a: number, b: number, c: number): Sign {
  const u = axis === 2 ? 0 : axis + 1;
  const v = u === 2 ? 0 : u + 1;
  const bu = p[3 * b + u]! - p[3 * a + u]!;
  const bv = p[3 * b + v]! - p[3 * a + v]!;
  const cu = p[3 * c + u]! - p[3 * a + u]!;
  const cv = p[3 * c + v]! - p[3 * a + v]!;
  if ((bu === 0 || cv === 0) && (bv === 0 || cu === 0)) return 0; // both products are exactly zero
  const left = bu * cv;
  const right = bv * cu;
  const determinant = left - right;
  const size = Math.abs(left) + Math.abs(right);
  if (size > TOO_SMALL && Math.abs(determinant) > BOUND_2D * size) return determinant > 0 ? 1 : -1;

  return exactOrient2d(p, 3 * a + u, 3 * a + v, 3 * b + u, 3 * b + v, 3 * c + u, 3 * c + v);
}

function exactOrient2d(p: Float64Array, ...places: readonly number[]): Sign {
  const [au, av, bu, bv, cu, cv] = wholeNumbers(p, places);
  return signOf((bu! - au!) * (cv! - av!) - (bv! - av!) * (cu! - au!));
}

function exactOrient3d(p: Float64Array, i: number, j: number, k: number, l: number): Sign {
  const from = [i, i + 1, i + 2, j, j + 1, j + 2, k, k + 1, k + 2, l, l + 1, l + 2];
  const [ax, ay, az, bx, by, bz, cx, cy, cz, dx, dy, dz] = wholeNumbers(p, from);
  const [ux, uy, uz] = [bx! - ax!, by! - ay!, bz! - az!];
  const [vx, vy, vz] = [cx! - ax!, cy! - ay!, cz! - az!];
  const [wx, wy, wz] = [dx! - ax!, dy! - ay!, dz! - az!];
  return signOf(wx * (uy * vz - uz * vy) + wy * (uz * vx - ux * vz) + wz * (ux * vy - uy * vx));
}

const signOf = (value: bigint): Sign => (value > 0n ? 1 : value < 0n ? -1 : 0);

const FRACTION_BITS = 52n;
const FRACTION = (1n << FRACTION_BITS) - 1n;
const double = new Float64Array(1);
const doubleBits = new BigUint64Array(double.buffer);

/** The numbers at these places, all multiplied by the one power of two that makes whole numbers of them. */
function wholeNumbers(p: Float64Array, places: readonly number[]): bigint[] {
  const parts = places.map((place) => {
    double[0] = p[place]!;
    const bits = doubleBits[0]!;
    const exponent = (bits >> FRACTION_BITS) & 0x7ffn; // 0 for numbers without the leading 1, which count as exponent 1
    const digits = (bits & FRACTION) | (exponent > 0n ? FRACTION + 1n : 0n);
    return { digits: double[0] < 0 ? -digits : digits, exponent: exponent > 0n ? exponent : 1n };
  });
  let least = 0x7ffn;
  for (const { digits, exponent } of parts) if (digits !== 0n && exponent < least) least = exponent;
  return parts.map(({ digits, exponent }) => (digits === 0n ? 0n : digits << (exponent - least)));
}
