import { PatchEvaluator, patchDomain } from '../geometry/evaluate-patch';
import type { Patch } from '../geometry/patch';
import { boundsOf } from '../geometry/tessellate';
import type { StepFile, StepInstance } from './step-tokenizer';
import { listOf, recordOf, refOf, tripleOf } from './step-values';

/** Share of the patch's size within which a corner of a face counts as lying on the patch's own border. */
const BORDER_REACH = 2e-3;
const BORDER_STEPS = 64;

export const faceRecord = (instance: StepInstance | undefined) =>
  recordOf(instance, 'ADVANCED_FACE') ?? recordOf(instance, 'FACE_SURFACE');

/** Whether a face shows less than its surface: a corner of its outline, or a straight edge's middle, is off the surface's border. */
export function isTrimmed(file: StepFile, face: StepInstance, patch: Patch): boolean {
  const outline = outlinePoints(file, face);
  if (outline.length === 0) return false;
  const reach = BORDER_REACH * boundsOf(patch.points).diagonal;
  const border = borderPoints(patch);
  return outline.some((p) => distanceToBorder(border, p) > reach);
}

type Point = [number, number, number];

/** Ends of all edges of a face, and the middles of the straight ones, in the face's own unit. */
function outlinePoints(file: StepFile, face: StepInstance): Point[] {
  const at = (id: number | null) => file.instances.get(id ?? -1);
  const points: Point[] = [];
  for (const bound of listOf(faceRecord(face)?.args[1])) {
    const loop = recordOf(at(refOf(at(refOf(bound))?.records[0]?.args[1])), 'EDGE_LOOP');
    for (const item of listOf(loop?.args[1])) {
      const oriented = recordOf(at(refOf(item)), 'ORIENTED_EDGE');
      const edge = recordOf(at(refOf(oriented?.args[3])), 'EDGE_CURVE');
      const ends = [edge?.args[1], edge?.args[2]].map((end) =>
        tripleOf(at(refOf(recordOf(at(refOf(end)), 'VERTEX_POINT')?.args[1])), 'CARTESIAN_POINT'),
      );
      for (const end of ends) if (end?.every(Number.isFinite)) points.push(end);
      const isLine = recordOf(at(refOf(edge?.args[3])), 'LINE') !== undefined;
      if (isLine && ends[0] && ends[1]) {
        const middle = [0, 1, 2].map((d) => (ends[0]![d]! + ends[1]![d]!) / 2) as Point;
        if (middle.every(Number.isFinite)) points.push(middle);
      }
    }
  }
  return points;
}

/** Four polylines along the patch's border, one after the other, `BORDER_STEPS` + 1 points each. */
function borderPoints(patch: Patch): Float64Array {
  const evaluator = new PatchEvaluator();
  const [u0, u1, v0, v1] = patchDomain(patch);
  const points = new Float64Array(12 * (BORDER_STEPS + 1));
  const local = new Float64Array(3);
  let at = 0;
  for (let side = 0; side < 4; side++) {
    for (let i = 0; i <= BORDER_STEPS; i++) {
      const s = i / BORDER_STEPS;
      const u = side === 0 ? u0 : side === 1 ? u1 : u0 + s * (u1 - u0);
      const v = side === 2 ? v0 : side === 3 ? v1 : v0 + s * (v1 - v0);
      evaluator.evaluate(local, patch, u, v, 0);
      points.set(local, at);
      at += 3;
    }
  }
  return points;
}

function distanceToBorder(border: Float64Array, p: Point): number {
  let best = Infinity;
  for (let k = 0; k + 3 < border.length; k += 3) {
    if ((k / 3) % (BORDER_STEPS + 1) === BORDER_STEPS) continue;
    let along = 0;
    let l2 = 0;
    for (let d = 0; d < 3; d++) {
      const e = border[k + 3 + d]! - border[k + d]!;
      l2 += e * e;
      along += e * (p[d]! - border[k + d]!);
    }
    const t = l2 > 0 ? Math.min(1, Math.max(0, along / l2)) : 0;
    let r2 = 0;
    for (let d = 0; d < 3; d++) r2 += (border[k + d]! + t * (border[k + 3 + d]! - border[k + d]!) - p[d]!) ** 2;
    best = Math.min(best, r2);
  }
  return Math.sqrt(best);
}
