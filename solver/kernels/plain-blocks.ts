import type { BlockPattern } from '../linear/block-pattern';
import type { BlockPairs } from '../quadrature/prepared';

/** Block operations of the plain kernels; the layout is that of BlockPattern. */

/** K += Σ_g factors[g] Σ_m D_gm D_gmᵀ; D holds 4 vectors of all unknowns a group. */
export function addOuterProducts(
  K: Float64Array,
  pattern: BlockPattern,
  D: Float64Array,
  factors: Float64Array,
  member: Uint8Array,
): void {
  const { size, partCount, columnStart, rows, partAt } = pattern;
  const length = partCount * size;
  for (let column = 0; column < partCount; column++) {
    const b = partAt[column]!;
    for (let e = columnStart[column]!; e < columnStart[column + 1]!; e++) {
      const a = partAt[rows[e]!]!;
      for (let g = 0; g < factors.length; g++) {
        if (factors[g] === 0 || !member[g * partCount + a] || !member[g * partCount + b]) continue;
        for (let m = 0; m < 4; m++) {
          const rowVector = (4 * g + m) * length + a * size;
          const columnVector = (4 * g + m) * length + b * size;
          for (let r = 0; r < size; r++) {
            const s = factors[g]! * D[rowVector + r]!;
            const to = (e * size + r) * size;
            for (let c = 0; c < size; c++) K[to + c]! += s * D[columnVector + c]!;
          }
        }
      }
    }
  }
}

/** Right-looking block Cholesky in place (Golub and Van Loan 2013, sec. 4.2.9); false when a pivot is not positive. */
export function factorBlocks(K: Float64Array, pattern: BlockPattern): boolean {
  const { partCount, size, columnStart, rows, blockAt } = pattern;
  const area = size * size;
  for (let column = 0; column < partCount; column++) {
    const first = columnStart[column]!;
    const end = columnStart[column + 1]!;
    if (!factorDense(K, first * area, size)) return false;
    for (let e = first + 1; e < end; e++) solveRight(K, e * area, first * area, size);
    for (let e = first + 1; e < end; e++) {
      for (let f = first + 1; f <= e; f++) {
        subtractProduct(K, blockAt[rows[e]! * partCount + rows[f]!]! * area, e * area, f * area, size);
      }
    }
  }
  return true;
}

function factorDense(K: Float64Array, at: number, n: number): boolean {
  for (let j = 0; j < n; j++) {
    const rowJ = at + j * n;
    let d = K[rowJ + j]!;
    for (let k = 0; k < j; k++) d -= K[rowJ + k]! * K[rowJ + k]!;
    if (!(d > 0)) return false;
    d = Math.sqrt(d);
    K[rowJ + j] = d;
    const inverse = 1 / d;
    for (let i = j + 1; i < n; i++) {
      const rowI = at + i * n;
      let s = K[rowI + j]!;
      for (let k = 0; k < j; k++) s -= K[rowI + k]! * K[rowJ + k]!;
      K[rowI + j] = s * inverse;
    }
  }
  return true;
}

/** X ← X L⁻ᵀ for the block X and the factored diagonal block L. */
function solveRight(K: Float64Array, x: number, l: number, n: number): void {
  for (let r = 0; r < n; r++) {
    const row = x + r * n;
    for (let j = 0; j < n; j++) {
      const lower = l + j * n;
      let s = K[row + j]!;
      for (let k = 0; k < j; k++) s -= K[row + k]! * K[lower + k]!;
      K[row + j] = s / K[lower + j]!;
    }
  }
}

/** C ← C − A Bᵀ, n even. */
function subtractProduct(K: Float64Array, c: number, a: number, b: number, n: number): void {
  for (let i = 0; i < n; i += 2) {
    for (let j = 0; j < n; j += 2) {
      let p = a + i * n;
      let q = b + j * n;
      let s00 = 0, s01 = 0, s10 = 0, s11 = 0; // prettier-ignore
      for (let k = 0; k < n; k++, p++, q++) {
        const x0 = K[p]!, x1 = K[p + n]!, y0 = K[q]!, y1 = K[q + n]!; // prettier-ignore
        s00 += x0 * y0;
        s01 += x0 * y1;
        s10 += x1 * y0;
        s11 += x1 * y1; // prettier-ignore
      }
      const to = c + i * n + j;
      K[to]! -= s00;
      K[to + 1]! -= s01;
      K[to + n]! -= s10;
      K[to + n + 1]! -= s11;
    }
  }
}

