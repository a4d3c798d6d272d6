/** A disc magnet. Millimetres, tesla. */
export interface Magnet {
  readonly diameter: number;
  readonly thickness: number;
  /** Strongest field on the pole, measured with a gaussmeter; absent: worked out from the remanence. */
  readonly poleField?: number;
  /** Tesla; sintered neodymium has about 1.2 T (grade N35, from memory). */
  readonly remanence?: number;
}

const USUAL_REMANENCE = 1.2;

/**
 * Field at the middle of the pole of a disc magnetised along its axis, tesla: `Br/2 · t / √(t² + r²)` (textbook
 * formula).
 */
export function poleFieldOf({ diameter, thickness, poleField, remanence = USUAL_REMANENCE }: Magnet): number {
  return poleField ?? (remanence / 2) * (thickness / Math.hypot(thickness, diameter / 2));
}

/** Flux index, kG² mm²: area of the pole times the square of the field there (16 CFR 1262.3; 1 T = 10 kG). */
export function fluxIndex(magnet: Magnet): number {
  return (Math.PI / 4) * magnet.diameter ** 2 * (10 * poleFieldOf(magnet)) ** 2;
}
