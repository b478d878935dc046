/** Triangles of many patches in one list. */
export interface TriangleSoup {
  /** 3 · vertexCount, m */
  positions: Float64Array;
  /** 3 · triangleCount vertex numbers; the normal is (b − a) × (c − a) */
  triangles: Int32Array;
  /** triangleCount: the patch of each triangle */
  patch: Int32Array;
}

export interface Bounds {
  min: Float64Array;
  max: Float64Array;
}

/** Turns the triangles of every patch with flips[patch] = 1 over, in place. */
export function flipTriangles(soup: TriangleSoup, flips: Uint8Array): void {
  const { triangles, patch } = soup;
  for (let t = 0; t < patch.length; t++) {
    if (flips[patch[t]!] === 0) continue;
    const b = triangles[3 * t + 1]!;
    triangles[3 * t + 1] = triangles[3 * t + 2]!;
    triangles[3 * t + 2] = b;
  }
}

/** Triangle numbers of the patches with chosen[patch] = 1, ascending. */
export function trianglesOf(soup: TriangleSoup, chosen: Uint8Array): Int32Array {
  let count = 0;
  for (let t = 0; t < soup.patch.length; t++) count += chosen[soup.patch[t]!]!;
  const list = new Int32Array(count);
  let n = 0;
  for (let t = 0; t < soup.patch.length; t++) if (chosen[soup.patch[t]!] === 1) list[n++] = t;
  return list;
}

/** Box around the listed triangles, m. */
export function boundsOf(soup: TriangleSoup, list: Int32Array): Bounds {
  const min = new Float64Array(3).fill(Infinity);
  const max = new Float64Array(3).fill(-Infinity);
  for (const t of list) {
    for (let k = 0; k < 3; k++) {
      const v = 3 * soup.triangles[3 * t + k]!;
      for (let d = 0; d < 3; d++) {
        const x = soup.positions[v + d]!;
        if (x < min[d]!) min[d] = x;
        if (x > max[d]!) max[d] = x;
      }
    }
  }
  return { min, max };
}

/** Total area of the listed triangles, m². */
export function areaOf(soup: TriangleSoup, list: Int32Array): number {
  const { positions: p, triangles } = soup;
  let area = 0;
  for (const t of list) {
    const a = 3 * triangles[3 * t]!;
    const b = 3 * triangles[3 * t + 1]!;
    const c = 3 * triangles[3 * t + 2]!;
    const ux = p[b]! - p[a]!;
    const uy = p[b + 1]! - p[a + 1]!;
    const uz = p[b + 2]! - p[a + 2]!;
    const vx = p[c]! - p[a]!;
    const vy = p[c + 1]! - p[a + 1]!;
    const vz = p[c + 2]! - p[a + 2]!;
    area += 0.5 * Math.hypot(uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx);
  }
  return area;
}
