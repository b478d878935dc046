import type { Patch } from '../geometry/patch';
import { nearestOnEdge, patchEdges, type PatchEdges } from './patch-edges';

/** Patches of one material that hang together by their edges. */
export interface Components {
  count: number;
  /** patch: its component, numbered by first patch */
  of: Int32Array;
  /** component: 1 when no edge of it is free */
  closed: Uint8Array;
}

/** Two edges are one when they keep within this share of their length (chords of coarse polylines included). */
const JOINED = 3e-3;
/** A free edge looks for a free partner within this share of its length. */
const REACH = 0.25;
/** … and does not take a partner much farther than the nearest. */
const NEAREST = 1.5;
/** Least cosine between a gap and the surfaces it is to bridge. */
const FLUSH = 0.3;
/** Places of an edge that are looked at. */
const LOOKS = 17;

/**
 * Joins patches whose edges coincide, then lets edges that stayed free find the nearest other free
 * edge within a quarter of their length: a box of six loose faces is one piece, while a closed body
 * a hair above a closed plate stays apart, because closed bodies have no free edges.
 */
export function connectPatches(patches: readonly Patch[], material: Int32Array, diagonal: number): Components {
  const edges = patchEdges(patches, diagonal);
  const boxes = edgeBoxes(edges);
  const edgeCount = 4 * patches.length;
  const parent = Int32Array.from(patches, (_, k) => k);
  const free = new Uint8Array(edgeCount);

  for (let e = 0; e < edgeCount; e++) {
    if (edges.lengths[e] === 0) continue;
    const tolerance = Math.max(JOINED * edges.lengths[e]!, 1e-6 * diagonal);
    const near = edgesNear(edges, boxes, e, tolerance, material, null);
    const share = coverage(edges, e, near, tolerance, (other, hits) => {
      if (hits >= 0.2) join(parent, e >> 2, other >> 2);
    });
    if (share < 0.8) free[e] = 1;
  }
  const closedEdge = free.slice();
  for (let e = 0; e < edgeCount; e++) {
    if (free[e] === 0) continue;
    const reach = REACH * edges.lengths[e]!;
    const near = edgesNear(edges, boxes, e, reach, material, free);
    joinNearest(edges, e, near, reach, parent);
  }

  const of = new Int32Array(patches.length);
  const number = new Map<number, number>();
  for (let k = 0; k < patches.length; k++) {
    const root = find(parent, k);
    if (!number.has(root)) number.set(root, number.size);
    of[k] = number.get(root)!;
  }
  const closed = new Uint8Array(number.size).fill(1);
  for (let e = 0; e < edgeCount; e++) if (closedEdge[e] === 1) closed[of[e >> 2]!] = 0;
  return { count: number.size, of, closed };
}

/** Share of the edge's points within `tolerance` of any of the others; tells each other's own share. */
function coverage(
  edges: PatchEdges,
  edge: number,
  others: readonly number[],
  tolerance: number,
  tell: (other: number, share: number) => void,
): number {
  const from = edges.start[edge]!;
  const steps = edges.start[edge + 1]! - from - 1;
  const covered = new Uint8Array(LOOKS);
  for (const other of others) {
    let hits = 0;
    for (let i = 0; i < LOOKS; i++) {
      const o = 3 * (from + Math.round((i * steps) / (LOOKS - 1)));
      if (
        nearestOnEdge(nearest, edges, other, edges.points[o]!, edges.points[o + 1]!, edges.points[o + 2]!) <= tolerance
      ) {
        covered[i] = 1;
        hits++;
      }
    }
    tell(other, hits / LOOKS);
  }
  let total = 0;
  for (let i = 0; i < LOOKS; i++) total += covered[i]!;
  return total / LOOKS;
}

function joinNearest(
  edges: PatchEdges,
  edge: number,
  others: readonly number[],
  reach: number,
  parent: Int32Array,
): void {
  const distances = others.map((other) => gapBetween(edges, edge, other, reach));
  const least = Math.min(reach, ...distances);
  others.forEach((other, n) => {
    if (distances[n]! <= reach && distances[n]! <= NEAREST * least) join(parent, edge >> 2, other >> 2);
  });
}

/**
 * Mean distance between two free edges, Infinity when one is no continuation of the other: the gap
 * must run along one of the surfaces (or its extension), so that sheets stacked above one another stay apart.
 */
function gapBetween(edges: PatchEdges, edge: number, other: number, reach: number): number {
  const { points, outward, start } = edges;
  const from = start[edge]!;
  const steps = start[edge + 1]! - from - 1;
  let sum = 0;
  let along = 0;
  for (let i = 0; i < LOOKS; i++) {
    const o = 3 * (from + Math.round((i * steps) / (LOOKS - 1)));
    const distance = nearestOnEdge(nearest, edges, other, points[o]!, points[o + 1]!, points[o + 2]!);
    sum += Math.min(4 * reach, distance);
    const q = 3 * nearest[3]!;
    let mine = 0;
    let its = 0;
    for (let d = 0; d < 3; d++) {
      const gap = nearest[d]! - points[o + d]!;
      mine += gap * outward[o + d]!;
      its += gap * outward[q + d]!;
    }
    if (Math.abs(mine) >= FLUSH * distance || Math.abs(its) >= FLUSH * distance) along++;
  }
  return along >= 0.5 * LOOKS ? sum / LOOKS : Infinity;
}

const nearest = new Float64Array(4);

/** Boxes of all edges, [edge][6]: min, max. */
function edgeBoxes(edges: PatchEdges): Float64Array {
  const count = edges.lengths.length;
  const boxes = new Float64Array(6 * count);
  for (let e = 0; e < count; e++) {
    boxes.fill(Infinity, 6 * e, 6 * e + 3);
    boxes.fill(-Infinity, 6 * e + 3, 6 * e + 6);
    for (let i = edges.start[e]!; i < edges.start[e + 1]!; i++) {
      for (let d = 0; d < 3; d++) {
        const x = edges.points[3 * i + d]!;
        boxes[6 * e + d] = Math.min(boxes[6 * e + d]!, x);
        boxes[6 * e + 3 + d] = Math.max(boxes[6 * e + 3 + d]!, x);
      }
    }
  }
  return boxes;
}

/** Other edges of the same material whose boxes come within `reach`; only allowed ones when a mask is given. */
function edgesNear(
  edges: PatchEdges,
  boxes: Float64Array,
  edge: number,
  reach: number,
  material: Int32Array,
  allowed: Uint8Array | null,
): number[] {
  const near: number[] = [];
  for (let other = 0; other < edges.lengths.length; other++) {
    if (other === edge || edges.lengths[other] === 0) continue;
    if (allowed !== null && (allowed[other] === 0 || other >> 2 === edge >> 2)) continue;
    if (material[other >> 2] !== material[edge >> 2]) continue;
    let apart = false;
    for (let d = 0; d < 3; d++) {
      if (
        boxes[6 * other + d]! > boxes[6 * edge + 3 + d]! + reach ||
        boxes[6 * other + 3 + d]! < boxes[6 * edge + d]! - reach
      )
        apart = true;
    }
    if (!apart) near.push(other);
  }
  return near;
}

export function find(parent: Int32Array, k: number): number {
  while (parent[k] !== k) {
    parent[k] = parent[parent[k]!]!;
    k = parent[k]!;
  }
  return k;
}

/** Joins two sets; the smaller number stays the root, so the result does not depend on the order of joins. */
export function join(parent: Int32Array, a: number, b: number): void {
  const ra = find(parent, a);
  const rb = find(parent, b);
  if (ra < rb) parent[rb] = ra;
  else parent[ra] = rb;
}
