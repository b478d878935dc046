import type { Kernels } from '../../kernels/kernels';
import { affineCoefficients } from '../affine-patch/affine';
import { box, caseScene, compare, simulateCase, type CaseRow } from '../published-case';
import { bodyOf, type ProofCurve, type ProofResult } from './proof-result';

const PER_SECOND = 24;
const DENSITY = 1000;
const STEPS = 12;
const STRETCH = 1e-3;
/** ω h: the period over the step, times 2π */
const PACES = [0.1, 0.5, 1];

/**
 * A free cube that stretches and springs back: what backward Euler takes from its energy is known. ½E(a − 1)² and
 * ∫ρX² dV = ρ/12 give ω² = 12 E/ρ, and every step multiplies the energy by 1/(1 + ω²h²).
 */
export function energy(kernels: Kernels, onProgress: (share: number) => void): ProofResult {
  const rows: CaseRow[] = [];
  const curves: ProofCurve[] = [];
  let body: ProofResult['body'] | null = null;
  PACES.forEach((pace, p) => {
    const scene = caseScene({
      parts: 1,
      material: { youngsModulus: ((pace * PER_SECOND) ** 2 * DENSITY) / 12, poissonsRatio: 0, density: DENSITY },
      geometry: box([0, 0, 0], [1, 1, 1]),
      time: { kind: 'motion', framesPerSecond: PER_SECOND, frames: STEPS, substeps: 1, method: 'backward-euler' },
    });
    scene.parts.order = 'linear';
    const simulation = simulateCase(scene, kernels);
    const rest = simulation.coefficients.slice();
    const stretched = affineCoefficients(
      simulation.prepared,
      [1 + STRETCH, 0, 0, 0, 1, 0, 0, 0, 1],
      [-STRETCH / 2, 0, 0],
    );
    simulation.adopt(stretched, new Float64Array(rest.length), 0);
    body ??= bodyOf(simulation, rest, 300);
    const kept = [1];
    const total = () => {
      const { kinetic, elastic } = simulation.readouts();
      return kinetic + elastic;
    };
    const start = total();
    for (let step = 1; step <= STEPS; step++) {
      simulation.step({ exact: true });
      kept.push(total() / start);
      onProgress((p + step / STEPS) / PACES.length);
    }
    const factor = 1 / (1 + pace * pace);
    curves.push(
      { name: `ωh = ${pace}`, kind: 'textbook', points: kept.map((_, k) => [k, factor ** k] as const) },
      { name: `here, ωh = ${pace}`, kind: 'here', points: kept.map((value, k) => [k, value] as const) },
    );
    rows.push(
      compare({
        what: `energy left after ${STEPS} steps, ωh = ${pace}`,
        source: 'closed form; cf. T. J. R. Hughes, The Finite Element Method (1987), ch. 9',
        unit: 'of the first',
        parts: 1,
        expected: factor ** STEPS,
        ours: kept.at(-1)!,
        bar: 0.002,
      }),
    );
  });
  return { rows, plot: { x: 'steps', y: 'energy left, of the first', curves }, body: body!, estimate: null };
}
