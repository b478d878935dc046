import { bestKernels } from '../../../solver/kernels/best-kernels';
import type { BoundKernels, Kernels } from '../../../solver/kernels/kernels';
import { plainKernels } from '../../../solver/kernels/plain';
import { wasmKernels } from '../../../solver/kernels/wasm';
import { difference, fullMatrix, randomSystem } from './random-system';

const systems = [
  { name: 'linear, odd counts', basis: 4, parts: 5, groups: [{ active: 3, points: 7 }, { active: 1, points: 1 }, { active: 4, points: 5 }] }, // prettier-ignore
  { name: 'quadratic, odd counts', basis: 10, parts: 7, groups: [{ active: 3, points: 9 }, { active: 7, points: 13 }, { active: 1, points: 3 }] }, // prettier-ignore
  { name: 'one part', basis: 10, parts: 1, groups: [{ active: 1, points: 4 }] },
  {
    name: 'a wide group',
    basis: 10,
    parts: 9,
    groups: [
      { active: 8, points: 21 },
      { active: 2, points: 1 },
    ],
  },
] as const;

/** of the two dilatation groups */
const FACTORS = [0.7, 0.4] as const;

type System = ReturnType<typeof randomSystem>;

const make = (index: number): System => {
  const { basis, parts, groups } = systems[index]!;
  return randomSystem(17 + index, basis, parts, groups);
};

function allocate(bound: BoundKernels, values: ArrayLike<number>): Float64Array {
  const array = bound.allocate(values.length);
  array.set(values);
  return array;
}

/** Runs every operation once on the same numbers and returns what each one made. */
function runAll(kernels: Kernels, index: number) {
  const { points, pattern, unknowns, random } = make(index);
  const { basis } = systems[index]!;
  const bound = kernels.bind(points, pattern, basis);
  const draw = (length: number) => Float64Array.from({ length }, random);
  const c = draw(unknowns);
  const F = bound.allocate(9 * points.count);
  bound.deformation(F, c);
  const r = draw(unknowns);
  bound.accumulateGradient(r, allocate(bound, draw(9 * points.count)));
  const length = pattern.blockCount * pattern.size ** 2;
  const assembled = bound.allocate(length);
  const terms = [
    allocate(bound, draw(9 * points.count)),
    allocate(bound, draw(points.count)),
    allocate(bound, draw(points.count)),
  ] as const;
  bound.assemble(assembled, ...terms);
  const assembledSingle = bound.allocate(length);
  bound.assembleSingle(assembledSingle, ...terms);
  const laplace = bound.allocate(length);
  const factors = draw(points.count);
  bound.assembleLaplace(laplace, factors);
  // Dilatation groups are the first two groups of points; the first point belongs to none.
  const groupOf = groupsOf(points);
  const modes = allocate(bound, draw(4 * points.count));
  const cof = allocate(bound, draw(9 * points.count));
  const groups = Math.min(2, pattern.partCount);
  const D = bound.allocate(4 * groups * unknowns);
  bound.directions(D, groups, cof, modes, groupOf);
  const member = new Uint8Array(groups * pattern.partCount);
  D.forEach((x, u) => {
    const [vector, part] = [Math.floor(u / unknowns), Math.floor((u % unknowns) / pattern.size)];
    if (x !== 0) member[Math.floor(vector / 4) * pattern.partCount + part] = 1;
  });
  const outer = bound.allocate(length);
  bound.addOuter(outer, D, Float64Array.from(FACTORS.slice(0, groups)), member);
  const outerSingle = bound.allocate(length);
  bound.addOuterSingle(outerSingle, D, Float64Array.from(FACTORS.slice(0, groups)), member);
  // Laplacian and outer products are semi-definite; a firm diagonal makes a matrix that Cholesky must accept.
  const K = bound.allocate(length);
  for (let e = 0; e < length; e++) K[e] = Math.abs(factors[0]!) * outer[e]!;
  for (let column = 0; column < pattern.partCount; column++) {
    const at = pattern.columnStart[column]! * pattern.size ** 2;
    for (let u = 0; u < pattern.size; u++) K[at + u * (pattern.size + 1)]! += 4;
    for (let e = pattern.columnStart[column]! + 1; e < pattern.columnStart[column + 1]!; e++) {
      for (let u = 0; u < pattern.size; u++) K[e * pattern.size ** 2 + u * (pattern.size + 1)]! -= 0.2;
    }
  }
  const before = fullMatrix(K, pattern);
  const y = new Float64Array(unknowns);
  bound.multiply(y, K, c);
  const kept = K.slice();
  const single = { definite: bound.factorSingle(K), x: draw(unknowns), b: new Float64Array() };
  expect(K).toEqual(kept);
  single.b = single.x.slice();
  bound.solveSingle(single.x);
  const definite = bound.factor(K);
  const b = draw(unknowns);
  const x = b.slice();
  bound.solve(K, x);
  return {
    c, r, D: D.slice(), b, x, y, modes: modes.slice(), cof: cof.slice(), definite, before, single,
    assembledSingle: fullMatrix(assembledSingle, pattern),
    F: F.slice(),
    assembled: fullMatrix(assembled, pattern),
    laplace: fullMatrix(laplace, pattern),
    outer: fullMatrix(outer, pattern),
    outerSingle: fullMatrix(outerSingle, pattern),
  }; // prettier-ignore
}

