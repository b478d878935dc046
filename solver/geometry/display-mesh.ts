import { DisjointSets } from '../math/disjoint-sets';
import { analyseEdges, type PatchSide } from './edges';
import { PatchEvaluator } from './evaluate-patch';
import type { Patch } from './patch';
import { bendOf, cellsWithin, creases, type Tessellation, tessellateGrids } from './tessellate';

/**
 * Triangles for the screen: the finest chord whose vertices stay within `budget`, with cells no longer than about a
 * fiftieth of the diagonal so that flat faces can bend. Patches that are joined share the vertices' places along
 * their seam, so that no pinholes show. Deterministic for the same patches and budget.
 */
export function tessellateForDisplay(patches: readonly Patch[], diagonal: number, budget: number): Tessellation {
  const evaluator = new PatchEvaluator();
  const { seams, pinches } = seamsOf(patches);
  const bends = patches.map((patch) => bendOf(patch, evaluator));
  const extents = patches.map(netLengths);
  let chord = diagonal * 2e-5;
  let reach = diagonal / 48;
  for (;;) {
    const grids = bends.map((bend, k): [number, number] => {
      const [n, m] = cellsWithin(bend, { chord, maxCells: 160 });
      const [u, v] = extents[k]!;
      return [Math.max(n, Math.ceil(u / reach)), Math.max(m, Math.ceil(v / reach))];
    });
    equaliseAcrossSeams(patches, seams, grids);
    const vertices = grids.reduce((sum, [n, m]) => sum + (n + 1) * (m + 1), 0);
    if (vertices <= budget || chord > diagonal) {
      const mesh = tessellateGrids(patches, grids, evaluator);
      closeSeams(mesh, seams, pinches, grids);
      return mesh;
    }
    chord *= Math.max(1.25, (vertices / budget) * 0.8);
    reach *= 1.15;
  }
}

/** Longest row of the control net along u and along v: an upper bound of the surface's extent each way. */
function netLengths(patch: Patch): [number, number] {
  const { countU, countV, points } = patch;
  const step = (from: number, to: number) =>
    Math.hypot(
      points[3 * to]! - points[3 * from]!,
      points[3 * to + 1]! - points[3 * from + 1]!,
      points[3 * to + 2]! - points[3 * from + 2]!,
    );
  let u = 0;
  let v = 0;
  for (let j = 0; j < countV; j++) {
    let sum = 0;
    for (let i = 0; i + 1 < countU; i++) sum += step(i * countV + j, (i + 1) * countV + j);
    u = Math.max(u, sum);
  }
  for (let i = 0; i < countU; i++) {
    let sum = 0;
    for (let j = 0; j + 1 < countV; j++) sum += step(i * countV + j, i * countV + j + 1);
    v = Math.max(v, sum);
  }
  return [u, v];
}

interface Edge {
  patch: number;
  side: PatchSide;
}

/** Two whole edges that run along each other. */
interface Seam {
  a: Edge;
  b: Edge;
}

/** Seams between edges that have each other as neighbour, and edges pinched to a point. */
function seamsOf(patches: readonly Patch[]): { seams: Seam[]; pinches: Edge[] } {
  const { edges } = analyseEdges(patches);
  const seams: Seam[] = [];
  edges.forEach(({ patch, side, state, neighbour }, k) => {
    if (state !== 'joined' || !neighbour) return;
    const other = 4 * neighbour.patch + neighbour.side;
    const back = edges[other]!.neighbour;
    if (k < other && back?.patch === patch && back.side === side) seams.push({ a: { patch, side }, b: neighbour });
  });
  return { seams, pinches: edges.filter((edge) => edge.state === 'degenerate') };
}

/** Sides 0 and 1 run along v, sides 2 and 3 along u. */
const along = (side: PatchSide): 0 | 1 => (side < 2 ? 1 : 0);

/** Raises the cells of patches that meet to the largest among them, passed on through opposite sides. */
function equaliseAcrossSeams(patches: readonly Patch[], seams: readonly Seam[], grids: [number, number][]): void {
  const sets = new DisjointSets(2 * patches.length);
  for (const { a, b } of seams) sets.join(2 * a.patch + along(a.side), 2 * b.patch + along(b.side));
  const cells = new Float64Array(2 * patches.length);
  patches.forEach((patch, k) => {
    const pieces = [
      creases(patch.knotsU, patch.degreeU, patch.countU).length - 1,
      creases(patch.knotsV, patch.degreeV, patch.countV).length - 1,
    ];
    for (const d of [0, 1] as const) {
      const g = sets.first(2 * k + d);
      cells[g] = Math.max(cells[g]!, Math.ceil(grids[k]![d] / pieces[d]!) * pieces[d]!);
    }
  });
  grids.forEach((grid, k) => {
    for (const d of [0, 1] as const) grid[d] = cells[sets.first(2 * k + d)]!;
  });
}

/** Gives vertices that stand for one point of the surface the same place, bit for bit: that of the first of them. */
function closeSeams(
  mesh: Tessellation,
  seams: readonly Seam[],
  pinches: readonly Edge[],
  grids: readonly (readonly [number, number])[],
): void {
  const p = mesh.positions;
  const first = new Int32Array(grids.length);
  for (let k = 1; k < grids.length; k++) first[k] = first[k - 1]! + (grids[k - 1]![0] + 1) * (grids[k - 1]![1] + 1);
  const vertices = ({ patch, side }: Edge): number[] => {
    const [n, m] = grids[patch]!;
    const start = first[patch]! + (side === 1 ? n * (m + 1) : side === 3 ? m : 0);
    const step = side < 2 ? 1 : m + 1;
    return Array.from({ length: (side < 2 ? m : n) + 1 }, (_, i) => start + i * step);
  };
  const distance = (i: number, j: number) =>
    Math.hypot(p[3 * i]! - p[3 * j]!, p[3 * i + 1]! - p[3 * j + 1]!, p[3 * i + 2]! - p[3 * j + 2]!);
  const sets = new DisjointSets(mesh.patch.length);
  for (const edge of pinches) {
    const [tip, ...rest] = vertices(edge);
    for (const v of rest) sets.join(tip!, v);
  }
  for (const { a, b } of seams) {
    const onA = vertices(a);
    const onB = vertices(b);
    if (onA.length !== onB.length) continue;
    const last = onA.length - 1;
    const straight = distance(onA[0]!, onB[0]!) + distance(onA[last]!, onB[last]!);
    const crossed = distance(onA[0]!, onB[last]!) + distance(onA[last]!, onB[0]!);
    const middle = last >> 1;
    // A closed edge starts where it ends: ask a point beside the middle.
    const turned =
      straight === crossed
        ? distance(onA[middle]!, onB[middle]!) > distance(onA[middle]!, onB[last - middle]!)
        : straight > crossed;
    if (turned) onB.reverse();
    // Curves that run at different speeds do not pair up: moving such vertices would fold the mesh.
    let spacing = Infinity;
    for (let i = 0; i < last; i++) spacing = Math.min(spacing, distance(onA[i]!, onA[i + 1]!));
    if (onA.every((v, i) => distance(v, onB[i]!) <= spacing / 4)) onA.forEach((v, i) => sets.join(v, onB[i]!));
  }
  for (let v = 0; v < mesh.patch.length; v++) {
    const lowest = sets.first(v);
    if (lowest !== v) p.copyWithin(3 * v, 3 * lowest, 3 * lowest + 3);
  }
}
