import type { Shape } from '../../solver/scene';

/** Distance from a point to the surface of a built-in shape, by the textbook formula of each. */
export function fitsShape(shape: Shape, p: readonly number[]): number {
  const dot = (a: readonly number[], b: readonly number[]) => a[0]! * b[0]! + a[1]! * b[1]! + a[2]! * b[2]!;
  const minus = (a: readonly number[], b: readonly number[]) => a.map((x, d) => x - b[d]!);
  switch (shape.kind) {
    case 'sphere':
      return Math.abs(Math.hypot(...minus(p, shape.centre)) - shape.radius);
    case 'torus': {
      const r = minus(p, shape.centre);
      const along = dot(r, shape.axis) / Math.hypot(...shape.axis);
      const across = Math.sqrt(Math.max(0, dot(r, r) - along * along));
      return Math.abs(Math.hypot(across - shape.majorRadius, along) - shape.minorRadius);
    }
    case 'cylinder': {
      const axis = minus(shape.end, shape.start);
      const height = Math.hypot(...axis);
      const r = minus(p, shape.start);
      const along = dot(r, axis) / height;
      const across = Math.sqrt(Math.max(0, dot(r, r) - along * along));
      return Math.min(Math.abs(across - shape.radius), Math.abs(along), Math.abs(along - height));
    }
    case 'box':
      return Math.min(...p.flatMap((x, d) => [Math.abs(x - shape.min[d]!), Math.abs(x - shape.max[d]!)]));
  }
}
