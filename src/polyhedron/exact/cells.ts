/**
 * Directions sorted into cells: squares on the sides of a cube around the origin, `side` along each edge. Planes of one
 * cell have similar normals.
 */
export function cellOfDirection(x: number, y: number, z: number, side: number): number {
  const ax = Math.abs(x);
  const ay = Math.abs(y);
  const az = Math.abs(z);
  if (ax >= ay && ax >= az) return square(x > 0 ? 0 : 1, y / ax, z / ax, side);
  if (ay >= az) return square(y > 0 ? 2 : 3, z / ay, x / ay, side);
  return square(z > 0 ? 4 : 5, x / az, y / az, side);
}

function square(ofCube: number, s: number, t: number, side: number): number {
  const i = Math.min(side - 1, Math.floor(((s + 1) / 2) * side));
  const j = Math.min(side - 1, Math.floor(((t + 1) / 2) * side));
  return (ofCube * side + i) * side + j;
}
