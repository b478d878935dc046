import type { BlockPattern } from '../linear/block-pattern';
import type { BlockPairs, QuadraturePoints } from '../quadrature/prepared';
import { addOuterProducts, applyForm, factorBlocks, multiplyBlocks, solveBlocks } from './plain-blocks';
import { addTransposedProduct } from './plain-product';
import type { BoundForm, BoundKernels, Kernels } from './kernels';

/** The kernels in plain TypeScript, double precision, fixed order of summation. */
export const plainKernels: Kernels = {
  name: 'plain',
  bind: (points, pattern, basis) => new PlainKernels(points, pattern, basis),
};

/** Products are tiled by four: scratch rows are padded to a multiple of it. */
const TILE = 4;

class PlainKernels implements BoundKernels {
  private readonly local: Float64Array;
  private readonly left: Float64Array;
  private readonly right: Float64Array;
  private readonly product: Float64Array;
  private kept: Float64Array | null = null;

  constructor(
    private readonly points: QuadraturePoints,
    private readonly pattern: BlockPattern,
    private readonly basis: number,
  ) {
    let widest = 0;
    let longest = 0;
    for (let g = 0; g < points.groupCount; g++) {
      widest = Math.max(widest, padded((points.activeStart[g + 1]! - points.activeStart[g]!) * basis));
      longest = Math.max(longest, points.start[g + 1]! - points.start[g]!);
    }
    this.local = new Float64Array(3 * widest);
    this.left = new Float64Array(3 * longest * widest);
    this.right = new Float64Array(2 * longest * widest);
    this.product = new Float64Array(widest * widest);
  }

  allocate(length: number): Float64Array {
    return new Float64Array(length);
  }

  private width(group: number): number {
    return (this.points.activeStart[group + 1]! - this.points.activeStart[group]!) * this.basis;
  }

  private gather(group: number, n: number, c: Float64Array): void {
    const { activeStart, activeParts } = this.points;
    const { basis, local } = this;
    let m = 0;
    for (let e = activeStart[group]!; e < activeStart[group + 1]!; e++, m += basis) {
      const from = activeParts[e]! * 3 * basis;
      for (let i = 0; i < 3; i++) {
        for (let a = 0; a < basis; a++) local[i * n + m + a] = c[from + i * basis + a]!;
      }
    }
  }

  deformation(F: Float64Array, c: Float64Array): void {
    const { groupCount, start, gradientStart, gradients } = this.points;
    const local = this.local;
    for (let g = 0; g < groupCount; g++) {
      const n = this.width(g);
      this.gather(g, n, c);
      let G = gradientStart[g]!;
      for (let k = start[g]!; k < start[g + 1]!; k++) {
        for (let d = 0; d < 3; d++, G += n) {
          let x = 0;
          let y = 0;
          let z = 0;
          for (let a = 0; a < n; a++) {
            const gradient = gradients[G + a]!;
            x += local[a]! * gradient;
            y += local[n + a]! * gradient;
            z += local[2 * n + a]! * gradient;
          }
          F[9 * k + d] = x;
          F[9 * k + 3 + d] = y;
          F[9 * k + 6 + d] = z;
        }
      }
    }
  }

  accumulateGradient(r: Float64Array, PV: Float64Array): void {
    const { groupCount, start, gradientStart, gradients, activeStart, activeParts } = this.points;
    const { basis, local } = this;
    for (let g = 0; g < groupCount; g++) {
      const n = this.width(g);
      local.fill(0, 0, 3 * n);
      let G = gradientStart[g]!;
      for (let k = start[g]!; k < start[g + 1]!; k++) {
        for (let d = 0; d < 3; d++, G += n) {
          const x = PV[9 * k + d]!;
          const y = PV[9 * k + 3 + d]!;
          const z = PV[9 * k + 6 + d]!;
          for (let a = 0; a < n; a++) {
            const gradient = gradients[G + a]!;
            local[a]! += x * gradient;
            local[n + a]! += y * gradient;
            local[2 * n + a]! += z * gradient;
          }
        }
      }
      let m = 0;
      for (let e = activeStart[g]!; e < activeStart[g + 1]!; e++, m += basis) {
        const to = activeParts[e]! * 3 * basis;
        for (let i = 0; i < 3; i++) for (let a = 0; a < basis; a++) r[to + i * basis + a]! += local[i * n + m + a]!;
      }
    }
  }

