import type { BlockPattern } from '../linear/block-pattern';
import type { BlockPairs } from '../quadrature/prepared';

/** K += factor · A on the three diagonal components. */
export function addForm(K: Float64Array, pattern: BlockPattern, form: BlockPairs, basis: number, factor: number): void {
  const { position, blockAt, partCount, size } = pattern;
  const { rows, columns, values } = form;
  for (let p = 0; p < rows.length; p++) {
    const row = position[rows[p]!]!;
    const column = position[columns[p]!]!;
    const turned = row < column;
    const at = blockAt[turned ? column * partCount + row : row * partCount + column]! * size * size;
    for (let i = 0; i < 3; i++) {
      for (let a = 0; a < basis; a++) {
        for (let b = 0; b < basis; b++) {
          const value = factor * values[(p * basis + a) * basis + b]!;
          const to = turned ? (i * basis + b) * size + i * basis + a : (i * basis + a) * size + i * basis + b;
          K[at + to]! += value;
        }
      }
    }
  }
}

/** K += factor · diag(d), d one number an unknown. */
export function addDiagonal(K: Float64Array, pattern: BlockPattern, d: Float64Array, factor: number): void {
  const { partCount, partAt, blockAt, size } = pattern;
  for (let position = 0; position < partCount; position++) {
    const at = blockAt[position * partCount + position]! * size * size;
    const from = partAt[position]! * size;
    for (let u = 0; u < size; u++) K[at + u * size + u]! += factor * d[from + u]!;
  }
}
