import type { SceneObstacle } from '../scene';

/** How far a place is inside an obstacle, and which way out is. */
export interface Depth {
  /** m, positive inside */
  depth: number;
  /** unit, outward; not set where depth ≤ 0 and the shape does not say */
  normal: [number, number, number];
}

/**
 * Depth (m) of a place in an obstacle; `up` is the index of the scene's upward axis. Distances outside a box may be
 * underestimated in size, never in sign.
 */
export function depthIn(out: Depth, obstacle: SceneObstacle, up: number, p: ArrayLike<number>): void {
  const { normal } = out;
  switch (obstacle.kind) {
    case 'ground':
      normal[0] = normal[1] = normal[2] = 0;
      normal[up] = 1;
      out.depth = obstacle.height - p[up]!;
      return;
    case 'sphere': {
      const { centre, radius } = obstacle;
      const x = p[0]! - centre[0], y = p[1]! - centre[1], z = p[2]! - centre[2]; // prettier-ignore
      const distance = Math.sqrt(x * x + y * y + z * z);
      out.depth = radius - distance;
      if (distance > 0) {
        normal[0] = x / distance;
        normal[1] = y / distance;
        normal[2] = z / distance;
      } else {
        normal[0] = normal[1] = normal[2] = 0;
        normal[up] = 1;
      }
      return;
    }
    case 'box': {
      const { min, max } = obstacle;
      out.depth = Infinity;
      for (let d = 0; d < 3; d++) {
        for (const side of [-1, 1]) {
          const depth = side > 0 ? max[d]! - p[d]! : p[d]! - min[d]!;
          if (depth >= out.depth) continue;
          out.depth = depth;
          normal[0] = normal[1] = normal[2] = 0;
          normal[d] = side;
        }
      }
    }
  }
}
