/** A closed triangle mesh in millimetres: shared vertices, counter-clockwise triangles seen from outside. */
export interface Mesh {
  /** x, y, z of each vertex, one after the other, millimetres. */
  readonly positions: Float64Array;
  /** Three vertex numbers a triangle. */
  readonly triangles: Uint32Array;
}
