import type { Kernels } from '../../kernels/kernels';
import { cantilever } from '../cantilever/scene';
import { compare, meanGauge, simulateCase } from '../published-case';
import { bodyOf, type ProofResult } from './proof-result';

const PARTS = 24;
/** Hz, converged quadratic hexahedra 24 × 3 × 3; Euler–Bernoulli says 0.510835, Timoshenko 0.506874. */
const FREQUENCY = 0.50933;
const STEPS_PER_SECOND = 60;
const SECONDS = 4;

/** A bar bent by a small weight and let go swings as a cosine of its first frequency. */
export function vibration(kernels: Kernels, onProgress: (share: number) => void): ProofResult {
  const bent = cantilever({ poissonsRatio: 0.3, parts: PARTS, load: 'weight' });
  const simulation = simulateCase(bent, kernels);
  const rest = simulation.coefficients.slice();
  simulation.solveStatic(1);
  const body = bodyOf(simulation, rest, 100);
  simulation.update({
    ...bent,
    loads: [],
    time: {
      kind: 'motion',
      framesPerSecond: STEPS_PER_SECOND,
      frames: SECONDS * STEPS_PER_SECOND,
      substeps: 1,
      method: 'hht',
    },
  });
  const heights = [meanGauge(simulation)[2]];
  for (let step = 1; step <= SECONDS * STEPS_PER_SECOND; step++) {
    simulation.step({ exact: true });
    heights.push(meanGauge(simulation)[2]);
    onProgress(step / (SECONDS * STEPS_PER_SECOND));
  }
  const crossings = heights.flatMap((z, k) => {
    const before = heights[k - 1];
    return before !== undefined && before < 0 !== z < 0 ? [(k - 1 + before / (before - z)) / STEPS_PER_SECOND] : [];
  });
  const frequency = (crossings.length - 1) / (2 * (crossings.at(-1)! - crossings[0]!));
  const start = heights[0]!;
  return {
    rows: [
      compare({
        what: 'first bending frequency',
        source: 'converged quadratic hexahedra 24 × 3 × 3',
        unit: 'Hz',
        parts: PARTS,
        expected: FREQUENCY,
        ours: frequency,
        bar: 0.01,
      }),
      compare({
        what: 'the same, against beam theory',
        source: 'Euler and Bernoulli; R. D. Blevins (1979), table 8-1',
        unit: 'Hz',
        parts: PARTS,
        expected: 0.510835,
        ours: frequency,
        bar: 0.01,
      }),
    ],
    plot: {
      x: 'time, s',
      y: 'tip, mm',
      curves: [
        {
          name: 'textbook',
          kind: 'textbook',
          points: heights.map((_, k) => {
            const t = k / STEPS_PER_SECOND;
            return [t, 1000 * start * Math.cos(2 * Math.PI * FREQUENCY * t)] as const;
          }),
        },
        {
          name: 'here',
          kind: 'here',
          points: heights.flatMap((z, k) => (k % 8 === 0 ? [[k / STEPS_PER_SECOND, 1000 * z] as const] : [])),
        },
      ],
    },
    body,
    estimate: null,
  };
}
