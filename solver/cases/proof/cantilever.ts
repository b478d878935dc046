import { shapePatches } from '../../geometry/shapes';
import type { Kernels } from '../../kernels/kernels';
import { estimateConvergence } from '../../time/convergence';
import type { Simulation } from '../../time/simulation';
import { BEAM, SOLID } from '../cantilever/case';
import { cantilever, END_LOAD } from '../cantilever/scene';
import { compare, meanGauge, simulateCase, type CaseRow } from '../published-case';
import { alongEdge, bodyOf, type ProofCurve, type ProofResult } from './proof-result';

const COUNTS = [24, 10, 6];
const EI = (1e6 * 0.1 ** 4) / 12;
/** m per newton */
const beamLine = (x: number) => (x * x * (3 - x)) / (6 * EI);
const MAGNIFIED = 40;

/** A held bar under an end load with 6, 10 and 24 parts: beam theory (ν = 0) and three dimensions (ν = 0.3). */
export function cantileverCheck(kernels: Kernels, onProgress: (share: number) => void): ProofResult {
  const rows: CaseRow[] = [];
  const curves: ProofCurve[] = [
    {
      name: 'textbook',
      kind: 'textbook',
      points: Array.from({ length: 41 }, (_, k) => [k / 40, -1000 * END_LOAD * beamLine(k / 40)] as const),
    },
  ];
  let shown: { simulation: Simulation; rest: Float64Array } | null = null;
  let done = 0;
  const solve = (poissonsRatio: number, parts: number) => {
    const simulation = simulateCase(cantilever({ poissonsRatio, parts, load: 'end' }), kernels);
    const rest = simulation.coefficients.slice();
    simulation.solveStatic(1);
    onProgress((0.5 * ++done) / (2 * COUNTS.length));
    return { simulation, rest, tip: -meanGauge(simulation)[2] };
  };
  for (const parts of COUNTS) {
    const { simulation, rest, tip } = solve(0, parts);
    shown ??= { simulation, rest };
    curves.push({
      name: `here, ${parts} parts`,
      kind: 'here',
      points: thin(alongEdge(simulation, rest, 0, [0, 0]), 13).map(
        ({ place, moved }) => [place, 1000 * moved[2]] as const,
      ),
    });
    rows.push(
      compare({
        what: `tip, ${parts} parts, ν = 0, beam theory`,
        source: BEAM,
        unit: 'm',
        parts,
        expected: END_LOAD * beamLine(1),
        ours: tip,
        bar: 0.01,
      }),
    );
  }
  for (const parts of COUNTS) {
    rows.push(
      compare({
        what: `tip, ${parts} parts, ν = 0.3, in three dimensions`,
        source: SOLID,
        unit: 'm',
        parts,
        expected: END_LOAD * 0.0400119,
        ours: solve(0.3, parts).tip,
        bar: parts === 24 ? 0.01 : 0.03,
      }),
    );
  }
  const scene = cantilever({ poissonsRatio: 0.3, parts: 24, load: 'end' });
  const shapes = scene.geometry.kind === 'shapes' ? scene.geometry.shapes : [];
  return {
    rows,
    plot: { x: 'distance from the held end, m', y: 'deflection, mm', curves },
    body: bodyOf(shown!.simulation, shown!.rest, MAGNIFIED),
    estimate: estimateConvergence(scene, shapes.flatMap(shapePatches), kernels, (share) => onProgress(0.5 + share / 2)),
  };
}

/** About `count` of a list, first and last among them. */
function thin<T>(list: readonly T[], count: number): T[] {
  const step = Math.max(1, Math.round((list.length - 1) / (count - 1)));
  return list.filter((_, k) => k % step === 0 || k === list.length - 1);
}
