// AssemblyScript: compiled to WebAssembly by `npm run build:kernels`, not by TypeScript. The same operations as
// solver/kernels/plain*.ts, two doubles at a time; pointers are byte offsets into the imported memory.

// @ts-nocheck
export { addOuterSingle, assembleSingle, factorSingle, solveSingle } from './single';

const D: usize = 8;

// @inline
function i32At(base: usize, index: i32): i32 {
  return load<i32>(base + ((<usize>index) << 2));
}

function width(activeStart: usize, group: i32, basis: i32): i32 {
  return (i32At(activeStart, group + 1) - i32At(activeStart, group)) * basis;
}

// Copies the coefficients of the group's parts into local[component][function].
function gather(group: i32, n: i32, c: usize, activeStart: usize, activeParts: usize, basis: i32, local: usize): void {
  let m = 0;
  const end = i32At(activeStart, group + 1);
  for (let e = i32At(activeStart, group); e < end; e++, m += basis) {
    const from = c + <usize>(i32At(activeParts, e) * 3 * basis) * D;
    for (let i = 0; i < 3; i++) {
      memory.copy(local + <usize>(i * n + m) * D, from + <usize>(i * basis) * D, <usize>basis * D);
    }
  }
}

export function deformation(
  F: usize,
  c: usize,
  groupCount: i32,
  start: usize,
  activeStart: usize,
  activeParts: usize,
  gradientStart: usize,
  gradients: usize,
  basis: i32,
  local: usize,
): void {
  for (let g = 0; g < groupCount; g++) {
    const n = width(activeStart, g, basis);
    const bytes = <usize>n * D;
    gather(g, n, c, activeStart, activeParts, basis, local);
    let G = gradients + <usize>i32At(gradientStart, g) * D;
    const end = i32At(start, g + 1);
    for (let k = i32At(start, g); k < end; k++) {
      const out = F + <usize>(9 * k) * D;
      for (let d: usize = 0; d < 3; d++, G += bytes) {
        let x = f64x2.splat(0);
        let y = f64x2.splat(0);
        let z = f64x2.splat(0);
        for (let a: usize = 0; a < bytes; a += 16) {
          const v = v128.load(G + a);
          x = f64x2.add(x, f64x2.mul(v128.load(local + a), v));
          y = f64x2.add(y, f64x2.mul(v128.load(local + bytes + a), v));
          z = f64x2.add(z, f64x2.mul(v128.load(local + 2 * bytes + a), v));
        }
        store<f64>(out + d * D, f64x2.extract_lane(x, 0) + f64x2.extract_lane(x, 1));
        store<f64>(out + (3 + d) * D, f64x2.extract_lane(y, 0) + f64x2.extract_lane(y, 1));
        store<f64>(out + (6 + d) * D, f64x2.extract_lane(z, 0) + f64x2.extract_lane(z, 1));
      }
    }
  }
}

export function accumulateGradient(
  r: usize,
  PV: usize,
  groupCount: i32,
  start: usize,
  activeStart: usize,
  activeParts: usize,
  gradientStart: usize,
  gradients: usize,
  basis: i32,
  local: usize,
): void {
  for (let g = 0; g < groupCount; g++) {
    const n = width(activeStart, g, basis);
    const bytes = <usize>n * D;
    memory.fill(local, 0, 3 * bytes);
    let G = gradients + <usize>i32At(gradientStart, g) * D;
    const end = i32At(start, g + 1);
    for (let k = i32At(start, g); k < end; k++) {
      const from = PV + <usize>(9 * k) * D;
      for (let d: usize = 0; d < 3; d++, G += bytes) {
        const x = v128.load64_splat(from + d * D);
        const y = v128.load64_splat(from + (3 + d) * D);
        const z = v128.load64_splat(from + (6 + d) * D);
        for (let a: usize = 0; a < bytes; a += 16) {
          const v = v128.load(G + a);
          v128.store(local + a, f64x2.add(v128.load(local + a), f64x2.mul(x, v)));
          v128.store(local + bytes + a, f64x2.add(v128.load(local + bytes + a), f64x2.mul(y, v)));
          v128.store(local + 2 * bytes + a, f64x2.add(v128.load(local + 2 * bytes + a), f64x2.mul(z, v)));
        }
      }
    }
    let m = 0;
    const last = i32At(activeStart, g + 1);
    for (let e = i32At(activeStart, g); e < last; e++, m += basis) {
      const to = r + <usize>(i32At(activeParts, e) * 3 * basis) * D;
      for (let i = 0; i < 3; i++) {
        const into = to + <usize>(i * basis) * D;
        const out = local + <usize>(i * n + m) * D;
        for (let a: usize = 0; a < <usize>basis * D; a += 16) {
          v128.store(into + a, f64x2.add(v128.load(into + a), v128.load(out + a)));
        }
      }
    }
  }
}

