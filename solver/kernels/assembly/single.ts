// AssemblyScript: assembly and Cholesky factor in single precision, four floats at a time. The system matrix stays in
// doubles; products at the quadrature points and the factor are floats, which is enough for the direction of a Newton
// step. Blocks of the factor are `wide` × `wide`: their size rounded up to 8, padded by the identity.

// @ts-nocheck
const D: usize = 8;
const S: usize = 4;

// @inline
function i32At(base: usize, index: i32): i32 {
  return load<i32>(base + ((<usize>index) << 2));
}

// P[a][b] = Σ_k A[k][a] B[k][b] for tiles on or below the diagonal; n a multiple of 8.
function lowerProduct(P: usize, n: i32, A: usize, B: usize, rows: i32): void {
  const bytes = <usize>n * S;
  for (let a: usize = 0; a < bytes; a += 16) {
    for (let b: usize = 0; b <= a; b += 32) {
      let s00 = f32x4.splat(0), s01 = f32x4.splat(0), s10 = f32x4.splat(0), s11 = f32x4.splat(0); // prettier-ignore
      let s20 = f32x4.splat(0), s21 = f32x4.splat(0), s30 = f32x4.splat(0), s31 = f32x4.splat(0); // prettier-ignore
      let p = A + a;
      let q = B + b;
      for (let k = 0; k < rows; k++, p += bytes, q += bytes) {
        const y0 = v128.load(q);
        const y1 = v128.load(q, 16);
        let x = v128.load32_splat(p);
        s00 = f32x4.add(s00, f32x4.mul(x, y0));
        s01 = f32x4.add(s01, f32x4.mul(x, y1));
        x = v128.load32_splat(p, 4);
        s10 = f32x4.add(s10, f32x4.mul(x, y0));
        s11 = f32x4.add(s11, f32x4.mul(x, y1));
        x = v128.load32_splat(p, 8);
        s20 = f32x4.add(s20, f32x4.mul(x, y0));
        s21 = f32x4.add(s21, f32x4.mul(x, y1));
        x = v128.load32_splat(p, 12);
        s30 = f32x4.add(s30, f32x4.mul(x, y0));
        s31 = f32x4.add(s31, f32x4.mul(x, y1));
      }
      let c = P + (a >> 2) * bytes + b;
      v128.store(c, s00);
      v128.store(c, s01, 16);
      c += bytes;
      v128.store(c, s10);
      v128.store(c, s11, 16);
      c += bytes;
      v128.store(c, s20);
      v128.store(c, s21, 16);
      c += bytes;
      v128.store(c, s30);
      v128.store(c, s31, 16);
    }
  }
}

