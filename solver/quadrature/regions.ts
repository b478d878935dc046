import type { Region } from '../scene';
import type { SurfaceSamples } from './prepared';

/** Samples of the rest surface in a region, ascending. A plane's tolerance is at least a millionth of the diagonal (m). */
export function samplesInRegion(samples: SurfaceSamples, region: Region, diagonal: number): Int32Array {
  const inside = test(region, diagonal);
  const chosen: number[] = [];
  for (let s = 0; s < samples.count; s++) {
    const x = samples.positions[3 * s]!;
    const y = samples.positions[3 * s + 1]!;
    const z = samples.positions[3 * s + 2]!;
    if (inside(x, y, z, samples.patch[s]!)) chosen.push(s);
  }
  return Int32Array.from(chosen);
}

function test(region: Region, diagonal: number): (x: number, y: number, z: number, patch: number) => boolean {
  switch (region.kind) {
    case 'all':
      return () => true;
    case 'plane': {
      const [px, py, pz] = region.point;
      const [nx, ny, nz] = region.normal;
      const limit = Math.max(region.tolerance, 1e-6 * diagonal) * Math.hypot(nx, ny, nz);
      return (x, y, z) => Math.abs((x - px) * nx + (y - py) * ny + (z - pz) * nz) <= limit;
    }
    case 'box': {
      const { min, max } = region;
      return (x, y, z) => x >= min[0] && x <= max[0] && y >= min[1] && y <= max[1] && z >= min[2] && z <= max[2];
    }
    case 'sphere': {
      const [cx, cy, cz] = region.centre;
      const r2 = region.radius * region.radius;
      return (x, y, z) => (x - cx) ** 2 + (y - cy) ** 2 + (z - cz) ** 2 <= r2;
    }
    case 'patches': {
      const wanted = new Set(region.patches);
      return (_x, _y, _z, patch) => wanted.has(patch);
    }
  }
}
