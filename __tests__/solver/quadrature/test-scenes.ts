import { createHash } from 'node:crypto';
import { shapePatches } from '../../../solver/geometry/shapes';
import type { Patch } from '../../../solver/geometry/patch';
import type { Prepared } from '../../../solver/quadrature/prepared';
import type { Scene, SceneMaterial, Shape, Vec3 } from '../../../solver/scene';

export const rubber: SceneMaterial = {
  id: 'rubber',
  name: 'Rubber',
  law: 'stable-neo-hookean',
  youngsModulus: 1e6,
  poissonsRatio: 0.3,
  density: 1000,
};

/** A scene of one material with nothing that acts on it. */
export function plainScene(count = 12, changes: Partial<Scene> = {}): Scene {
  return {
    format: 'lollop-scene',
    version: 1,
    name: 'test',
    geometry: { kind: 'shapes', shapes: [] },
    unit: 1,
    up: 'z',
    parts: { count, order: 'quadratic' },
    bondDistance: 0,
    materials: [rubber],
    supports: [],
    loads: [],
    obstacles: [],
    gauges: [],
    time: { kind: 'static', loadSteps: 1 },
    ...changes,
  };
}

export const patchesOf = (...shapes: Shape[]): Patch[] => shapes.flatMap(shapePatches);

export const box = (min: Vec3, max: Vec3, gap = 0): Shape => ({ kind: 'box', min, max, gap });

/** The patches turned by `angle` about the unit vector `axis` (Rodrigues' formula). */
export function rotated(patches: readonly Patch[], axis: Vec3, angle: number): Patch[] {
  const c = Math.cos(angle);
  const s = Math.sin(angle);
  const [kx, ky, kz] = axis;
  return patches.map((patch) => {
    const points = new Float64Array(patch.points.length);
    for (let o = 0; o < points.length; o += 3) {
      const [x, y, z] = [patch.points[o]!, patch.points[o + 1]!, patch.points[o + 2]!];
      const dot = (kx * x + ky * y + kz * z) * (1 - c);
      points[o] = x * c + (ky * z - kz * y) * s + kx * dot;
      points[o + 1] = y * c + (kz * x - kx * z) * s + ky * dot;
      points[o + 2] = z * c + (kx * y - ky * x) * s + kz * dot;
    }
    return { ...patch, points };
  });
}

/** A quadratic deformation with its gradient, different in every monomial. */
export const quadratic = {
  position: ([x, y, z]: Vec3): Vec3 => [
    0.3 + 1.1 * x - 0.2 * y + 0.1 * z + 0.4 * x * x - 0.3 * y * z + 0.2 * z * z,
    -0.1 + 0.3 * x + 0.9 * y - 0.15 * z + 0.25 * x * y + 0.1 * y * y,
    0.2 - 0.1 * x + 0.2 * y + 1.2 * z - 0.35 * z * x + 0.3 * x * x - 0.2 * y * y,
  ],
  /** [component][direction] */
  gradient: ([x, y, z]: Vec3): [Vec3, Vec3, Vec3] => [
    [1.1 + 0.8 * x, -0.2 - 0.3 * z, 0.1 - 0.3 * y + 0.4 * z],
    [0.3 + 0.25 * y, 0.9 + 0.25 * x + 0.2 * y, -0.15],
    [-0.1 - 0.35 * z + 0.6 * x, 0.2 - 0.4 * y, 1.2 - 0.35 * x],
  ],
};

/** Coefficients with which every part holds the quadratic above: its Taylor series at the part's centre. */
export function quadraticCoefficients({ parts }: Pick<Prepared, 'parts'>): Float64Array {
  const out = new Float64Array(30 * parts.count);
  for (let i = 0; i < parts.count; i++) {
    const centre: Vec3 = [parts.centres[3 * i]!, parts.centres[3 * i + 1]!, parts.centres[3 * i + 2]!];
    const h = parts.scales[i]!;
    const value = quadratic.position(centre);
    const slope = quadratic.gradient(centre);
    // ξ², η², ζ², ξη, ηζ, ζξ
    const second = [
      [0.4, 0, 0.2, 0, -0.3, 0],
      [0, 0.1, 0, 0.25, 0, 0],
      [0.3, -0.2, 0, 0, 0, -0.35],
    ];
    for (let d = 0; d < 3; d++) {
      const o = (3 * i + d) * 10;
      out[o] = value[d]!;
      for (let e = 0; e < 3; e++) out[o + 1 + e] = h * slope[d]![e]!;
      for (let q = 0; q < 6; q++) out[o + 4 + q] = h * h * second[d]![q]!;
    }
  }
  return out;
}

/** Deformation gradients at all quadrature points, [point][component][direction]. */
export function deformationGradients({ points, parts }: Prepared, coefficients: Float64Array): Float64Array {
  const { basis } = parts;
  const out = new Float64Array(9 * points.count);
  for (let g = 0; g < points.groupCount; g++) {
    const active = points.activeParts.subarray(points.activeStart[g]!, points.activeStart[g + 1]!);
    const width = active.length * basis;
    for (let k = points.start[g]!; k < points.start[g + 1]!; k++) {
      for (let e = 0; e < 3; e++) {
        const row = points.gradientStart[g]! + (3 * (k - points.start[g]!) + e) * width;
        for (let d = 0; d < 3; d++) {
          let sum = 0;
          active.forEach((part, m) => {
            for (let a = 0; a < basis; a++)
              sum += points.gradients[row + m * basis + a]! * coefficients[(3 * part + d) * basis + a]!;
          });
          out[9 * k + 3 * d + e] = sum;
        }
      }
    }
  }
  return out;
}

export const vectorAt = (list: ArrayLike<number>, k: number): Vec3 => [
  list[3 * k]!,
  list[3 * k + 1]!,
  list[3 * k + 2]!,
];

/** Largest difference of two lists of one length. */
export function furthest(a: ArrayLike<number>, b: ArrayLike<number>): number {
  if (a.length !== b.length) return Infinity;
  let worst = 0;
  for (let n = 0; n < a.length; n++) worst = Math.max(worst, Math.abs(a[n]! - b[n]!));
  return worst;
}

/** A structure of typed arrays as text in which every bit counts; quicker to compare than the arrays. */
export function fingerprint(value: unknown): string {
  return JSON.stringify(value, (_key, item: unknown) =>
    ArrayBuffer.isView(item)
      ? createHash('sha256')
          .update(new Uint8Array(item.buffer, item.byteOffset, item.byteLength))
          .digest('hex')
      : item,
  );
}