// P[a][b] = Σ_k A[k][a] B[k][b] + E[k][a] F[k][b] for tiles on or below the diagonal; n a multiple of 8.
function lowerProducts(P: usize, n: i32, A: usize, B: usize, E: usize, F: usize, rows: i32): void {
  const bytes = <usize>n * S;
  const toE = E - A;
  const toF = F - B;
  for (let a: usize = 0; a < bytes; a += 16) {
    for (let b: usize = 0; b <= a; b += 32) {
      let s00 = f32x4.splat(0), s01 = f32x4.splat(0), s10 = f32x4.splat(0), s11 = f32x4.splat(0); // prettier-ignore
      let s20 = f32x4.splat(0), s21 = f32x4.splat(0), s30 = f32x4.splat(0), s31 = f32x4.splat(0); // prettier-ignore
      let p = A + a;
      let q = B + b;
      for (let k = 0; k < rows; k++, p += bytes, q += bytes) {
        let y0 = v128.load(q);
        let y1 = v128.load(q, 16);
        let x = v128.load32_splat(p);
        s00 = f32x4.add(s00, f32x4.mul(x, y0));
        s01 = f32x4.add(s01, f32x4.mul(x, y1));
        x = v128.load32_splat(p, 4);
        s10 = f32x4.add(s10, f32x4.mul(x, y0));
        s11 = f32x4.add(s11, f32x4.mul(x, y1));
        x = v128.load32_splat(p, 8);
        s20 = f32x4.add(s20, f32x4.mul(x, y0));
        s21 = f32x4.add(s21, f32x4.mul(x, y1));
        x = v128.load32_splat(p, 12);
        s30 = f32x4.add(s30, f32x4.mul(x, y0));
        s31 = f32x4.add(s31, f32x4.mul(x, y1));
        y0 = v128.load(q + toF);
        y1 = v128.load(q + toF, 16);
        x = v128.load32_splat(p + toE);
        s00 = f32x4.add(s00, f32x4.mul(x, y0));
        s01 = f32x4.add(s01, f32x4.mul(x, y1));
        x = v128.load32_splat(p + toE, 4);
        s10 = f32x4.add(s10, f32x4.mul(x, y0));
        s11 = f32x4.add(s11, f32x4.mul(x, y1));
        x = v128.load32_splat(p + toE, 8);
        s20 = f32x4.add(s20, f32x4.mul(x, y0));
        s21 = f32x4.add(s21, f32x4.mul(x, y1));
        x = v128.load32_splat(p + toE, 12);
        s30 = f32x4.add(s30, f32x4.mul(x, y0));
        s31 = f32x4.add(s31, f32x4.mul(x, y1));
      }
      let c = P + (a >> 2) * bytes + b;
      v128.store(c, s00);
      v128.store(c, s01, 16);
      c += bytes;
      v128.store(c, s10);
      v128.store(c, s11, 16);
      c += bytes;
      v128.store(c, s20);
      v128.store(c, s21, 16);
      c += bytes;
      v128.store(c, s30);
      v128.store(c, s31, 16);
    }
  }
}

// Adds the lower part pairs of product[a][b] (component i of a, j of b) to the blocks of K. The group's parts are in
// elimination order, so that every pair lies in a stored block, rows to rows.
function scatterLower(
  K: usize,
  product: usize,
  bytes: usize,
  i: i32,
  j: i32,
  parts: usize,
  active: i32,
  basis: i32,
  position: usize,
  blockAt: usize,
  partCount: i32,
  size: i32,
): void {
  const area = size * size;
  for (let m = 0; m < active; m++) {
    const p = i32At(position, i32At(parts, m));
    for (let q = 0; q <= m; q++) {
      const at = i32At(blockAt, p * partCount + i32At(position, i32At(parts, q))) * area;
      if (q == m && i < j) {
        // Within a diagonal block only the pair (j, i) is stored; its entries right of the diagonal come from here.
        for (let a = 1; a < basis; a++) {
          const from = product + <usize>(m * basis + a) * bytes + <usize>(m * basis) * S;
          for (let b = 0; b < a; b++) {
            const t = K + <usize>(at + (j * basis + b) * size + i * basis + a) * D;
            store<f64>(t, load<f64>(t) + <f64>load<f32>(from + <usize>b * S));
          }
        }
        continue;
      }
      for (let a = 0; a < basis; a++) {
        const to = K + <usize>(at + (i * basis + a) * size + j * basis) * D;
        const from = product + <usize>(m * basis + a) * bytes + <usize>(q * basis) * S;
        const last = q == m ? a + 1 : basis;
        let b = 0;
        for (; b + 2 <= last; b += 2) {
          const t = to + <usize>b * D;
          const x = f64x2.promote_low_f32x4(v128.load64_zero(from + <usize>b * S));
          v128.store(t, f64x2.add(v128.load(t), x));
        }
        if (b < last) {
          const t = to + <usize>b * D;
          store<f64>(t, load<f64>(t) + <f64>load<f32>(from + <usize>b * S));
        }
      }
    }
  }
}

