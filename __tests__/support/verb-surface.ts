import verb from 'verb-nurbs-web';
import type { Patch } from '../../solver/geometry/patch';

/** Derivatives [k][l] = ∂^(k+l)S/∂u^k∂v^l up to order 2 by the library verb-nurbs-web. */
export function verbDerivatives(patch: Patch, u: number, v: number): number[][][] {
  const rows = <T>(value: (k: number) => T): T[][] =>
    Array.from({ length: patch.countU }, (_, i) =>
      Array.from({ length: patch.countV }, (_, j) => value(i * patch.countV + j)),
    );
  const surface = verb.geom.NurbsSurface.byKnotsControlPointsWeights(
    patch.degreeU,
    patch.degreeV,
    Array.from(patch.knotsU),
    Array.from(patch.knotsV),
    rows((k) => Array.from(patch.points.subarray(3 * k, 3 * k + 3))),
    rows((k) => patch.weights[k]!),
  );
  return surface.derivatives(u, v, 2);
}
