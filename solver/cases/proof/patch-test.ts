import type { Kernels } from '../../kernels/kernels';
import { evaluateRows } from '../../quadrature/rows';
import { affineCoefficients } from '../affine-patch/affine';
import { caseScene, simulateCase } from '../published-case';
import { alongEdge, bodyOf, type ProofResult } from './proof-result';

const MAP = [1.2, 0.3, -0.1, 0.05, 0.8, 0.2, -0.15, 0.1, 1.1];
const SHIFT = [0.1, -0.2, 0.15];
const GAP = 0.01;

/** Six faces that do not meet are given an affine map: every place must be the map's. */
export function patchTest(kernels: Kernels, onProgress: (share: number) => void): ProofResult {
  const scene = caseScene({
    parts: 6,
    geometry: { kind: 'shapes', shapes: [{ kind: 'box', min: [0, 0, 0], max: [1, 1, 1], gap: GAP }] },
  });
  const simulation = simulateCase(scene, kernels);
  const rest = simulation.coefficients.slice();
  onProgress(0.6);
  simulation.adopt(affineCoefficients(simulation.prepared, MAP, SHIFT), new Float64Array(rest.length), 0);
  const { rows, positions, count } = simulation.prepared.samples;
  const x = evaluateRows(new Float64Array(3 * count), rows, simulation.coefficients);
  let worst = 0;
  for (let s = 0; s < count; s++) {
    for (let i = 0; i < 3; i++) {
      const wanted = SHIFT[i]! + [0, 1, 2].reduce((sum, d) => sum + MAP[3 * i + d]! * positions[3 * s + d]!, 0);
      worst = Math.max(worst, Math.abs(x[3 * s + i]! - wanted));
    }
  }
  const edge = alongEdge(simulation, rest, 0, [0, GAP]);
  const direction = (i: number) => (place: number) => SHIFT[i]! + MAP[3 * i]! * place + MAP[3 * i + 2]! * GAP;
  return {
    rows: [
      {
        what: 'worst place, of the body’s size',
        source: 'common practice',
        unit: '',
        parts: simulation.prepared.parts.count,
        expected: 0,
        ours: worst / simulation.prepared.report.diagonal,
        error: worst / simulation.prepared.report.diagonal,
        bar: 1e-10,
      },
    ],
    plot: {
      x: 'place along an edge at rest, m',
      y: 'place in the map, m',
      curves: [0, 2].flatMap((i) => [
        { name: `the map, ${'xyz'[i]}`, kind: 'textbook' as const, points: edge.map(({ place }) => [place, direction(i)(place)] as const) }, // prettier-ignore
        { name: `here, ${'xyz'[i]}`, kind: 'here' as const, points: edge.map(({ place, moved }) => [place, moved[i]! + (i === 0 ? place : GAP)] as const) }, // prettier-ignore
      ]),
    },
    body: bodyOf(simulation, rest, 1),
    estimate: null,
  };
}
