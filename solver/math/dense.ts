/**
 * Small dense symmetric algebra for set-up work (sizes up to a few hundred). Row-major.
 */

/**
 * Factors the symmetric positive matrix `a` (n × n, lower triangle read) as L Lᵀ in place.
 * Pivots below `floor` × the largest diagonal are skipped: their unknown comes out as 0 (a rank-deficient
 * least-squares fit then keeps the well-determined part).
 */
export function factorSymmetric(a: Float64Array, n: number, floor = 1e-13): void {
  let largest = 0;
  for (let i = 0; i < n; i++) largest = Math.max(largest, a[i * n + i]!);
  const limit = floor * largest;
  for (let j = 0; j < n; j++) {
    let d = a[j * n + j]!;
    for (let k = 0; k < j; k++) d -= a[j * n + k]! * a[j * n + k]!;
    if (!(d > limit)) {
      for (let i = j; i < n; i++) a[i * n + j] = 0;
      continue;
    }
    const root = Math.sqrt(d);
    a[j * n + j] = root;
    for (let i = j + 1; i < n; i++) {
      let s = a[i * n + j]!;
      for (let k = 0; k < j; k++) s -= a[i * n + k]! * a[j * n + k]!;
      a[i * n + j] = s / root;
    }
  }
}

/** Solves L Lᵀ x = b in place for `columns` right-hand sides laid out [row][column]. */
export function solveFactored(l: Float64Array, n: number, b: Float64Array, columns = 1): void {
  for (let i = 0; i < n; i++) {
    const d = l[i * n + i]!;
    for (let c = 0; c < columns; c++) {
      let s = b[i * columns + c]!;
      for (let k = 0; k < i; k++) s -= l[i * n + k]! * b[k * columns + c]!;
      b[i * columns + c] = d === 0 ? 0 : s / d;
    }
  }
  for (let i = n - 1; i >= 0; i--) {
    const d = l[i * n + i]!;
    for (let c = 0; c < columns; c++) {
      let s = b[i * columns + c]!;
      for (let k = i + 1; k < n; k++) s -= l[k * n + i]! * b[k * columns + c]!;
      b[i * columns + c] = d === 0 ? 0 : s / d;
    }
  }
}