  assemble(K: Float64Array, cof: Float64Array, alpha: Float64Array, beta: Float64Array): void {
    const { groupCount, start, gradientStart, gradients } = this.points;
    const { left: H, right, product } = this;
    for (let g = 0; g < groupCount; g++) {
      const n = this.width(g);
      const wide = padded(n);
      const first = start[g]!;
      const count = start[g + 1]! - first;
      // H[i][k][a] = Σ_d cof_k[i][d] ∂N_a/∂X_d
      for (let k = 0; k < count; k++) {
        const G = gradientStart[g]! + k * 3 * n;
        for (let i = 0; i < 3; i++) {
          const x = cof[9 * (first + k) + 3 * i]!;
          const y = cof[9 * (first + k) + 3 * i + 1]!;
          const z = cof[9 * (first + k) + 3 * i + 2]!;
          const at = (i * count + k) * wide;
          for (let a = 0; a < n; a++) {
            H[at + a] = x * gradients[G + a]! + y * gradients[G + n + a]! + z * gradients[G + 2 * n + a]!;
          }
          for (let a = n; a < wide; a++) H[at + a] = 0;
        }
      }
      for (let i = 0; i < 3; i++) {
        for (let j = i; j < 3; j++) {
          product.fill(0, 0, wide * wide);
          scaleRows(right, H, i * count, count, wide, alpha, first, i === j ? beta : null);
          addTransposedProduct(product, wide, right, 0, H, j * count * wide, count, i === j);
          if (i !== j) {
            scaleRows(right, H, j * count, count, wide, beta, first, null);
            addTransposedProduct(product, wide, right, 0, H, i * count * wide, count, false);
          }
          this.scatter(K, g, wide, i, j);
        }
      }
    }
  }

  assembleSingle(K: Float64Array, cof: Float64Array, alpha: Float64Array, beta: Float64Array): void {
    this.assemble(K, cof, alpha, beta);
  }

  assembleLaplace(K: Float64Array, factor: Float64Array): void {
    const { groupCount, start, gradientStart, gradients } = this.points;
    const { left: H, right, product } = this;
    for (let g = 0; g < groupCount; g++) {
      const n = this.width(g);
      const wide = padded(n);
      const first = start[g]!;
      const count = start[g + 1]! - first;
      product.fill(0, 0, wide * wide);
      for (let d = 0; d < 3; d++) {
        for (let k = 0; k < count; k++) {
          const G = gradientStart[g]! + (k * 3 + d) * n;
          for (let a = 0; a < n; a++) H[k * wide + a] = gradients[G + a]!;
          for (let a = n; a < wide; a++) H[k * wide + a] = 0;
        }
        scaleRows(right, H, 0, count, wide, factor, first, null);
        addTransposedProduct(product, wide, right, 0, H, 0, count, true);
      }
      for (let i = 0; i < 3; i++) this.scatter(K, g, wide, i, i);
    }
  }

