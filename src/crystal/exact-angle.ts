/** Cosine and sine of angles in degrees, exact where crystallography needs it: 60°, 90° and 120°. */

export function cosDegrees(degrees: number): number {
  if (degrees === 90) return 0;
  if (degrees === 60) return 0.5;
  if (degrees === 120) return -0.5;
  return Math.cos((degrees * Math.PI) / 180);
}

export function sinDegrees(degrees: number): number {
  if (degrees === 90) return 1;
  if (degrees === 60 || degrees === 120) return Math.sqrt(0.75);
  return Math.sin((degrees * Math.PI) / 180);
}

export const toDegrees = (radians: number): number => (radians * 180) / Math.PI;