// C[a][b] += Σ_k A[k][a] B[k][b]; n a multiple of 4.
function addTransposedProduct(C: usize, n: i32, A: usize, B: usize, rows: i32, lower: bool): void {
  const bytes = <usize>n * D;
  for (let a: usize = 0; a < bytes; a += 32) {
    const last = lower ? a + 32 : bytes;
    for (let b: usize = 0; b < last; b += 32) {
      let s00 = f64x2.splat(0),
        s01 = f64x2.splat(0);
      let s10 = f64x2.splat(0),
        s11 = f64x2.splat(0);
      let s20 = f64x2.splat(0),
        s21 = f64x2.splat(0);
      let s30 = f64x2.splat(0),
        s31 = f64x2.splat(0);
      let p = A + a;
      let q = B + b;
      for (let k = 0; k < rows; k++, p += bytes, q += bytes) {
        const y0 = v128.load(q);
        const y1 = v128.load(q, 16);
        let x = v128.load64_splat(p);
        s00 = f64x2.add(s00, f64x2.mul(x, y0));
        s01 = f64x2.add(s01, f64x2.mul(x, y1));
        x = v128.load64_splat(p, 8);
        s10 = f64x2.add(s10, f64x2.mul(x, y0));
        s11 = f64x2.add(s11, f64x2.mul(x, y1));
        x = v128.load64_splat(p, 16);
        s20 = f64x2.add(s20, f64x2.mul(x, y0));
        s21 = f64x2.add(s21, f64x2.mul(x, y1));
        x = v128.load64_splat(p, 24);
        s30 = f64x2.add(s30, f64x2.mul(x, y0));
        s31 = f64x2.add(s31, f64x2.mul(x, y1));
      }
      let c = C + (a >> 3) * bytes + b;
      v128.store(c, f64x2.add(v128.load(c), s00));
      v128.store(c, f64x2.add(v128.load(c, 16), s01), 16);
      c += bytes;
      v128.store(c, f64x2.add(v128.load(c), s10));
      v128.store(c, f64x2.add(v128.load(c, 16), s11), 16);
      c += bytes;
      v128.store(c, f64x2.add(v128.load(c), s20));
      v128.store(c, f64x2.add(v128.load(c, 16), s21), 16);
      c += bytes;
      v128.store(c, f64x2.add(v128.load(c), s30));
      v128.store(c, f64x2.add(v128.load(c, 16), s31), 16);
    }
  }
}

// out[k] = weights[k] · rows[k], or (weights[k] + more[k]) · rows[k] when `more` is given.
function scaleRows(out: usize, rows: usize, count: i32, bytes: usize, weights: usize, more: usize): void {
  for (let k = 0; k < count; k++) {
    let s = load<f64>(weights + <usize>k * D);
    if (more) s += load<f64>(more + <usize>k * D);
    const v = f64x2.splat(s);
    const at = <usize>k * bytes;
    for (let a: usize = 0; a < bytes; a += 16) v128.store(out + at + a, f64x2.mul(v, v128.load(rows + at + a)));
  }
}

