import type { BlockPattern } from '../linear/block-pattern';
import type { BlockPairs, QuadraturePoints } from '../quadrature/prepared';
import type { BoundForm, BoundKernels, Kernels } from './kernels';
import { KERNELS_WASM_BASE64 } from './kernels-wasm';

/** What solver/kernels/assembly exports; pointers are byte offsets. */
interface Exports {
  deformation(...args: number[]): void;
  accumulateGradient(...args: number[]): void;
  assemble(...args: number[]): void;
  assembleLaplace(...args: number[]): void;
  directions(...args: number[]): void;
  addOuter(...args: number[]): void;
  factorBlocks(...args: number[]): number;
  solveBlocks(...args: number[]): void;
  multiplyBlocks(...args: number[]): void;
  applyForm(...args: number[]): void;
  assembleSingle(...args: number[]): void;
  addOuterSingle(...args: number[]): void;
  factorSingle(...args: number[]): number;
  solveSingle(...args: number[]): void;
}

const PAGE = 65536;
/** Matrices there is room for. Pages that nobody touches cost nothing. */
const MATRICES = 4;
/** Constant forms there is room for. */
const FORMS = 2;
let compiled: WebAssembly.Module | null | undefined;

/** The kernels as WebAssembly with SIMD; null where the engine lacks it. */
export function wasmKernels(): Kernels | null {
  if (compiled === undefined) {
    try {
      compiled = new WebAssembly.Module(Uint8Array.from(atob(KERNELS_WASM_BASE64), (c) => c.charCodeAt(0)));
    } catch {
      compiled = null;
    }
  }
  const module = compiled;
  if (!module) return null;
  return { name: 'wasm-simd', bind: (points, pattern, basis) => new WasmKernels(module, points, pattern, basis) };
}

class WasmKernels implements BoundKernels {
  private readonly memory: WebAssembly.Memory;
  private readonly exports: Exports;
  private next = 64;
  private readonly start: number;
  private readonly activeStart: number;
  private readonly activeParts: number;
  private readonly gradientStart: number;
  private readonly gradients: number;
  private readonly position: number;
  private readonly partAt: number;
  private readonly columnStart: number;
  private readonly rows: number;
  private readonly blockAt: number;
  private readonly local: number;
  private readonly left: number;
  private readonly right: number;
  private readonly product: number;
  private readonly block: number;
  private readonly vector: Float64Array;
  private readonly result: Float64Array;
  private readonly perPoint: Float64Array;
  private readonly pointInts: Int32Array;
  /** what `addOuter` reads; there are at most as many groups as parts */
  private readonly outer: { factors: Float64Array; member: Uint8Array; list: number };
  /** the same points for the kernels in single precision */
  private readonly single: {
    wide: number;
    parts: number;
    gradientStart: number;
    gradients: number;
    /** H, αH, βH, (α + β)H */
    layers: [number, number, number, number];
    product: number;
    factor: number;
    scale: number;
    scratch: number;
    directions: number;
    vectors: number;
  };