// `gradients` here are floats laid out like the points' own, but with the group's parts in elimination order (`parts`)
// and every row padded with zeros to a multiple of 8.
export function assembleSingle(
  K: usize,
  cof: usize,
  alpha: usize,
  beta: usize,
  groupCount: i32,
  start: usize,
  activeStart: usize,
  parts: usize,
  gradientStart: usize,
  gradients: usize,
  basis: i32,
  H: usize,
  A: usize,
  B: usize,
  C: usize,
  product: usize,
  position: usize,
  blockAt: usize,
  partCount: i32,
  size: i32,
): void {
  for (let g = 0; g < groupCount; g++) {
    const active = i32At(activeStart, g + 1) - i32At(activeStart, g);
    const wide = (active * basis + 7) & ~7;
    const bytes = <usize>wide * S;
    const first = i32At(start, g);
    const count = i32At(start, g + 1) - first;
    const layer = <usize>count * bytes;
    let G = gradients + <usize>i32At(gradientStart, g) * S;
    for (let k = 0; k < count; k++, G += 3 * bytes) {
      const f = cof + <usize>(9 * (first + k)) * D;
      const s = <f32>load<f64>(alpha + <usize>(first + k) * D);
      const t = <f32>load<f64>(beta + <usize>(first + k) * D);
      const sv = f32x4.splat(s);
      const tv = f32x4.splat(t);
      const both = f32x4.splat(s + t);
      for (let i: usize = 0; i < 3; i++) {
        const x = f32x4.splat(<f32>load<f64>(f + 3 * i * D));
        const y = f32x4.splat(<f32>load<f64>(f + (3 * i + 1) * D));
        const z = f32x4.splat(<f32>load<f64>(f + (3 * i + 2) * D));
        const at = i * layer + <usize>k * bytes;
        for (let a: usize = 0; a < bytes; a += 16) {
          const sum = f32x4.add(f32x4.mul(x, v128.load(G + a)), f32x4.mul(y, v128.load(G + bytes + a)));
          const h = f32x4.add(sum, f32x4.mul(z, v128.load(G + 2 * bytes + a)));
          v128.store(H + at + a, h);
          v128.store(A + at + a, f32x4.mul(sv, h));
          v128.store(B + at + a, f32x4.mul(tv, h));
          v128.store(C + at + a, f32x4.mul(both, h));
        }
      }
    }
    const own = parts + <usize>i32At(activeStart, g) * 4;
    for (let i: usize = 0; i < 3; i++) {
      for (let j: usize = 0; j < 3; j++) {
        // K_ab(i, j) = Σ α h_ai h_bj + β h_aj h_bi
        if (i == j) lowerProduct(product, wide, C + i * layer, H + i * layer, count);
        else lowerProducts(product, wide, A + i * layer, H + j * layer, B + j * layer, H + i * layer, count);
        scatterLower(K, product, bytes, <i32>i, <i32>j, own, active, basis, position, blockAt, partCount, size);
      }
    }
  }
}

// C = A T, or C − A T; T upper triangular when `triangular`. n a multiple of 8, C apart from A and T.
// `lower`: only tiles on or below the diagonal.
function multiply(C: usize, A: usize, T: usize, n: i32, subtract: bool, triangular: bool, lower: bool): void {
  const bytes = <usize>n * S;
  for (let i = 0; i < n; i += 4) {
    const last = lower ? <usize>(i + 4) * S : bytes;
    for (let j: usize = 0; j < last; j += 32) {
      let s00 = f32x4.splat(0), s01 = f32x4.splat(0), s10 = f32x4.splat(0), s11 = f32x4.splat(0); // prettier-ignore
      let s20 = f32x4.splat(0), s21 = f32x4.splat(0), s30 = f32x4.splat(0), s31 = f32x4.splat(0); // prettier-ignore
      let p = A + <usize>i * bytes;
      let q = T + j;
      const rows = triangular ? <i32>(j >> 2) + 8 : n;
      for (let k = 0; k < rows; k++, p += 4, q += bytes) {
        const y0 = v128.load(q);
        const y1 = v128.load(q, 16);
        let x = v128.load32_splat(p);
        s00 = f32x4.add(s00, f32x4.mul(x, y0));
        s01 = f32x4.add(s01, f32x4.mul(x, y1));
        x = v128.load32_splat(p + bytes);
        s10 = f32x4.add(s10, f32x4.mul(x, y0));
        s11 = f32x4.add(s11, f32x4.mul(x, y1));
        x = v128.load32_splat(p + 2 * bytes);
        s20 = f32x4.add(s20, f32x4.mul(x, y0));
        s21 = f32x4.add(s21, f32x4.mul(x, y1));
        x = v128.load32_splat(p + 3 * bytes);
        s30 = f32x4.add(s30, f32x4.mul(x, y0));
        s31 = f32x4.add(s31, f32x4.mul(x, y1));
      }
      const c = C + <usize>i * bytes + j;
      if (subtract) {
        s00 = f32x4.sub(v128.load(c), s00);
        s01 = f32x4.sub(v128.load(c, 16), s01);
        s10 = f32x4.sub(v128.load(c + bytes), s10);
        s11 = f32x4.sub(v128.load(c + bytes, 16), s11);
        s20 = f32x4.sub(v128.load(c + 2 * bytes), s20);
        s21 = f32x4.sub(v128.load(c + 2 * bytes, 16), s21);
        s30 = f32x4.sub(v128.load(c + 3 * bytes), s30);
        s31 = f32x4.sub(v128.load(c + 3 * bytes, 16), s31);
      }
      v128.store(c, s00);
      v128.store(c, s01, 16);
      v128.store(c + bytes, s10);
      v128.store(c + bytes, s11, 16);
      v128.store(c + 2 * bytes, s20);
      v128.store(c + 2 * bytes, s21, 16);
      v128.store(c + 3 * bytes, s30);
      v128.store(c + 3 * bytes, s31, 16);
    }
  }
}

