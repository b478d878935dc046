import { type Components, find, join } from './components';
import { type Scatter, scatterOnTriangles } from './rays/scatter';
import { boundsOf, type Bounds, type TriangleSoup, trianglesOf } from './rays/soup';
import { buildWindingTree, windingNumber, type WindingTree } from './rays/winding-tree';

/** A connected piece of one material before it has points: one or more components that run into each other. */
export interface Piece {
  material: number;
  patches: Int32Array;
  /** its triangles in the soup */
  triangles: Int32Array;
  bounds: Bounds;
  /** no free edges */
  closed: boolean;
  /** sum of its components' winding numbers: ≥ ½ inside any of them */
  winding: (x: number, y: number, z: number) => number;
}

/** Points of the other component that are looked at for "one runs into the other". */
const PROBES = 200;
/** Inside for certain: clear of the ½ met on a touching face. */
const WELL_INSIDE = 0.7;

/**
 * Pieces: components of one material joined where some surface point of one lies well inside the
 * other's winding field (wings pushed into a body without trimming). Ordered by material, then first patch.
 */
export function findPieces(soup: TriangleSoup, components: Components, material: Int32Array): Piece[] {
  const count = components.count;
  const lists: Int32Array[] = [];
  const boxes: Bounds[] = [];
  const trees: WindingTree[] = [];
  const probes: Scatter[] = [];
  const materialOf = new Int32Array(count);
  for (let c = 0; c < count; c++) {
    lists.push(
      trianglesOf(
        soup,
        Uint8Array.from(components.of, (of) => (of === c ? 1 : 0)),
      ),
    );
    boxes.push(boundsOf(soup, lists[c]!));
    trees.push(buildWindingTree(soup, lists[c]!));
    probes.push(scatterOnTriangles(soup, lists[c]!, lists[c]!.length === 0 ? 0 : PROBES));
    materialOf[c] = material[components.of.indexOf(c)]!;
  }
  const parent = Int32Array.from({ length: count }, (_, c) => c);
  for (let a = 0; a < count; a++) {
    for (let b = a + 1; b < count; b++) {
      if (materialOf[a] !== materialOf[b] || find(parent, a) === find(parent, b)) continue;
      if (!boxesMeet(boxes[a]!, boxes[b]!)) continue;
      if (runsInto(probes[b]!, trees[a]!, boxes[a]!) || runsInto(probes[a]!, trees[b]!, boxes[b]!)) join(parent, a, b);
    }
  }
  const roots: number[] = [];
  for (let c = 0; c < count; c++) if (find(parent, c) === c && lists[c]!.length > 0) roots.push(c);
  roots.sort((a, b) => materialOf[a]! - materialOf[b]! || a - b);
  return roots.map((root) => {
    const members = Array.from({ length: count }, (_, c) => c).filter(
      (c) => find(parent, c) === root && lists[c]!.length > 0,
    );
    const inside = Uint8Array.from(components.of, (of) => (members.includes(of) ? 1 : 0));
    const triangles = trianglesOf(soup, inside);
    const patches: number[] = [];
    components.of.forEach((of, k) => {
      if (members.includes(of)) patches.push(k);
    });
    const own = members.map((c) => trees[c]!);
    return {
      material: materialOf[root]!,
      patches: Int32Array.from(patches),
      triangles,
      bounds: boundsOf(soup, triangles),
      closed: members.every((c) => components.closed[c] === 1),
      winding: (x, y, z) => {
        let sum = 0;
        for (const tree of own) sum += windingNumber(tree, x, y, z);
        return sum;
      },
    };
  });
}

export function boxesMeet(a: Bounds, b: Bounds, reach = 0): boolean {
  for (let d = 0; d < 3; d++) {
    if (a.min[d]! > b.max[d]! + reach || b.min[d]! > a.max[d]! + reach) return false;
  }
  return true;
}

function runsInto(probes: Scatter, tree: WindingTree, box: Bounds): boolean {
  for (let k = 0; k < probes.count; k++) {
    const x = probes.positions[3 * k]!;
    const y = probes.positions[3 * k + 1]!;
    const z = probes.positions[3 * k + 2]!;
    if (x < box.min[0]! || x > box.max[0]! || y < box.min[1]! || y > box.max[1]! || z < box.min[2]! || z > box.max[2]!)
      continue;
    if (windingNumber(tree, x, y, z) > WELL_INSIDE) return true;
  }
  return false;
}