/** Solves L Lᵀ x = b in place, parts in elimination order. */
export function solveBlocks(L: Float64Array, pattern: BlockPattern, x: Float64Array): void {
  const { partCount, size, columnStart, rows, partAt } = pattern;
  const area = size * size;
  for (let column = 0; column < partCount; column++) {
    const own = partAt[column]! * size;
    const diagonal = columnStart[column]! * area;
    for (let i = 0; i < size; i++) {
      let s = x[own + i]!;
      for (let k = 0; k < i; k++) s -= L[diagonal + i * size + k]! * x[own + k]!;
      x[own + i] = s / L[diagonal + i * size + i]!;
    }
    for (let e = columnStart[column]! + 1; e < columnStart[column + 1]!; e++) {
      const to = partAt[rows[e]!]! * size;
      for (let i = 0; i < size; i++) {
        let s = 0;
        const row = e * area + i * size;
        for (let k = 0; k < size; k++) s += L[row + k]! * x[own + k]!;
        x[to + i]! -= s;
      }
    }
  }
  for (let column = partCount - 1; column >= 0; column--) {
    const own = partAt[column]! * size;
    for (let e = columnStart[column]! + 1; e < columnStart[column + 1]!; e++) {
      const from = partAt[rows[e]!]! * size;
      for (let i = 0; i < size; i++) {
        const value = x[from + i]!;
        const row = e * area + i * size;
        for (let k = 0; k < size; k++) x[own + k]! -= L[row + k]! * value;
      }
    }
    const diagonal = columnStart[column]! * area;
    for (let i = size - 1; i >= 0; i--) {
      let s = x[own + i]!;
      for (let k = i + 1; k < size; k++) s -= L[diagonal + k * size + i]! * x[own + k]!;
      x[own + i] = s / L[diagonal + i * size + i]!;
    }
  }
}

/** y = K x over the stored blocks; of diagonal blocks the lower triangle counts. */
export function multiplyBlocks(y: Float64Array, K: Float64Array, pattern: BlockPattern, x: Float64Array): void {
  const { partCount, size, columnStart, rows, partAt } = pattern;
  y.fill(0);
  for (let column = 0; column < partCount; column++) {
    const own = partAt[column]! * size;
    const first = columnStart[column]!;
    for (let i = 0; i < size; i++) {
      const row = first * size * size + i * size;
      for (let k = 0; k < i; k++) {
        y[own + i]! += K[row + k]! * x[own + k]!;
        y[own + k]! += K[row + k]! * x[own + i]!;
      }
      y[own + i]! += K[row + i]! * x[own + i]!;
    }
    for (let e = first + 1; e < columnStart[column + 1]!; e++) {
      const other = partAt[rows[e]!]! * size;
      for (let i = 0; i < size; i++) {
        const row = (e * size + i) * size;
        for (let k = 0; k < size; k++) {
          y[other + i]! += K[row + k]! * x[own + k]!;
          y[own + k]! += K[row + k]! * x[other + i]!;
        }
      }
    }
  }
}

/** out += factor · A x on each of the three components, for the symmetric scalar form A given in block pairs. */
export function applyForm(out: Float64Array, form: BlockPairs, basis: number, x: Float64Array, factor: number): void {
  const { rows, columns, values } = form;
  for (let p = 0; p < rows.length; p++) {
    const block = p * basis * basis;
    for (let i = 0; i < 3; i++) {
      const r = (rows[p]! * 3 + i) * basis;
      const c = (columns[p]! * 3 + i) * basis;
      for (let a = 0; a < basis; a++) {
        let s = 0;
        for (let b = 0; b < basis; b++) s += values[block + a * basis + b]! * x[c + b]!;
        out[r + a]! += factor * s;
      }
      if (r === c) continue;
      for (let a = 0; a < basis; a++) {
        const s = factor * x[r + a]!;
        for (let b = 0; b < basis; b++) out[c + b]! += s * values[block + a * basis + b]!;
      }
    }
  }
}