  constructor(
    module: WebAssembly.Module,
    private readonly points: QuadraturePoints,
    private readonly pattern: BlockPattern,
    private readonly basis: number,
  ) {
    let widest = 0;
    let longest = 0;
    for (let g = 0; g < points.groupCount; g++) {
      widest = Math.max(widest, Math.ceil(((points.activeStart[g + 1]! - points.activeStart[g]!) * basis) / 4) * 4);
      longest = Math.max(longest, points.start[g + 1]! - points.start[g]!);
    }
    const { partCount, size, blockCount } = pattern;
    const unknowns = partCount * size;
    // Everything is allocated from one memory of a fixed size: growing it would take the views away from the callers.
    const doubles =
      points.gradients.length + 44 * points.count + widest * (3 + 5 * longest + widest) + 12 * unknowns +
      MATRICES * blockCount * size * size + FORMS * blockCount * basis * basis + 9 * partCount + partCount * partCount + 4 * partCount * unknowns + 2 * size * size +
      Math.ceil(singleFloats(points, pattern, basis) / 2) + unknowns; // prettier-ignore
    const integers =
      4 * points.groupCount +
      points.activeParts.length +
      points.count +
      points.activeParts.length +
      4 * partCount +
      blockCount +
      partCount * partCount +
      unknowns;
    this.memory = new WebAssembly.Memory({ initial: Math.ceil((8 * doubles + 4 * integers) / PAGE) + 16 });
    this.exports = new WebAssembly.Instance(module, { env: { memory: this.memory, abort: () => undefined } })
      .exports as unknown as Exports;
    this.start = this.copyInts(points.start);
    this.activeStart = this.copyInts(points.activeStart);
    this.activeParts = this.copyInts(points.activeParts);
    this.gradientStart = this.copyInts(points.gradientStart);
    this.position = this.copyInts(pattern.position);
    this.partAt = this.copyInts(pattern.partAt);
    this.columnStart = this.copyInts(pattern.columnStart);
    this.rows = this.copyInts(pattern.rows);
    this.blockAt = this.copyInts(pattern.blockAt);
    this.pointInts = new Int32Array(this.memory.buffer, this.take(4 * points.count), points.count);
    this.outer = {
      factors: this.allocate(partCount),
      member: new Uint8Array(this.memory.buffer, this.take(partCount * partCount), partCount * partCount),
      list: this.take(64 * partCount),
    };
    const gradients = this.allocate(points.gradients.length);
    gradients.set(points.gradients);
    this.gradients = gradients.byteOffset;
    this.local = this.allocate(3 * widest).byteOffset;
    this.left = this.allocate(3 * longest * widest).byteOffset;
    this.right = this.allocate(2 * longest * widest).byteOffset;
    this.product = this.allocate(widest * widest).byteOffset;
    this.block = this.allocate(size * size).byteOffset;
    this.vector = this.allocate(unknowns);
    this.result = this.allocate(unknowns);
    this.perPoint = this.allocate(points.count);
    this.single = this.placeSingle(longest);
  }

  /** Gradients as floats, the parts of each group in elimination order, rows padded to whole vectors. */
  private placeSingle(longest: number) {
    const { points, pattern, basis } = this;
    const { partCount, size, blockCount, position } = pattern;
    const order = points.activeParts.slice();
    const starts = new Int32Array(points.groupCount);
    const floats = new Float32Array(this.memory.buffer, this.take(4 * paddedGradients(points, basis)), paddedGradients(points, basis)); // prettier-ignore
    let at = 0;
    let widest = 0;
    for (let g = 0; g < points.groupCount; g++) {
      const from = points.activeStart[g]!;
      const own = points.activeParts.subarray(from, points.activeStart[g + 1]);
      const sorted = Array.from(own, (_, m) => m).sort((a, b) => position[own[a]!]! - position[own[b]!]!);
      sorted.forEach((m, place) => (order[from + place] = own[m]!));
      const n = own.length * basis;
      const wide = whole(n);
      widest = Math.max(widest, wide);
      starts[g] = at;
      const rows = 3 * (points.start[g + 1]! - points.start[g]!);
      for (let row = 0; row < rows; row++, at += wide) {
        const source = points.gradientStart[g]! + row * n;
        sorted.forEach((m, place) => {
          for (let a = 0; a < basis; a++) floats[at + place * basis + a] = points.gradients[source + m * basis + a]!;
        });
      }
    }
    const wide = whole(size);
    const layer = 4 * 3 * longest * widest;
    return {
      wide,
      parts: this.copyInts(order),
      gradientStart: this.copyInts(starts),
      gradients: floats.byteOffset,
      layers: [this.take(layer), this.take(layer), this.take(layer), this.take(layer)] as [
        number,
        number,
        number,
        number,
      ],
      product: this.take(4 * widest * widest),
      factor: this.take(4 * blockCount * wide * wide),
      scale: this.take(8 * partCount * size),
      scratch: this.take(8 * wide * wide),
      directions: this.take(16 * partCount * partCount * wide),
      vectors: this.take(8 * partCount * wide),
    };
  }

