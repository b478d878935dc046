import type { Kernels } from '../../kernels/kernels';
import { box, caseScene, compare, meanGauge, sectionGauges, simulateCase, symmetry, type CaseRow, type PublishedCase } from '../published-case'; // prettier-ignore

const LINEAR = 'S. P. Timoshenko and J. N. Goodier, Theory of Elasticity, 3rd ed. (1970), sec. 97';
const LARGE = 'closed form μ(λ − 1/λ²) = ρg(L − X), incompressible neo-Hookean';

/** A quarter of a bar of 0.2 × 0.2 m that hangs along x from x = 0, free to contract. */
function elongation(
  gravity: number,
  youngsModulus: number,
  poissonsRatio: number,
  parts: number,
  kernels: Kernels,
): number {
  const scene = (g: number) =>
    caseScene({
      parts,
      material: { youngsModulus, poissonsRatio },
      geometry: box([0, 0, 0], [1, 0.1, 0.1]),
      supports: symmetry('x', 'y', 'z'),
      loads: [{ id: 'L1', name: 'Weight', kind: 'gravity', acceleration: [g, 0, 0] }],
      gauges: sectionGauges(1, 0.1, 0.1),
    });
  const simulation = simulateCase(scene(0), kernels);
  for (const share of [0.25, 0.5, 0.75, 1]) {
    simulation.update(scene(share * gravity));
    simulation.solveStatic(1);
  }
  return meanGauge(simulation)[0];
}

function rows(kernels: Kernels): CaseRow[] {
  const parts = 10;
  const small = [0, 0.3, 0.45].map((nu) =>
    compare({
      what: `elongation of a hanging bar, small, ν = ${nu}`,
      source: LINEAR,
      unit: 'm',
      parts,
      expected: 4.905e-5,
      ours: elongation(0.0981, 1e6, nu, parts, kernels),
      bar: 0.005,
    }),
  );
  const large = [
    ['E = 1 MPa, ν = 0.49, hanging', 9.81, 1e6, 0.004937236],
    ['E = 1 MPa, ν = 0.49, standing', -9.81, 1e6, -0.004873079],
    ['E = 0.1 MPa, ν = 0.49, hanging', 9.81, 1e5, 0.052414109],
    ['E = 0.1 MPa, ν = 0.49, standing', -9.81, 1e5, -0.045998565],
  ] as const;
  return [
    ...small,
    ...large.map(([name, g, E, expected]) =>
      compare({
        what: `elongation under full weight, ${name}`,
        source: LARGE,
        unit: 'm',
        parts,
        expected,
        ours: elongation(g, E, 0.49, parts, kernels),
        bar: 0.005,
      }),
    ),
  ];
}

export const hangingBar: PublishedCase = { id: 'hanging-bar', converges: false, rows };
