/** Hardness for which the formula below is trusted. */
export const SHORE_A_RANGE = [20, 80] as const;
/** The estimate may be off by this share either way. */
export const HARDNESS_SPREAD = 0.3;

/**
 * Young's modulus, Pa, of rubber of hardness Shore A, as an estimate: A. N. Gent, Rubber Chem. Technol. 31 (1958) 896,
 * E = 0.0981 (56 + 7.62336 S) / (0.137505 (254 − 2.54 S)) MPa. Below 20 and above 80 it is extrapolated.
 */
export function modulusFromShoreA(hardness: number): number {
  return (1e6 * 0.0981 * (56 + 7.62336 * hardness)) / (0.137505 * (254 - 2.54 * hardness));
}
