import type { BlockPattern } from '../linear/block-pattern';
import type { BasisRows } from '../quadrature/prepared';
import { evaluateRow, scatterRow } from './rows';

/**
 * Quadratic penalties ½ k |N c − target|² on chosen components: supports, ties between bodies and the pull of a
 * hand are all of this form. Stiffness in N/m, targets in m.
 */
export interface Constraint {
  /** The support it belongs to, or what it is. */
  id: string;
  rows: BasisRows;
  /** N/m a row */
  stiffness: Float64Array;
  /** which of x, y, z are held */
  axes: readonly [boolean, boolean, boolean];
  /** 3 a row, m; changed in place as a support is carried */
  targets: Float64Array;
}

const place = new Float64Array(3);

/** Adds the constraint's gradient to r (when given) and returns its energy, J. */
export function constraintGradient(constraint: Constraint, c: Float64Array, r: Float64Array | null): number {
  const { rows, stiffness, axes, targets } = constraint;
  let energy = 0;
  for (let k = 0; k < rows.count; k++) {
    evaluateRow(place, rows, k, c);
    const dx = axes[0] ? place[0]! - targets[3 * k]! : 0;
    const dy = axes[1] ? place[1]! - targets[3 * k + 1]! : 0;
    const dz = axes[2] ? place[2]! - targets[3 * k + 2]! : 0;
    const s = stiffness[k]!;
    energy += 0.5 * s * (dx * dx + dy * dy + dz * dz);
    if (r) scatterRow(r, rows, k, s * dx, s * dy, s * dz);
  }
  return energy;
}

/** K += factor Σ k N Nᵀ on the held components. */
export function constraintHessian(
  K: Float64Array,
  pattern: BlockPattern,
  constraint: Constraint,
  factor: number,
): void {
  const { rows, stiffness, axes } = constraint;
  const tensor = new Float64Array(9);
  for (let k = 0; k < rows.count; k++) {
    for (let i = 0; i < 3; i++) tensor[4 * i] = axes[i] ? factor * stiffness[k]! : 0;
    addRowTensor(K, pattern, rows, k, tensor);
  }
}

/** K += T ⊗ N Nᵀ for one row; T symmetric, 9 numbers row-major. */
export function addRowTensor(
  K: Float64Array,
  pattern: BlockPattern,
  rows: BasisRows,
  row: number,
  T: ArrayLike<number>,
): void {
  const { basis, offsets, parts, values } = rows;
  const { position, blockAt, partCount, size } = pattern;
  for (let e = offsets[row]!; e < offsets[row + 1]!; e++) {
    const p = position[parts[e]!]!;
    for (let f = offsets[row]!; f < offsets[row + 1]!; f++) {
      const q = position[parts[f]!]!;
      if (p < q) continue;
      const at = blockAt[p * partCount + q]! * size * size;
      for (let i = 0; i < 3; i++) {
        for (let j = 0; j < 3; j++) {
          const s = T[3 * i + j]!;
          if (s === 0) continue;
          for (let a = 0; a < basis; a++) {
            const value = s * values[e * basis + a]!;
            const to = at + (i * basis + a) * size + j * basis;
            for (let b = 0; b < basis; b++) K[to + b]! += value * values[f * basis + b]!;
          }
        }
      }
    }
  }
}

/** Force (N) and moment (N m) about `about` that the constraint puts on the body. */
export function constraintReaction(
  constraint: Constraint,
  c: Float64Array,
  about: readonly [number, number, number],
): { force: [number, number, number]; moment: [number, number, number] } {
  const { rows, stiffness, axes, targets } = constraint;
  const force: [number, number, number] = [0, 0, 0];
  const moment: [number, number, number] = [0, 0, 0];
  for (let k = 0; k < rows.count; k++) {
    evaluateRow(place, rows, k, c);
    const f = [0, 1, 2].map((d) => (axes[d] ? -stiffness[k]! * (place[d]! - targets[3 * k + d]!) : 0));
    const arm = [0, 1, 2].map((d) => place[d]! - about[d]!);
    for (let d = 0; d < 3; d++) {
      const e = (d + 1) % 3;
      const g = (d + 2) % 3;
      force[d]! += f[d]!;
      moment[d]! += arm[e]! * f[g]! - arm[g]! * f[e]!;
    }
  }
  return { force, moment };
}
