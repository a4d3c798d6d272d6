/** Red, green and blue, 0 to 1, of a colour #RRGGBB as it stands (sRGB, not linear). */
export function channels(colour: string): [number, number, number] {
  const part = (at: number): number => Number.parseInt(colour.slice(at, at + 2), 16) / 255;
  return [part(1), part(3), part(5)];
}

/** One channel of sRGB, 0 to 1, as linear light (IEC 61966-2-1). */
export const linear = (value: number): number => (value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4);