  /** Adds product[a][b], the coupling of component i of function a with component j of function b, to the blocks. */
  private scatter(K: Float64Array, group: number, wide: number, i: number, j: number): void {
    const { activeStart, activeParts } = this.points;
    const { position, blockAt, partCount, size } = this.pattern;
    const { basis, product } = this;
    const from = activeStart[group]!;
    const active = activeStart[group + 1]! - from;
    for (let m = 0; m < active; m++) {
      const p = position[activeParts[from + m]!]!;
      for (let q = 0; q < active; q++) {
        const s = position[activeParts[from + q]!]!;
        if (i === j) {
          // Only the lower triangle of `product` (by function number) was made; read it from there.
          if (p < s) continue;
          const at = blockAt[p * partCount + s]! * size * size;
          for (let a = 0; a < basis; a++) {
            const to = at + (i * basis + a) * size + i * basis;
            const last = m === q ? a + 1 : basis;
            for (let b = 0; b < last; b++) {
              const row = m * basis + a;
              const column = q * basis + b;
              K[to + b]! += row >= column ? product[row * wide + column]! : product[column * wide + row]!;
            }
          }
        } else if (p > s) {
          const at = blockAt[p * partCount + s]! * size * size;
          for (let a = 0; a < basis; a++) {
            const to = at + (i * basis + a) * size + j * basis;
            const source = (m * basis + a) * wide + q * basis;
            for (let b = 0; b < basis; b++) K[to + b]! += product[source + b]!;
          }
        } else {
          const at = blockAt[s * partCount + p]! * size * size;
          for (let a = 0; a < basis; a++) {
            const to = at + j * basis * size + i * basis + a;
            const source = (m * basis + a) * wide + q * basis;
            for (let b = 0; b < basis; b++) K[to + b * size]! += product[source + b]!;
          }
        }
      }
    }
  }

  directions(D: Float64Array, count: number, cof: Float64Array, modes: Float64Array, groupOf: Int32Array): void {
    const { groupCount, start, gradientStart, gradients, activeStart, activeParts } = this.points;
    const { basis } = this;
    const length = this.pattern.partCount * this.pattern.size;
    D.fill(0, 0, 4 * count * length);
    for (let g = 0; g < groupCount; g++) {
      const n = this.width(g);
      let G = gradientStart[g]!;
      for (let k = start[g]!; k < start[g + 1]!; k++, G += 3 * n) {
        if (groupOf[k]! < 0) continue;
        const base = 4 * groupOf[k]! * length;
        for (let i = 0; i < 3; i++) {
          const x = cof[9 * k + 3 * i]!;
          const y = cof[9 * k + 3 * i + 1]!;
          const z = cof[9 * k + 3 * i + 2]!;
          for (let e = activeStart[g]!, a = 0; e < activeStart[g + 1]!; e++) {
            const to = base + (activeParts[e]! * 3 + i) * basis;
            for (let b = 0; b < basis; b++, a++) {
              const h = x * gradients[G + a]! + y * gradients[G + n + a]! + z * gradients[G + 2 * n + a]!;
              for (let m = 0; m < 4; m++) D[to + m * length + b]! += modes[4 * k + m]! * h;
            }
          }
        }
      }
    }
  }

  addOuter(K: Float64Array, D: Float64Array, factors: Float64Array, member: Uint8Array): void {
    addOuterProducts(K, this.pattern, D, factors, member);
  }

  addOuterSingle(K: Float64Array, D: Float64Array, factors: Float64Array, member: Uint8Array): void {
    this.addOuter(K, D, factors, member);
  }

  bindForm(form: BlockPairs): BoundForm {
    return { apply: (out, x, factor) => applyForm(out, form, this.basis, x, factor) };
  }

  multiply(y: Float64Array, K: Float64Array, x: Float64Array): void {
    multiplyBlocks(y, K, this.pattern, x);
  }

  factor(K: Float64Array): boolean {
    return factorBlocks(K, this.pattern);
  }

  solve(L: Float64Array, x: Float64Array): void {
    solveBlocks(L, this.pattern, x);
  }

  factorSingle(K: Float64Array): boolean {
    this.kept ??= new Float64Array(K.length);
    this.kept.set(K);
    return this.factor(this.kept);
  }

  solveSingle(x: Float64Array): void {
    this.solve(this.kept!, x);
  }
}

const padded = (n: number) => Math.ceil(n / TILE) * TILE;

/** out[k] = (weights[first+k] + more[first+k]) · rows[row0+k], rows of `wide` numbers. */
function scaleRows(
  out: Float64Array,
  rows: Float64Array,
  row0: number,
  count: number,
  wide: number,
  weights: Float64Array,
  first: number,
  more: Float64Array | null,
): void {
  for (let k = 0; k < count; k++) {
    const s = weights[first + k]! + (more ? more[first + k]! : 0);
    const from = (row0 + k) * wide;
    const to = k * wide;
    for (let a = 0; a < wide; a++) out[to + a] = s * rows[from + a]!;
  }
}
