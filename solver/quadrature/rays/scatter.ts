import type { TriangleSoup } from './soup';

export interface Scatter {
  count: number;
  /** 3 · count, m */
  positions: Float64Array;
  triangle: Int32Array;
}

/**
 * `count` points spread evenly by area over the listed triangles, always the same ones: equal steps
 * of the running area pick the triangle, a golden-ratio sequence the place in it.
 */
export function scatterOnTriangles(soup: TriangleSoup, list: Int32Array, count: number): Scatter {
  const { positions: p, triangles } = soup;
  const running = new Float64Array(list.length + 1);
  for (let n = 0; n < list.length; n++) {
    const [a, b, c] = cornersOf(triangles, list[n]!);
    const ux = p[b]! - p[a]!;
    const uy = p[b + 1]! - p[a + 1]!;
    const uz = p[b + 2]! - p[a + 2]!;
    const vx = p[c]! - p[a]!;
    const vy = p[c + 1]! - p[a + 1]!;
    const vz = p[c + 2]! - p[a + 2]!;
    running[n + 1] = running[n]! + 0.5 * Math.hypot(uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx);
  }
  const positions = new Float64Array(3 * count);
  const triangle = new Int32Array(count);
  let n = 0;
  for (let k = 0; k < count; k++) {
    const target = ((k + 0.5) / count) * running[list.length]!;
    while (n + 1 < list.length && running[n + 1]! < target) n++;
    let s = (0.5 + k * 0.7548776662466927) % 1;
    let t = (0.5 + k * 0.5698402909980532) % 1;
    if (s + t > 1) {
      s = 1 - s;
      t = 1 - t;
    }
    const [a, b, c] = cornersOf(triangles, list[n]!);
    for (let d = 0; d < 3; d++) {
      positions[3 * k + d] = p[a + d]! + s * (p[b + d]! - p[a + d]!) + t * (p[c + d]! - p[a + d]!);
    }
    triangle[k] = list[n]!;
  }
  return { count, positions, triangle };
}

function cornersOf(triangles: Int32Array, t: number): [number, number, number] {
  return [3 * triangles[3 * t]!, 3 * triangles[3 * t + 1]!, 3 * triangles[3 * t + 2]!];
}