// Adds product[a][b] (component i of a, j of b) to the blocks of K.
function scatter(
  K: usize,
  product: usize,
  group: i32,
  wide: i32,
  i: i32,
  j: i32,
  activeStart: usize,
  activeParts: usize,
  basis: i32,
  position: usize,
  blockAt: usize,
  partCount: i32,
  size: i32,
): void {
  const from = i32At(activeStart, group);
  const active = i32At(activeStart, group + 1) - from;
  const area = size * size;
  for (let m = 0; m < active; m++) {
    const p = i32At(position, i32At(activeParts, from + m));
    for (let q = 0; q < active; q++) {
      const s = i32At(position, i32At(activeParts, from + q));
      if (i == j) {
        if (p < s) continue;
        const at = i32At(blockAt, p * partCount + s) * area;
        for (let a = 0; a < basis; a++) {
          const to = K + <usize>(at + (i * basis + a) * size + i * basis) * D;
          const row = m * basis + a;
          const last = m == q ? a + 1 : basis;
          for (let b = 0; b < last; b++) {
            const column = q * basis + b;
            const source = row >= column ? row * wide + column : column * wide + row;
            const t = to + <usize>b * D;
            store<f64>(t, load<f64>(t) + load<f64>(product + <usize>source * D));
          }
        }
      } else if (p > s) {
        const at = i32At(blockAt, p * partCount + s) * area;
        for (let a = 0; a < basis; a++) {
          const to = K + <usize>(at + (i * basis + a) * size + j * basis) * D;
          const source = product + <usize>((m * basis + a) * wide + q * basis) * D;
          for (let b: usize = 0; b < <usize>basis * D; b += 16) {
            v128.store(to + b, f64x2.add(v128.load(to + b), v128.load(source + b)));
          }
        }
      } else {
        const at = i32At(blockAt, s * partCount + p) * area;
        for (let a = 0; a < basis; a++) {
          let to = K + <usize>(at + j * basis * size + i * basis + a) * D;
          const source = product + <usize>((m * basis + a) * wide + q * basis) * D;
          for (let b = 0; b < basis; b++, to += <usize>size * D) {
            store<f64>(to, load<f64>(to) + load<f64>(source + <usize>b * D));
          }
        }
      }
    }
  }
}

export function assemble(
  K: usize,
  cof: usize,
  alpha: usize,
  beta: usize,
  groupCount: i32,
  start: usize,
  activeStart: usize,
  activeParts: usize,
  gradientStart: usize,
  gradients: usize,
  basis: i32,
  H: usize,
  right: usize,
  product: usize,
  position: usize,
  blockAt: usize,
  partCount: i32,
  size: i32,
): void {
  for (let g = 0; g < groupCount; g++) {
    const n = width(activeStart, g, basis);
    const wide = (n + 3) & ~3;
    const nb = <usize>n * D;
    const wb = <usize>wide * D;
    const first = i32At(start, g);
    const count = i32At(start, g + 1) - first;
    const layer = <usize>count * wb;
    for (let k = 0; k < count; k++) {
      const G = gradients + <usize>(i32At(gradientStart, g) + k * 3 * n) * D;
      const f = cof + <usize>(9 * (first + k)) * D;
      for (let i: usize = 0; i < 3; i++) {
        const x = v128.load64_splat(f + 3 * i * D);
        const y = v128.load64_splat(f + (3 * i + 1) * D);
        const z = v128.load64_splat(f + (3 * i + 2) * D);
        const at = H + i * layer + <usize>k * wb;
        for (let a: usize = 0; a < nb; a += 16) {
          const sum = f64x2.add(f64x2.mul(x, v128.load(G + a)), f64x2.mul(y, v128.load(G + nb + a)));
          v128.store(at + a, f64x2.add(sum, f64x2.mul(z, v128.load(G + 2 * nb + a))));
        }
        for (let a = nb; a < wb; a += 8) store<f64>(at + a, 0);
      }
    }
    const w = alpha + <usize>first * D;
    const b = beta + <usize>first * D;
    for (let i = 0; i < 3; i++) {
      for (let j = i; j < 3; j++) {
        memory.fill(product, 0, <usize>wide * wb);
        scaleRows(right, H + <usize>i * layer, count, wb, w, i == j ? b : 0);
        addTransposedProduct(product, wide, right, H + <usize>j * layer, count, i == j);
        if (i != j) {
          scaleRows(right, H + <usize>j * layer, count, wb, b, 0);
          addTransposedProduct(product, wide, right, H + <usize>i * layer, count, false);
        }
        scatter(K, product, g, wide, i, j, activeStart, activeParts, basis, position, blockAt, partCount, size);
      }
    }
  }
}