  allocate(length: number): Float64Array {
    return new Float64Array(this.memory.buffer, this.take(8 * length), length);
  }

  private take(bytes: number): number {
    const at = this.next;
    this.next += Math.ceil(bytes / 16) * 16;
    if (this.next > this.memory.buffer.byteLength)
      throw new RangeError('The body is too large for the solver’s memory. Use fewer parts.');
    return at;
  }

  private copyInts(values: Int32Array): number {
    const at = this.take(4 * values.length);
    new Int32Array(this.memory.buffer, at, values.length).set(values);
    return at;
  }

  /** The byte offset of an array that `allocate` made. */
  private offset(array: Float64Array): number {
    if (array.buffer !== this.memory.buffer) throw new Error('This array was not allocated by these kernels.');
    return array.byteOffset;
  }

  deformation(F: Float64Array, c: Float64Array): void {
    this.vector.set(c);
    this.exports.deformation(
      this.offset(F), this.vector.byteOffset, this.points.groupCount, this.start, this.activeStart, this.activeParts,
      this.gradientStart, this.gradients, this.basis, this.local,
    ); // prettier-ignore
  }

  accumulateGradient(r: Float64Array, PV: Float64Array): void {
    this.vector.set(r);
    this.exports.accumulateGradient(
      this.vector.byteOffset, this.offset(PV), this.points.groupCount, this.start, this.activeStart, this.activeParts,
      this.gradientStart, this.gradients, this.basis, this.local,
    ); // prettier-ignore
    r.set(this.vector);
  }

  assemble(K: Float64Array, cof: Float64Array, alpha: Float64Array, beta: Float64Array): void {
    this.exports.assemble(
      this.offset(K), this.offset(cof), this.offset(alpha), this.offset(beta), this.points.groupCount, this.start,
      this.activeStart, this.activeParts, this.gradientStart, this.gradients, this.basis, this.left, this.right,
      this.product, this.position, this.blockAt, this.pattern.partCount, this.pattern.size,
    ); // prettier-ignore
  }

  assembleLaplace(K: Float64Array, factor: Float64Array): void {
    this.perPoint.set(factor);
    this.exports.assembleLaplace(
      this.offset(K), this.perPoint.byteOffset, this.points.groupCount, this.start, this.activeStart, this.activeParts,
      this.gradientStart, this.gradients, this.basis, this.left, this.right, this.product, this.position, this.blockAt,
      this.pattern.partCount, this.pattern.size,
    ); // prettier-ignore
  }

  directions(D: Float64Array, count: number, cof: Float64Array, modes: Float64Array, groupOf: Int32Array): void {
    this.pointInts.set(groupOf);
    this.exports.directions(
      this.offset(D), count, this.offset(cof), this.offset(modes), this.pointInts.byteOffset, this.points.groupCount,
      this.start, this.activeStart, this.activeParts, this.gradientStart, this.gradients, this.basis,
      this.pattern.partCount,
    ); // prettier-ignore
  }

  addOuter(K: Float64Array, D: Float64Array, factors: Float64Array, member: Uint8Array): void {
    const { partCount, size } = this.pattern;
    const { factors: kept, member: places, list } = this.outer;
    kept.set(factors);
    places.set(member);
    this.exports.addOuter(
      this.offset(K), this.offset(D), factors.length, kept.byteOffset, places.byteOffset, list, partCount, size,
      this.columnStart, this.rows, this.partAt,
    ); // prettier-ignore
  }

  addOuterSingle(K: Float64Array, D: Float64Array, factors: Float64Array, member: Uint8Array): void {
    const { partCount, size } = this.pattern;
    const { factors: kept, member: places, list } = this.outer;
    const { wide, directions, scratch } = this.single;
    kept.set(factors);
    places.set(member);
    this.exports.addOuterSingle(
      this.offset(K), this.offset(D), factors.length, kept.byteOffset, places.byteOffset, directions, scratch, list,
      partCount, size, wide, this.columnStart, this.rows, this.partAt,
    ); // prettier-ignore
  }

