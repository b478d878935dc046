/**
 * Eigenvalues (ascending) and unit eigenvectors of a small symmetric matrix (n × n, row-major, not changed) by cyclic
 * Jacobi rotations (C. G. J. Jacobi, J. reine angew. Math. 30 (1846) 51).
 */
export function symmetricEigen(matrix: Float64Array, n: number): { values: Float64Array; vectors: Float64Array[] } {
  const a = matrix.slice();
  const v = new Float64Array(n * n);
  for (let i = 0; i < n; i++) v[i * n + i] = 1;
  for (let sweep = 0; sweep < 40; sweep++) {
    let off = 0;
    let scale = 0;
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        scale += a[i * n + j]! ** 2;
        if (i !== j) off += a[i * n + j]! ** 2;
      }
    }
    if (off <= 1e-30 * scale) break;
    for (let p = 0; p < n; p++) for (let q = p + 1; q < n; q++) rotate(a, v, n, p, q);
  }
  const order = Array.from({ length: n }, (_, i) => i).sort((i, j) => a[i * n + i]! - a[j * n + j]!);
  return {
    values: Float64Array.from(order, (i) => a[i * n + i]!),
    vectors: order.map((i) => Float64Array.from({ length: n }, (_, row) => v[row * n + i]!)),
  };
}

function rotate(a: Float64Array, v: Float64Array, n: number, p: number, q: number): void {
  const apq = a[p * n + q]!;
  if (apq === 0) return;
  const theta = (a[q * n + q]! - a[p * n + p]!) / (2 * apq);
  const t = (theta < 0 ? -1 : 1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
  const c = 1 / Math.sqrt(t * t + 1);
  const s = t * c;
  for (let k = 0; k < n; k++) {
    const x = a[k * n + p]!;
    const y = a[k * n + q]!;
    a[k * n + p] = c * x - s * y;
    a[k * n + q] = s * x + c * y;
  }
  for (let k = 0; k < n; k++) {
    const x = a[p * n + k]!;
    const y = a[q * n + k]!;
    a[p * n + k] = c * x - s * y;
    a[q * n + k] = s * x + c * y;
    const vp = v[k * n + p]!;
    const vq = v[k * n + q]!;
    v[k * n + p] = c * vp - s * vq;
    v[k * n + q] = s * vp + c * vq;
  }
}