export function assembleLaplace(
  K: usize,
  factor: usize,
  groupCount: i32,
  start: usize,
  activeStart: usize,
  activeParts: usize,
  gradientStart: usize,
  gradients: usize,
  basis: i32,
  H: usize,
  right: usize,
  product: usize,
  position: usize,
  blockAt: usize,
  partCount: i32,
  size: i32,
): void {
  for (let g = 0; g < groupCount; g++) {
    const n = width(activeStart, g, basis);
    const wide = (n + 3) & ~3;
    const wb = <usize>wide * D;
    const first = i32At(start, g);
    const count = i32At(start, g + 1) - first;
    memory.fill(product, 0, <usize>wide * wb);
    for (let d = 0; d < 3; d++) {
      for (let k = 0; k < count; k++) {
        const at = H + <usize>k * wb;
        memory.copy(at, gradients + <usize>(i32At(gradientStart, g) + (k * 3 + d) * n) * D, <usize>n * D);
        for (let a = <usize>n * D; a < wb; a += 8) store<f64>(at + a, 0);
      }
      scaleRows(right, H, count, wb, factor + <usize>first * D, 0);
      addTransposedProduct(product, wide, right, H, count, true);
    }
    for (let i = 0; i < 3; i++) {
      scatter(K, product, g, wide, i, i, activeStart, activeParts, basis, position, blockAt, partCount, size);
    }
  }
}

// D[4g + m] = Σ_k modes[4k + m] h_k over the points k of group g = groupOf[k] (none where it is negative).
export function directions(
  out: usize,
  count: i32,
  cof: usize,
  modes: usize,
  groupOf: usize,
  groupCount: i32,
  start: usize,
  activeStart: usize,
  activeParts: usize,
  gradientStart: usize,
  gradients: usize,
  basis: i32,
  partCount: i32,
): void {
  const length = <usize>(partCount * 3 * basis) * D;
  memory.fill(out, 0, <usize>(4 * count) * length);
  for (let g = 0; g < groupCount; g++) {
    const n = width(activeStart, g, basis);
    const bytes = <usize>n * D;
    const from = i32At(activeStart, g);
    const active = i32At(activeStart, g + 1) - from;
    const last = i32At(start, g + 1);
    let G = gradients + <usize>i32At(gradientStart, g) * D;
    for (let k = i32At(start, g); k < last; k++, G += 3 * bytes) {
      const own = i32At(groupOf, k);
      if (own < 0) continue;
      const w = modes + <usize>(4 * k) * D;
      const m0 = v128.load64_splat(w);
      const m1 = v128.load64_splat(w, 8);
      const m2 = v128.load64_splat(w, 16);
      const m3 = v128.load64_splat(w, 24);
      const base = out + <usize>(4 * own) * length;
      const f = cof + <usize>(9 * k) * D;
      for (let i = 0; i < 3; i++) {
        const x = v128.load64_splat(f + <usize>(3 * i) * D);
        const y = v128.load64_splat(f + <usize>(3 * i + 1) * D);
        const z = v128.load64_splat(f + <usize>(3 * i + 2) * D);
        let p = G;
        for (let m = 0; m < active; m++) {
          let to = base + <usize>((i32At(activeParts, from + m) * 3 + i) * basis) * D;
          for (let a: usize = 0; a < <usize>basis * D; a += 16, p += 16, to += 16) {
            const sum = f64x2.add(f64x2.mul(x, v128.load(p)), f64x2.mul(y, v128.load(p + bytes)));
            const h = f64x2.add(sum, f64x2.mul(z, v128.load(p + 2 * bytes)));
            v128.store(to, f64x2.add(v128.load(to), f64x2.mul(m0, h)));
            v128.store(to + length, f64x2.add(v128.load(to + length), f64x2.mul(m1, h)));
            v128.store(to + 2 * length, f64x2.add(v128.load(to + 2 * length), f64x2.mul(m2, h)));
            v128.store(to + 3 * length, f64x2.add(v128.load(to + 3 * length), f64x2.mul(m3, h)));
          }
        }
      }
    }
  }
}