function transpose(out: usize, block: usize, n: i32): void {
  const bytes = <usize>n * S;
  for (let r: usize = 0; r < bytes; r += 16) {
    for (let c: usize = 0; c < bytes; c += 16) {
      const from = block + (r >> 2) * bytes + c;
      const a = v128.load(from);
      const b = v128.load(from + bytes);
      const d = v128.load(from + 2 * bytes);
      const e = v128.load(from + 3 * bytes);
      const ab = v128.shuffle<f32>(a, b, 0, 4, 1, 5);
      const AB = v128.shuffle<f32>(a, b, 2, 6, 3, 7);
      const de = v128.shuffle<f32>(d, e, 0, 4, 1, 5);
      const DE = v128.shuffle<f32>(d, e, 2, 6, 3, 7);
      const to = out + (c >> 2) * bytes + r;
      v128.store(to, v128.shuffle<f32>(ab, de, 0, 1, 4, 5));
      v128.store(to + bytes, v128.shuffle<f32>(ab, de, 2, 3, 6, 7));
      v128.store(to + 2 * bytes, v128.shuffle<f32>(AB, DE, 0, 1, 4, 5));
      v128.store(to + 3 * bytes, v128.shuffle<f32>(AB, DE, 2, 3, 6, 7));
    }
  }
}

// Factors a diagonal block whose upper triangle is zero, then replaces it by the inverse of its factor.
function invertFactor(at: usize, n: i32): bool {
  const bytes = <usize>n * S;
  for (let j = 0; j < n; j++) {
    const rowJ = at + <usize>j * bytes;
    let d = load<f32>(rowJ + <usize>j * S);
    for (let k: usize = 0; k < <usize>j * S; k += S) d -= load<f32>(rowJ + k) * load<f32>(rowJ + k);
    if (!(d > 0)) return false;
    d = Mathf.sqrt(d);
    store<f32>(rowJ + <usize>j * S, d);
    const inverse: f32 = 1 / d;
    const whole = <usize>(j & ~3) * S;
    for (let i = j + 1; i < n; i++) {
      const rowI = at + <usize>i * bytes;
      let sum = f32x4.splat(0);
      let k: usize = 0;
      for (; k < whole; k += 16) sum = f32x4.add(sum, f32x4.mul(v128.load(rowI + k), v128.load(rowJ + k)));
      let s = load<f32>(rowI + <usize>j * S);
      s -= f32x4.extract_lane(sum, 0) + f32x4.extract_lane(sum, 1) + (f32x4.extract_lane(sum, 2) + f32x4.extract_lane(sum, 3)); // prettier-ignore
      for (; k < <usize>j * S; k += S) s -= load<f32>(rowI + k) * load<f32>(rowJ + k);
      store<f32>(rowI + <usize>j * S, s * inverse);
    }
  }
  // Row i of the inverse from the rows above it: X_i = (e_i − Σ_k<i L_ik X_k) / L_ii; rows are finished top down.
  for (let i = 0; i < n; i++) {
    const rowI = at + <usize>i * bytes;
    const inverse: f32 = 1 / load<f32>(rowI + <usize>i * S);
    // L_ik are read before position k of the row is overwritten: column by column from the left.
    for (let c = 0; c < i; c++) {
      let s: f32 = 0;
      for (let k = c; k < i; k++) s += load<f32>(rowI + <usize>k * S) * load<f32>(at + <usize>k * bytes + <usize>c * S);
      store<f32>(rowI + <usize>c * S, -s * inverse);
    }
    store<f32>(rowI + <usize>i * S, inverse);
    for (let k = <usize>(i + 1) * S; k < bytes; k += S) store<f32>(rowI + k, 0);
  }
  return true;
}

