/**
 * Which part pairs of the system matrix can be non-zero, fill of the factor included, in an order that keeps the
 * fill small. Positions are places in the elimination order; blocks are stored for row position ≥ column position.
 */
export interface BlockPattern {
  partCount: number;
  /** Unknowns a part: 3 · basis. */
  size: number;
  /** part → position */
  position: Int32Array;
  /** position → part */
  partAt: Int32Array;
  /** Blocks of column J: columnStart[J] … columnStart[J+1]−1, the diagonal block first, rows ascending. */
  columnStart: Int32Array;
  /** row position of each block */
  rows: Int32Array;
  /** partCount × partCount: block of (row position, column position), −1 where there is none */
  blockAt: Int32Array;
  blockCount: number;
}

/** Collects which parts meet in one term of the energy. */
export class PartGraph {
  readonly neighbours: Set<number>[];

  constructor(readonly partCount: number) {
    this.neighbours = Array.from({ length: partCount }, () => new Set<number>());
  }

  /** Couples every pair of the parts list[from … to−1]. */
  join(list: ArrayLike<number>, from = 0, to = list.length): void {
    for (let i = from; i < to; i++) {
      for (let j = from; j < i; j++) {
        const a = list[i]!;
        const b = list[j]!;
        if (a === b || this.neighbours[a]!.has(b)) continue;
        this.neighbours[a]!.add(b);
        this.neighbours[b]!.add(a);
      }
    }
  }
}

/** Minimum-degree elimination (Rose 1972) of the part graph with its fill; ties go to the lower part number. */
export function eliminate(graph: PartGraph, size: number): BlockPattern {
  const n = graph.partCount;
  const live = graph.neighbours.map((set) => new Set(set));
  const done = new Uint8Array(n);
  const position = new Int32Array(n);
  const partAt = new Int32Array(n);
  const below: number[][] = [];
  for (let step = 0; step < n; step++) {
    let best = -1;
    for (let part = 0; part < n; part++) {
      if (!done[part] && (best < 0 || live[part]!.size < live[best]!.size)) best = part;
    }
    done[best] = 1;
    position[best] = step;
    partAt[step] = best;
    const rest = [...live[best]!];
    below.push(rest);
    for (const a of rest) {
      live[a]!.delete(best);
      for (const b of rest) if (a !== b) live[a]!.add(b);
    }
  }
  const columnStart = new Int32Array(n + 1);
  const rows: number[] = [];
  const blockAt = new Int32Array(n * n).fill(-1);
  for (let column = 0; column < n; column++) {
    const places = [column, ...below[column]!.map((part) => position[part]!).sort((a, b) => a - b)];
    for (const row of places) {
      blockAt[row * n + column] = rows.length;
      rows.push(row);
    }
    columnStart[column + 1] = rows.length;
  }
  return {
    partCount: n,
    size,
    position,
    partAt,
    columnStart,
    rows: Int32Array.from(rows),
    blockAt,
    blockCount: rows.length,
  };
}
