import { CholeskyDecomposition, EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { factorSymmetric, solveFactored } from '../../../solver/math/dense';
import { seededRandom } from '../../../solver/math/random';
import { symmetricEigen } from '../../../solver/math/symmetric-eigen';

// Our small dense algebra against a general-purpose library, on symmetric positive matrices with eigenvalues over four
// decades.

function positive(n: number, seed: number): Matrix {
  const random = seededRandom(seed);
  const mixed = Matrix.zeros(n, n);
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) mixed.set(i, j, (random() - 0.5) * 10 ** ((-2 * j) / n));
  return mixed.mmul(mixed.transpose()).add(Matrix.eye(n).mul(1e-4));
}

const flat = (m: Matrix) => Float64Array.from(m.to1DArray());

it.each([3, 12, 40])('factor and solution of %s equations', (n) => {
  const a = positive(n, n);
  const right = Matrix.columnVector(Array.from({ length: n }, (_, k) => Math.cos(k)));
  const l = flat(a);
  factorSymmetric(l, n);
  const theirs = new CholeskyDecomposition(a).lowerTriangularMatrix;
  for (let i = 0; i < n; i++)
    for (let j = 0; j <= i; j++) expect(Math.abs(l[i * n + j]! - theirs.get(i, j))).toBeLessThan(1e-11);
  const x = flat(right);
  solveFactored(l, n, x);
  const residual = a.mmul(Matrix.columnVector([...x])).sub(right);
  expect(residual.norm('frobenius')).toBeLessThan(1e-9);
});

it.each([3, 12, 40])('eigenvalues and eigenvectors, %s of them', (n) => {
  const a = positive(n, 100 + n);
  const { values, vectors } = symmetricEigen(flat(a), n);
  const theirs = [...new EigenvalueDecomposition(a, { assumeSymmetric: true }).realEigenvalues].sort((p, q) => p - q);
  const largest = theirs.at(-1)!;
  values.forEach((value, k) => expect(Math.abs(value - theirs[k]!)).toBeLessThan(1e-13 * largest));
  const v = new Matrix(vectors.map((column) => [...column])).transpose();
  // Orthonormal, and A V = V Λ.
  expect(v.transpose().mmul(v).sub(Matrix.eye(n)).norm('frobenius')).toBeLessThan(1e-12);
  expect(
    a
      .mmul(v)
      .sub(v.mmul(Matrix.diag([...values])))
      .norm('frobenius'),
  ).toBeLessThan(1e-12 * largest);
});
