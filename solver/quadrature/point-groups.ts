import type { Cell } from './cells';
import type { QuadraturePoints } from './prepared';

interface Group {
  active: Int32Array;
  cells: Cell[];
}

/** A group with fewer cells than this looks for another to join. */
const SMALL = 8;
/** What a group costs of its own, in cells: clearing its products and adding them to the system. */
const OVERHEAD = 1.5;

/**
 * Cells as quadrature points grouped by active set. Small groups join the group with which they make least
 * work, padded with zeros, where that is less work than staying apart. Order: by body,
 * then by first appearance. Also tells each point's dominant part.
 */
export function groupPoints(cells: readonly Cell[], basis: 4 | 10): { points: QuadraturePoints; dominant: Int32Array } {
  const groups = mergeSmall(collect(cells));
  const count = 4 * cells.length;
  const start = new Int32Array(groups.length + 1);
  const activeStart = new Int32Array(groups.length + 1);
  const gradientStart = new Int32Array(groups.length + 1);
  groups.forEach((g, n) => {
    start[n + 1] = start[n]! + 4 * g.cells.length;
    activeStart[n + 1] = activeStart[n]! + g.active.length;
    gradientStart[n + 1] = gradientStart[n]! + 12 * g.cells.length * g.active.length * basis;
  });
  const points: QuadraturePoints = {
    count,
    groupCount: groups.length,
    start,
    activeStart,
    activeParts: new Int32Array(activeStart[groups.length]!),
    gradientStart,
    gradients: new Float64Array(gradientStart[groups.length]!),
    positions: new Float64Array(3 * count),
    volumes: new Float64Array(count),
    body: new Int32Array(count),
  };
  const dominant = new Int32Array(count);
  groups.forEach((g, n) => {
    points.activeParts.set(g.active, activeStart[n]!);
    const width = g.active.length * basis;
    g.cells.forEach((cell, c) => {
      const first = start[n]! + 4 * c;
      points.positions.set(cell.positions, 3 * first);
      const narrow = cell.active.length * basis;
      const places = Array.from(cell.active, (i) => g.active.indexOf(i) * basis);
      for (let k = 0; k < 4; k++) {
        points.volumes[first + k] = cell.volume / 4;
        points.body[first + k] = cell.body;
        dominant[first + k] = cell.part;
        for (let d = 0; d < 3; d++) {
          const from = (3 * k + d) * narrow;
          const to = gradientStart[n]! + (3 * (4 * c + k) + d) * width;
          places.forEach((place, m) => {
            points.gradients.set(cell.gradients.subarray(from + m * basis, from + (m + 1) * basis), to + place);
          });
        }
      }
    });
  });
  return { points, dominant };
}

function collect(cells: readonly Cell[]): Group[] {
  const groups = new Map<string, Group>();
  for (const cell of cells) {
    const key = cell.active.join(',');
    const group = groups.get(key);
    if (group) group.cells.push(cell);
    else groups.set(key, { active: cell.active, cells: [cell] });
  }
  return [...groups.values()];
}

function mergeSmall(groups: Group[]): Group[] {
  const order = groups
    .map((group, n) => ({ group, n }))
    .sort((a, b) => a.group.active.length - b.group.active.length || a.n - b.n);
  const alive = order.map((o) => o.group);
  for (let s = 0; s < alive.length; s++) {
    const small = alive[s]!;
    if (small.cells.length >= SMALL) continue;
    let best = -1;
    let bestCost = Infinity;
    for (let t = 0; t < alive.length; t++) {
      if (t === s || alive[t]!.cells.length === 0 || alive[t]!.cells[0]!.body !== small.cells[0]!.body) continue;
      const other = alive[t]!;
      const union = unionSize(small.active, other.active);
      // Work goes with the square of the active set.
      const work = union * union * (small.cells.length + other.cells.length + OVERHEAD);
      const before =
        small.active.length ** 2 * (small.cells.length + OVERHEAD) +
        other.active.length ** 2 * (other.cells.length + OVERHEAD);
      const cost = work - before;
      if (cost >= 0) continue;
      if (cost < bestCost) {
        bestCost = cost;
        best = t;
      }
    }
    if (best < 0) continue;
    const target = alive[best]!;
    target.active = Int32Array.from(new Set([...target.active, ...small.active])).sort();
    target.cells.push(...small.cells);
    small.cells = [];
  }
  const rank = new Map(groups.map((g, n) => [g, n]));
  return alive
    .filter((g) => g.cells.length > 0)
    .sort((a, b) => a.cells[0]!.body - b.cells[0]!.body || rank.get(a)! - rank.get(b)!);
}

function unionSize(a: Int32Array, b: Int32Array): number {
  let i = 0;
  let j = 0;
  let n = 0;
  while (i < a.length && j < b.length) {
    if (a[i] === b[j]) {
      i++;
      j++;
    } else if (a[i]! < b[j]!) i++;
    else j++;
    n++;
  }
  return n + (a.length - i) + (b.length - j);
}
