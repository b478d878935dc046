import type { Parts } from './prepared';

/** Number of monomials ξⁱηʲζᵏ up to twice the basis' degree. */
export const MONOMIALS = { 4: 10, 10: 35 } as const;

type Exponents = readonly [number, number, number];

/** Exponents of the basis functions, in the order of the basis. */
const BASIS: readonly Exponents[] = [
  [0, 0, 0],
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
  [2, 0, 0],
  [0, 2, 0],
  [0, 0, 2],
  [1, 1, 0],
  [0, 1, 1],
  [1, 0, 1],
];

/** All monomials up to degree 4, those of a lower degree first. */
const ALL: readonly Exponents[] = [0, 1, 2, 3, 4].flatMap((degree) => {
  const list: Exponents[] = [];
  for (let i = degree; i >= 0; i--) for (let j = degree - i; j >= 0; j--) list.push([i, j, degree - i - j]);
  return list;
});

const numberOf = (e: Exponents): number => ALL.findIndex((a) => a[0] === e[0] && a[1] === e[1] && a[2] === e[2]);

/** Monomial q is monomial PARENT[q] times coordinate FACTOR[q]. */
const FACTOR = Int32Array.from(ALL, (e) => (e[0] > 0 ? 0 : e[1] > 0 ? 1 : 2));
const PARENT = Int32Array.from(ALL, (e, q) =>
  q === 0 ? 0 : numberOf(e.map((x, d) => (d === FACTOR[q] ? x - 1 : x)) as unknown as Exponents),
);
/** Number of the monomial p_a p_b, at [10 a + b]. */
const PRODUCT = Int32Array.from({ length: 100 }, (_, n) => {
  const a = BASIS[Math.floor(n / 10)]!;
  const b = BASIS[n % 10]!;
  return numberOf([a[0] + b[0], a[1] + b[1], a[2] + b[2]]);
});

/** Values of all monomials of twice the basis' degree at (x, y, z). */
export function monomialValues(out: Float64Array, basis: 4 | 10, x: number, y: number, z: number): void {
  out[0] = 1;
  const count = MONOMIALS[basis];
  for (let q = 1; q < count; q++) {
    const factor = FACTOR[q];
    out[q] = out[PARENT[q]!]! * (factor === 0 ? x : factor === 1 ? y : z);
  }
}

/** T with p_j = T p_i, [basis][basis]: the polynomials of part j in those of part i. */
export function shiftMatrix(out: Float64Array, parts: Parts, i: number, j: number): void {
  const { basis, centres, scales } = parts;
  const s = scales[i]! / scales[j]!;
  const t = [0, 1, 2].map((d) => (centres[3 * i + d]! - centres[3 * j + d]!) / scales[j]!);
  out.fill(0);
  for (let b = 0; b < basis; b++) {
    // Expand Π_d (s ξ_d + t_d)^e_d, e_d ≤ 2, term by term.
    const [ex, ey, ez] = BASIS[b]!;
    for (let i0 = 0; i0 <= ex; i0++) {
      for (let i1 = 0; i1 <= ey; i1++) {
        for (let i2 = 0; i2 <= ez; i2++) {
          const c = BASIS.findIndex((e) => e[0] === i0 && e[1] === i1 && e[2] === i2);
          out[b * basis + c] = term(ex, i0, s, t[0]!) * term(ey, i1, s, t[1]!) * term(ez, i2, s, t[2]!);
        }
      }
    }
  }
}

/** Coefficient of ξᵏ in (s ξ + t)ⁿ for n ≤ 2. */
function term(n: number, k: number, s: number, t: number): number {
  const binomial = n === 2 && k === 1 ? 2 : 1;
  return binomial * s ** k * t ** (n - k);
}

/** out[o …] = Σ_c ∫ p_a p_c · T_bc: the block of a pair from its moments. */
export function momentBlock(
  out: Float64Array,
  o: number,
  basis: 4 | 10,
  moments: Float64Array,
  m: number,
  shift: Float64Array,
): void {
  for (let a = 0; a < basis; a++) {
    for (let b = 0; b < basis; b++) {
      let sum = 0;
      for (let c = 0; c < basis; c++) sum += moments[m + PRODUCT[10 * a + c]!]! * shift[b * basis + c]!;
      out[o + a * basis + b] = sum;
    }
  }
}