// K += Σ_g factors[g] Σ_m D_gm D_gmᵀ; member[g · partCount + part] tells where D_g is not zero. `list`: room for the
// factor and both ends of 4 vectors a group.
export function addOuter(
  K: usize,
  vectors: usize,
  count: i32,
  factors: usize,
  member: usize,
  list: usize,
  partCount: i32,
  size: i32,
  columnStart: usize,
  rows: usize,
  partAt: usize,
): void {
  const length = <usize>(partCount * size) * D;
  const bytes = <usize>size * D;
  for (let column = 0; column < partCount; column++) {
    const b = i32At(partAt, column);
    const end = i32At(columnStart, column + 1);
    for (let e = i32At(columnStart, column); e < end; e++) {
      const a = i32At(partAt, i32At(rows, e));
      let n = 0;
      for (let g = 0; g < count; g++) {
        const factor = load<f64>(factors + <usize>g * D);
        const places = member + <usize>(g * partCount);
        if (factor == 0 || !load<u8>(places + <usize>a) || !load<u8>(places + <usize>b)) continue;
        for (let m = 0; m < 4; m++, n++) {
          const vector = vectors + <usize>(4 * g + m) * length;
          store<f64>(list + <usize>(16 * n), factor);
          store<u32>(list + <usize>(16 * n), <u32>(vector + <usize>a * bytes), 8);
          store<u32>(list + <usize>(16 * n), <u32>(vector + <usize>b * bytes), 12);
        }
      }
      if (n == 0) continue;
      const at = K + <usize>e * bytes * <usize>size;
      for (let i: usize = 0; i < bytes; i += 24) {
        for (let j: usize = 0; j < bytes; j += 48) {
          let s00 = f64x2.splat(0), s01 = f64x2.splat(0), s02 = f64x2.splat(0); // prettier-ignore
          let s10 = f64x2.splat(0), s11 = f64x2.splat(0), s12 = f64x2.splat(0); // prettier-ignore
          let s20 = f64x2.splat(0), s21 = f64x2.splat(0), s22 = f64x2.splat(0); // prettier-ignore
          for (let k: usize = 0; k < <usize>n; k++) {
            const entry = list + 16 * k;
            const f = v128.load64_splat(entry);
            const p = <usize>load<u32>(entry, 8) + i;
            const q = <usize>load<u32>(entry, 12) + j;
            const y0 = v128.load(q);
            const y1 = v128.load(q, 16);
            const y2 = v128.load(q, 32);
            let x = f64x2.mul(f, v128.load64_splat(p));
            s00 = f64x2.add(s00, f64x2.mul(x, y0));
            s01 = f64x2.add(s01, f64x2.mul(x, y1));
            s02 = f64x2.add(s02, f64x2.mul(x, y2));
            x = f64x2.mul(f, v128.load64_splat(p, 8));
            s10 = f64x2.add(s10, f64x2.mul(x, y0));
            s11 = f64x2.add(s11, f64x2.mul(x, y1));
            s12 = f64x2.add(s12, f64x2.mul(x, y2));
            x = f64x2.mul(f, v128.load64_splat(p, 16));
            s20 = f64x2.add(s20, f64x2.mul(x, y0));
            s21 = f64x2.add(s21, f64x2.mul(x, y1));
            s22 = f64x2.add(s22, f64x2.mul(x, y2));
          }
          let c = at + (i >> 3) * bytes + j;
          v128.store(c, f64x2.add(v128.load(c), s00));
          v128.store(c, f64x2.add(v128.load(c, 16), s01), 16);
          v128.store(c, f64x2.add(v128.load(c, 32), s02), 32);
          c += bytes;
          v128.store(c, f64x2.add(v128.load(c), s10));
          v128.store(c, f64x2.add(v128.load(c, 16), s11), 16);
          v128.store(c, f64x2.add(v128.load(c, 32), s12), 32);
          c += bytes;
          v128.store(c, f64x2.add(v128.load(c), s20));
          v128.store(c, f64x2.add(v128.load(c, 16), s21), 16);
          v128.store(c, f64x2.add(v128.load(c, 32), s22), 32);
        }
      }
    }
  }
}

