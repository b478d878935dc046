import type { BlockPattern } from '../linear/block-pattern';
import type { QuadraturePoints } from '../quadrature/prepared';
import type { BoundKernels, Kernels } from './kernels';
import { KERNELS_WASM_BASE64 } from './kernels-wasm';

/** What solver/kernels/assembly exports; pointers are byte offsets. */
interface Exports {
  deformation(...args: number[]): void;
  accumulateGradient(...args: number[]): void;
  assemble(...args: number[]): void;
  assembleLaplace(...args: number[]): void;
  addOuter(...args: number[]): void;
  factorBlocks(...args: number[]): number;
  solveBlocks(...args: number[]): void;
}

const PAGE = 65536;
/** Matrices there is room for. Pages that nobody touches cost nothing. */
const MATRICES = 4;
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
  private readonly perPoint: Float64Array;
  private readonly list: Int32Array;

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
      points.gradients.length + 40 * points.count + widest * (3 + 5 * longest + widest) + 12 * unknowns +
      MATRICES * blockCount * size * size + 4 * partCount * unknowns + 2 * size * size; // prettier-ignore
    const integers =
      3 * points.groupCount + points.activeParts.length + 4 * partCount + blockCount + partCount * partCount + unknowns;
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
    this.list = new Int32Array(this.memory.buffer, this.take(4 * partCount), partCount);
    const gradients = this.allocate(points.gradients.length);
    gradients.set(points.gradients);
    this.gradients = gradients.byteOffset;
    this.local = this.allocate(3 * widest).byteOffset;
    this.left = this.allocate(3 * longest * widest).byteOffset;
    this.right = this.allocate(2 * longest * widest).byteOffset;
    this.product = this.allocate(widest * widest).byteOffset;
    this.block = this.allocate(size * size).byteOffset;
    this.vector = this.allocate(unknowns);
    this.perPoint = this.allocate(points.count);
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

  addOuter(K: Float64Array, D: Float64Array, count: number, parts: Int32Array, factor: number): void {
    this.list.set(parts);
    this.exports.addOuter(
      this.offset(K), this.offset(D), count, this.list.byteOffset, parts.length, factor, this.position, this.blockAt,
      this.pattern.partCount, this.pattern.size,
    ); // prettier-ignore
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
}
