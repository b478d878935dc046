export interface BodySize {
  /** What its parts are shared by, m²: volume^⅔, for a sheet a quarter of its area. */
  size: number;
  /** Pa */
  youngsModulus: number;
}

/** One quadratic part suffices for a body this many times stiffer than the softest. */
const STIFF = 300;

/**
 * Splits `total` parts over bodies in proportion to their size (largest remainder), at least one each;
 * a body far stiffer than the softest one gets exactly one, unless all are alike. With more bodies
 * than parts the total grows to one a body.
 */
export function splitParts(total: number, bodies: readonly BodySize[]): number[] {
  const counts = bodies.map(() => 1);
  const softest = Math.min(...bodies.map((b) => b.youngsModulus));
  const share = bodies.map((b) => (b.youngsModulus >= STIFF * softest ? 0 : b.size));
  const sum = share.reduce((a, b) => a + b, 0);
  const spare = total - bodies.length;
  if (spare <= 0 || !(sum > 0)) return counts;
  // Aim at `total` in proportion; the one that every body has already counts towards its share.
  const pool = spare + share.filter((s) => s > 0).length;
  const exact = share.map((s) => Math.max(0, (pool * s) / sum - 1));
  const scale = spare / exact.reduce((a, b) => a + b, 0);
  const wanted = exact.map((e) => e * scale);
  let left = spare;
  wanted.forEach((w, i) => {
    counts[i]! += Math.floor(w);
    left -= Math.floor(w);
  });
  const order = wanted
    .map((w, i) => ({ i, rest: share[i]! > 0 ? w - Math.floor(w) : -1 }))
    .sort((a, b) => b.rest - a.rest || a.i - b.i);
  for (let n = 0; left > 0; n = (n + 1) % order.length) {
    if (order[n]!.rest < 0) continue;
    counts[order[n]!.i]!++;
    left--;
  }
  return counts;
}