function factorDense(at: usize, n: i32): bool {
  for (let j = 0; j < n; j++) {
    const rowJ = at + <usize>(j * n) * D;
    let d = load<f64>(rowJ + <usize>j * D);
    for (let k: usize = 0; k < <usize>j * D; k += 8) d -= load<f64>(rowJ + k) * load<f64>(rowJ + k);
    if (!(d > 0)) return false;
    d = Math.sqrt(d);
    store<f64>(rowJ + <usize>j * D, d);
    const inverse = 1 / d;
    for (let i = j + 1; i < n; i++) {
      const rowI = at + <usize>(i * n) * D;
      let s = load<f64>(rowI + <usize>j * D);
      for (let k: usize = 0; k < <usize>j * D; k += 8) s -= load<f64>(rowI + k) * load<f64>(rowJ + k);
      store<f64>(rowI + <usize>j * D, s * inverse);
    }
  }
  return true;
}

function transpose(out: usize, block: usize, n: i32): void {
  for (let r = 0; r < n; r++) {
    for (let c = 0; c < n; c++) {
      store<f64>(out + <usize>(c * n + r) * D, load<f64>(block + <usize>(r * n + c) * D));
    }
  }
}

// X ← X L⁻ᵀ, with T = Lᵀ so that the updates run along rows.
function solveRight(X: usize, T: usize, n: i32): void {
  const bytes = <usize>n * D;
  for (let r = 0; r < n; r++) {
    const row = X + <usize>r * bytes;
    for (let j = 0; j < n; j++) {
      const upper = T + <usize>j * bytes;
      const value = load<f64>(row + <usize>j * D) / load<f64>(upper + <usize>j * D);
      store<f64>(row + <usize>j * D, value);
      let m = j + 1;
      if (m & 1) {
        const t = row + <usize>m * D;
        store<f64>(t, load<f64>(t) - value * load<f64>(upper + <usize>m * D));
        m++;
      }
      const v = f64x2.splat(value);
      for (let c = <usize>m * D; c < bytes; c += 16) {
        v128.store(row + c, f64x2.sub(v128.load(row + c), f64x2.mul(v, v128.load(upper + c))));
      }
    }
  }
}

// C ← C − A T with T = Bᵀ; n a multiple of 6. Tiles of three rows and six columns.
function subtractProduct(C: usize, A: usize, T: usize, n: i32): void {
  const bytes = <usize>n * D;
  for (let i: usize = 0; i < <usize>n; i += 3) {
    for (let j: usize = 0; j < bytes; j += 48) {
      let s00 = f64x2.splat(0),
        s01 = f64x2.splat(0),
        s02 = f64x2.splat(0);
      let s10 = f64x2.splat(0),
        s11 = f64x2.splat(0),
        s12 = f64x2.splat(0);
      let s20 = f64x2.splat(0),
        s21 = f64x2.splat(0),
        s22 = f64x2.splat(0);
      let p = A + i * bytes;
      let q = T + j;
      for (let k = 0; k < n; k++, p += 8, q += bytes) {
        const y0 = v128.load(q);
        const y1 = v128.load(q, 16);
        const y2 = v128.load(q, 32);
        let x = v128.load64_splat(p);
        s00 = f64x2.add(s00, f64x2.mul(x, y0));
        s01 = f64x2.add(s01, f64x2.mul(x, y1));
        s02 = f64x2.add(s02, f64x2.mul(x, y2));
        x = v128.load64_splat(p + bytes);
        s10 = f64x2.add(s10, f64x2.mul(x, y0));
        s11 = f64x2.add(s11, f64x2.mul(x, y1));
        s12 = f64x2.add(s12, f64x2.mul(x, y2));
        x = v128.load64_splat(p + 2 * bytes);
        s20 = f64x2.add(s20, f64x2.mul(x, y0));
        s21 = f64x2.add(s21, f64x2.mul(x, y1));
        s22 = f64x2.add(s22, f64x2.mul(x, y2));
      }
      let c = C + i * bytes + j;
      v128.store(c, f64x2.sub(v128.load(c), s00));
      v128.store(c, f64x2.sub(v128.load(c, 16), s01), 16);
      v128.store(c, f64x2.sub(v128.load(c, 32), s02), 32);
      c += bytes;
      v128.store(c, f64x2.sub(v128.load(c), s10));
      v128.store(c, f64x2.sub(v128.load(c, 16), s11), 16);
      v128.store(c, f64x2.sub(v128.load(c, 32), s12), 32);
      c += bytes;
      v128.store(c, f64x2.sub(v128.load(c), s20));
      v128.store(c, f64x2.sub(v128.load(c, 16), s21), 16);
      v128.store(c, f64x2.sub(v128.load(c, 32), s22), 32);
    }
  }
}