/** The group of points that every point but the first belongs to, as far as there are two. */
function groupsOf({ count, groupCount, start }: System['points']): Int32Array {
  const of = new Int32Array(count).fill(-1);
  for (let g = 0; g < Math.min(2, groupCount); g++) of.fill(g, Math.max(1, start[g]!), start[g + 1]);
  return of;
}

const flat = (matrix: Float64Array[]) => matrix.flatMap((row) => [...row]);

describe.each(systems.map((system, index) => [system.name, index] as const))('%s', (_, index) => {
  const plain = runAll(plainKernels, index);
  const { basis } = systems[index]!;

  test('the plain twin sums what its description says', () => {
    const { points, unknowns, random } = make(index);
    const draw = (length: number) => Float64Array.from({ length }, random);
    const c = draw(unknowns);
    const r = draw(unknowns);
    const PV = draw(9 * points.count);
    const cof = draw(9 * points.count);
    const alpha = draw(points.count);
    const beta = draw(points.count);
    const factors = draw(points.count);
    const F = new Float64Array(9 * points.count);
    const K = Array.from({ length: unknowns }, () => new Float64Array(unknowns));
    const laplace = Array.from({ length: unknowns }, () => new Float64Array(unknowns));
    for (let g = 0; g < points.groupCount; g++) {
      const parts = points.activeParts.subarray(points.activeStart[g], points.activeStart[g + 1]);
      const n = parts.length * basis;
      for (let k = points.start[g]!; k < points.start[g + 1]!; k++) {
        const at = points.gradientStart[g]! + (k - points.start[g]!) * 3 * n;
        const gradient = (a: number, d: number) => points.gradients[at + d * n + a]!;
        const unknown = (a: number, i: number) => (parts[Math.floor(a / basis)]! * 3 + i) * basis + (a % basis);
        const h = (a: number, i: number) =>
          [0, 1, 2].reduce((sum, d) => sum + cof[9 * k + 3 * i + d]! * gradient(a, d), 0);
        for (let a = 0; a < n; a++) {
          for (let i = 0; i < 3; i++) {
            for (let d = 0; d < 3; d++) {
              F[9 * k + 3 * i + d]! += c[unknown(a, i)]! * gradient(a, d);
              r[unknown(a, i)]! += PV[9 * k + 3 * i + d]! * gradient(a, d);
            }
          }
          for (let b = 0; b < n; b++) {
            const dot = [0, 1, 2].reduce((sum, d) => sum + gradient(a, d) * gradient(b, d), 0);
            for (let i = 0; i < 3; i++) {
              laplace[unknown(a, i)]![unknown(b, i)]! += factors[k]! * dot;
              for (let j = 0; j < 3; j++) {
                K[unknown(a, i)]![unknown(b, j)]! += alpha[k]! * h(a, i) * h(b, j) + beta[k]! * h(b, i) * h(a, j);
              }
            }
          }
        }
      }
    }
    expect(difference(plain.F, F)).toBeLessThan(1e-13);
    expect(difference(plain.r, r)).toBeLessThan(1e-13);
    expect(difference(flat(plain.assembled), flat(K))).toBeLessThan(1e-13);
    expect(difference(flat(plain.laplace), flat(laplace))).toBeLessThan(1e-13);
  });

  test('dilatation directions sum what their description says, and outer products add them', () => {
    const { points, unknowns } = make(index);
    const expected = new Float64Array(plain.D.length);
    groupsOf(points).forEach((of, k) => {
      if (of < 0) return;
      const parts = points.activeParts.subarray(points.activeStart[of], points.activeStart[of + 1]);
      const n = parts.length * basis;
      const at = points.gradientStart[of]! + (k - points.start[of]!) * 3 * n;
      for (let a = 0; a < n; a++) {
        for (let i = 0; i < 3; i++) {
          const h = [0, 1, 2].reduce(
            (sum, d) => sum + plain.cof[9 * k + 3 * i + d]! * points.gradients[at + d * n + a]!,
            0,
          );
          const unknown = (parts[Math.floor(a / basis)]! * 3 + i) * basis + (a % basis);
          for (let m = 0; m < 4; m++) expected[(4 * of + m) * unknowns + unknown]! += plain.modes[4 * k + m]! * h;
        }
      }
    });
    expect(difference(plain.D, expected)).toBeLessThan(1e-13);
    const outer = Array.from({ length: unknowns }, (__, u) =>
      Float64Array.from(
        { length: unknowns },
        (___, v) =>
        Array.from({ length: expected.length / unknowns }, (____, m) => FACTORS[m >> 2]! * expected[m * unknowns + u]! * expected[m * unknowns + v]!).reduce((x, y) => x + y), // prettier-ignore
      ),
    );
    expect(difference(flat(plain.outer), flat(outer))).toBeLessThan(1e-13);
  });

  test('the factor solves the system, fill and ordering included', () => {
    expect(plain.definite).toBe(true);
    const product = plain.before.map((row) => row.reduce((sum, value, v) => sum + value * plain.x[v]!, 0));
    expect(difference(product, plain.b)).toBeLessThan(1e-12);
    const image = plain.before.map((row) => row.reduce((sum, value, v) => sum + value * plain.c[v]!, 0));
    expect(difference(plain.y, image)).toBeLessThan(1e-12);
  });

  test('the WebAssembly twin gives the same numbers', () => {
    const wasm = runAll(wasmKernels()!, index);
    for (const name of ['F', 'r', 'x', 'y', 'D'] as const)
      expect(difference(wasm[name], plain[name])).toBeLessThan(1e-12);
    for (const name of ['assembled', 'laplace', 'outer'] as const) {
      expect(difference(flat(wasm[name]), flat(plain[name]))).toBeLessThan(1e-12);
    }
    expect(wasm.definite).toBe(true);
  });

  test('single precision is close to double', () => {
    const wasm = runAll(wasmKernels()!, index);
    expect(difference(flat(wasm.assembledSingle), flat(plain.assembled))).toBeLessThan(2e-6);
    expect(difference(flat(wasm.outerSingle), flat(plain.outer))).toBeLessThan(2e-6);
    expect(wasm.single.definite).toBe(true);
    for (const { before, single } of [wasm, plain]) {
      const product = before.map((row) => row.reduce((sum, value, v) => sum + value * single.x[v]!, 0));
      expect(difference(product, single.b)).toBeLessThan(1e-4);
    }
  });
});