// scale[u] = 1 / √K_uu by position (Jacobi); F = the scaled K as floats, then its factor: off-diagonal blocks of L,
// inverses of L's diagonal blocks. False when K is not positive definite in single precision. K stays.
export function factorSingle(
  F: usize,
  K: usize,
  scale: usize,
  partCount: i32,
  size: i32,
  wide: i32,
  columnStart: usize,
  rows: usize,
  blockAt: usize,
  scratch: usize,
): bool {
  const area = <usize>(wide * wide) * S;
  const row = <usize>wide * S;
  for (let column = 0; column < partCount; column++) {
    const at = K + <usize>(i32At(columnStart, column) * size * size) * D;
    for (let u = 0; u < size; u++) {
      const d = load<f64>(at + <usize>(u * (size + 1)) * D);
      if (!(d > 0)) return false;
      store<f64>(scale + <usize>(column * size + u) * D, 1 / Math.sqrt(d));
    }
  }
  for (let column = 0; column < partCount; column++) {
    const end = i32At(columnStart, column + 1);
    for (let e = i32At(columnStart, column); e < end; e++) {
      const to = F + <usize>e * area;
      const r = i32At(rows, e);
      const diagonal = r == column;
      memory.fill(to, 0, area);
      for (let a = 0; a < size; a++) {
        const s = load<f64>(scale + <usize>(r * size + a) * D);
        const from = K + <usize>(e * size * size + a * size) * D;
        const last = diagonal ? a + 1 : size;
        for (let b = 0; b < last; b++) {
          const x = s * load<f64>(from + <usize>b * D) * load<f64>(scale + <usize>(column * size + b) * D);
          store<f32>(to + <usize>a * row + <usize>b * S, <f32>x);
        }
      }
      if (diagonal) for (let a = size; a < wide; a++) store<f32>(to + <usize>a * row + <usize>a * S, 1);
    }
  }
  const copy = scratch + area;
  for (let column = 0; column < partCount; column++) {
    const first = i32At(columnStart, column);
    const end = i32At(columnStart, column + 1);
    const diagonal = F + <usize>first * area;
    if (!invertFactor(diagonal, wide)) return false;
    transpose(scratch, diagonal, wide);
    for (let e = first + 1; e < end; e++) {
      const block = F + <usize>e * area;
      memory.copy(copy, block, area);
      multiply(block, copy, scratch, wide, false, true, false);
    }
    for (let f = first + 1; f < end; f++) {
      transpose(scratch, F + <usize>f * area, wide);
      for (let e = f; e < end; e++) {
        const block = F + <usize>i32At(blockAt, i32At(rows, e) * partCount + i32At(rows, f)) * area;
        multiply(block, F + <usize>e * area, scratch, wide, true, false, e == f);
      }
    }
  }
  return true;
}

