/**
 * Vertex normals of a moving surface. Vertices that coincide at rest with nearly the same normal share one, so that
 * seams between patches do not show.
 */
export class SmoothNormals {
  private readonly shared: Uint32Array;
  private readonly sums: Float32Array;

  constructor(
    private readonly triangles: Uint32Array,
    restPositions: Float32Array,
    restNormals: Float32Array,
    reach: number,
  ) {
    const count = restPositions.length / 3;
    this.shared = new Uint32Array(count);
    const places = new Map<string, number[]>();
    let groups = 0;
    const normalOf: number[] = [];
    for (let v = 0; v < count; v++) {
      const key = [0, 1, 2].map((d) => Math.round(restPositions[3 * v + d]! / reach)).join();
      const here = places.get(key) ?? [];
      const match = here.find((group) => {
        const w = normalOf[group]!;
        let cosine = 0;
        for (let d = 0; d < 3; d++) cosine += restNormals[3 * v + d]! * restNormals[3 * w + d]!;
        return cosine > 0.85;
      });
      if (match === undefined) {
        here.push(groups);
        places.set(key, here);
        normalOf.push(v);
        this.shared[v] = groups++;
      } else this.shared[v] = match;
    }
    this.sums = new Float32Array(3 * groups);
  }

  /** Fills `normals` for the present positions. */
  update(normals: Float32Array, positions: Float32Array): void {
    const { triangles, shared, sums } = this;
    sums.fill(0);
    for (let t = 0; t < triangles.length; t += 3) {
      const a = 3 * triangles[t]!;
      const b = 3 * triangles[t + 1]!;
      const c = 3 * triangles[t + 2]!;
      const ux = positions[b]! - positions[a]!;
      const uy = positions[b + 1]! - positions[a + 1]!;
      const uz = positions[b + 2]! - positions[a + 2]!;
      const vx = positions[c]! - positions[a]!;
      const vy = positions[c + 1]! - positions[a + 1]!;
      const vz = positions[c + 2]! - positions[a + 2]!;
      const nx = uy * vz - uz * vy;
      const ny = uz * vx - ux * vz;
      const nz = ux * vy - uy * vx;
      for (let k = 0; k < 3; k++) {
        const g = 3 * shared[triangles[t + k]!]!;
        sums[g]! += nx;
        sums[g + 1]! += ny;
        sums[g + 2]! += nz;
      }
    }
    for (let v = 0; v < shared.length; v++) {
      const g = 3 * shared[v]!;
      const x = sums[g]!;
      const y = sums[g + 1]!;
      const z = sums[g + 2]!;
      const l = Math.sqrt(x * x + y * y + z * z) || 1;
      normals[3 * v] = x / l;
      normals[3 * v + 1] = y / l;
      normals[3 * v + 2] = z / l;
    }
  }
}
