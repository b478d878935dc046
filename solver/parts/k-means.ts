/** Clusters of weighted points. */
export interface Clusters {
  count: number;
  /** 3 · count */
  centres: Float64Array;
  /** point: its cluster */
  of: Int32Array;
}

/**
 * k-means (Lloyd 1982) with a farthest-point start (Gonzalez 1985) from the point nearest the
 * centroid; deterministic, ties go to the lower number. `weights` may be null for equal ones.
 * Fewer distinct points than `count` give fewer clusters.
 */
export function kMeans(points: Float64Array, weights: Float64Array | null, count: number, rounds = 10): Clusters {
  const n = points.length / 3;
  const centres = farthestPoints(points, count);
  const k = centres.length / 3;
  const of = new Int32Array(n);
  const sums = new Float64Array(4 * k);
  for (let round = 0; round <= rounds; round++) {
    sums.fill(0);
    for (let i = 0; i < n; i++) {
      const x = points[3 * i]!;
      const y = points[3 * i + 1]!;
      const z = points[3 * i + 2]!;
      let best = Infinity;
      let nearest = 0;
      for (let c = 0; c < k; c++) {
        const dx = x - centres[3 * c]!;
        const dy = y - centres[3 * c + 1]!;
        const dz = z - centres[3 * c + 2]!;
        const d2 = dx * dx + dy * dy + dz * dz;
        if (d2 < best) {
          best = d2;
          nearest = c;
        }
      }
      of[i] = nearest;
      const w = weights === null ? 1 : weights[i]!;
      sums[4 * nearest]! += w * x;
      sums[4 * nearest + 1]! += w * y;
      sums[4 * nearest + 2]! += w * z;
      sums[4 * nearest + 3]! += w;
    }
    if (round === rounds) break;
    for (let c = 0; c < k; c++) {
      const w = sums[4 * c + 3]!;
      if (w > 0) for (let d = 0; d < 3; d++) centres[3 * c + d] = sums[4 * c + d]! / w;
    }
  }
  return { count: k, centres, of };
}

function farthestPoints(points: Float64Array, count: number): Float64Array {
  const n = points.length / 3;
  const middle = [0, 0, 0];
  for (let i = 0; i < n; i++) for (let d = 0; d < 3; d++) middle[d]! += points[3 * i + d]! / n;
  const distance = new Float64Array(n).fill(Infinity);
  const chosen: number[] = [];
  let next = 0;
  let best = Infinity;
  for (let i = 0; i < n; i++) {
    const d2 = squared(points, i, middle[0]!, middle[1]!, middle[2]!);
    if (d2 < best) {
      best = d2;
      next = i;
    }
  }
  while (chosen.length < count) {
    chosen.push(next);
    const x = points[3 * next]!;
    const y = points[3 * next + 1]!;
    const z = points[3 * next + 2]!;
    let far = 0;
    for (let i = 0; i < n; i++) {
      const d2 = squared(points, i, x, y, z);
      if (d2 < distance[i]!) distance[i] = d2;
      if (distance[i]! > far) {
        far = distance[i]!;
        next = i;
      }
    }
    if (far === 0) break;
  }
  const centres = new Float64Array(3 * chosen.length);
  chosen.forEach((i, c) => centres.set(points.subarray(3 * i, 3 * i + 3), 3 * c));
  return centres;
}

function squared(points: Float64Array, i: number, x: number, y: number, z: number): number {
  const dx = points[3 * i]! - x;
  const dy = points[3 * i + 1]! - y;
  const dz = points[3 * i + 2]! - z;
  return dx * dx + dy * dy + dz * dz;
}