// out[i] ← Σ_k M[i][k] x[k], or out[i] − that.
function times(out: usize, M: usize, x: usize, n: i32, subtract: bool): void {
  const bytes = <usize>n * S;
  for (let i: usize = 0; i < bytes; i += 4) {
    const row = M + (i >> 2) * bytes;
    let sum = f32x4.splat(0);
    for (let k: usize = 0; k < bytes; k += 16) sum = f32x4.add(sum, f32x4.mul(v128.load(row + k), v128.load(x + k)));
    const s = f32x4.extract_lane(sum, 0) + f32x4.extract_lane(sum, 1) + (f32x4.extract_lane(sum, 2) + f32x4.extract_lane(sum, 3)); // prettier-ignore
    store<f32>(out + i, subtract ? load<f32>(out + i) - s : s);
  }
}

// out[k] += or −= Σ_i M[i][k] x[i].
function timesTransposed(out: usize, M: usize, x: usize, n: i32, subtract: bool): void {
  const bytes = <usize>n * S;
  for (let i: usize = 0; i < bytes; i += 4) {
    const row = M + (i >> 2) * bytes;
    const value = load<f32>(x + i);
    const v = f32x4.splat(subtract ? -value : value);
    for (let k: usize = 0; k < bytes; k += 16) v128.store(out + k, f32x4.add(v128.load(out + k), f32x4.mul(v, v128.load(row + k)))); // prettier-ignore
  }
}

// Solves K x = b in place with a factor made by `factorSingle`; y: two vectors of partCount · wide floats.
export function solveSingle(
  F: usize,
  scale: usize,
  x: usize,
  y: usize,
  partCount: i32,
  size: i32,
  wide: i32,
  columnStart: usize,
  rows: usize,
  partAt: usize,
): void {
  const area = <usize>(wide * wide) * S;
  const bytes = <usize>wide * S;
  const z = y + <usize>partCount * bytes;
  memory.fill(y, 0, 2 * <usize>partCount * bytes);
  // A common factor keeps tiny right-hand sides clear of the smallest floats.
  let largest: f64 = 0;
  for (let p = 0; p < partCount; p++) {
    for (let u = 0; u < size; u++) {
      const b = Math.abs(load<f64>(x + <usize>(i32At(partAt, p) * size + u) * D) * load<f64>(scale + <usize>(p * size + u) * D)); // prettier-ignore
      if (b > largest) largest = b;
    }
  }
  if (!(largest > 0)) return;
  const down = 1 / largest;
  for (let p = 0; p < partCount; p++) {
    for (let u = 0; u < size; u++) {
      const b = load<f64>(x + <usize>(i32At(partAt, p) * size + u) * D) * load<f64>(scale + <usize>(p * size + u) * D);
      store<f32>(y + <usize>p * bytes + <usize>u * S, <f32>(b * down));
    }
  }
  for (let column = 0; column < partCount; column++) {
    const own = z + <usize>column * bytes;
    const first = i32At(columnStart, column);
    const end = i32At(columnStart, column + 1);
    times(own, F + <usize>first * area, y + <usize>column * bytes, wide, false);
    for (let e = first + 1; e < end; e++)
      times(y + <usize>i32At(rows, e) * bytes, F + <usize>e * area, own, wide, true);
  }
  for (let column = partCount - 1; column >= 0; column--) {
    const own = y + <usize>column * bytes;
    const first = i32At(columnStart, column);
    const end = i32At(columnStart, column + 1);
    const right = z + <usize>column * bytes;
    for (let e = first + 1; e < end; e++) timesTransposed(right, F + <usize>e * area, y + <usize>i32At(rows, e) * bytes, wide, true); // prettier-ignore
    memory.fill(own, 0, bytes);
    timesTransposed(own, F + <usize>first * area, right, wide, false);
    for (let u = 0; u < size; u++) {
      const s = load<f64>(scale + <usize>(column * size + u) * D) * largest;
      store<f64>(x + <usize>(i32At(partAt, column) * size + u) * D, s * <f64>load<f32>(own + <usize>u * S));
    }
  }
}

