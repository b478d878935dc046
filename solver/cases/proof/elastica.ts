import type { Kernels } from '../../kernels/kernels';
import { ELASTICA, ELASTICA_SOURCE, ElasticaBar } from '../elastica/case';
import { compare, type CaseRow } from '../published-case';
import { bodyOf, type ProofResult } from './proof-result';

const PARTS = 24;

/** A slender bar bent by a dead tip load until it hangs. */
export function elasticaCheck(kernels: Kernels, onProgress: (share: number) => void): ProofResult {
  const bar = new ElasticaBar(PARTS, kernels);
  const rest = bar.simulation.coefficients.slice();
  const rows: CaseRow[] = [];
  const tips = ELASTICA.map(([load, expectedW, expectedU], k) => {
    const { w, u } = bar.bend(load);
    onProgress((k + 1) / ELASTICA.length);
    const common = { source: ELASTICA_SOURCE, unit: 'of the length', parts: PARTS };
    rows.push(
      compare({ ...common, what: `down, PL²/EI = ${load}`, expected: expectedW, ours: w, bar: 0.01 }),
      compare({ ...common, what: `shortened, PL²/EI = ${load}`, expected: expectedU, ours: u, bar: 0.02 }),
    );
    return { load, w, u };
  });
  // The largest load first: it is what the sheet tells.
  rows.reverse();
  rows.sort((a, b) => Number(b.what.startsWith('down')) - Number(a.what.startsWith('down')));
  return {
    rows,
    plot: {
      x: 'load PL²/EI',
      y: 'of the length',
      curves: [
        { name: 'down', kind: 'textbook', points: [[0, 0], ...ELASTICA.map(([load, w]) => [load, w] as const)] },
        { name: 'here', kind: 'here', points: tips.map(({ load, w }) => [load, w] as const) },
        { name: 'shortened', kind: 'textbook', points: [[0, 0], ...ELASTICA.map(([load, , u]) => [load, u] as const)] },
        { name: 'here, shortened', kind: 'here', points: tips.map(({ load, u }) => [load, u] as const) },
      ],
    },
    body: bodyOf(bar.simulation, rest, 1),
    estimate: null,
  };
}