export function factorBlocks(
  K: usize,
  partCount: i32,
  size: i32,
  columnStart: usize,
  rows: usize,
  blockAt: usize,
  scratch: usize,
): bool {
  const area = <usize>(size * size) * D;
  for (let column = 0; column < partCount; column++) {
    const first = i32At(columnStart, column);
    const end = i32At(columnStart, column + 1);
    const diagonal = K + <usize>first * area;
    if (!factorDense(diagonal, size)) return false;
    transpose(scratch, diagonal, size);
    for (let e = first + 1; e < end; e++) solveRight(K + <usize>e * area, scratch, size);
    for (let f = first + 1; f < end; f++) {
      transpose(scratch, K + <usize>f * area, size);
      for (let e = f; e < end; e++) {
        const block = i32At(blockAt, i32At(rows, e) * partCount + i32At(rows, f));
        subtractProduct(K + <usize>block * area, K + <usize>e * area, scratch, size);
      }
    }
  }
  return true;
}

export function solveBlocks(
  L: usize,
  x: usize,
  partCount: i32,
  size: i32,
  columnStart: usize,
  rows: usize,
  partAt: usize,
): void {
  const bytes = <usize>size * D;
  const area = <usize>size * bytes;
  for (let column = 0; column < partCount; column++) {
    const own = x + <usize>i32At(partAt, column) * bytes;
    const diagonal = L + <usize>i32At(columnStart, column) * area;
    for (let i: usize = 0; i < <usize>size; i++) {
      let s = load<f64>(own + i * D);
      for (let k: usize = 0; k < i; k++) s -= load<f64>(diagonal + i * bytes + k * D) * load<f64>(own + k * D);
      store<f64>(own + i * D, s / load<f64>(diagonal + i * bytes + i * D));
    }
    const end = i32At(columnStart, column + 1);
    for (let e = i32At(columnStart, column) + 1; e < end; e++) {
      const to = x + <usize>i32At(partAt, i32At(rows, e)) * bytes;
      for (let i: usize = 0; i < <usize>size; i++) {
        const row = L + <usize>e * area + i * bytes;
        let s = f64x2.splat(0);
        for (let k: usize = 0; k < bytes; k += 16) s = f64x2.add(s, f64x2.mul(v128.load(row + k), v128.load(own + k)));
        store<f64>(to + i * D, load<f64>(to + i * D) - (f64x2.extract_lane(s, 0) + f64x2.extract_lane(s, 1)));
      }
    }
  }
  for (let column = partCount - 1; column >= 0; column--) {
    const own = x + <usize>i32At(partAt, column) * bytes;
    const end = i32At(columnStart, column + 1);
    for (let e = i32At(columnStart, column) + 1; e < end; e++) {
      const from = x + <usize>i32At(partAt, i32At(rows, e)) * bytes;
      for (let i: usize = 0; i < <usize>size; i++) {
        const row = L + <usize>e * area + i * bytes;
        const v = v128.load64_splat(from + i * D);
        for (let k: usize = 0; k < bytes; k += 16) {
          v128.store(own + k, f64x2.sub(v128.load(own + k), f64x2.mul(v, v128.load(row + k))));
        }
      }
    }
    const diagonal = L + <usize>i32At(columnStart, column) * area;
    for (let i = size - 1; i >= 0; i--) {
      let s = load<f64>(own + <usize>i * D);
      for (let k = i + 1; k < size; k++) {
        s -= load<f64>(diagonal + <usize>k * bytes + <usize>i * D) * load<f64>(own + <usize>k * D);
      }
      store<f64>(own + <usize>i * D, s / load<f64>(diagonal + <usize>i * bytes + <usize>i * D));
    }
  }
}

