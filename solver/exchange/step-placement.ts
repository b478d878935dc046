import { cross, dot, length, normalise, scale, subtract } from '../math/vec3';
import type { Patch } from '../geometry/patch';
import type { Vec3 } from '../scene';
import type { StepFile } from './step-tokenizer';
import { recordOf, refOf, tripleOf } from './step-values';

/** x ↦ M x + t, rows [m00, m01, m02, t0, m10, …]; lengths in the file's unit. */
export type Placement = readonly number[];

export const IDENTITY: Placement = [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0];

/** The placement that applies `inner` first. */
export function compose(outer: Placement, inner: Placement): Placement {
  const out: number[] = [];
  for (let r = 0; r < 3; r++) {
    for (let c = 0; c < 4; c++) {
      let sum = c === 3 ? outer[4 * r + 3]! : 0;
      for (let k = 0; k < 3; k++) sum += outer[4 * r + k]! * inner[4 * k + c]!;
      out.push(sum);
    }
  }
  return out;
}

/** Undoes a rigid placement. */
export function invertRigid(p: Placement): Placement {
  const t = [p[3]!, p[7]!, p[11]!];
  return [0, 1, 2].flatMap((r) => [
    p[r]!,
    p[4 + r]!,
    p[8 + r]!,
    -(p[r]! * t[0]! + p[4 + r]! * t[1]! + p[8 + r]! * t[2]!),
  ]);
}

export const isIdentity = (p: Placement): boolean => p.every((x, k) => x === IDENTITY[k]);

/** Scales what is placed and where it is placed, for a file that mixes units. */
export const scaledPlacement = (p: Placement, factor: number): Placement =>
  p.map((x, k) => (k % 4 === 3 ? x * factor : x));

/**
 * The frame of an AXIS2_PLACEMENT_3D (ISO 10303-42): z along its axis, x along its reference direction as far as that is
 * across z. null when it cannot be read.
 */
export function axisPlacement(file: StepFile, id: number | null): Placement | null {
  const record = recordOf(file.instances.get(id ?? -1), 'AXIS2_PLACEMENT_3D');
  if (!record) return null;
  const direction = (at: number, otherwise: Vec3): Vec3 | null => {
    const ref = refOf(record.args[at]);
    return ref === null ? otherwise : tripleOf(file.instances.get(ref), 'DIRECTION');
  };
  const origin = tripleOf(file.instances.get(refOf(record.args[1]) ?? -1), 'CARTESIAN_POINT');
  const axis = direction(2, [0, 0, 1]);
  if (!origin || !axis || !(length(axis) > 0) || ![...origin, ...axis].every(Number.isFinite)) return null;
  const z = normalise(axis);
  const reference = direction(3, Math.abs(z[0]) < 0.9 ? [1, 0, 0] : [0, 0, 1]);
  if (!reference || !reference.every(Number.isFinite)) return null;
  const across = subtract(reference, scale(z, dot(reference, z)));
  if (!(length(across) > 1e-9 * length(reference))) return null;
  const x = normalise(across);
  const y = cross(z, x);
  return [x[0], y[0], z[0], origin[0], x[1], y[1], z[1], origin[1], x[2], y[2], z[2], origin[2]];
}

/** The patch carried to its place. Knots and weights are shared. */
export function placePatch(patch: Patch, p: Placement): Patch {
  const points = new Float64Array(patch.points.length);
  for (let k = 0; k < points.length; k += 3) {
    for (let r = 0; r < 3; r++) {
      points[k + r] =
        p[4 * r]! * patch.points[k]! +
        p[4 * r + 1]! * patch.points[k + 1]! +
        p[4 * r + 2]! * patch.points[k + 2]! +
        p[4 * r + 3]!;
    }
  }
  return { ...patch, points };
}
