import type { Prepared } from '../quadrature/prepared';
import { samplesInRegion } from '../quadrature/regions';
import type { Scene, SceneSupport, Vec3 } from '../scene';
import { pickRows } from './rows';
import type { Constraint } from './constraints';
import { cubeRoot } from '../math/elementary';

/** Penalty of supports and ties over E/ℓ: 100 hides stiffness error behind compliance, 10⁴ stiffens by .2–.9 %. */
export const SUPPORT_FACTOR = 1000;

/** A support on its samples. */
export interface PlacedSupport {
  support: SceneSupport;
  constraint: Constraint;
  /** rest places, 3 a row, m */
  rest: Float64Array;
  pivot: Vec3;
}

/** Finds the samples of every support; throws a RangeError when a region touches no surface. */
export function placeSupports(prepared: Prepared, scene: Scene): PlacedSupport[] {
  const { samples, bodies, report } = prepared;
  return scene.supports.map((support) => {
    const chosen = samplesInRegion(samples, support.region, report.diagonal);
    if (chosen.length === 0) {
      throw new RangeError(
        `Support ${support.id} (${support.name}) touches no surface. Move its region onto the body.`,
      );
    }
    const rest = new Float64Array(3 * chosen.length);
    const stiffness = new Float64Array(chosen.length);
    const pivot: Vec3 = [0, 0, 0];
    let area = 0;
    chosen.forEach((s, k) => {
      const body = bodies[samples.body[s]!]!;
      stiffness[k] = penaltyStiffness(scene.materials[body.material]!.youngsModulus, body.volume) * samples.areas[s]!;
      for (let d = 0; d < 3; d++) {
        rest[3 * k + d] = samples.positions[3 * s + d]!;
        pivot[d]! += samples.areas[s]! * samples.positions[3 * s + d]!;
      }
      area += samples.areas[s]!;
    });
    for (let d = 0; d < 3; d++) pivot[d]! /= area;
    return {
      support,
      rest,
      pivot: support.pivot ?? pivot,
      constraint: {
        id: support.id,
        rows: pickRows(samples.rows, chosen),
        stiffness,
        axes: [support.axes.includes('x'), support.axes.includes('y'), support.axes.includes('z')],
        targets: rest.slice(),
      },
    };
  });
}

/** β E/ℓ, Pa/m, with ℓ the cube root of the body's volume. */
export const penaltyStiffness = (youngsModulus: number, volume: number) =>
  (SUPPORT_FACTOR * youngsModulus) / cubeRoot(volume);

/** Moves the targets to where the support is at `time` (s); linear between keys, held outside their range. */
export function carry(placed: PlacedSupport, time: number): void {
  const { keys } = placed.support;
  if (keys.length === 0) return;
  let next = keys.findIndex((key) => key.time >= time);
  if (next < 0) next = keys.length - 1;
  const b = keys[next]!;
  const a = next > 0 && time < b.time ? keys[next - 1]! : b;
  const s = b === a ? 1 : (time - a.time) / (b.time - a.time);
  const mix = (x: Vec3, y: Vec3): Vec3 => [0, 1, 2].map((d) => x[d]! + s * (y[d]! - x[d]!)) as Vec3;
  moveTargets(placed, mix(a.translation, b.translation), mix(a.rotationDegrees, b.rotationDegrees));
}

/** For statics: the share 0…1 of the way to the last key. */
export function carryShare(placed: PlacedSupport, share: number): void {
  const last = placed.support.keys[placed.support.keys.length - 1];
  if (!last) return;
  const scaled = (v: Vec3): Vec3 => [share * v[0], share * v[1], share * v[2]];
  moveTargets(placed, scaled(last.translation), scaled(last.rotationDegrees));
}

function moveTargets(placed: PlacedSupport, translation: Vec3, rotationDegrees: Vec3): void {
  const R = rotationMatrix(rotationDegrees);
  const { rest, pivot, constraint } = placed;
  for (let k = 0; k < rest.length; k += 3) {
    const x = rest[k]! - pivot[0];
    const y = rest[k + 1]! - pivot[1];
    const z = rest[k + 2]! - pivot[2];
    for (let d = 0; d < 3; d++) {
      constraint.targets[k + d] = pivot[d]! + translation[d]! + R[3 * d]! * x + R[3 * d + 1]! * y + R[3 * d + 2]! * z;
    }
  }
}

/** Rotation by the vector's length (degrees) about it: Rodrigues' formula, row-major. */
export function rotationMatrix(degrees: Vec3): number[] {
  const angle = (Math.hypot(...degrees) * Math.PI) / 180;
  if (angle === 0) return [1, 0, 0, 0, 1, 0, 0, 0, 1];
  const l = Math.hypot(...degrees);
  const [x, y, z] = [degrees[0] / l, degrees[1] / l, degrees[2] / l];
  const { sin, cos } = sineCosine(angle);
  const t = 1 - cos;
  return [
    t * x * x + cos, t * x * y - sin * z, t * x * z + sin * y,
    t * x * y + sin * z, t * y * y + cos, t * y * z - sin * x,
    t * x * z - sin * y, t * y * z + sin * x, t * z * z + cos,
  ]; // prettier-ignore
}

/**
 * Sine and cosine by their Taylor series after reduction to ±π/4: the same bits in every engine, which the
 * built-in functions do not promise. Error below 1e-15 for angles up to a few hundred turns.
 */
export function sineCosine(angle: number): { sin: number; cos: number } {
  const quarter = Math.round(angle / (Math.PI / 2));
  const x = angle - quarter * (Math.PI / 2);
  let sin = 0;
  let cos = 0;
  let term = 1;
  for (let n = 0; n < 22; n++) {
    const signed = n % 4 < 2 ? term : -term;
    if (n % 2 === 0) cos += signed;
    else sin += signed;
    term *= x / (n + 1);
  }
  switch (((quarter % 4) + 4) % 4) {
    case 0:
      return { sin, cos };
    case 1:
      return { sin: cos, cos: -sin };
    case 2:
      return { sin: -sin, cos: -cos };
    default:
      return { sin: -cos, cos: sin };
  }
}
