/**
 * Wind in words and numbers. Bands of the Beaufort scale (m/s, 10 min mean at 10 m): WMO No. 306, Manual on Codes,
 * code table 1100; the middle of a band is 0.836 B^1.5.
 */
export const BEAUFORT = [
  { name: 'calm', from: 0 },
  { name: 'light air', from: 0.3 },
  { name: 'light breeze', from: 1.6 },
  { name: 'gentle breeze', from: 3.4 },
  { name: 'moderate breeze', from: 5.5 },
  { name: 'fresh breeze', from: 8 },
  { name: 'strong breeze', from: 10.8 },
  { name: 'near gale', from: 13.9 },
  { name: 'gale', from: 17.2 },
  { name: 'strong gale', from: 20.8 },
  { name: 'storm', from: 24.5 },
  { name: 'violent storm', from: 28.5 },
  { name: 'hurricane', from: 32.7 },
] as const;

/** The number on the Beaufort scale of a mean speed, m/s. */
export function beaufortOf(speed: number): number {
  // Bands are printed to a tenth of a metre a second.
  const rounded = Math.round(speed * 10) / 10;
  let number = 0;
  while (number + 1 < BEAUFORT.length && BEAUFORT[number + 1]!.from <= rounded) number++;
  return number;
}

/** m/s in the middle of the band. */
export const beaufortSpeed = (number: number): number => 0.836 * number ** 1.5;

/** "4.3 m/s is a gentle breeze, Beaufort 3." */
export function windWords(speed: number): string {
  const number = beaufortOf(speed);
  return `${BEAUFORT[number]!.name}, Beaufort ${number}`;
}

/**
 * Peak of three seconds over the mean of ten minutes by where the wind comes over: Harper, Kepert and Ginger,
 * WMO/TD-No. 1555 (2010), table 1.1 (values from memory); for strong winds, larger in a breeze.
 */
export const GUST_PLACES = [
  { value: 'steady', label: 'Steady', factor: 1 },
  { value: 'sea', label: 'At sea', factor: 1.23 },
  { value: 'shore', label: 'Off the sea', factor: 1.38 },
  { value: 'land', label: 'Inland', factor: 1.66 },
] as const;
