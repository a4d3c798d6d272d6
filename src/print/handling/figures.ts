/** Figures of the standards, millimetres unless told otherwise; the report sets measured values beside them. */

/**
 * Small-parts cylinder: width and least and greatest depth, the bottom sloping evenly between them. 1.25, 1.00 and
 * 2.25 inches.
 */
export const SMALL_PARTS = {
  across: 31.7,
  least: 25.4,
  greatest: 57.1,
  source: '16 CFR 1501.4; the same gauge in EN 71-1 and ISO 8124 (from memory)',
} as const;

/** Sharp-point gauge: the slot, how far its feeler is set back, and how much farther it must be pushed. */
export const POINT_GAUGE = {
  slot: [1.02, 1.15],
  setBack: 0.38,
  push: 0.12,
  source: '16 CFR 1500.48; the same gauge in EN 71-1 and ASTM F963 (from memory)',
} as const;

/** Least dihedral angle of an edge that prints and does not chip, degrees. */
export const SHARP_EDGE = {
  right: 90,
  acute: 30,
  source:
    'least angle of 30° by printing design guides; the tape test of 16 CFR 1500.49 covers metal and glass edges only',
} as const;

/** Flux index, kG² mm². */
export const MAGNET = { most: 50, source: '16 CFR 1262.2 and 1262.3; ASTM F963, 8.25' } as const;

/** Stands over and under every report on handling. */
export const DEFERRAL =
  'Design aid, not a compliance test. Not a toy; not tested for children. Check with your safety officer, ' +
  'accessibility officer or conservator, and with local rules, before use.';
