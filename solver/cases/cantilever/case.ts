import type { Kernels } from '../../kernels/kernels';
import { compare, meanGauge, simulateCase, type CaseRow, type PublishedCase } from '../published-case';
import { cantilever, END_LOAD, type CantileverOptions } from './scene';

export const BEAM = 'S. Timoshenko, Strength of Materials I, 3rd ed. (1955), ch. 5';
export const SOLID = 'converged quadratic hexahedra 24 × 3 × 3';

/** Name, options, source, expected (m; end loads per newton) and bars at 6, 10 and 24 parts. */
const CASES: readonly [string, Omit<CantileverOptions, 'parts'>, string, number, readonly [number, number, number]][] =
  [
    ['end load 1 N, ν = 0, with shear', { poissonsRatio: 0, load: 'end' }, `${BEAM}; G. R. Cowper 1966`, 0.04024, [0.005, 0.005, 0.005]], // prettier-ignore
    ['end load 1 N, ν = 0, Euler–Bernoulli', { poissonsRatio: 0, load: 'end' }, BEAM, 0.04, [0.01, 0.01, 0.01]],
    ['end load 1 N, ν = 0.3', { poissonsRatio: 0.3, load: 'end' }, SOLID, 0.0400119, [0.03, 0.02, 0.005]],
    ['end load 1 N, ν = 0.45', { poissonsRatio: 0.45, load: 'end' }, SOLID, 0.0395966, [0.03, 0.02, 0.01]],
    ['own weight, g = 0.00981 m/s², ν = 0', { poissonsRatio: 0, load: 'weight' }, BEAM, 0.0014715, [0.02, 0.02, 0.01]],
    ['own weight, g = 0.00981 m/s², ν = 0.3', { poissonsRatio: 0.3, load: 'weight' }, SOLID, 0.001472304, [0.03, 0.02, 0.005]], // prettier-ignore
  ];

function rows(kernels: Kernels): CaseRow[] {
  return CASES.flatMap(([name, options, source, expected, bars]) =>
    [6, 10, 24].map((parts, k) => {
      const simulation = simulateCase(cantilever({ ...options, parts }), kernels);
      simulation.solveStatic(1);
      const load = options.load === 'end' ? END_LOAD : 1;
      const ours = -meanGauge(simulation)[2] / load;
      return compare({ what: `tip of a held bar, ${name}`, source, unit: 'm', parts, expected, ours, bar: bars[k]! });
    }),
  );
}

export const cantileverCase: PublishedCase = { id: 'cantilever', converges: false, rows };
