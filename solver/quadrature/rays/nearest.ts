import type { Bounds, TriangleSoup } from './soup';

/** Triangles in a uniform grid, for nearest-point questions within a short reach. */
export interface TriangleGrid {
  soup: TriangleSoup;
  min: Float64Array;
  cell: number;
  counts: Int32Array;
  /** cell c: triangles list[start[c]] … list[start[c+1]−1] */
  start: Int32Array;
  list: Int32Array;
  reach: number;
}

const MOST_CELLS = 64;

/** Grid over the listed triangles; answers are sought up to `reach` (m) away. */
export function triangleGrid(soup: TriangleSoup, triangles: Int32Array, bounds: Bounds, reach: number): TriangleGrid {
  const longest = Math.max(...[0, 1, 2].map((d) => bounds.max[d]! - bounds.min[d]!)) + 2 * reach;
  const cell = Math.max(reach, longest / MOST_CELLS);
  const min = bounds.min.map((x) => x - reach);
  const counts = Int32Array.from([0, 1, 2], (d) => Math.max(1, Math.ceil((bounds.max[d]! + reach - min[d]!) / cell)));
  const start = new Int32Array(counts[0]! * counts[1]! * counts[2]! + 1);
  const low = new Int32Array(3);
  const high = new Int32Array(3);
  const visit = (act: (c: number, t: number) => void) => {
    for (const t of triangles) {
      for (let d = 0; d < 3; d++) {
        let lo = Infinity;
        let hi = -Infinity;
        for (let k = 0; k < 3; k++) {
          const x = soup.positions[3 * soup.triangles[3 * t + k]! + d]!;
          lo = Math.min(lo, x);
          hi = Math.max(hi, x);
        }
        low[d] = clampCell((lo - reach - min[d]!) / cell, counts[d]!);
        high[d] = clampCell((hi + reach - min[d]!) / cell, counts[d]!);
      }
      for (let i = low[0]!; i <= high[0]!; i++) {
        for (let j = low[1]!; j <= high[1]!; j++) {
          for (let k = low[2]!; k <= high[2]!; k++) act((i * counts[1]! + j) * counts[2]! + k, t);
        }
      }
    }
  };
  visit((c) => start[c + 1]!++);
  for (let c = 0; c + 1 < start.length; c++) start[c + 1]! += start[c]!;
  const list = new Int32Array(start[start.length - 1]!);
  const next = start.slice();
  visit((c, t) => {
    list[next[c]!++] = t;
  });
  return { soup, min, cell, counts, start, list, reach };
}

/** Nearest point of the triangles into out[0..2]; returns its distance, or Infinity beyond the reach. */
export function nearestOnTriangles(out: Float64Array, grid: TriangleGrid, x: number, y: number, z: number): number {
  const { min, cell, counts, start, list, soup } = grid;
  const i = Math.floor((x - min[0]!) / cell);
  const j = Math.floor((y - min[1]!) / cell);
  const k = Math.floor((z - min[2]!) / cell);
  if (i < 0 || j < 0 || k < 0 || i >= counts[0]! || j >= counts[1]! || k >= counts[2]!) return Infinity;
  const c = (i * counts[1]! + j) * counts[2]! + k;
  let best = grid.reach * grid.reach;
  let found = false;
  for (let n = start[c]!; n < start[c + 1]!; n++) {
    const d2 = nearestOnTriangle(candidate, soup, list[n]!, x, y, z);
    if (d2 <= best) {
      best = d2;
      found = true;
      out.set(candidate);
    }
  }
  return found ? Math.sqrt(best) : Infinity;
}

const candidate = new Float64Array(3);

/** Squared distance to one triangle (Ericson 2005, sec. 5.1.5), its nearest point into out. */
function nearestOnTriangle(out: Float64Array, soup: TriangleSoup, t: number, x: number, y: number, z: number): number {
  const { positions: p, triangles } = soup;
  const a = 3 * triangles[3 * t]!;
  const b = 3 * triangles[3 * t + 1]!;
  const c = 3 * triangles[3 * t + 2]!;
  const ab = [p[b]! - p[a]!, p[b + 1]! - p[a + 1]!, p[b + 2]! - p[a + 2]!];
  const ac = [p[c]! - p[a]!, p[c + 1]! - p[a + 1]!, p[c + 2]! - p[a + 2]!];
  const from = (q: number) => [x - p[q]!, y - p[q + 1]!, z - p[q + 2]!];
  const dot = (u: number[], v: number[]) => u[0]! * v[0]! + u[1]! * v[1]! + u[2]! * v[2]!;
  const ap = from(a);
  const bp = from(b);
  const cp = from(c);
  const d1 = dot(ab, ap);
  const d2 = dot(ac, ap);
  const d3 = dot(ab, bp);
  const d4 = dot(ac, bp);
  const d5 = dot(ab, cp);
  const d6 = dot(ac, cp);
  const va = d3 * d6 - d5 * d4;
  const vb = d5 * d2 - d1 * d6;
  const vc = d1 * d4 - d3 * d2;
  let s: number;
  let r: number;
  if (d1 <= 0 && d2 <= 0) [s, r] = [0, 0];
  else if (d3 >= 0 && d4 <= d3) [s, r] = [1, 0];
  else if (d6 >= 0 && d5 <= d6) [s, r] = [0, 1];
  else if (vc <= 0 && d1 >= 0 && d3 <= 0) [s, r] = [d1 / (d1 - d3), 0];
  else if (vb <= 0 && d2 >= 0 && d6 <= 0) [s, r] = [0, d2 / (d2 - d6)];
  else if (va <= 0 && d4 - d3 >= 0 && d5 - d6 >= 0) {
    const w = (d4 - d3) / (d4 - d3 + (d5 - d6));
    [s, r] = [1 - w, w];
  } else {
    const sum = va + vb + vc;
    [s, r] = [vb / sum, vc / sum];
  }
  let squared = 0;
  const place = [x, y, z];
  for (let d = 0; d < 3; d++) {
    out[d] = p[a + d]! + s * ab[d]! + r * ac[d]!;
    squared += (out[d]! - place[d]!) ** 2;
  }
  return squared;
}

function clampCell(x: number, count: number): number {
  return Math.min(count - 1, Math.max(0, Math.floor(x)));
}