describe.each([plainKernels, wasmKernels()!].map((kernels) => [kernels.name, kernels] as const))('%s', (_, kernels) => {
  test('the factor refuses a matrix with one negative direction', () => {
    const { points, pattern } = make(1);
    const bound = kernels.bind(points, pattern, 10);
    const area = pattern.size ** 2;
    for (const column of [0, pattern.partCount - 1]) {
      const K = bound.allocate(pattern.blockCount * area);
      for (let p = 0; p < pattern.partCount; p++) {
        for (let u = 0; u < pattern.size; u++) K[pattern.columnStart[p]! * area + u * (pattern.size + 1)] = 1;
      }
      K[pattern.columnStart[column]! * area + 29 * (pattern.size + 1)] = -1e-9;
      expect(bound.factorSingle(K)).toBe(false);
      expect(bound.factor(K)).toBe(false);
    }
  });

  test('a number that is none is refused as not definite', () => {
    const { points, pattern } = make(2);
    const bound = kernels.bind(points, pattern, 10);
    const K = bound.allocate(pattern.blockCount * pattern.size ** 2).fill(NaN);
    expect(bound.factorSingle(K)).toBe(false);
    expect(bound.factor(K)).toBe(false);
  });

  test('the same input gives the same bits again', () => {
    const twice = [runAll(kernels, 3), runAll(kernels, 3)];
    expect(twice[1]).toEqual(twice[0]);
  });
});

