/**
 * Binary STL: 80 bytes of header, the number of facets as uint32, then 50 bytes a facet (normal and three vertices as
 * float32, a uint16 attribute), all little-endian. Source: M. Burns, Automated Fabrication, section 6.5
 * (fabbers.com/tech/STL_Format), after the 3D Systems interface specification of 1989.
 */
export const STL_HEADER_BYTES = 80;
/** Header and count: where the first facet begins. */
export const STL_FACETS_START = STL_HEADER_BYTES + 4;
export const STL_FACET_BYTES = 50;

/** Facets as they follow each other in a file. */
export interface Facets {
  /** Three numbers a facet. */
  readonly normals: Float32Array;
  /** Nine numbers a facet, in memory of its own. */
  readonly corners: Float32Array;
}
