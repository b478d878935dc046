import { eliminate, PartGraph, type BlockPattern } from '../../../solver/linear/block-pattern';
import { seededRandom } from '../../../solver/math/random';
import type { QuadraturePoints } from '../../../solver/quadrature/prepared';

/** Random points in groups of unlike sizes over random sets of parts, with the pattern that fits them. */
export function randomSystem(
  seed: number,
  basis: 4 | 10,
  partCount: number,
  groups: readonly { active: number; points: number }[],
): { points: QuadraturePoints; pattern: BlockPattern; unknowns: number; random: () => number } {
  const uniform = seededRandom(seed);
  const random = () => 2 * uniform() - 1;
  const start = [0];
  const activeStart = [0];
  const activeParts: number[] = [];
  const gradientStart: number[] = [];
  let length = 0;
  const graph = new PartGraph(partCount);
  // A chain through all parts, so that the factor has fill.
  for (let part = 1; part < partCount; part++) graph.join([part - 1, part]);
  for (const { active, points } of groups) {
    const chosen = Array.from({ length: partCount }, (_, part) => ({ part, key: uniform() }))
      .sort((a, b) => a.key - b.key)
      .slice(0, active)
      .map(({ part }) => part)
      .sort((a, b) => a - b);
    graph.join(chosen);
    activeParts.push(...chosen);
    activeStart.push(activeParts.length);
    start.push(start.at(-1)! + points);
    gradientStart.push(length);
    length += 3 * points * active * basis;
  }
  const count = start.at(-1)!;
  return {
    points: {
      count,
      groupCount: groups.length,
      start: Int32Array.from(start),
      activeStart: Int32Array.from(activeStart),
      activeParts: Int32Array.from(activeParts),
      gradientStart: Int32Array.from(gradientStart),
      gradients: Float64Array.from({ length }, random),
      positions: new Float64Array(3 * count),
      volumes: new Float64Array(count).fill(1),
      body: new Int32Array(count),
    },
    pattern: eliminate(graph, 3 * basis),
    unknowns: partCount * 3 * basis,
    random,
  };
}

/** The whole symmetric matrix behind blocks of which only the lower triangle counts, in part order. */
export function fullMatrix(K: Float64Array, pattern: BlockPattern): Float64Array[] {
  const { partCount, size, columnStart, rows, partAt } = pattern;
  const full = Array.from({ length: partCount * size }, () => new Float64Array(partCount * size));
  for (let column = 0; column < partCount; column++) {
    for (let e = columnStart[column]!; e < columnStart[column + 1]!; e++) {
      const r0 = partAt[rows[e]!]! * size;
      const c0 = partAt[column]! * size;
      for (let i = 0; i < size; i++) {
        const last = rows[e] === column ? i : size - 1;
        for (let j = 0; j <= last; j++) {
          full[r0 + i]![c0 + j] = K[(e * size + i) * size + j]!;
          full[c0 + j]![r0 + i] = K[(e * size + i) * size + j]!;
        }
      }
    }
  }
  return full;
}

/** max |a − b| over max |b|. */
export function difference(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let worst = 0;
  let largest = 0;
  for (let k = 0; k < b.length; k++) {
    worst = Math.max(worst, Math.abs(a[k]! - b[k]!));
    largest = Math.max(largest, Math.abs(b[k]!));
  }
  return a.length === b.length && Number.isFinite(worst) ? worst / largest : Infinity;
}