  bindForm({ rows, columns, values }: BlockPairs): BoundForm {
    const at = this.allocate(values.length);
    at.set(values);
    const rowsAt = this.copyInts(rows);
    const columnsAt = this.copyInts(columns);
    return {
      apply: (out, x, factor) => {
        this.vector.set(x);
        this.result.set(out);
        this.exports.applyForm(
          this.result.byteOffset, rows.length, rowsAt, columnsAt, at.byteOffset, this.basis, this.vector.byteOffset,
          factor,
        ); // prettier-ignore
        out.set(this.result);
      },
    };
  }

  multiply(y: Float64Array, K: Float64Array, x: Float64Array): void {
    const { partCount, size } = this.pattern;
    this.vector.set(x);
    this.exports.multiplyBlocks(
      this.result.byteOffset, this.offset(K), this.vector.byteOffset, partCount, size, this.columnStart, this.rows,
      this.partAt,
    ); // prettier-ignore
    y.set(this.result);
  }

  factor(K: Float64Array): boolean {
    const { partCount, size } = this.pattern;
    return (
      this.exports.factorBlocks(
        this.offset(K),
        partCount,
        size,
        this.columnStart,
        this.rows,
        this.blockAt,
        this.block,
      ) !== 0
    );
  }

  solve(L: Float64Array, x: Float64Array): void {
    const { partCount, size } = this.pattern;
    this.vector.set(x);
    this.exports.solveBlocks(
      this.offset(L),
      this.vector.byteOffset,
      partCount,
      size,
      this.columnStart,
      this.rows,
      this.partAt,
    );
    x.set(this.vector);
  }

  assembleSingle(K: Float64Array, cof: Float64Array, alpha: Float64Array, beta: Float64Array): void {
    const { parts, gradientStart, gradients, layers, product } = this.single;
    this.exports.assembleSingle(
      this.offset(K), this.offset(cof), this.offset(alpha), this.offset(beta), this.points.groupCount, this.start,
      this.activeStart, parts, gradientStart, gradients, this.basis, ...layers, product, this.position, this.blockAt,
      this.pattern.partCount, this.pattern.size,
    ); // prettier-ignore
  }

  factorSingle(K: Float64Array): boolean {
    const { partCount, size } = this.pattern;
    const { wide, factor, scale, scratch } = this.single;
    return (
      this.exports.factorSingle(
        factor, this.offset(K), scale, partCount, size, wide, this.columnStart, this.rows, this.blockAt, scratch,
      ) !== 0
    ); // prettier-ignore
  }

  solveSingle(x: Float64Array): void {
    const { partCount, size } = this.pattern;
    const { wide, factor, scale, vectors } = this.single;
    this.vector.set(x);
    this.exports.solveSingle(
      factor, scale, this.vector.byteOffset, vectors, partCount, size, wide, this.columnStart, this.rows, this.partAt,
    ); // prettier-ignore
    x.set(this.vector);
  }
}

/** Rounded up to whole tiles of the kernels in single precision. */
const whole = (n: number) => Math.ceil(n / 8) * 8;

function paddedGradients(points: QuadraturePoints, basis: number): number {
  let length = 0;
  for (let g = 0; g < points.groupCount; g++) {
    const wide = whole((points.activeStart[g + 1]! - points.activeStart[g]!) * basis);
    length += 3 * (points.start[g + 1]! - points.start[g]!) * wide;
  }
  return length;
}

/** Floats that the kernels in single precision work in. */
function singleFloats(points: QuadraturePoints, { partCount, size, blockCount }: BlockPattern, basis: number): number {
  let widest = 0;
  let longest = 0;
  for (let g = 0; g < points.groupCount; g++) {
    widest = Math.max(widest, whole((points.activeStart[g + 1]! - points.activeStart[g]!) * basis));
    longest = Math.max(longest, points.start[g + 1]! - points.start[g]!);
  }
  const wide = whole(size);
  return (
    paddedGradients(points, basis) + 12 * longest * widest + widest * widest +
    (blockCount + 2) * wide * wide + 2 * partCount * wide + 4 * partCount * partCount * wide
  ); // prettier-ignore
}
