/**
 * The unit normals of facets `from` up to `to` by the right-hand rule, put at the beginning of `normals`; 0 0 0 for a
 * facet without area. Computed in double; a zero may come out negative.
 */
export function fillNormals(
  normals: Float32Array,
  positions: Float32Array,
  triangles: Int32Array | Uint32Array,
  from: number,
  to: number,
): void {
  for (let i = 3 * from, n = 0; i < 3 * to; i += 3, n += 3) {
    const a = Math.imul(3, triangles[i]!);
    const b = Math.imul(3, triangles[i + 1]!);
    const c = Math.imul(3, triangles[i + 2]!);
    const ax = positions[a]!;
    const ay = positions[a + 1]!;
    const az = positions[a + 2]!;
    const ux = positions[b]! - ax;
    const uy = positions[b + 1]! - ay;
    const uz = positions[b + 2]! - az;
    const vx = positions[c]! - ax;
    const vy = positions[c + 1]! - ay;
    const vz = positions[c + 2]! - az;
    const nx = uy * vz - uz * vy;
    const ny = uz * vx - ux * vz;
    const nz = ux * vy - uy * vx;
    const square = nx * nx + ny * ny + nz * nz;
    const scale = square > 0 ? 1 / Math.sqrt(square) : 0;
    normals[n] = nx * scale;
    normals[n + 1] = ny * scale;
    normals[n + 2] = nz * scale;
  }
}
