/**
 * C[a][b] += Σ_k A[k][a] B[k][b] for `rows` rows of `n` numbers (n a multiple of 4), C row-major n × n.
 * `lower`: only tiles on or below the diagonal. Four by four sums are kept in registers.
 */
export function addTransposedProduct(
  C: Float64Array,
  n: number,
  A: Float64Array,
  a0: number,
  B: Float64Array,
  b0: number,
  rows: number,
  lower: boolean,
): void {
  for (let a = 0; a < n; a += 4) {
    const last = lower ? a + 4 : n;
    for (let b = 0; b < last; b += 4) {
      let s00 = 0, s01 = 0, s02 = 0, s03 = 0; // prettier-ignore
      let s10 = 0, s11 = 0, s12 = 0, s13 = 0; // prettier-ignore
      let s20 = 0, s21 = 0, s22 = 0, s23 = 0; // prettier-ignore
      let s30 = 0, s31 = 0, s32 = 0, s33 = 0; // prettier-ignore
      let p = a0 + a;
      let q = b0 + b;
      for (let k = 0; k < rows; k++, p += n, q += n) {
        const x0 = A[p]!, x1 = A[p + 1]!, x2 = A[p + 2]!, x3 = A[p + 3]!; // prettier-ignore
        const y0 = B[q]!, y1 = B[q + 1]!, y2 = B[q + 2]!, y3 = B[q + 3]!; // prettier-ignore
        s00 += x0 * y0;
        s01 += x0 * y1;
        s02 += x0 * y2;
        s03 += x0 * y3; // prettier-ignore
        s10 += x1 * y0;
        s11 += x1 * y1;
        s12 += x1 * y2;
        s13 += x1 * y3; // prettier-ignore
        s20 += x2 * y0;
        s21 += x2 * y1;
        s22 += x2 * y2;
        s23 += x2 * y3; // prettier-ignore
        s30 += x3 * y0;
        s31 += x3 * y1;
        s32 += x3 * y2;
        s33 += x3 * y3; // prettier-ignore
      }
      let c = a * n + b;
      C[c]! += s00;
      C[c + 1]! += s01;
      C[c + 2]! += s02;
      C[c + 3]! += s03; // prettier-ignore
      c += n;
      C[c]! += s10;
      C[c + 1]! += s11;
      C[c + 2]! += s12;
      C[c + 3]! += s13; // prettier-ignore
      c += n;
      C[c]! += s20;
      C[c + 1]! += s21;
      C[c + 2]! += s22;
      C[c + 3]! += s23; // prettier-ignore
      c += n;
      C[c]! += s30;
      C[c + 1]! += s31;
      C[c + 2]! += s32;
      C[c + 3]! += s33; // prettier-ignore
    }
  }
}
