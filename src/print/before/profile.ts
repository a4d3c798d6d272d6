/** What the checks before printing need to know of a printer. Lengths in millimetres. */
export interface PrintingProfile {
  readonly name: string;
  /** Largest object: width, depth, height. */
  readonly bed: readonly [number, number, number];
  /** Thinnest wall that prints, and the thinnest that is advised. */
  readonly wall: number;
  readonly usualWall: number;
  /** Thinnest feature, such as an edge or a face, that comes out at all. */
  readonly feature: number;
  /** Faces that lean farther than this from the vertical need support, degrees. */
  readonly overhang: number;
  readonly material: {
    readonly name: string;
    /** g/cm³. */
    readonly density: number;
    /** Thickness of the solid shell, and the share of the inside that is filled; 1 for resin. */
    readonly shell: number;
    readonly infill: number;
  };
  readonly speed: {
    /** Thickness of a layer. */
    readonly layer: number;
    /** Seconds that each layer takes besides laying down material: moves, exposure, lifting. */
    readonly perLayer: number;
    /** Material laid down, mm³/s; null where a layer takes the same time whatever is in it. */
    readonly flow: number | null;
  };
}
