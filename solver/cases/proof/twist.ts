import type { Kernels } from '../../kernels/kernels';
import { compare, simulateCase, type CaseRow } from '../published-case';
import { TORQUE, TORSION_SOURCE, torsionScene } from '../torsion/case';
import { bodyOf, type ProofCurve, type ProofResult } from './proof-result';

const DEGREES = [1, 2, 3, 4, 5];
/** A square needs several parts across to warp; a round bar does not warp. */
const PARTS = { square: 40, round: 24 };

/** Square and round bars turned at one end, both ends free to warp. */
export function twist(kernels: Kernels, onProgress: (share: number) => void): ProofResult {
  const rows: CaseRow[] = [];
  const curves: ProofCurve[] = [];
  let body: ProofResult['body'] | null = null;
  for (const section of ['square', 'round'] as const) {
    const parts = PARTS[section];
    const simulation = simulateCase(torsionScene(section, 0, parts), kernels);
    const rest = simulation.coefficients.slice();
    const torques = DEGREES.map((degrees, k) => {
      simulation.update(torsionScene(section, degrees, parts));
      simulation.solveStatic(1);
      onProgress(((section === 'round' ? DEGREES.length : 0) + k + 1) / (2 * DEGREES.length));
      return simulation.readouts().supports[1]!.moment[0];
    });
    const perDegree = TORQUE[section] / 10;
    curves.push(
      { name: section, kind: 'textbook', points: [0, ...DEGREES].map((d) => [d, d * perDegree] as const) },
      { name: `here, ${section}`, kind: 'here', points: DEGREES.map((d, k) => [d, torques[k]!] as const) },
    );
    rows.push(
      compare({
        what: `torque of a ${section} bar for 1° over 1 m`,
        source: TORSION_SOURCE,
        unit: 'N m',
        parts,
        expected: perDegree,
        ours: torques[0]!,
        bar: 0.01,
      }),
    );
    body ??= bodyOf(simulation, rest, 6);
  }
  return { rows, plot: { x: 'turned by, degrees', y: 'torque, N m', curves }, body: body!, estimate: null };
}
