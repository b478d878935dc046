/** Sets of the numbers 0 … count − 1 that only grow together (Tarjan 1975, with path halving). */
export class DisjointSets {
  private readonly parent: Int32Array;

  constructor(count: number) {
    this.parent = Int32Array.from({ length: count }, (_, k) => k);
  }

  /** The smallest number in the set of `k`. */
  first(k: number): number {
    const { parent } = this;
    while (parent[k] !== k) k = parent[k] = parent[parent[k]!]!;
    return k;
  }

  join(a: number, b: number): void {
    const [x, y] = [this.first(a), this.first(b)];
    this.parent[Math.max(x, y)] = Math.min(x, y);
  }
}