// y = K x over the stored blocks; of diagonal blocks the lower triangle counts.
export function multiplyBlocks(
  y: usize,
  K: usize,
  x: usize,
  partCount: i32,
  size: i32,
  columnStart: usize,
  rows: usize,
  partAt: usize,
): void {
  const bytes = <usize>size * D;
  const area = <usize>size * bytes;
  memory.fill(y, 0, <usize>partCount * bytes);
  for (let column = 0; column < partCount; column++) {
    const first = i32At(columnStart, column);
    const ownX = x + <usize>i32At(partAt, column) * bytes;
    const ownY = y + <usize>i32At(partAt, column) * bytes;
    for (let i: usize = 0; i < bytes; i += D) {
      const row = K + <usize>first * area + (i >> 3) * bytes;
      const value = load<f64>(ownX + i);
      let s = load<f64>(row + i) * value;
      for (let k: usize = 0; k < i; k += D) {
        s += load<f64>(row + k) * load<f64>(ownX + k);
        store<f64>(ownY + k, load<f64>(ownY + k) + load<f64>(row + k) * value);
      }
      store<f64>(ownY + i, load<f64>(ownY + i) + s);
    }
    const end = i32At(columnStart, column + 1);
    for (let e = first + 1; e < end; e++) {
      const other = <usize>i32At(partAt, i32At(rows, e)) * bytes;
      for (let i: usize = 0; i < bytes; i += D) {
        const row = K + <usize>e * area + (i >> 3) * bytes;
        const v = v128.load64_splat(x + other + i);
        let s = f64x2.splat(0);
        for (let k: usize = 0; k < bytes; k += 16) {
          const m = v128.load(row + k);
          s = f64x2.add(s, f64x2.mul(m, v128.load(ownX + k)));
          v128.store(ownY + k, f64x2.add(v128.load(ownY + k), f64x2.mul(m, v)));
        }
        const to = y + other + i;
        store<f64>(to, load<f64>(to) + (f64x2.extract_lane(s, 0) + f64x2.extract_lane(s, 1)));
      }
    }
  }
}

// out += factor · A x on each component, A symmetric in blocks of basis × basis for pairs of parts.
export function applyForm(
  out: usize,
  pairs: i32,
  rows: usize,
  columns: usize,
  values: usize,
  basis: i32,
  x: usize,
  factor: f64,
): void {
  const bytes = <usize>basis * D;
  let block = values;
  for (let p = 0; p < pairs; p++, block += bytes * <usize>basis) {
    const r = <usize>(i32At(rows, p) * 3) * bytes;
    const c = <usize>(i32At(columns, p) * 3) * bytes;
    for (let i: usize = 0; i < 3 * bytes; i += bytes) {
      const xr = x + r + i;
      const xc = x + c + i;
      const yr = out + r + i;
      const yc = out + c + i;
      for (let a: usize = 0; a < bytes; a += D) {
        const row = block + (a >> 3) * bytes;
        let s = f64x2.splat(0);
        if (r == c) {
          for (let b: usize = 0; b < bytes; b += 16) s = f64x2.add(s, f64x2.mul(v128.load(row + b), v128.load(xc + b)));
        } else {
          const v = f64x2.splat(factor * load<f64>(xr + a));
          for (let b: usize = 0; b < bytes; b += 16) {
            const m = v128.load(row + b);
            s = f64x2.add(s, f64x2.mul(m, v128.load(xc + b)));
            v128.store(yc + b, f64x2.add(v128.load(yc + b), f64x2.mul(v, m)));
          }
        }
        const sum = f64x2.extract_lane(s, 0) + f64x2.extract_lane(s, 1);
        store<f64>(yr + a, load<f64>(yr + a) + factor * sum);
      }
    }
  }
}