// K += Σ_g factors[g] Σ_m D_gm D_gmᵀ as in addOuter, factors not negative. `kept`: the vectors as floats, each part's
// together: [part position][group][4][wide]. `tile`: wide × wide floats. `list`: room for one int a group.
export function addOuterSingle(
  K: usize,
  vectors: usize,
  count: i32,
  factors: usize,
  member: usize,
  kept: usize,
  tile: usize,
  list: usize,
  partCount: i32,
  size: i32,
  wide: i32,
  columnStart: usize,
  rows: usize,
  partAt: usize,
): void {
  const bytes = <usize>wide * S;
  const length = <usize>(partCount * size) * D;
  const own = <usize>(4 * count) * bytes;
  for (let p = 0; p < partCount; p++) {
    const part = i32At(partAt, p);
    for (let v = 0; v < 4 * count; v++) {
      const root = Math.sqrt(load<f64>(factors + <usize>(v >> 2) * D));
      const from = vectors + <usize>v * length + <usize>(part * size) * D;
      const to = kept + <usize>p * own + <usize>v * bytes;
      for (let u = 0; u < size; u++) store<f32>(to + <usize>u * S, <f32>(root * load<f64>(from + <usize>u * D)));
      for (let u = size; u < wide; u++) store<f32>(to + <usize>u * S, 0);
    }
  }
  for (let column = 0; column < partCount; column++) {
    const b = <usize>i32At(partAt, column);
    const B = kept + <usize>column * own;
    const end = i32At(columnStart, column + 1);
    for (let e = i32At(columnStart, column); e < end; e++) {
      const r = i32At(rows, e);
      const a = <usize>i32At(partAt, r);
      const A = kept + <usize>r * own;
      let n = 0;
      for (let g = 0; g < count; g++) {
        const places = member + <usize>(g * partCount);
        if (!load<u8>(places + a) || !load<u8>(places + b)) continue;
        store<i32>(list + ((<usize>n) << 2), 4 * g * <i32>bytes);
        n++;
      }
      if (n == 0) continue;
      for (let i: usize = 0; i < bytes; i += 16) {
        for (let j: usize = 0; j < bytes; j += 32) {
          let s00 = f32x4.splat(0), s01 = f32x4.splat(0), s10 = f32x4.splat(0), s11 = f32x4.splat(0); // prettier-ignore
          let s20 = f32x4.splat(0), s21 = f32x4.splat(0), s30 = f32x4.splat(0), s31 = f32x4.splat(0); // prettier-ignore
          for (let l = 0; l < n; l++) {
            const at = <usize>i32At(list, l);
            let p = A + at + i;
            let q = B + at + j;
            for (let m = 0; m < 4; m++, p += bytes, q += bytes) {
              const y0 = v128.load(q);
              const y1 = v128.load(q, 16);
              let x = v128.load32_splat(p);
              s00 = f32x4.add(s00, f32x4.mul(x, y0));
              s01 = f32x4.add(s01, f32x4.mul(x, y1));
              x = v128.load32_splat(p, 4);
              s10 = f32x4.add(s10, f32x4.mul(x, y0));
              s11 = f32x4.add(s11, f32x4.mul(x, y1));
              x = v128.load32_splat(p, 8);
              s20 = f32x4.add(s20, f32x4.mul(x, y0));
              s21 = f32x4.add(s21, f32x4.mul(x, y1));
              x = v128.load32_splat(p, 12);
              s30 = f32x4.add(s30, f32x4.mul(x, y0));
              s31 = f32x4.add(s31, f32x4.mul(x, y1));
            }
          }
          const c = tile + (i >> 2) * bytes + j;
          v128.store(c, s00);
          v128.store(c, s01, 16);
          v128.store(c + bytes, s10);
          v128.store(c + bytes, s11, 16);
          v128.store(c + 2 * bytes, s20);
          v128.store(c + 2 * bytes, s21, 16);
          v128.store(c + 3 * bytes, s30);
          v128.store(c + 3 * bytes, s31, 16);
        }
      }
      const block = K + <usize>(e * size * size) * D;
      for (let i = 0; i < size; i++) {
        const to = block + <usize>(i * size) * D;
        const from = tile + <usize>i * bytes;
        for (let j = 0; j < size; j += 2) {
          const t = to + <usize>j * D;
          v128.store(t, f64x2.add(v128.load(t), f64x2.promote_low_f32x4(v128.load64_zero(from + <usize>j * S))));
        }
      }
    }
  }
}