test('a constant form acts on each component alike, in both twins', () => {
  const { points, pattern, unknowns, random } = make(1);
  const pairs = { rows: Int32Array.of(0, 3, 3), columns: Int32Array.of(0, 1, 3) };
  const values = Float64Array.from({ length: 300 }, random);
  // The blocks of a part with itself are symmetric.
  for (const p of [0, 2]) {
    for (let a = 0; a < 10; a++) for (let b = 0; b < a; b++) values[p * 100 + 10 * b + a] = values[p * 100 + 10 * a + b]!;
  } // prettier-ignore
  const x = Float64Array.from({ length: unknowns }, random);
  const start = Float64Array.from({ length: unknowns }, random);
  const expected = start.slice();
  const at = (part: number, i: number, a: number) => (part * 3 + i) * 10 + a;
  for (let p = 0; p < 3; p++) {
    const [r, c] = [pairs.rows[p]!, pairs.columns[p]!];
    for (let i = 0; i < 3; i++) {
      for (let a = 0; a < 10; a++) {
        for (let b = 0; b < 10; b++) {
          const value = 0.3 * values[p * 100 + 10 * a + b]!;
          expected[at(r, i, a)]! += value * x[at(c, i, b)]!;
          if (r !== c) expected[at(c, i, b)]! += value * x[at(r, i, a)]!;
        }
      }
    }
  }
  for (const kernels of [plainKernels, wasmKernels()!]) {
    const out = start.slice();
    kernels
      .bind(points, pattern, 10)
      .bindForm({ ...pairs, values })
      .apply(out, x, 0.3);
    expect(difference(out, expected)).toBeLessThan(1e-13);
  }
});

test('the WebAssembly twin is preferred, and refuses arrays that are not its own', () => {
  expect(bestKernels().name).toBe('wasm-simd');
  const { points, pattern, unknowns } = make(0);
  const bound = wasmKernels()!.bind(points, pattern, 4);
  expect(() => bound.deformation(new Float64Array(9 * points.count), new Float64Array(unknowns))).toThrow(
    'not allocated by these kernels',
  );
});

test('without WebAssembly the plain twin is taken', () => {
  const engine = globalThis.WebAssembly;
  try {
    Object.defineProperty(globalThis, 'WebAssembly', { value: undefined, configurable: true, writable: true });
    jest.isolateModules(() => {
      const fresh = jest.requireActual<typeof import('../../../solver/kernels/best-kernels')>(
        '../../../solver/kernels/best-kernels',
      );
      expect(fresh.bestKernels().name).toBe('plain');
    });
  } finally {
    Object.defineProperty(globalThis, 'WebAssembly', { value: engine, configurable: true, writable: true });
  }
});
